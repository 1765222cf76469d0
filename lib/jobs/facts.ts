/** The facts that a job's stage follows from, read in one statement for one job or many. */
import { select } from '@/lib/platform/db';
import type { JobFacts } from './stage';

interface FactRow extends JobFacts {
  id: string;
}

/*
 * `paid` compares what an invoice asks with what was received for it; a voided invoice asks for nothing. A job is
 * signed off when each of its latest released sheets has a sign-off.
 */
const FACTS = `
  with wanted as (select id, survey_done_at, deposit_rule from jobs where id = any ($1::uuid[])),
  quotes as (
    select d.job_id, bool_or(e.kind = 'sent') as sent
    from documents d join document_events e on e.document_id = d.id and e.shop_id = d.shop_id
    where d.kind = 'quote' and d.job_id = any ($1::uuid[]) group by d.job_id),
  accepted as (
    select distinct d.job_id from acceptances a join documents d on d.id = a.document_id and d.shop_id = a.shop_id
    where d.job_id = any ($1::uuid[])),
  invoices as (
    select d.job_id, d.canonical::jsonb ->> 'purpose' as purpose, d.amount_minor,
      coalesce((select sum(p.amount_minor) from payments p where p.invoice_id = d.id and p.shop_id = d.shop_id), 0) as received
    from documents d
    where d.kind = 'invoice' and d.job_id = any ($1::uuid[])
      and not exists (select 1 from document_events e where e.document_id = d.id and e.shop_id = d.shop_id and e.kind = 'voided')),
  sheets as (
    select distinct on (d.job_id, d.number) d.job_id, d.id,
      exists (select 1 from sheet_events s where s.sheet_id = d.id and s.shop_id = d.shop_id and s.kind = 'sign-off') as signed
    from documents d where d.kind = 'wiring-sheet' and d.job_id = any ($1::uuid[])
    order by d.job_id, d.number, d.revision desc)
  select w.id,
    w.survey_done_at is not null as "surveyDone",
    (select coalesce(sum(open_stops), 0)::int from change_lines c where c.job_id = w.id and c.archived_at is null)
      + (select coalesce(sum(open_stops), 0)::int from circuits c where c.job_id = w.id and c.archived_at is null) as "openStops",
    coalesce((select sent from quotes q where q.job_id = w.id), false) as "quoteSent",
    exists (select 1 from accepted a where a.job_id = w.id) as "accepted",
    w.deposit_rule as "depositRule",
    exists (select 1 from documents d where d.job_id = w.id and d.kind = 'invoice'
      and d.canonical::jsonb ->> 'purpose' = 'deposit') as "depositAsked",
    exists (select 1 from invoices i where i.job_id = w.id and i.purpose = 'deposit') as "depositInvoiced",
    coalesce((select bool_and(i.received >= i.amount_minor) from invoices i
      where i.job_id = w.id and i.purpose = 'deposit'), false) as "depositPaid",
    exists (select 1 from visits v where v.job_id = w.id and v.archived_at is null) as "visitPlanned",
    exists (select 1 from sheets s where s.job_id = w.id) as "sheetReleased",
    coalesce((select bool_and(s.signed) from sheets s where s.job_id = w.id), false) as "sheetsSignedOff",
    exists (select 1 from invoices i where i.job_id = w.id and i.purpose = 'final') as "finalInvoiced",
    coalesce((select bool_and(i.received >= i.amount_minor) from invoices i where i.job_id = w.id)
      and exists (select 1 from invoices i where i.job_id = w.id and i.purpose = 'final'), false) as "finalPaid",
    exists (select 1 from job_closings c where c.job_id = w.id) as "closed"
  from wanted w`;

/** Must run inside `withShop`. */
export async function factsOfJobs(jobIds: string[]): Promise<Map<string, JobFacts>> {
  if (jobIds.length === 0) return new Map();
  const rows = await select<FactRow>(FACTS, [jobIds]);
  return new Map(rows.map(({ id, ...facts }) => [id, facts]));
}
