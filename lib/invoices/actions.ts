'use server';
import { shopAction } from '@/lib/access/action';
import { issueDepositAgain, issueFinalInvoice, voidInvoice } from './commands';
import { type IssueForm, issueForm, voidForm, type VoidInput } from './schema';

interface Meta {
  idempotencyKey?: string;
}

const issue = shopAction({
  name: 'invoices.issueFinal',
  permission: 'invoice:edit',
  schema: issueForm,
  run: issueFinalInvoice,
});
const depositAgain = shopAction({
  name: 'invoices.issueDeposit',
  permission: 'invoice:edit',
  schema: issueForm,
  run: issueDepositAgain,
});
const voided = shopAction({
  name: 'invoices.voidOne',
  permission: 'payment:refund',
  schema: voidForm,
  run: voidInvoice,
});

export async function issueFinal(shopId: string, input: IssueForm, meta?: Meta) {
  return issue(shopId, input, meta);
}
export async function issueDeposit(shopId: string, input: IssueForm, meta?: Meta) {
  return depositAgain(shopId, input, meta);
}
export async function voidOne(shopId: string, input: VoidInput, meta?: Meta) {
  return voided(shopId, input, meta);
}
