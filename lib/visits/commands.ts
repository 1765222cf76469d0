/** Planning visits. A time is the shop's wall-clock time with its zone: clocks that change do not move a visit. */
import { randomUUID } from 'node:crypto';
import { type AnyActor, command } from '@/lib/access/command';
import { refreshStage } from '@/lib/jobs/commands';
import { getJob } from '@/lib/jobs/queries';
import { run, select } from '@/lib/platform/db';
import { conflict, invalid, notFound } from '@/lib/platform/http/errors';
import { getSettings } from '@/lib/shops/queries';
import { crewChoices, findVisit } from './queries';
import type { CancelVisitInput, VisitInput } from './schema';

async function checkCrew(crew: string[]): Promise<void> {
  const known = new Set((await crewChoices()).map((one) => one.id));
  if (crew.some((id) => !known.has(id))) throw invalid('crew', 'One of these people is not in the shop.');
}

async function setCrew(shopId: string, visitId: string, crew: string[]): Promise<void> {
  await run('delete from visit_crew where visit_id = $1', [visitId]);
  await run('insert into visit_crew (shop_id, visit_id, membership_id) select $1, $2, unnest($3::uuid[])', [
    shopId,
    visitId,
    crew,
  ]);
}

async function insert(shopId: string, input: VisitInput): Promise<string> {
  const id = input.id ?? randomUUID();
  const { timeZone } = await getSettings(shopId);
  await run(
    `insert into visits (shop_id, id, job_id, starts_at, ends_at, time_zone, notes)
     values ($1, $2, $3, $4::timestamp, $5::timestamp, $6, $7)`,
    [shopId, id, input.jobId, input.startsAt, input.endsAt, timeZone, input.notes],
  );
  return id;
}

/** Changes a visit of the same job against the version that the form was opened with. */
async function change(id: string, baseVersion: number, input: VisitInput): Promise<void> {
  const before = await findVisit(id);
  if (before?.jobId !== input.jobId) throw notFound('This visit');
  const changed = await select(
    `update visits set starts_at = $3::timestamp, ends_at = $4::timestamp, notes = $5, version = version + 1
     where id = $1 and version = $2 and archived_at is null returning id`,
    [id, baseVersion, input.startsAt, input.endsAt, input.notes],
  );
  if (changed.length !== 1)
    throw conflict('Somebody else changed this visit meanwhile. Both are shown.', before);
}

/** Plans a visit, or changes one. */
export async function saveVisit(
  actor: AnyActor,
  input: VisitInput,
): Promise<{ id: string; version: number }> {
  return command(actor, async ({ audit, shopId }) => {
    await getJob(input.jobId);
    await checkCrew(input.crew);
    const { id: known, baseVersion, ...after } = input;
    const changes = known !== undefined && baseVersion !== undefined;
    if (changes) await change(known, baseVersion, input);
    const id = changes ? known : await insert(shopId, input);
    await setCrew(shopId, id, input.crew);
    await audit(changes ? 'visit.changed' : 'visit.planned', { type: 'visit', id }, { after });
    await refreshStage(input.jobId);
    return { id, version: changes ? baseVersion + 1 : 1 };
  });
}

/** Takes a visit off the plan. It stays in the records. */
export async function cancelVisit(actor: AnyActor, input: CancelVisitInput): Promise<{ id: string }> {
  return command(actor, async ({ audit }) => {
    const before = await findVisit(input.id);
    if (!before) throw notFound('This visit');
    const changed = await select(
      `update visits set archived_at = now(), version = version + 1
       where id = $1 and version = $2 and archived_at is null returning id`,
      [input.id, input.baseVersion],
    );
    if (changed.length !== 1) throw conflict('Somebody else changed this visit meanwhile.', before);
    await audit('visit.cancelled', { type: 'visit', id: input.id });
    await refreshStage(before.jobId);
    return { id: input.id };
  });
}
