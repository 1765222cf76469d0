/** A role's first screen: just what waits for that person. */
import { type Actor, may } from '@/lib/access/policy';
import { type JobWithSteps, openJobs, type StepKey, type WaitKey } from '@/lib/jobs/queries';
import { withShop } from '@/lib/platform/db';
import { getSettings } from '@/lib/shops/queries';
import { formatDateTime } from '@/lib/units';

export interface Waiting {
  jobId: string;
  title: string;
  waitsFor: WaitKey;
  stops: number;
  steps: JobWithSteps['steps'];
  href: string;
  action: string;
}

/** Whose move it is, and where it is made. */
const MOVES: Record<WaitKey, { needs: Parameters<typeof may>[1]; path: string; action: string } | null> = {
  'survey-not-finished': { needs: 'work:edit', path: 'survey', action: 'Go on surveying' },
  'stops-to-clear': { needs: 'work:edit', path: 'circuits', action: 'Clear the stop' },
  'quote-not-sent': { needs: 'quote:send', path: 'quote', action: 'Send the quote' },
  // The customer's move: nothing waits for anybody here.
  'quote-waits-for-answer': null,
  'deposit-not-invoiced': { needs: 'invoice:edit', path: 'money', action: 'Send the deposit invoice' },
  'deposit-open': { needs: 'invoice:edit', path: 'money', action: 'Look at the deposit' },
  'no-visit-yet': { needs: 'visit:edit', path: 'install', action: 'Plan a visit' },
  'sheet-not-released': { needs: 'sheet:release', path: 'install', action: 'Release the sheet' },
  'sheet-not-signed-off': null,
  'final-invoice-not-sent': { needs: 'invoice:edit', path: 'money', action: 'Send the final invoice' },
  'balance-open': { needs: 'invoice:edit', path: 'money', action: 'Look at the balance' },
  'job-not-closed': { needs: 'invoice:edit', path: '', action: 'Close the job' },
};

function moveOf(actor: Actor, job: JobWithSteps): Waiting | null {
  const open = job.steps.find(
    (step): step is { key: StepKey; state: 'open'; waitsFor: WaitKey } => step.state === 'open',
  );
  const closable = !open && !job.facts.closed;
  const waitsFor = open?.waitsFor ?? (closable ? 'job-not-closed' : null);
  const move = waitsFor ? MOVES[waitsFor] : null;
  if (!waitsFor || !move || !may(actor, move.needs)) return null;
  return {
    jobId: job.id,
    title: `${job.customerName}: ${job.title}`,
    waitsFor,
    stops: job.facts.openStops,
    steps: job.steps,
    href: `/s/${actor.shopId}/jobs/${job.id}${move.path ? `/${move.path}` : ''}`,
    action: move.action,
  };
}

export async function nextUp(actor: Actor): Promise<{ waiting: Waiting[]; today: string }> {
  return withShop(actor.shopId, async () => {
    const settings = await getSettings(actor.shopId);
    const jobs = may(actor, 'job:see') ? await openJobs() : [];
    return {
      waiting: jobs.flatMap((job) => moveOf(actor, job) ?? []),
      today: formatDateTime(new Date(), settings),
    };
  });
}
