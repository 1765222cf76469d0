/** Jobs of the shop. All must run inside `withShop`. */
import { select, withShop } from '@/lib/platform/db';
import { notFound } from '@/lib/platform/http/errors';
import { factsOfJobs } from './facts';
import type { JobsQuery } from './schema';
import { type JobFacts, type Stage, type Step, stepsOf } from './stage';

export type { StepKey, WaitKey } from './stage';

export interface JobRow {
  id: string;
  number: string;
  title: string;
  stage: Stage;
  customerId: string;
  customerName: string;
  customerEmail: string;
  contactName: string;
  siteId: string;
  siteName: string;
  siteAddress: string;
  depositRule: 'percent' | 'none' | 'terms';
  surveyDoneAt: Date | null;
  createdAt: Date;
}

export interface JobWithSteps extends JobRow {
  facts: JobFacts;
  steps: Step[];
}

const COLUMNS = `
  j.id, j.number::text as number, j.title, j.stage, j.customer_id as "customerId", c.name as "customerName",
  c.email as "customerEmail", c.contact_name as "contactName", j.site_id as "siteId", s.name as "siteName",
  s.address as "siteAddress", j.deposit_rule as "depositRule", j.survey_done_at as "surveyDoneAt",
  j.created_at as "createdAt"`;
const TABLES = `
  jobs j join customers c on c.shop_id = j.shop_id and c.id = j.customer_id
  join sites s on s.shop_id = j.shop_id and s.id = j.site_id`;

async function withSteps(rows: JobRow[]): Promise<JobWithSteps[]> {
  const facts = await factsOfJobs(rows.map((row) => row.id));
  return rows.flatMap((row) => {
    const known = facts.get(row.id);
    return known ? [{ ...row, facts: known, steps: stepsOf(known) }] : [];
  });
}

/** @throws {AppError} `not-found` */
export async function getJob(id: string): Promise<JobWithSteps> {
  const rows = await select<JobRow>(
    `select ${COLUMNS} from ${TABLES} where j.id = $1 and j.archived_at is null`,
    [id],
  );
  const [job] = await withSteps(rows);
  if (!job) throw notFound('This job');
  return job;
}

const SORTS = { number: 'j.number', customer: 'lower(c.name)', stage: 'j.stage' } as const;
export const JOBS_PAGE_SIZE = 25;

/** A page of jobs. One more row than a page is read, to know whether there is a next one. */
export async function listJobs(query: JobsQuery): Promise<{ jobs: JobWithSteps[]; more: boolean }> {
  const find = query.find ? `%${query.find.replace(/[\\%_]/g, '\\$&')}%` : null;
  const order = `${SORTS[query.sort]} ${query.dir}${query.sort === 'number' ? '' : ', j.number desc'}`;
  const rows = await select<JobRow>(
    `select ${COLUMNS} from ${TABLES}
     where j.archived_at is null and ($1::text is null or j.stage = $1)
       and ($2::text is null or j.title ilike $2 or c.name ilike $2 or s.name ilike $2 or j.number::text = $3)
     order by ${order} limit $4 offset $5`,
    [query.stage ?? null, find, query.find ?? null, JOBS_PAGE_SIZE + 1, (query.page - 1) * JOBS_PAGE_SIZE],
  );
  return { jobs: await withSteps(rows.slice(0, JOBS_PAGE_SIZE)), more: rows.length > JOBS_PAGE_SIZE };
}

/** Jobs that wait for something, oldest first: what a role's first screen chooses from. */
export async function openJobs(): Promise<JobWithSteps[]> {
  const rows = await select<JobRow>(
    `select ${COLUMNS} from ${TABLES}
     where j.archived_at is null and j.stage <> 'closed' and j.not_going_ahead_at is null
       and (j.parked_until is null or j.parked_until <= current_date)
     order by j.number limit 200`,
  );
  return withSteps(rows);
}

export async function jobIdsOfCustomer(
  customerId: string,
): Promise<{ id: string; number: string; title: string; stage: Stage }[]> {
  return select(
    `select id, number::text as number, title, stage from jobs where customer_id = $1 and archived_at is null order by number desc`,
    [customerId],
  );
}

/** For the jobs list: opens the shop itself. */
export const jobsPage = (shopId: string, query: JobsQuery) => withShop(shopId, () => listJobs(query));
export const loadJob = (shopId: string, jobId: string) => withShop(shopId, () => getJob(jobId));
export const loadOpenJobs = (shopId: string) => withShop(shopId, openJobs);
