/** Every kind of outbox row and who handles it. */
import { invoiceHandlers } from '@/lib/invoices/jobs';
import { paymentHandlers } from '@/lib/payments/jobs';
import { peopleHandlers } from '@/lib/people/jobs';
import type { Handler } from '@/lib/platform/queue/worker';
import { quoteHandlers } from '@/lib/quotes/jobs';

export const handlers: ReadonlyMap<string, Handler> = new Map([
  ...peopleHandlers,
  ...quoteHandlers,
  ...invoiceHandlers,
  ...paymentHandlers,
]);
