import { JobLine } from '@/components/job-line/job-line';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState, Sheet } from '@/components/ui/sheet';
import { jobLineSteps } from './steps';

interface Waiting {
  jobId: string;
  title: string;
  waitsFor: string;
  stops: number;
  steps: Parameters<typeof jobLineSteps>[0];
  href: string;
  action: string;
}

export function NextUp({ waiting }: { waiting: Waiting[] }) {
  if (waiting.length === 0)
    return (
      <Sheet>
        <EmptyState>
          What needs you appears here: a survey to finish, a stop to clear, an invoice to send.
        </EmptyState>
      </Sheet>
    );
  return (
    <ul className="rounded-md border border-rule bg-sheet">
      {waiting.map((one) => {
        const steps = jobLineSteps(one.steps);
        const open = steps.find((step) => step.state === 'open');
        return (
          <li
            key={one.jobId}
            className="grid items-center gap-4 border-b border-rule p-4 last:border-b-0 sm:p-5 lg:grid-cols-[1fr_18rem_13rem]"
          >
            <div className="min-w-0">
              <p className="text-lg font-bold">{one.title}</p>
              <p className="text-ink-2">
                {open ? `${open.label}: ${open.sub ?? ''}` : 'Everything is paid.'}
                {one.stops > 0 ? `, ${one.stops} ${one.stops === 1 ? 'stop' : 'stops'}` : ''}
              </p>
            </div>
            <JobLine steps={steps} />
            <ButtonLink look={one.stops > 0 ? 'primary' : 'secondary'} href={one.href}>
              {one.action}
              <span className="sr-only">: {one.title}</span>
            </ButtonLink>
          </li>
        );
      })}
    </ul>
  );
}
