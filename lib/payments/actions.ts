'use server';
import { shopAction } from '@/lib/access/action';
import { recordPayment as recordPaymentCommand } from './commands';
import { type RecordPaymentForm, recordPaymentForm } from './schema';

const record = shopAction({
  name: 'payments.recordPayment',
  permission: 'payment:record',
  schema: recordPaymentForm,
  run: recordPaymentCommand,
});

export async function recordPayment(
  shopId: string,
  input: RecordPaymentForm,
  meta?: { idempotencyKey?: string },
) {
  return record(shopId, input, meta);
}
