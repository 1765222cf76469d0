/** What is published: kinds of documents, what may happen to one, and what state follows from that. */
export const DOCUMENT_KINDS = ['quote', 'invoice', 'wiring-sheet'] as const;
export type DocumentKind = (typeof DOCUMENT_KINDS)[number];

export const DOCUMENT_EVENTS = [
  'sent',
  'resent',
  'opened',
  'accepted',
  'declined',
  'superseded',
  'withdrawn',
  'released',
  'voided',
  'paid',
  // The PDF of a document whose number is only known in the transaction that freezes it.
  'pdf',
] as const;
export type DocumentEventKind = (typeof DOCUMENT_EVENTS)[number];

export interface EventRow {
  id: string;
  kind: DocumentEventKind;
  at: Date;
  /** The person of the shop who did it, where it was one. */
  by: string | null;
  detail: Record<string, unknown>;
}

/** A published document without its content, which only the pages that show it read. */
export interface DocumentRow {
  id: string;
  jobId: string;
  kind: DocumentKind;
  number: string;
  revision: number;
  title: string;
  sha256: string;
  pdfSha256: string | null;
  /** Minor units, as text: BIGINT. */
  amountMinor: string | null;
  currency: string | null;
  dueOn: string | null;
  validUntil: string | null;
  createdAt: Date;
}

export type DocumentState =
  'draft' | 'sent' | 'opened' | 'accepted' | 'declined' | 'superseded' | 'withdrawn' | 'expired';

/** These end a document's life: what comes after them changes nothing. */
const FINAL: readonly DocumentEventKind[] = ['accepted', 'superseded', 'withdrawn'];

/**
 * A document's state follows from its events, in their order. A decline stands until the document is sent again;
 * validity ends signing, and only of what still waits for an answer.
 * @param today the shop's own date, `YYYY-MM-DD`, compared with `validUntil`.
 */
export function stateOf(
  events: readonly Pick<EventRow, 'kind'>[],
  validUntil: string | null,
  today: string,
): DocumentState {
  const final = events.find((event) => FINAL.includes(event.kind));
  if (final) return final.kind as DocumentState;
  let state: DocumentState = 'draft';
  for (const { kind } of events) {
    if (kind === 'sent' || kind === 'resent' || kind === 'declined')
      state = kind === 'resent' ? 'sent' : kind;
    if (kind === 'opened' && state === 'sent') state = 'opened';
  }
  const waits = state === 'sent' || state === 'opened';
  return waits && validUntil !== null && today > validUntil ? 'expired' : state;
}

/** Whether the customer may still answer. */
export const canBeSigned = (state: DocumentState): boolean => state === 'sent' || state === 'opened';
