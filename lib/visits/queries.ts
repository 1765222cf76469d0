/** Visits of the shop. Queries must run inside `withShop`; `load…` opens the shop itself. */
import { type Actor, seesOnlyOwnVisits } from '@/lib/access/policy';
import { listMembers } from '@/lib/people/queries';
import { select, withShop } from '@/lib/platform/db';
import { getSettings } from '@/lib/shops/queries';
import { dayIn } from '@/lib/units/time';
import type { CrewChoice, VisitRow } from './schema';

const VISITS = `
  select v.id, v.job_id as "jobId", j.number::text as "jobNumber", j.title as "jobTitle",
    s.name as "siteName", s.address as "siteAddress",
    to_char(v.starts_at, 'YYYY-MM-DD"T"HH24:MI') as "startsAt", to_char(v.ends_at, 'YYYY-MM-DD"T"HH24:MI') as "endsAt",
    v.time_zone as "timeZone", v.notes, v.version,
    coalesce((select json_agg(json_build_object('id', m.id, 'name', m.name) order by m.name)
      from visit_crew c join memberships m on m.shop_id = c.shop_id and m.id = c.membership_id
      where c.shop_id = v.shop_id and c.visit_id = v.id), '[]'::json) as crew
  from visits v
  join jobs j on j.shop_id = v.shop_id and j.id = v.job_id
  join sites s on s.shop_id = j.shop_id and s.id = j.site_id
  where v.archived_at is null and j.archived_at is null`;

export async function visitsOfJob(jobId: string): Promise<VisitRow[]> {
  return select<VisitRow>(`${VISITS} and v.job_id = $1 order by v.starts_at`, [jobId]);
}

export async function findVisit(id: string): Promise<VisitRow | null> {
  return (await select<VisitRow>(`${VISITS} and v.id = $1`, [id]))[0] ?? null;
}

/** Whether the person is on a visit of the job. */
export async function isOnVisit(membershipId: string, jobId: string): Promise<boolean> {
  const rows = await select(
    `select 1 from visit_crew c join visits v on v.shop_id = c.shop_id and v.id = c.visit_id
     where c.membership_id = $1 and v.job_id = $2 and v.archived_at is null limit 1`,
    [membershipId, jobId],
  );
  return rows.length > 0;
}

/** Who may go. */
export async function crewChoices(): Promise<CrewChoice[]> {
  const members = await listMembers();
  return members.map(({ id, name, mainsQualified }) => ({ id, name, mainsQualified }));
}

export interface VisitWithSheets extends VisitRow {
  /** The newest released copy of each wiring sheet of the job. */
  sheets: { id: string; number: string; revision: number; signedOff: boolean }[];
}

const SHEETS = `
  select distinct on (d.job_id, d.number) d.id, d.job_id as "jobId", d.number, d.revision,
    exists (select 1 from sheet_events e where e.shop_id = d.shop_id and e.sheet_id = d.id and e.kind = 'sign-off') as "signedOff"
  from documents d where d.kind = 'wiring-sheet' and d.job_id = any ($1::uuid[])
  order by d.job_id, d.number, d.revision desc`;

/** Visits that end today or later: all of the shop's, or for crew those that the person is on. */
export async function comingVisits(
  actor: Actor,
  today: string,
): Promise<{ visits: VisitWithSheets[]; today: string }> {
  const own = seesOnlyOwnVisits(actor) ? actor.membershipId : null;
  const visits = await select<VisitRow>(
    `${VISITS} and v.ends_at >= $1::date and ($2::uuid is null or exists (
       select 1 from visit_crew c where c.shop_id = v.shop_id and c.visit_id = v.id and c.membership_id = $2::uuid))
     order by v.starts_at limit 200`,
    [today, own],
  );
  const jobIds = [...new Set(visits.map((visit) => visit.jobId))];
  const sheets = jobIds.length
    ? await select<VisitWithSheets['sheets'][number] & { jobId: string }>(SHEETS, [jobIds])
    : [];
  return {
    today,
    visits: visits.map((visit) => ({
      ...visit,
      sheets: sheets
        .filter((sheet) => sheet.jobId === visit.jobId)
        .map(({ id, number, revision, signedOff }) => ({ id, number, revision, signedOff })),
    })),
  };
}

export const loadComingVisits = (actor: Actor, now = new Date()) =>
  withShop(actor.shopId, async () => {
    const settings = await getSettings(actor.shopId);
    return { settings, ...(await comingVisits(actor, dayIn(settings.timeZone, now))) };
  });
