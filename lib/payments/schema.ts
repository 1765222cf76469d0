import { z } from 'zod';

export const HAND_METHODS = ['cheque', 'cash', 'transfer'] as const;

export const recordPaymentForm = z.object({
  invoiceId: z.uuid(),
  method: z.enum(HAND_METHODS),
  /** As typed, in the shop's currency; read by lib/units when it is saved. */
  amount: z.string().trim().min(1, 'Type the amount.').max(30, 'This is too long.'),
  receivedOn: z.iso.date('Type a day such as 2026-12-01.'),
  reference: z.string().trim().max(120, 'At most 120 characters.'),
});
export type RecordPaymentForm = z.input<typeof recordPaymentForm>;
export type RecordPaymentInput = z.output<typeof recordPaymentForm>;

export type PayState = 'open' | 'paid' | 'pending' | 'failed' | 'expired';
