/** Wiring sheets: what a phone needs, and what the desk sees of the crew's work. */
import { type Actor, may, seesOnlyOwnVisits } from '@/lib/access/policy';
import { canonicalOf, documentsOfJob, getDocument } from '@/lib/documents/queries';
import type { DocumentRow } from '@/lib/documents/schema';
import { getJob } from '@/lib/jobs/queries';
import type { Entity } from '@/lib/offline/protocol';
import { select, withShop } from '@/lib/platform/db';
import { notFound } from '@/lib/platform/http/errors';
import { getSettings } from '@/lib/shops/queries';
import { crewChoices, isOnVisit, visitsOfJob } from '@/lib/visits/queries';
import { type Happening, progressOf } from './schema/events';
import type { WiringSheet } from './schema/sheet';

/** Must run inside `withShop`. @throws {AppError} `not-found`, also for crew who are on no visit of the job. */
export async function sheetFor(actor: Actor, sheetId: string): Promise<DocumentRow> {
  const document = await getDocument(sheetId).catch(() => null);
  const own =
    document && seesOnlyOwnVisits(actor) ? await isOnVisit(actor.membershipId, document.jobId) : true;
  if (document?.kind !== 'wiring-sheet' || !own) throw notFound('This wiring sheet');
  return document;
}

/** Must run inside `withShop`. The frozen text, read back. */
export const contentOfSheet = async (sheetId: string): Promise<WiringSheet> =>
  JSON.parse(await canonicalOf(sheetId)) as WiringSheet;

/** Must run inside `withShop`. */
export async function happeningsOf(sheetId: string): Promise<Happening[]> {
  const rows = await select<Omit<Happening, 'at'> & { at: Date }>(
    `select id, kind, body, at, membership_id as "membershipId", person_name as "personName"
     from sheet_events where sheet_id = $1 order by at, id`,
    [sheetId],
  );
  return rows.map((row) => ({ ...row, at: new Date(row.at).toISOString() }));
}

export const toHappening = (happening: Happening): Entity => ({
  collection: 'happening',
  id: happening.id,
  version: 1,
  archived: false,
  data: { ...happening },
});

/** Must run inside `withShop`. The newest copy under the same number, where this is not it. */
export async function newerCopy(document: DocumentRow): Promise<{ id: string; revision: number } | null> {
  const rows = await select<{ id: string; revision: number }>(
    `select id, revision from documents where kind = 'wiring-sheet' and job_id = $1 and number = $2 and revision > $3
     order by revision desc limit 1`,
    [document.jobId, document.number, document.revision],
  );
  return rows[0] ?? null;
}

/** All that a phone needs to work on this sheet without a signal. No cost, no price. */
export const loadSheet = (actor: Actor, sheetId: string) =>
  withShop(actor.shopId, async () => {
    const document = await sheetFor(actor, sheetId);
    return {
      entities: (await happeningsOf(document.id)).map(toHappening),
      sheet: await contentOfSheet(document.id),
      sha256: document.sha256,
      newer: await newerCopy(document),
      me: { membershipId: actor.membershipId, name: actor.name, mainsQualified: actor.mainsQualified },
      takenAt: new Date().toISOString(),
    };
  });

/** Whether the page may be opened at all. @throws {AppError} `not-found` */
export const checkSheet = (actor: Actor, sheetId: string) =>
  withShop(actor.shopId, async () => (await sheetFor(actor, sheetId)).id);

/** The install page at the desk. */
export const loadInstall = (actor: Actor, jobId: string) =>
  withShop(actor.shopId, async () => {
    const job = await getJob(jobId);
    const copies = await documentsOfJob(jobId, 'wiring-sheet');
    const latest = copies[0];
    return {
      job,
      settings: await getSettings(actor.shopId),
      visits: await visitsOfJob(jobId),
      crew: may(actor, 'visit:edit') ? await crewChoices() : [],
      copies: copies.map(({ id, number, revision, sha256, createdAt }) => ({
        id,
        number,
        revision,
        sha256,
        createdAt,
      })),
      latest: latest
        ? { sheet: await contentOfSheet(latest.id), progress: progressOf(await happeningsOf(latest.id)) }
        : null,
    };
  });
