/** The job line's devices with their words. */
import type { JobLineStep } from '@/components/job-line/job-line';
import { message } from '@/lib/messages';
import type { MessageKey } from '@/lib/messages';

interface Step {
  key: string;
  state: 'reached' | 'open' | 'beyond';
  waitsFor: string | null;
}

export function jobLineSteps(steps: readonly Step[]): JobLineStep[] {
  return steps.map((step) => ({
    key: step.key,
    state: step.state,
    label: message(`job.step.${step.key}` as MessageKey),
    sub: step.waitsFor ? message(`job.wait.${step.waitsFor}` as MessageKey) : undefined,
  }));
}
