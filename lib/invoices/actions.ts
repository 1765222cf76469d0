'use server';
import { shopAction } from '@/lib/access/action';
import { issueFinalInvoice, voidInvoice } from './commands';
import { type IssueFinalForm, issueFinalForm, voidForm, type VoidInput } from './schema';

interface Meta {
  idempotencyKey?: string;
}

const issue = shopAction({
  name: 'invoices.issueFinal',
  permission: 'invoice:edit',
  schema: issueFinalForm,
  run: issueFinalInvoice,
});
const voided = shopAction({
  name: 'invoices.voidOne',
  permission: 'payment:refund',
  schema: voidForm,
  run: voidInvoice,
});

export async function issueFinal(shopId: string, input: IssueFinalForm, meta?: Meta) {
  return issue(shopId, input, meta);
}
export async function voidOne(shopId: string, input: VoidInput, meta?: Meta) {
  return voided(shopId, input, meta);
}
