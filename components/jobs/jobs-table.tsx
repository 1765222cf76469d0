import Link from 'next/link';
import { JobLine } from '@/components/job-line/job-line';
import { Button, ButtonLink } from '@/components/ui/button';
import { SelectInput, TextInput } from '@/components/ui/field';
import { EmptyState, Sheet } from '@/components/ui/sheet';
import { type JobsQuery, STAGES } from '@/lib/jobs/schema';
import { jobLineSteps } from './steps';

export interface JobListItem {
  id: string;
  number: string;
  title: string;
  stage: string;
  customerName: string;
  siteName: string;
  steps: Parameters<typeof jobLineSteps>[0];
}

const STAGE_NAMES: Record<string, string> = {
  survey: 'Survey',
  quote: 'Quote',
  install: 'Install',
  closeout: 'Closeout',
  closed: 'Closed',
};

function address(shopId: string, query: JobsQuery, change: Partial<JobsQuery>): string {
  const next = { ...query, page: 1, ...change };
  const search = new URLSearchParams();
  if (next.stage) search.set('stage', next.stage);
  if (next.find) search.set('find', next.find);
  if (next.sort !== 'number') search.set('sort', next.sort);
  if (next.dir !== 'desc') search.set('dir', next.dir);
  if (next.page > 1) search.set('page', String(next.page));
  const text = search.toString();
  return `/s/${shopId}/jobs${text ? `?${text}` : ''}`;
}

function SortHead({
  shopId,
  query,
  by,
  children,
}: {
  shopId: string;
  query: JobsQuery;
  by: JobsQuery['sort'];
  children: string;
}) {
  const active = query.sort === by;
  const dir = active && query.dir === 'desc' ? 'asc' : 'desc';
  return (
    <th
      scope="col"
      aria-sort={active ? (query.dir === 'asc' ? 'ascending' : 'descending') : undefined}
      className="py-2 pr-4 text-left"
    >
      <Link href={address(shopId, query, { sort: by, dir })} className="inline-flex min-h-touch items-center">
        {children}
        <span aria-hidden>{active ? (query.dir === 'asc' ? ' ↑' : ' ↓') : ''}</span>
      </Link>
    </th>
  );
}

function Filter({ shopId, query }: { shopId: string; query: JobsQuery }) {
  return (
    <form action={`/s/${shopId}/jobs`} className="mb-4 flex flex-wrap items-end gap-3">
      <TextInput
        id="find"
        name="find"
        label="Find"
        hint="Number, title, customer or site"
        defaultValue={query.find ?? ''}
        className="grow basis-56"
      />
      <SelectInput
        id="stage"
        name="stage"
        label="Stage"
        defaultValue={query.stage ?? ''}
        className="basis-40"
      >
        <option value="">All</option>
        {STAGES.map((stage) => (
          <option key={stage} value={stage}>
            {STAGE_NAMES[stage]}
          </option>
        ))}
      </SelectInput>
      <Button type="submit" look="secondary">
        Show
      </Button>
    </form>
  );
}

/** Jobs with their lines; filter, sort and page live in the address. On a phone each row is a card. */
export function JobsTable({
  shopId,
  jobs,
  more,
  query,
}: {
  shopId: string;
  jobs: JobListItem[];
  more: boolean;
  query: JobsQuery;
}) {
  return (
    <Sheet>
      <Filter shopId={shopId} query={query} />
      {jobs.length === 0 ? (
        <EmptyState>
          {query.find || query.stage
            ? 'No job fits this.'
            : 'No job yet. The first one starts with a customer and a site.'}
        </EmptyState>
      ) : (
        <table className="block w-full sm:table">
          <caption className="sr-only">Jobs</caption>
          <thead className="sr-only border-b border-rule sm:not-sr-only sm:table-header-group">
            <tr>
              <SortHead shopId={shopId} query={query} by="number">
                Number
              </SortHead>
              <th scope="col" className="py-2 pr-4 text-left">
                Job
              </th>
              <SortHead shopId={shopId} query={query} by="customer">
                Customer
              </SortHead>
              <SortHead shopId={shopId} query={query} by="stage">
                Stage
              </SortHead>
              <th scope="col" className="w-72 py-2 text-left">
                Job line
              </th>
            </tr>
          </thead>
          <tbody className="block sm:table-row-group">
            {jobs.map((job) => (
              <tr key={job.id} className="block border-b border-rule py-3 last:border-b-0 sm:table-row">
                <td className="block font-mono sm:table-cell sm:py-3 sm:pr-4 sm:align-middle">
                  {job.number}
                </td>
                <td className="block sm:table-cell sm:py-3 sm:pr-4 sm:align-middle">
                  <Link
                    href={`/s/${shopId}/jobs/${job.id}`}
                    className="inline-flex min-h-touch items-center font-bold sm:min-h-0"
                  >
                    {job.title}
                  </Link>
                  {job.siteName === job.customerName ? null : (
                    <span className="block text-ink-2">{job.siteName}</span>
                  )}
                </td>
                <td className="block sm:table-cell sm:py-3 sm:pr-4 sm:align-middle">{job.customerName}</td>
                <td className="block sm:table-cell sm:py-3 sm:pr-4 sm:align-middle">
                  {STAGE_NAMES[job.stage]}
                </td>
                <td className="block sm:table-cell sm:py-3 sm:align-middle">
                  <JobLine steps={jobLineSteps(job.steps)} />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
      <nav aria-label="Pages" className="mt-4 flex gap-3">
        {query.page > 1 ? (
          <ButtonLink look="secondary" href={address(shopId, query, { page: query.page - 1 })}>
            Before
          </ButtonLink>
        ) : null}
        {more ? (
          <ButtonLink look="secondary" href={address(shopId, query, { page: query.page + 1 })}>
            Further
          </ButtonLink>
        ) : null}
      </nav>
    </Sheet>
  );
}
