import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { JobLine } from '@/components/job-line/job-line';
import { CloseJob } from '@/components/jobs/close-job';
import { jobLineSteps } from '@/components/jobs/steps';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { Sheet } from '@/components/ui/sheet';
import { isId, pageActor } from '@/lib/access/actor';
import { may, type Permission } from '@/lib/access/policy';
import { loadJob } from '@/lib/jobs/queries';

export const metadata: Metadata = { title: 'Job' };

const PLACES: { path: string; label: string; about: string; needs: Permission; steps: string[] }[] = [
  {
    path: 'survey',
    label: 'Survey',
    about: 'Areas, counts, coves, changes',
    needs: 'work:edit',
    steps: ['survey'],
  },
  { path: 'circuits', label: 'Circuits', about: 'Sized, drawn, checked', needs: 'work:edit', steps: [] },
  { path: 'savings', label: 'Savings', about: 'Energy, money, payback', needs: 'price:see', steps: [] },
  { path: 'quote', label: 'Quote', about: 'Draft, send, answer', needs: 'price:see', steps: ['quote'] },
  {
    path: 'money',
    label: 'Money',
    about: 'Invoices and payments',
    needs: 'price:see',
    steps: ['deposit', 'closeout', 'paid'],
  },
  {
    path: 'install',
    label: 'Install',
    about: 'Visits and wiring sheet',
    needs: 'job:see',
    steps: ['install'],
  },
];

export default async function JobPage({ params }: { params: Promise<{ shop: string; job: string }> }) {
  const { shop, job: jobId } = await params;
  const actor = await pageActor(shop, 'job:see');
  if (!isId(jobId)) notFound();
  const job = await loadJob(shop, jobId).catch(() => notFound());
  const steps = jobLineSteps(job.steps);
  const open = steps.find((step) => step.state === 'open');
  return (
    <PageBody
      title={job.title}
      sub={`Job ${job.number}, ${[...new Set([job.customerName, job.siteName, job.siteAddress].filter(Boolean))].join(', ')}`}
    >
      <Sheet>
        <JobLine steps={steps} size="large" />
        <p className="mt-3">{open ? `Next: ${open.label}, ${open.sub ?? ''}.` : 'This job is closed.'}</p>
      </Sheet>
      <ul className="grid gap-4 sm:grid-cols-2 lg:grid-cols-3 xl:grid-cols-6">
        {PLACES.filter((place) => may(actor, place.needs)).map((place) => (
          <li key={place.path} className="flex flex-col gap-2 rounded-md border border-rule bg-sheet p-4">
            <h2 className="text-2xl">{place.label}</h2>
            <p className="grow text-ink-2">{place.about}</p>
            <ButtonLink
              look={open && place.steps.includes(open.key) ? 'primary' : 'secondary'}
              href={`/s/${shop}/jobs/${jobId}/${place.path}`}
            >
              Open<span className="sr-only"> {place.label}</span>
            </ButtonLink>
          </li>
        ))}
      </ul>
      {job.facts.finalPaid && !job.facts.closed && may(actor, 'invoice:edit') ? (
        <CloseJob shopId={shop} jobId={jobId} />
      ) : null}
    </PageBody>
  );
}
