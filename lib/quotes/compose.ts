/** Gathers what the next revision would say. Runs inside `withShop`. */
import { getJob } from '@/lib/jobs/queries';
import { message } from '@/lib/messages';
import { select } from '@/lib/platform/db';
import { AppError, notFound } from '@/lib/platform/http/errors';
import { canonical, sha256 } from '@/lib/platform/http/hash';
import { getShop } from '@/lib/shops/queries';
import { assumedCounts } from '@/lib/surveys/queries';
import { dayIn } from '@/lib/units';
import { buildContent } from './content';
import { validUntilOf } from './dates';
import { livePorts } from './ports';
import { draftState, type DraftState } from './queries/draft';
import type { QuoteContent } from './schema/content';
import type { SourcePorts } from './sources';

export interface Composed {
  state: DraftState;
  content: QuoteContent;
  /** Of everything but number, revision and dates: what the sender looked at. */
  bodySha256: string;
}

export function bodyHash(content: QuoteContent): string {
  const { number: _number, revision: _revision, issuedOn: _issued, validUntil: _valid, ...body } = content;
  return sha256(canonical(body));
}

async function nextRevision(jobId: string): Promise<number> {
  const rows = await select<{ next: number }>(
    `select coalesce(max(revision), 0)::int + 1 as next from documents where job_id = $1 and kind = 'quote'`,
    [jobId],
  );
  return rows[0]?.next ?? 1;
}

async function customerAddress(customerId: string): Promise<string> {
  const rows = await select<{ address: string }>('select address from customers where id = $1', [customerId]);
  return rows[0]?.address ?? '';
}

const CAUTIONS = ['customer.caution.licensed', 'customer.caution.hidden'] as const;

/** @returns null when the job has no draft. */
export async function composeQuote(
  shopId: string,
  jobId: string,
  at: Date,
  ports: SourcePorts = livePorts,
): Promise<Composed | null> {
  const state = await draftState(shopId, jobId, ports);
  if (!state) return null;
  const job = await getJob(jobId);
  const shop = await getShop(shopId);
  const counts = await assumedCounts(jobId);
  const content = buildContent({
    number: job.number,
    revision: await nextRevision(jobId),
    title: job.title,
    issuedOn: dayIn(state.settings.timeZone, at),
    validUntil: validUntilOf(at, state.terms.validDays, state.settings.timeZone),
    shop: {
      name: shop.name,
      licenceNumber: shop.licenceNumber,
      email: shop.email,
      phone: shop.phone,
      address: shop.address,
    },
    customer: {
      name: job.customerName,
      contactName: job.contactName,
      email: job.customerEmail,
      address: await customerAddress(job.customerId),
    },
    site: { name: job.siteName, address: job.siteAddress },
    settings: state.settings,
    terms: { ...state.terms, depositPct: state.depositPct },
    lines: state.lines,
    figures: state.figures,
    assumedCounts: counts.map((count) => message('customer.assumed-count', { ...count })),
    cautions: CAUTIONS.map((key) => message(key)),
  });
  return { state, content, bodySha256: bodyHash(content) };
}

/** @throws {AppError} `not-found` without a draft, `conflict` with the blockers when it can't be sent. */
export async function composeSendable(
  shopId: string,
  jobId: string,
  at: Date,
  ports: SourcePorts = livePorts,
): Promise<Composed> {
  const composed = await composeQuote(shopId, jobId, at, ports);
  if (!composed) throw notFound('The draft of this job’s quote');
  const { blockers } = composed.state;
  if (blockers.length === 0) return composed;
  const issues = blockers.map((blocker) => ({
    path: blocker.lineId === null ? '' : `lines.${blocker.lineId}`,
    message: message(`quote.blocker.${blocker.code}`, { line: blocker.line, ...blocker.values }),
  }));
  throw new AppError('conflict', issues[0]?.message ?? 'This draft can not be sent yet.', issues);
}
