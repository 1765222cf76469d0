/** How a sent revision is answered: accepted by the customer or through the office, declined, opened. */
import { Acceptance } from '@/models';
import { type AnyActor, command, type CommandContext, systemActor } from '@/lib/access/command';
import { recordDocumentEvent } from '@/lib/documents/commands';
import { canBeSigned } from '@/lib/documents/schema';
import { refreshStage } from '@/lib/jobs/commands';
import type { CustomerVisit } from '@/lib/links/queries';
import { message } from '@/lib/messages';
import { withShop } from '@/lib/platform/db';
import { AppError, conflict, invalid, notFound } from '@/lib/platform/http/errors';
import { canonical, sha256 } from '@/lib/platform/http/hash';
import { enqueue } from '@/lib/platform/queue/outbox';
import { acceptedHooks } from '../accepted';
import { acceptanceOfJob, contentOf, type SentQuote, sentQuotes } from '../queries/sent';
import { acceptText } from '../schema/accept-text';
import type { QuoteContent, QuoteTotals } from '../schema/content';
import type { AcceptInput, DeclineInput, OfficeAcceptanceInput } from '../schema/forms';
import { totalsOf } from '../schema/totals';
import { lockDraft } from './draft';

export interface AcceptAnswer {
  acceptanceId: string;
  totalMinor: number;
  depositMinor: number;
}

async function findQuote(shopId: string, jobId: string, documentId: string): Promise<SentQuote> {
  const quote = (await sentQuotes(shopId, jobId)).find((sent) => sent.document.id === documentId);
  if (!quote) throw notFound('This quote');
  return quote;
}

const CLOSED = {
  accepted: 'customer.closed.accepted',
  superseded: 'customer.closed.superseded',
  withdrawn: 'customer.closed.withdrawn',
  expired: 'customer.closed.expired',
  declined: 'customer.closed.declined',
} as const;

/** @throws {AppError} `gone` in the reader's words when the revision can't be answered any more. */
function assertOpen(quote: SentQuote, allowed: SentQuote['state'][] = []): void {
  if (canBeSigned(quote.state) || allowed.includes(quote.state)) return;
  const state = quote.state in CLOSED ? (quote.state as keyof typeof CLOSED) : 'withdrawn';
  throw new AppError('gone', message(CLOSED[state]));
}

function chosenOf(content: QuoteContent, choices: readonly string[]): string[] {
  const known = new Set(content.options.map((option) => option.id));
  if (choices.some((id) => !known.has(id)))
    throw invalid('choices', 'An addition was ticked that is not in this quote. Load the page again.');
  return content.options.filter((option) => choices.includes(option.id)).map((option) => option.id);
}

interface Signing {
  jobId: string;
  quote: SentQuote;
  content: QuoteContent;
  choices: string[];
  totals: QuoteTotals;
  name: string;
  shownText: string;
  method: 'typed' | 'office';
  reference: string;
  linkId: string | null;
  address: string;
  userAgent: string;
  recordedBy: string | null;
}

async function store(shopId: string, signing: Signing): Promise<string> {
  const { quote, content, choices, totals, name, shownText, method, reference } = signing;
  const text = canonical({
    schema: 'lampwright.acceptance/1',
    documentSha256: quote.document.sha256,
    number: content.number,
    revision: content.revision,
    choices,
    totalMinor: totals.totalMinor,
    depositMinor: totals.depositMinor,
    currency: content.settings.currency,
    name,
    shownText,
    method,
    reference,
  });
  const row = await Acceptance.create({
    shopId,
    documentId: quote.document.id,
    method,
    name,
    choices,
    totalMinor: String(totals.totalMinor),
    currency: content.settings.currency,
    shownText,
    canonical: text,
    sha256: sha256(text),
    address: signing.address,
    userAgent: signing.userAgent.slice(0, 300),
    recordedBy: signing.recordedBy,
  });
  return row.id;
}

/** Writes the acceptance and all that follows from it, in the command's transaction. */
async function sign({ shopId, actor, audit }: CommandContext, signing: Signing): Promise<AcceptAnswer> {
  const { quote, totals, content, jobId } = signing;
  const documentId = quote.document.id;
  const acceptanceId = await store(shopId, signing);
  await recordDocumentEvent(
    documentId,
    'accepted',
    { acceptanceId, linkId: signing.linkId },
    actor.membershipId,
  );
  await enqueue('quote.accepted.customer', { documentId, acceptanceId });
  await enqueue('quote.accepted.shop', { documentId, acceptanceId });
  const { currency } = content.settings;
  for (const hook of acceptedHooks)
    await hook({ jobId, documentId, acceptanceId, depositMinor: totals.depositMinor, currency });
  await refreshStage(jobId);
  await audit(
    'quote.accepted',
    { type: 'document', id: documentId },
    { after: { acceptanceId, method: signing.method, totalMinor: totals.totalMinor, name: signing.name } },
  );
  return { acceptanceId, totalMinor: totals.totalMinor, depositMinor: totals.depositMinor };
}

async function refuseSecond(jobId: string): Promise<void> {
  const earlier = await acceptanceOfJob(jobId);
  if (earlier)
    throw conflict(message('customer.accepted-already', { name: earlier.name, revision: earlier.revision }));
}

/**
 * The customer accepts exactly the revision, choices, total and words that they were shown; each is figured
 * again here.
 * @throws {AppError} `gone` when it can't be signed any more, `conflict` when what was shown is not what stands.
 */
export async function acceptQuote(visit: CustomerVisit, input: AcceptInput): Promise<AcceptAnswer> {
  const { shopId, jobId } = visit;
  return command(systemActor(shopId, 'customer'), async (context) => {
    const quote = await findQuote(shopId, jobId, input.documentId);
    await lockDraft(jobId);
    await refuseSecond(jobId);
    // Read again under the lock: it may have been withdrawn or replaced while this request waited.
    const current = await findQuote(shopId, jobId, quote.document.id);
    assertOpen(current);
    const content = await contentOf(current.document.id);
    const choices = chosenOf(content, input.choices);
    const totals = totalsOf(content, choices);
    const shownText = acceptText(content, choices, totals);
    const same =
      input.sha256 === current.document.sha256 &&
      input.totalMinor === totals.totalMinor &&
      input.shownText === shownText;
    if (!same) throw conflict(message('customer.shown-differs'), totals);
    const { name } = input;
    const { linkId, address, userAgent } = visit;
    return sign(context, {
      ...{ jobId, quote: current, content, choices, totals, name, shownText },
      ...{ method: 'typed', reference: '', linkId, address, userAgent, recordedBy: null },
    });
  });
}

/** The office records an answer that came on paper: a purchase order, a signed copy, a telephone call. */
export async function recordAcceptance(actor: AnyActor, input: OfficeAcceptanceInput): Promise<AcceptAnswer> {
  return command(actor, async (context) => {
    const { shopId } = context;
    const { jobId, name, reference } = input;
    await lockDraft(jobId);
    await refuseSecond(jobId);
    const quote = await findQuote(shopId, jobId, input.documentId);
    assertOpen(quote, ['expired', 'declined']);
    const content = await contentOf(quote.document.id);
    const choices = chosenOf(content, input.choices);
    const totals = totalsOf(content, choices);
    const shownText = message('customer.accept.by-office', {
      recorder: actor.name,
      name,
      reference,
      text: acceptText(content, choices, totals),
    });
    return sign(context, {
      ...{ jobId, quote, content, choices, totals, name, shownText, reference },
      ...{ method: 'office', linkId: null, address: '', userAgent: '', recordedBy: actor.membershipId },
    });
  });
}

export async function declineQuote(visit: CustomerVisit, input: DeclineInput): Promise<{ id: string }> {
  const { shopId, jobId, linkId } = visit;
  return command(systemActor(shopId, 'customer'), async ({ audit }) => {
    await lockDraft(jobId);
    await refuseSecond(jobId);
    const quote = await findQuote(shopId, jobId, input.documentId);
    assertOpen(quote);
    await recordDocumentEvent(quote.document.id, 'declined', { reason: input.reason, linkId });
    await enqueue('quote.declined.shop', { documentId: quote.document.id });
    await refreshStage(jobId);
    await audit('quote.declined', { type: 'document', id: quote.document.id });
    return { id: quote.document.id };
  });
}

/** Whether this link's reader has seen the revision since it was last sent to anybody. */
function openedSince(quote: SentQuote, linkId: string): boolean {
  const last = quote.events.findLastIndex((event) => event.kind === 'sent' || event.kind === 'resent');
  const since = quote.events.slice(last + 1);
  return since.some((event) => event.kind === 'opened' && event.detail['linkId'] === linkId);
}

/** Told by a visible page, not by whoever fetches a link: kept once for each link and sending. */
export async function markOpened(visit: CustomerVisit, documentId: string): Promise<{ first: boolean }> {
  const { shopId, jobId, linkId } = visit;
  const seen = await withShop(shopId, async () =>
    openedSince(await findQuote(shopId, jobId, documentId), linkId),
  );
  if (seen) return { first: false };
  return command(systemActor(shopId, 'customer'), async ({ audit }) => {
    await lockDraft(jobId);
    const first = !openedSince(await findQuote(shopId, jobId, documentId), linkId);
    if (first) await recordDocumentEvent(documentId, 'opened', { linkId });
    await audit('quote.opened', { type: 'document', id: documentId }, { after: { first } });
    return { first };
  });
}
