/** What has been sent of a job's quote, and how it was answered. All must run inside `withShop`. */
import { canonicalOf, documentsOfJob, eventsOf } from '@/lib/documents/queries';
import { type DocumentRow, type DocumentState, type EventRow, stateOf } from '@/lib/documents/schema';
import { select } from '@/lib/platform/db';
import { getSettings } from '@/lib/shops/queries';
import { dayIn } from '@/lib/units';
import type { QuoteContent } from '../schema/content';

export interface AcceptanceRow {
  id: string;
  documentId: string;
  method: 'typed' | 'office';
  name: string;
  choices: string[];
  totalMinor: string;
  currency: string;
  shownText: string;
  sha256: string;
  reference: string;
  at: Date;
}

const ACCEPTANCE = `
  a.id, a.document_id as "documentId", a.method, a.name, a.choices, a.total_minor as "totalMinor", a.currency,
  a.shown_text as "shownText", a.sha256, coalesce(a.canonical::jsonb ->> 'reference', '') as reference, a.at`;

async function acceptancesOf(documentIds: string[]): Promise<Map<string, AcceptanceRow>> {
  const rows = await select<AcceptanceRow>(
    `select ${ACCEPTANCE} from acceptances a where a.document_id = any ($1::uuid[])`,
    [documentIds],
  );
  return new Map(rows.map((row) => [row.documentId, row]));
}

export async function acceptanceOf(documentId: string): Promise<AcceptanceRow | null> {
  return (await acceptancesOf([documentId])).get(documentId) ?? null;
}

/** The acceptance that the job's work rests on, with its revision. */
export async function acceptanceOfJob(jobId: string): Promise<(AcceptanceRow & { revision: number }) | null> {
  const rows = await select<AcceptanceRow & { revision: number }>(
    `select ${ACCEPTANCE}, d.revision from acceptances a
     join documents d on d.shop_id = a.shop_id and d.id = a.document_id
     where d.job_id = $1 and d.kind = 'quote' order by a.at desc limit 1`,
    [jobId],
  );
  return rows[0] ?? null;
}

export async function acceptedRevision(jobId: string): Promise<number | null> {
  return (await acceptanceOfJob(jobId))?.revision ?? null;
}

/** @throws {AppError} `not-found` */
export async function contentOf(documentId: string): Promise<QuoteContent> {
  return JSON.parse(await canonicalOf(documentId)) as QuoteContent;
}

export interface SentQuote {
  document: DocumentRow;
  events: EventRow[];
  state: DocumentState;
  acceptance: AcceptanceRow | null;
}

/** The newest first; a fixed number of statements however many revisions there are. */
export async function sentQuotes(shopId: string, jobId: string): Promise<SentQuote[]> {
  const { timeZone } = await getSettings(shopId);
  const today = dayIn(timeZone, new Date());
  const documents = await documentsOfJob(jobId, 'quote');
  const ids = documents.map((document) => document.id);
  const events = await eventsOf(ids);
  const acceptances = await acceptancesOf(ids);
  return documents.map((document) => {
    const own = events.get(document.id) ?? [];
    return {
      document,
      events: own,
      state: stateOf(own, document.validUntil, today),
      acceptance: acceptances.get(document.id) ?? null,
    };
  });
}

export interface QuoteForReader extends SentQuote {
  content: QuoteContent;
}

/**
 * What a customer's link shows: the accepted revision where there is one, else the newest.
 * @returns null when nothing was sent.
 */
export async function quoteForCustomer(shopId: string, jobId: string): Promise<QuoteForReader | null> {
  const sent = await sentQuotes(shopId, jobId);
  const shown = sent.find((quote) => quote.acceptance !== null) ?? sent[0];
  return shown ? { ...shown, content: await contentOf(shown.document.id) } : null;
}
