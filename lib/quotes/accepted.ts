/**
 * What happens when a quote has been accepted, in the acceptance's own transaction: each hook may write rows and
 * outbox messages, and must not talk to a service. A hook that throws undoes the acceptance.
 */
export interface Accepted {
  jobId: string;
  documentId: string;
  acceptanceId: string;
  /** Minor units; 0 where the quote asks for no deposit. */
  depositMinor: number;
  currency: string;
}

export type AcceptedHook = (accepted: Accepted) => Promise<void>;

export const acceptedHooks: AcceptedHook[] = [];
