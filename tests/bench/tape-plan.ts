/** Plans: how long sixty runs take and how far from the best they can be; small jobs against an exact program. */
import { WEB_LIMITS } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { tapePlanCalculation } from '@/lib/sizing/tape-plan';
import type { TapePlanInput } from '@/lib/sizing/tape-plan-input';
import { randomJob } from '../support/tape-plan-jobs';
import { judge } from '../support/tape-plan-milp';
import { median, milliseconds, type Row } from './row';

const LARGE_RUNS = 60;
const LARGE_JOBS = 20;
const MOST_MILLISECONDS = 300;
const MOST_BOUND_PCT = 2;
const JUDGED_JOBS = 200;
const JUDGED_RUNS = 12;

const plan = (job: TapePlanInput) => runCalculation(tapePlanCalculation, job, WEB_LIMITS).result;

/** Jobs of sixty runs, each of its own lengths, prices and distances, half of them with two driver places. */
function large(): Row[] {
  const jobs = Array.from({ length: LARGE_JOBS }, (_, seed) =>
    randomJob(seed, { runs: LARGE_RUNS, model: seed % 2 ? 'resistive' : 'constant-current' }),
  );
  const times = jobs.map((job) => milliseconds(() => plan(job), 3));
  const bounds = jobs.map((job) => plan(job).boundPct ?? 100);
  const row = (what: string, value: number, unit: string, most: number): Row => ({
    what: `plan of ${LARGE_RUNS} runs, ${what} of ${LARGE_JOBS} jobs`,
    value,
    unit,
    target: `under ${most}`,
    ok: value < most,
  });
  return [
    row('median time', median(times), 'ms', MOST_MILLISECONDS),
    { ...row('longest time', Math.max(...times), 'ms', MOST_MILLISECONDS), ok: null },
    row('median bound', median(bounds), '%', MOST_BOUND_PCT),
    { ...row('widest bound', Math.max(...bounds), '%', MOST_BOUND_PCT), ok: null },
  ];
}

/** Jobs of one to twelve runs against HiGHS, which may take ten seconds for each. */
async function judged(): Promise<Row[]> {
  const ask = await judge();
  let [dearer, proven, open] = [0, 0, 0];
  const times: number[] = [];
  const theirs: number[] = [];
  for (let seed = 0; seed < JUDGED_JOBS; seed++) {
    const model = seed % 2 ? 'constant-current' : 'resistive';
    const job = randomJob(seed, {
      runs: 1 + (seed % JUDGED_RUNS),
      model,
      cutMetres: [0.25, 0.5],
      maxSections: 4,
    });
    const start = performance.now();
    const own = plan(job);
    times.push(performance.now() - start);
    const begun = performance.now();
    const exact = ask(job);
    theirs.push(performance.now() - begun);
    if ((own.totalCost ?? Infinity) > exact.cost * (1 + 1e-7)) dearer++;
    if (exact.proven) proven++;
    if ((own.boundPct ?? 0) > 0) open++;
  }
  const what = `plans of ${JUDGED_JOBS} jobs of up to ${JUDGED_RUNS} runs`;
  return [
    {
      what: `${what}, dearer than the exact program's`,
      value: dearer,
      unit: 'jobs',
      target: 'never',
      ok: dearer === 0,
    },
    { what: `${what}, proven by the exact program`, value: proven, unit: 'jobs', ok: null },
    { what: `${what}, not searched to the end`, value: open, unit: 'jobs', ok: null },
    { what: `${what}, median time`, value: median(times), unit: 'ms', ok: null },
    { what: `${what}, longest time`, value: Math.max(...times), unit: 'ms', ok: null },
    { what: `${what}, the exact program's median time`, value: median(theirs), unit: 'ms', ok: null },
  ];
}

export async function benchTapePlan(): Promise<Row[]> {
  return [...large(), ...(await judged())];
}
