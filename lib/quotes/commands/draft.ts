/** Making and editing a job's one draft. */
import { QuoteDraft, QuoteLine } from '@/models';
import { type AnyActor, command } from '@/lib/access/command';
import { getJob } from '@/lib/jobs/queries';
import { currentShopId, run, select } from '@/lib/platform/db';
import { conflict, invalid, notFound } from '@/lib/platform/http/errors';
import { getShop, settingsOf } from '@/lib/shops/queries';
import { plainDecimal } from '../content';
import { livePorts } from '../ports';
import { priceDraft } from '../pricing';
import { draftState, findDraft, linesOfDraft } from '../queries/draft';
import type {
  AddSourceInput,
  LineInput,
  LineRefInput,
  MoveLineInput,
  OpenDraftInput,
  TermsInput,
} from '../schema/forms';
import type { DraftLine, DraftTerms, LineChange, PricedSource } from '../schema/lines';
import { moved } from '../schema/order';
import { pricedSources, type SourcePorts } from '../sources';
import { fieldsFrom } from '../stale';

/** The draft, held against others until this transaction ends. @throws {AppError} `not-found` */
export async function lockDraft(jobId: string): Promise<DraftTerms> {
  await run('select id from quote_drafts where job_id = $1 for update', [jobId]);
  const draft = await findDraft(jobId);
  if (!draft) throw notFound('The draft of this job’s quote');
  return draft;
}

async function nextPosition(draftId: string): Promise<number> {
  const rows = await select<{ next: number }>(
    'select coalesce(max(position), 0)::int + 1 as next from quote_lines where draft_id = $1',
    [draftId],
  );
  return rows[0]?.next ?? 1;
}

async function addSourced(draftId: string, source: PricedSource, position: number): Promise<string> {
  const shopId = currentShopId();
  const shop = await getShop(shopId);
  const row = await QuoteLine.create({
    shopId,
    draftId,
    position,
    ...fieldsFrom(source),
    labourRate: shop.labourRate,
    markupPct: shop.markupPct,
  });
  return row.id;
}

/** Opens the job's draft; a new one starts with a line for each change line and circuit, at today's prices. */
export async function openDraft(
  actor: AnyActor,
  input: OpenDraftInput,
  ports: SourcePorts = livePorts,
): Promise<{ id: string }> {
  return command(actor, async ({ audit, shopId }) => {
    const job = await getJob(input.jobId);
    const shop = await getShop(shopId);
    const [draft] = await run<{ id: string }>(
      `insert into quote_drafts (shop_id, job_id, deposit_pct, tax_name, tax_rate_pct, valid_days)
       values ($1, $2, $3, $4, $5, $6) on conflict (shop_id, job_id) do nothing returning id`,
      [shopId, job.id, shop.depositPct, shop.taxName, shop.taxRatePct, shop.quoteValidDays],
    );
    await audit('quote.draft-opened', { type: 'job', id: job.id });
    if (!draft) return { id: (await lockDraft(job.id)).id };
    const sources = await pricedSources(ports, job.id, new Date());
    for (const [index, source] of sources.entries()) await addSourced(draft.id, source, index + 1);
    return { id: draft.id };
  });
}

/** Whatever was typed must leave a draft that can be priced. @throws {AppError} `invalid-input` */
async function assertPriceable(jobId: string): Promise<void> {
  const terms = await findDraft(jobId);
  if (!terms) return;
  priceDraft(terms, await linesOfDraft(terms.id), settingsOf(await getShop(currentShopId())));
}

const COST_FIELDS = ['quantity', 'unitCost', 'unitLabourHours'] as const;

async function findLine(draftId: string, id: string): Promise<DraftLine> {
  const line = (await linesOfDraft(draftId)).find((candidate) => candidate.id === id);
  if (!line) throw notFound('This line');
  return line;
}

/** A sourced line's cost and hours are its source's: the circuit is changed, not the price of it. */
function editable(before: DraftLine, values: Omit<LineInput, 'jobId' | 'id' | 'baseVersion'>) {
  if (before.source === 'typed') return values;
  const { quantity, unitCost, unitLabourHours, areaName, ...rest } = values;
  const typed = { quantity, unitCost, unitLabourHours };
  for (const field of COST_FIELDS)
    if (Number(typed[field]) !== Number(before[field]))
      throw invalid(field, 'This comes from the survey. Change it there, then bring the line up to date.');
  if (areaName !== before.areaName)
    throw invalid('areaName', 'The area comes from the survey. Change it there.');
  return rest;
}

/** Adds a typed line, or changes a line against the version that the form was opened with. */
export async function saveLine(actor: AnyActor, input: LineInput): Promise<{ id: string; version: number }> {
  const { jobId, id, baseVersion, ...values } = input;
  return command(actor, async ({ audit, shopId }) => {
    const draft = await lockDraft(jobId);
    if (id === undefined || baseVersion === undefined) {
      const position = await nextPosition(draft.id);
      const row = await QuoteLine.create({ shopId, draftId: draft.id, source: 'typed', position, ...values });
      await assertPriceable(jobId);
      await audit('quote.line-added', { type: 'quote-line', id: row.id }, { after: values });
      return { id: row.id, version: 1 };
    }
    const before = await findLine(draft.id, id);
    const after = editable(before, values);
    const [changed] = await QuoteLine.update(
      { ...after, version: baseVersion + 1 },
      { where: { id, version: baseVersion } },
    );
    if (changed !== 1)
      throw conflict('Somebody else changed this line meanwhile. Both are shown.', readableLine(before));
    await assertPriceable(jobId);
    await audit('quote.line-changed', { type: 'quote-line', id }, { before: { ...before }, after });
    return { id, version: baseVersion + 1 };
  });
}

export async function removeLine(actor: AnyActor, input: LineRefInput): Promise<{ id: string }> {
  return command(actor, async ({ audit }) => {
    const draft = await lockDraft(input.jobId);
    const before = await findLine(draft.id, input.id);
    if (before.version !== input.baseVersion)
      throw conflict('Somebody else changed this line meanwhile. Look at it before you take it out.', before);
    await QuoteLine.destroy({ where: { id: input.id, draftId: draft.id } });
    await audit('quote.line-removed', { type: 'quote-line', id: input.id }, { before: { ...before } });
    return { id: input.id };
  });
}

/** Moves a line, or at the end of its area the whole area; at the end of the list nothing moves. */
export async function moveLine(actor: AnyActor, input: MoveLineInput): Promise<{ id: string }> {
  return command(actor, async ({ audit }) => {
    const draft = await lockDraft(input.jobId);
    const lines = await linesOfDraft(draft.id);
    if (!lines.some((line) => line.id === input.id)) throw notFound('This line');
    for (const [index, id] of moved(lines, input.id, input.direction).entries())
      await run('update quote_lines set position = $2 where id = $1', [id, index + 1]);
    await audit('quote.line-moved', { type: 'quote-line', id: input.id }, { after: { to: input.direction } });
    return { id: input.id };
  });
}

/** Puts a change line or circuit that the draft leaves out back on it. */
export async function addSource(
  actor: AnyActor,
  input: AddSourceInput,
  ports: SourcePorts = livePorts,
): Promise<{ id: string }> {
  return command(actor, async ({ audit, shopId }) => {
    const draft = await lockDraft(input.jobId);
    const state = await draftState(shopId, input.jobId, ports);
    const source = state?.unused.find((candidate) => candidate.id === input.sourceId);
    if (!source) throw conflict('This line is on the draft already, or it is no longer in the survey.');
    const id = await addSourced(draft.id, source, await nextPosition(draft.id));
    await assertPriceable(input.jobId);
    await audit('quote.line-added', { type: 'quote-line', id }, { after: { sourceId: source.id } });
    return { id };
  });
}

export interface BroughtUpToDate {
  lines: { id: string; description: string; changes: LineChange[] }[];
  removed: string[];
}

function updateOf(line: DraftLine, source: PricedSource) {
  const fresh = fieldsFrom(source);
  // An edited description is kept as long as the source's own words stay the same.
  return line.sourceDescription === source.description ? { ...fresh, description: line.description } : fresh;
}

/** Brings every sourced line up to date with its source and today's prices, and tells what changed. */
export async function bringUpToDate(
  actor: AnyActor,
  input: OpenDraftInput,
  ports: SourcePorts = livePorts,
): Promise<BroughtUpToDate> {
  return command(actor, async ({ audit, shopId }) => {
    const draft = await lockDraft(input.jobId);
    const state = await draftState(shopId, input.jobId, ports);
    const answer: BroughtUpToDate = { lines: [], removed: [] };
    for (const { line, source, changes } of state?.checks ?? []) {
      if (line.source !== 'typed' && !source) {
        await QuoteLine.destroy({ where: { id: line.id } });
        answer.removed.push(line.description);
      } else if (source && changes.length > 0) {
        await QuoteLine.update(
          { ...updateOf(line, source), version: line.version + 1 },
          { where: { id: line.id } },
        );
        answer.lines.push({ id: line.id, description: line.description, changes });
      }
    }
    await QuoteDraft.update({ pricesAt: new Date() }, { where: { id: draft.id } });
    await assertPriceable(input.jobId);
    await audit(
      'quote.brought-up-to-date',
      { type: 'job', id: input.jobId },
      { after: { lines: answer.lines.length, removed: answer.removed.length } },
    );
    return answer;
  });
}

export async function saveTerms(actor: AnyActor, input: TermsInput): Promise<{ version: number }> {
  const { jobId, baseVersion, validDays, ...values } = input;
  return command(actor, async ({ audit }) => {
    const before = await lockDraft(jobId);
    const after = { ...values, validDays: Number(validDays) };
    const [changed] = await QuoteDraft.update(
      { ...after, version: baseVersion + 1 },
      { where: { jobId, version: baseVersion } },
    );
    if (changed !== 1)
      throw conflict('Somebody else changed this draft meanwhile. Both are shown.', readable(before));
    await assertPriceable(jobId);
    await audit('quote.terms-changed', { type: 'job', id: jobId }, { before: { ...before }, after });
    return { version: baseVersion + 1 };
  });
}

/** The draft as a form shows it. */
const readable = (draft: DraftTerms) => ({
  ...draft,
  depositPct: plainDecimal(draft.depositPct),
  discountPct: plainDecimal(draft.discountPct),
  overheadPct: plainDecimal(draft.overheadPct),
  contingencyPct: plainDecimal(draft.contingencyPct),
  taxRatePct: plainDecimal(draft.taxRatePct),
});

const readableLine = (line: DraftLine) => ({
  ...line,
  quantity: plainDecimal(line.quantity),
  unitCost: plainDecimal(line.unitCost),
  unitLabourHours: plainDecimal(line.unitLabourHours),
  labourRate: plainDecimal(line.labourRate),
  markupPct: plainDecimal(line.markupPct),
});
