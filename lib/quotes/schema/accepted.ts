/** What follows from an acceptance is told in these terms. */
export interface Accepted {
  jobId: string;
  documentId: string;
  acceptanceId: string;
  /** Minor units; 0 where the quote asks for no deposit. */
  depositMinor: number;
  currency: string;
}
