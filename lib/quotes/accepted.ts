/**
 * What happens when a quote has been accepted, in the acceptance's own transaction: each hook may write rows and
 * outbox messages, and must not talk to a service. A hook that throws undoes the acceptance.
 */
import { issueDepositInvoice } from '@/lib/invoices/commands';
import type { Accepted } from './schema/accepted';

export type AcceptedHook = (accepted: Accepted) => Promise<void>;

export const acceptedHooks: AcceptedHook[] = [issueDepositInvoice];
