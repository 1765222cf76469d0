/** What an invoice says, and what follows from what was received for it. Money is in integer minor units. */
import { z } from 'zod';
import type { ShopSettings } from '@/lib/units/settings';

export interface InvoiceContent {
  schema: 'lampwright.invoice/1';
  purpose: 'deposit' | 'final';
  number: string;
  title: string;
  issuedOn: string;
  dueOn: string;
  shop: { name: string; licenceNumber: string; email: string; phone: string; address: string };
  customer: { name: string; contactName: string; address: string };
  site: { name: string; address: string };
  quote: { number: string; revision: number; acceptedOn: string };
  settings: Pick<ShopSettings, 'currency' | 'locale' | 'timeZone' | 'paper'>;
  rows: { text: string; amountMinor: number }[];
  taxName: string;
  taxMinor: number;
  totalMinor: number;
}

/** A balance is derived from what was asked and received; no column stores it. */
export interface InvoiceRow {
  id: string;
  jobId: string;
  number: string;
  title: string;
  purpose: 'deposit' | 'final';
  amountMinor: string;
  receivedMinor: string;
  currency: string;
  dueOn: string;
  voided: boolean;
  hasPdf: boolean;
  sha256: string;
  createdAt: Date;
}

export type InvoiceState = 'open' | 'part paid' | 'paid' | 'overdue' | 'voided';

export const balanceOf = (invoice: Pick<InvoiceRow, 'amountMinor' | 'receivedMinor' | 'voided'>): bigint =>
  invoice.voided ? 0n : BigInt(invoice.amountMinor) - BigInt(invoice.receivedMinor);

/** @param today the shop's own date, `YYYY-MM-DD` */
export function invoiceState(invoice: InvoiceRow, today: string): InvoiceState {
  if (invoice.voided) return 'voided';
  if (balanceOf(invoice) <= 0n) return 'paid';
  if (today > invoice.dueOn) return 'overdue';
  return BigInt(invoice.receivedMinor) > 0n ? 'part paid' : 'open';
}

/** An invoice that the office sends: the final one, or a deposit anew after a void. */
export const issueForm = z.object({
  jobId: z.uuid(),
  email: z.email('This is not an e-mail address.'),
  dueInDays: z.coerce
    .number<string | number>()
    .int('must be whole days')
    .min(0, 'not before today')
    .max(120, 'at most 120'),
});
export type IssueForm = z.input<typeof issueForm>;
export type IssueInput = z.output<typeof issueForm>;

export const voidForm = z.object({
  invoiceId: z.uuid(),
  reason: z.string().trim().min(3, 'Say why.').max(500, 'At most 500 characters.'),
});
export type VoidInput = z.output<typeof voidForm>;
