/** 9. Plan of tape runs: sections, feeds, feeder sizes and driver outputs of least total cost. */
import {
  defineCalculation,
  EngineError,
  floorWithin,
  type Limits,
  type Outcome,
  refuse,
} from '@/lib/engine/contract';
import { checkNames, choicesOf } from './tape-plan-choices';
import { offerFindings, planFindings } from './tape-plan-findings';
import { type TapePlanInput, tapePlanSchema } from './tape-plan-input';
import { offerOf } from './tape-plan-offer';
import { type Case, NO_PLAN, resultOf, type TapePlan } from './tape-plan-result';
import { cheapestPlan, type Effort } from './tape-plan-search';
import { SectionCheck } from './tape-plan-section';
import { stopsOf } from './tape-plan-stops';
import { workingOf } from './tape-plan-working';

export type { TapePlan } from './tape-plan-result';

/** Jobs of an everyday size are mostly searched to the end, within the two seconds of a request; larger ones less far. */
const EVERYDAY_RUNS = 12;
const LEAN = { combinations: 2, width: 1, steps: 6000 };
const EVERYDAY: Effort = {
  lean: LEAN,
  work: 1.5e8,
  steps: 2e6,
  parts: 4000,
  trial: { combinations: 3, width: 12, steps: 300 },
  last: { combinations: 1, width: Infinity, steps: 300_000 },
};
const LARGE: Effort = {
  lean: LEAN,
  work: 3e7,
  steps: 3e5,
  parts: 4,
  trial: { combinations: 4, width: 4, steps: 1500 },
  last: { combinations: 4, width: 4, steps: 1500 },
};

function cutsOf({ runs, tape }: TapePlanInput, limits: Limits): number[] {
  if (runs.length > limits.maxRuns) {
    const message = `must be at most ${limits.maxRuns} here`;
    throw new EngineError('too-large', `runs: ${message}`, [{ path: 'runs', message }]);
  }
  return runs.map(({ metres, pinned }, r) => {
    const cuts = floorWithin(metres / tape.cutMetres);
    if (cuts < 1) refuse(`runs.${r}.metres`, `is shorter than one cut of ${tape.cutMetres} m`);
    if (cuts > limits.maxCuts) {
      const message = `must be at most ${limits.maxCuts} cuts here`;
      throw new EngineError('too-large', `runs.${r}.metres: ${message}`, [
        { path: `runs.${r}.metres`, message },
      ]);
    }
    if ((pinned?.sections ?? 1) > cuts)
      refuse(`runs.${r}.pinned.sections`, `is more than the ${cuts} cuts of the run`);
    return cuts;
  });
}

/**
 * The cheapest plan of the choices that tape-plan-choices.ts describes, and how far from the best of them it can be.
 * Lengths m, ratings W and A, drop and dimming %, hours h, cost in one currency.
 * @throws {EngineError} `invalid-input` with the field, `too-large` over the limits of runs or cuts
 * Source: `tape-analysis` for every section; class limits as class-limits.ts; branch and bound with column generation.
 */
export function tapePlan(input: TapePlanInput, limits: Limits): Outcome<TapePlan> {
  checkNames(input);
  const cuts = cutsOf(input, limits);
  const check = new SectionCheck(input);
  const offer = offerOf(input, check);
  const choices = choicesOf(input, offer, check, cuts);
  const c: Case = { input, offer, check, choices };
  const stops = stopsOf(c);
  if (stops.length > 0) return { result: NO_PLAN, findings: [...stops, ...offerFindings(c)], working: [] };
  const { best, bound } = cheapestPlan(choices, input.runs.length <= EVERYDAY_RUNS ? EVERYDAY : LARGE);
  if (!best)
    throw new EngineError('no-solution', 'No plan was found.', [{ path: 'runs', message: 'have no plan' }]);
  const result = resultOf(c, best, bound);
  return {
    result,
    findings: [...planFindings(c, best, result), ...offerFindings(c)],
    working: workingOf(c, result),
  };
}

export const tapePlanCalculation = defineCalculation({
  name: 'tape-plan',
  summary:
    'Sections, feeds, feeder sizes and drivers of tape runs at least total cost, within electrical and class limits',
  bench: false,
  schema: tapePlanSchema,
  calculate: tapePlan,
});
