import type { Metadata } from 'next';
import { JobsTable } from '@/components/jobs/jobs-table';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { pageActor } from '@/lib/access/actor';
import { may } from '@/lib/access/policy';
import { jobsPage } from '@/lib/jobs/queries';
import { jobsQuery } from '@/lib/jobs/schema';

export const metadata: Metadata = { title: 'Jobs' };

export default async function JobsPage({
  params,
  searchParams,
}: {
  params: Promise<{ shop: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const { shop } = await params;
  const actor = await pageActor(shop, 'job:see');
  const query = jobsQuery.parse(await searchParams);
  const { jobs, more } = await jobsPage(shop, query);
  return (
    <PageBody
      title="Jobs"
      actions={may(actor, 'job:open') ? <ButtonLink href={`/s/${shop}/jobs/new`}>New job</ButtonLink> : null}
    >
      <JobsTable shopId={shop} jobs={jobs} more={more} query={query} />
    </PageBody>
  );
}
