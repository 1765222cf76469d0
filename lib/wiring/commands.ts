/** Releasing a wiring sheet, and the crew's events on it: each applied once. */
import { SheetEvent } from '@/models';
import { command } from '@/lib/access/command';
import type { Actor } from '@/lib/access/policy';
import { freezeDocument, recordDocumentEvent } from '@/lib/documents/commands';
import { latestDocument } from '@/lib/documents/queries';
import { refreshStage } from '@/lib/jobs/commands';
import { getJob } from '@/lib/jobs/queries';
import { type ClientEvent, type EventAnswer, PROTOCOL } from '@/lib/offline/protocol';
import { run, select, withShop } from '@/lib/platform/db';
import { type AppError, toAppError } from '@/lib/platform/http/errors';
import { canonical, sha256 } from '@/lib/platform/http/hash';
import { checkEvent, parseEvent } from './check';
import { checkReady, composeSheet } from './compose';
import { contentOfSheet, happeningsOf, newerCopy, sheetFor, toHappening } from './queries';
import { progressOf } from './schema/events';

export interface Released {
  id: string;
  sha256: string;
  revision: number;
}

/** Freezes the job's wiring as a numbered copy; the one before is superseded. */
export async function releaseSheet(actor: Actor, jobId: string): Promise<Released> {
  return command(actor, async ({ audit, shopId }) => {
    // Two presses at once must not make two copies of one number.
    await run('select 1 from jobs where id = $1 for update', [jobId]);
    const job = await getJob(jobId);
    checkReady(job);
    const before = await latestDocument(jobId, 'wiring-sheet');
    const revision = (before?.revision ?? 0) + 1;
    const content = await composeSheet(job, {
      shopId,
      revision,
      releasedBy: actor.name,
      releasedAt: new Date(),
    });
    const frozen = await freezeDocument({
      jobId,
      kind: 'wiring-sheet',
      number: job.number,
      revision,
      title: `Wiring sheet ${job.number}, copy ${revision}`,
      content,
      createdBy: actor.membershipId,
    });
    if (before) await recordDocumentEvent(before.id, 'superseded', { by: frozen.id }, actor.membershipId);
    await recordDocumentEvent(frozen.id, 'released', {}, actor.membershipId);
    await audit(
      'sheet.released',
      { type: 'document', id: frozen.id },
      { after: { revision, sha256: frozen.sha256 } },
    );
    await refreshStage(jobId);
    return { ...frozen, revision };
  });
}

const hashOf = (event: ClientEvent) =>
  sha256(canonical({ kind: event.kind, entityId: event.entityId, body: event.body }));

interface Known {
  body_sha256: string;
  sheet_id: string;
  membership_id: string;
  answer: EventAnswer;
}

async function replay(actor: Actor, sheetId: string, event: ClientEvent): Promise<EventAnswer | null> {
  const [known] = await select<Known>(
    'select body_sha256, sheet_id, membership_id, answer from sheet_events where id = $1',
    [event.id],
  );
  if (!known) return null;
  const same =
    known.body_sha256 === hashOf(event) &&
    known.sheet_id === sheetId &&
    known.membership_id === actor.membershipId;
  if (same) return known.answer;
  return {
    id: event.id,
    status: 409,
    code: 'conflict',
    message: 'This event was sent before with another content.',
  };
}

async function write(actor: Actor, sheetId: string, event: ClientEvent): Promise<EventAnswer> {
  return command(actor, async ({ audit, shopId }) => {
    const document = await sheetFor(actor, sheetId);
    // Events on one sheet go one after another: a sign-off must see every tick that came before it.
    await run('select 1 from jobs where id = $1 for update', [document.jobId]);
    const parsed = parseEvent(event);
    const { membershipId, name: personName } = actor;
    checkEvent(parsed, {
      sheet: await contentOfSheet(sheetId),
      progress: progressOf(await happeningsOf(sheetId)),
      superseded: (await newerCopy(document)) !== null,
      membershipId,
      mainsQualified: actor.mainsQualified,
    });
    const at = new Date(event.at).toISOString();
    const happening = { id: event.id, ...parsed, at, membershipId, personName };
    const answer: EventAnswer = { id: event.id, status: 200, entity: toHappening(happening) };
    await SheetEvent.create({
      shopId,
      id: event.id,
      sheetId,
      membershipId,
      personName,
      protocol: PROTOCOL,
      kind: parsed.kind,
      target: typeof parsed.body['target'] === 'string' ? parsed.body['target'] : '',
      body: parsed.body,
      bodySha256: hashOf(event),
      answer: { ...answer },
      at: new Date(event.at),
    });
    await audit(`sheet.${parsed.kind}`, { type: 'document', id: sheetId }, { after: parsed.body });
    if (parsed.kind === 'sign-off') await refreshStage(document.jobId);
    return answer;
  });
}

async function applyOne(actor: Actor, sheetId: string, event: ClientEvent): Promise<EventAnswer> {
  const again = () => withShop(actor.shopId, () => replay(actor, sheetId, event));
  try {
    return (await again()) ?? (await write(actor, sheetId, event));
  } catch (error) {
    const mapped = toAppError(error);
    // The same event may have come twice at once; the other one's answer is then this one's too.
    const twin = mapped.code === 'conflict' ? await again() : null;
    if (twin) return twin;
    if (mapped.code === 'unavailable' || mapped.code === 'unexpected') throw error;
    return refusal(event, mapped);
  }
}

const STATUS = { 'not-allowed': 403, 'not-found': 404, conflict: 409 } as const;

const refusal = (event: ClientEvent, error: AppError): EventAnswer => ({
  id: event.id,
  status: STATUS[error.code as keyof typeof STATUS] ?? 422,
  code: error.code,
  message: error.message,
  issues: error.issues,
});

/**
 * Applies events in order, each in a transaction of its own: one that is refused does not hold up the rest.
 * @throws {AppError} `not-found` for a sheet of another shop, or of a visit that the crew member is not on.
 */
export async function applySheetEvents(
  actor: Actor,
  sheetId: string,
  events: ClientEvent[],
): Promise<EventAnswer[]> {
  await withShop(actor.shopId, () => sheetFor(actor, sheetId));
  const answers: EventAnswer[] = [];
  for (const event of events) answers.push(await applyOne(actor, sheetId, event));
  return answers;
}
