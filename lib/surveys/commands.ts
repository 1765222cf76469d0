/** Events of a survey, applied: once each, against the version they were made on. */
import * as z from 'zod/mini';
import { FindingOverride } from '@/models';
import { command } from '@/lib/access/command';
import { type Actor, canOverrideSoftStop } from '@/lib/access/policy';
import type { Answer } from '@/lib/engine/contract';
import { toIssues } from '@/lib/engine/run';
import { refreshStage } from '@/lib/jobs/commands';
import { getJob } from '@/lib/jobs/queries';
import type { ClientEvent, EventAnswer } from '@/lib/offline/protocol';
import { run, select, withShop } from '@/lib/platform/db';
import { AppError, notAllowed, notFound, toAppError } from '@/lib/platform/http/errors';
import { canonical, sha256 } from '@/lib/platform/http/hash';
import { PROTOCOL } from '@/lib/offline/protocol';
import { SHOP_WIDE, TABLES, toEntity } from './collections';
import { serverFigures } from './recompute';
import { type Collection, COLLECTIONS, type OverrideInput } from './schema';

interface Known {
  body_sha256: string;
  job_id: string;
  answer: EventAnswer;
}

const hashOf = (event: ClientEvent) =>
  sha256(canonical({ kind: event.kind, entityId: event.entityId, body: event.body }));

function parseKind(kind: string): { collection: Collection; archive: boolean } {
  const [collection = '', verb] = kind.split('.');
  if (!Object.hasOwn(COLLECTIONS, collection) || (verb !== 'put' && verb !== 'archive'))
    throw new AppError('invalid-input', 'This kind of event is not known here.', [
      { path: 'kind', message: 'is not known' },
    ]);
  return { collection: collection as Collection, archive: verb === 'archive' };
}

/** The area, cove or luminaire that a body names must be of the same job: keys alone only prove the shop. */
async function checkReferences(jobId: string, body: Record<string, unknown>): Promise<void> {
  const references = {
    areaId: 'areas',
    coveId: 'coves',
    existingLuminaireId: 'existing_luminaires',
    circuitId: 'circuits',
  };
  for (const [field, table] of Object.entries(references)) {
    const id = body[field];
    if (typeof id !== 'string') continue;
    const rows = await select(`select 1 from ${table} where id = $1 and job_id = $2`, [id, jobId]);
    if (rows.length === 0)
      throw new AppError('invalid-input', 'This belongs to something that is not in the job.', [
        { path: field, message: 'is not in this job' },
      ]);
  }
}

function parseBody(collection: Collection, body: unknown): Record<string, unknown> {
  const parsed = z.safeParse(COLLECTIONS[collection] as z.ZodMiniType, body);
  if (parsed.success) return parsed.data as Record<string, unknown>;
  throw new AppError('invalid-input', 'Some fields need another look.', toIssues(parsed.error));
}

/** Writes the row. @throws {AppError} `conflict` with what stands there now when the version is another one. */
async function write(jobId: string, shopId: string, event: ClientEvent): Promise<EventAnswer> {
  const { collection, archive } = parseKind(event.kind);
  const table = TABLES[collection];
  const body = parseBody(collection, event.body);
  await checkReferences(jobId, body);
  const before = await table.findOne({ where: { id: event.entityId } });
  if (before && !SHOP_WIDE.has(collection) && before.get({ plain: true })['jobId'] !== jobId)
    throw notFound('This entry');
  const archivedAt = archive ? new Date() : null;
  const values = { ...body, ...(await serverFigures(collection, event.entityId, body)), archivedAt };
  if (!before) await table.create({ shopId, id: event.entityId, jobId, ...values });
  else {
    const version = event.baseVersion ?? 0;
    const [changed] = await table.update(
      { ...values, version: version + 1 },
      { where: { id: event.entityId, version } },
    );
    if (changed !== 1)
      throw new AppError(
        'conflict',
        'Somebody else changed this meanwhile.',
        [],
        toEntity(collection, before as never),
      );
  }
  const after = await table.findOne({ where: { id: event.entityId } });
  if (!after) throw notFound('This entry');
  return { id: event.id, status: 200, entity: toEntity(collection, after as never) };
}

async function replay(jobId: string, event: ClientEvent): Promise<EventAnswer | null> {
  const [known] = await select<Known>('select body_sha256, job_id, answer from client_events where id = $1', [
    event.id,
  ]);
  if (!known) return null;
  if (known.body_sha256 === hashOf(event) && known.job_id === jobId) return known.answer;
  throw new AppError('conflict', 'This event was sent before with another content.');
}

async function applyOne(actor: Actor, jobId: string, event: ClientEvent): Promise<EventAnswer> {
  const before = await withShop(actor.shopId, () => replay(jobId, event));
  if (before) return before;
  return command(actor, async ({ audit, shopId }) => {
    const answer = await write(jobId, shopId, event);
    await run(
      `insert into client_events (shop_id, id, job_id, membership_id, protocol, kind, entity_id, body_sha256, answer, at)
       values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10)`,
      [
        shopId,
        event.id,
        jobId,
        actor.membershipId,
        PROTOCOL,
        event.kind,
        event.entityId,
        hashOf(event),
        JSON.stringify(answer),
        event.at,
      ],
    );
    await audit(`survey.${event.kind}`, { type: event.kind.split('.')[0] ?? 'survey', id: event.entityId });
    await refreshStage(jobId);
    return answer;
  });
}

const findReplay = (actor: Actor, jobId: string, event: ClientEvent) =>
  withShop(actor.shopId, () => replay(jobId, event)).catch(() => null);

function refusal(event: ClientEvent, error: AppError): EventAnswer {
  const status =
    error.code === 'conflict'
      ? 409
      : error.code === 'not-found'
        ? 404
        : error.code === 'not-allowed'
          ? 403
          : 422;
  return {
    id: event.id,
    status,
    code: error.code,
    message: error.message,
    issues: error.issues,
    ...(error.current === undefined ? {} : { current: error.current as NonNullable<EventAnswer['current']> }),
  };
}

/** Applies events in order, each in a transaction of its own: one that is refused does not hold up the rest. */
export async function applySurveyEvents(
  actor: Actor,
  jobId: string,
  events: ClientEvent[],
): Promise<EventAnswer[]> {
  await withShop(actor.shopId, () => getJob(jobId));
  const answers: EventAnswer[] = [];
  for (const event of events) {
    const answer = await applyOne(actor, jobId, event).catch(async (error: unknown) => {
      const mapped = toAppError(error);
      // The same event may have come twice at once; the other one's answer is then this one's too.
      const twin = mapped.code === 'conflict' ? await findReplay(actor, jobId, event) : null;
      if (twin) return twin;
      if (mapped.code === 'unavailable' || mapped.code === 'unexpected') throw error;
      return refusal(event, mapped);
    });
    answers.push(answer);
  }
  return answers;
}

/** A soft stop stands on the word of a named person whose licence number is on file; a hard one never does. */
export async function overrideFinding(actor: Actor, input: OverrideInput): Promise<{ openStops: number }> {
  if (!canOverrideSoftStop(actor))
    throw notAllowed('a stop is overridden by a person whose licence number is on file');
  return command(actor, async ({ audit, shopId }) => {
    const collection: Collection = input.subjectType === 'circuit' ? 'circuits' : 'change-lines';
    const row = await TABLES[collection].findOne({
      where: { id: input.subjectId, jobId: input.jobId, archivedAt: null },
    });
    if (!row) throw notFound('This line');
    const plain = row.get({ plain: true });
    const finding = (plain['answer'] as Answer | null)?.findings.find((one) => one.code === input.code);
    if (finding?.severity !== 'stop') throw notFound('This stop');
    if (finding.hard) throw new AppError('not-allowed', 'A hard stop is never overridden: change the work.');
    await FindingOverride.create({
      shopId,
      jobId: input.jobId,
      subjectType: input.subjectType,
      subjectId: input.subjectId,
      code: input.code,
      reason: input.reason,
      membershipId: actor.membershipId,
      personName: actor.name,
      licenceNumber: actor.licenceNumber,
    });
    const figures = await serverFigures(
      collection,
      input.subjectId,
      toEntity(collection, plain as never).data,
    );
    await TABLES[collection].update({ openStops: figures['openStops'] }, { where: { id: input.subjectId } });
    await audit(
      'finding.overridden',
      { type: input.subjectType, id: input.subjectId },
      { after: { code: input.code, reason: input.reason } },
    );
    await refreshStage(input.jobId);
    return { openStops: Number(figures['openStops']) };
  });
}
