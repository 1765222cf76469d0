/** Sending, withdrawing and sending again: a revision is frozen once and never changes. */
import { type AnyActor, command, type CommandContext } from '@/lib/access/command';
import { freezeDocument, recordDocumentEvent, storePdf, type StoredPdf } from '@/lib/documents/commands';
import { refreshStage } from '@/lib/jobs/commands';
import { linkForContact } from '@/lib/links/commands';
import { withShop } from '@/lib/platform/db';
import { AppError, conflict, notFound } from '@/lib/platform/http/errors';
import { enqueue } from '@/lib/platform/queue/outbox';
import { bodyHash, type Composed, composeSendable } from '../compose';
import { renderQuotePdf } from '../pdf';
import { livePorts } from '../ports';
import { type SentQuote, sentQuotes } from '../queries/sent';
import type { QuoteContent } from '../schema/content';
import type { ResendInput, SendInput, WithdrawInput } from '../schema/forms';
import type { SourcePorts } from '../sources';
import { lockDraft } from './draft';

export interface Sent {
  documentId: string;
  revision: number;
  sha256: string;
}

const isLive = (quote: SentQuote) => quote.state !== 'superseded' && quote.state !== 'withdrawn';

const CHANGED = 'The draft changed since you looked at it. Look at the preview again, then send it.';

function assertUnsent(composed: Composed, input: SendInput, latest: SentQuote | undefined): void {
  if (composed.bodySha256 !== input.bodySha256) throw conflict(CHANGED);
  const said = latest && latest.state !== 'declined' && isLive(latest) && latest.state !== 'expired';
  const sent = latest?.events.find((event) => event.kind === 'sent');
  if (said && sent?.detail['bodySha256'] === composed.bodySha256)
    throw conflict(
      `Revision ${latest.document.revision} says exactly this already. Send that one again instead.`,
    );
}

/** One transaction: the frozen row, what becomes of the one before it, the link and the mail that carries it. */
async function publish(
  { audit, actor }: CommandContext,
  input: SendInput,
  content: QuoteContent,
  pdf: StoredPdf,
  before: SentQuote[],
): Promise<Sent> {
  const document = await freezeDocument({
    jobId: input.jobId,
    kind: 'quote',
    number: content.number,
    revision: content.revision,
    title: content.title,
    content,
    pdf,
    amountMinor: String(content.totals.totalMinor),
    currency: content.settings.currency,
    validUntil: content.validUntil,
    createdBy: actor.membershipId,
  });
  for (const quote of before.filter(isLive))
    await recordDocumentEvent(quote.document.id, 'superseded', { by: document.id }, actor.membershipId);
  const link = await linkForContact(input.jobId, input.email);
  const detail = { to: input.email, linkId: link.id, note: input.note, bodySha256: bodyHash(content) };
  await recordDocumentEvent(document.id, 'sent', detail, actor.membershipId);
  await enqueue('quote.sent', { documentId: document.id, linkId: link.id });
  await refreshStage(input.jobId);
  await audit(
    'quote.sent',
    { type: 'document', id: document.id },
    { after: { revision: content.revision, sha256: document.sha256, email: input.email } },
  );
  return { documentId: document.id, revision: content.revision, sha256: document.sha256 };
}

/**
 * Sends the draft as the next revision. The PDF is made and stored before the transaction; inside it the draft is
 * looked at again, so that what is frozen is what was printed.
 * @throws {AppError} `conflict` when something blocks it, or when the draft is not what the sender looked at.
 */
export async function sendQuote(
  actor: AnyActor,
  input: SendInput,
  ports: SourcePorts = livePorts,
): Promise<Sent> {
  const at = new Date();
  const { shopId } = actor;
  const composed = await withShop(shopId, async () => {
    const found = await composeSendable(shopId, input.jobId, at, ports);
    assertUnsent(found, input, (await sentQuotes(shopId, input.jobId))[0]);
    return found;
  });
  const { content } = composed;
  const pdf = await storePdf(shopId, await renderQuotePdf(content));
  return command(actor, async (context) => {
    await lockDraft(input.jobId);
    const again = await composeSendable(shopId, input.jobId, at, ports);
    const before = await sentQuotes(shopId, input.jobId);
    assertUnsent(again, input, before[0]);
    if (again.content.revision !== content.revision) throw conflict(CHANGED);
    return publish(context, input, content, pdf, before);
  });
}

async function findSent(shopId: string, jobId: string, documentId: string): Promise<SentQuote> {
  const quote = (await sentQuotes(shopId, jobId)).find((sent) => sent.document.id === documentId);
  if (!quote) throw notFound('This revision');
  return quote;
}

function refuseUnless(quote: SentQuote, allowed: SentQuote['state'][], what: string): void {
  if (allowed.includes(quote.state)) return;
  throw new AppError('conflict', `Revision ${quote.document.revision} is ${quote.state}: ${what}`);
}

/** Takes a revision back: the customer can still read it, and can no longer sign it. */
export async function withdrawQuote(actor: AnyActor, input: WithdrawInput): Promise<{ id: string }> {
  return command(actor, async ({ audit, shopId }) => {
    await lockDraft(input.jobId);
    const quote = await findSent(shopId, input.jobId, input.documentId);
    refuseUnless(quote, ['sent', 'opened', 'declined', 'expired'], 'it can not be withdrawn.');
    await recordDocumentEvent(input.documentId, 'withdrawn', { reason: input.reason }, actor.membershipId);
    await refreshStage(input.jobId);
    await audit('quote.withdrawn', { type: 'document', id: input.documentId }, { after: { ...input } });
    return { id: input.documentId };
  });
}

/** Mails the same revision once more, to the same contact or another. */
export async function resendQuote(actor: AnyActor, input: ResendInput): Promise<{ id: string }> {
  return command(actor, async ({ audit, shopId }) => {
    await lockDraft(input.jobId);
    const quote = await findSent(shopId, input.jobId, input.documentId);
    refuseUnless(quote, ['sent', 'opened', 'declined'], 'send a new revision instead.');
    const link = await linkForContact(input.jobId, input.email);
    await recordDocumentEvent(
      input.documentId,
      'resent',
      { to: input.email, linkId: link.id },
      actor.membershipId,
    );
    await enqueue('quote.sent', { documentId: input.documentId, linkId: link.id });
    await audit(
      'quote.resent',
      { type: 'document', id: input.documentId },
      { after: { email: input.email } },
    );
    return { id: input.documentId };
  });
}
