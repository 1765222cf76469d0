import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { JobLine } from '@/components/job-line/job-line';
import { jobLineSteps } from '@/components/jobs/steps';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState, Sheet } from '@/components/ui/sheet';
import { VisitList } from '@/components/visits/visit-list';
import { CrewProgress, ReadingsTable } from '@/components/wiring/crew-progress';
import { ReleaseSheet } from '@/components/wiring/release-sheet';
import { isId, pageActor } from '@/lib/access/actor';
import { may } from '@/lib/access/policy';
import { formatDateTime } from '@/lib/units';
import { loadInstall } from '@/lib/wiring/queries';

export const metadata: Metadata = { title: 'Install' };

type Install = Awaited<ReturnType<typeof loadInstall>>;

function Copies({ shop, install }: { shop: string; install: Install }) {
  if (install.copies.length === 0)
    return (
      <EmptyState>
        No copy is out yet. Once the quote is accepted and no stop is open, the sheet is released from here.
      </EmptyState>
    );
  return (
    <ul className="flex flex-col">
      {install.copies.map((copy, index) => (
        <li key={copy.id} className="border-t border-rule py-3 first:border-t-0 first:pt-0">
          <p className="flex flex-wrap items-baseline gap-x-3">
            <Link
              href={`/s/${shop}/sheets/${copy.id}`}
              className="inline-flex min-h-touch items-center font-bold"
            >
              {`Sheet ${copy.number}, copy ${copy.revision}`}
            </Link>
            <span>{index === 0 ? 'in force' : 'superseded'}</span>
            <span className="text-ink-2">{formatDateTime(copy.createdAt, install.settings)}</span>
          </p>
          <p className="font-mono text-xs break-all text-ink-2">SHA-256 {copy.sha256}</p>
        </li>
      ))}
    </ul>
  );
}

export default async function InstallPage({ params }: { params: Promise<{ shop: string; job: string }> }) {
  const { shop, job: jobId } = await params;
  const actor = await pageActor(shop, 'job:see');
  if (!isId(jobId)) notFound();
  const install = await loadInstall(actor, jobId).catch(() => notFound());
  const { job, settings, latest } = install;
  return (
    <PageBody
      title="Install"
      sub={`Job ${job.number}, ${job.title}, ${job.siteName}`}
      actions={
        <ButtonLink look="secondary" href={`/s/${shop}/jobs/${jobId}`}>
          To the job
        </ButtonLink>
      }
    >
      <Sheet>
        <JobLine steps={jobLineSteps(job.steps)} size="large" />
      </Sheet>
      <div className="grid items-start gap-5 *:min-w-0 lg:grid-cols-2">
        <Sheet title="Visits">
          <VisitList
            shopId={shop}
            jobId={jobId}
            visits={install.visits}
            crew={install.crew}
            settings={settings}
            editable={may(actor, 'visit:edit') && !job.facts.closed}
          />
        </Sheet>
        <Sheet title="Wiring sheet">
          <Copies shop={shop} install={install} />
          {may(actor, 'sheet:release') && !job.facts.closed ? (
            <div className="mt-4 border-t border-rule pt-4">
              <ReleaseSheet shopId={shop} jobId={jobId} copies={install.copies.length} />
            </div>
          ) : null}
        </Sheet>
        {latest ? (
          <>
            <Sheet title="The crew so far" aside={`copy ${latest.sheet.revision}`}>
              <CrewProgress {...latest} settings={settings} />
            </Sheet>
            <Sheet title="Readings">
              <ReadingsTable {...latest} settings={settings} />
            </Sheet>
          </>
        ) : null}
      </div>
    </PageBody>
  );
}
