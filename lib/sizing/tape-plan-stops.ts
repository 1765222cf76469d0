/** Why there is no plan of tape runs. */
import { atMost, type Finding } from '@/lib/engine/contract';
import { hardStop, softStop } from '@/lib/engine/finding';
import { CLASS_LIMIT_BASIS, placeLimitVolts, SELV_BASIS } from './class-limits';
import { feederOhms, mostSections, piecesOf, variantsOf } from './tape-plan-choices';
import { FEEDS, type PlanDriver, type PlanRun, type TapePlanInput } from './tape-plan-input';
import { type Cable, FEEDER_AMPS_BASIS } from './tape-plan-offer';
import type { Case } from './tape-plan-result';

export const names = (drivers: readonly PlanDriver[]) => drivers.map(({ sku }) => sku).join(', ');
export const classBasis = ({ input }: Case) => (input.basis === 'us' ? CLASS_LIMIT_BASIS : SELV_BASIS);

/** Nothing that is offered may feed this tape here. */
function driverStop(c: Case): Finding {
  const { input, offer } = c;
  const { volts } = input.tape;
  const skus = names([...offer.leftOut.mark, ...offer.leftOut.place]);
  if (skus === '')
    return softStop(
      'no-driver-of-these-volts',
      `No driver offered gives ${volts} V.`,
      { volts },
      'datasheet',
    );
  if (input.basis === 'iec' && !input.drivers.some(({ selv }) => selv))
    return hardStop(
      'no-selv-driver',
      `No driver offered at ${volts} V is marked SELV (${skus}).`,
      { volts, skus },
      SELV_BASIS,
    );
  return hardStop(
    'no-class-limited-driver',
    `No driver offered keeps within the class that this tape needs at ${volts} V (${skus}).`,
    { volts, skus },
    classBasis(c),
  );
}

function voltsStop(c: Case): Finding[] {
  const { basis, wet = false, insulated = false, tape } = c.input;
  const limitVolts = placeLimitVolts({ basis, wet, insulated, volts: tape.volts });
  if (limitVolts === null || atMost(tape.volts, limitVolts)) return [];
  return [
    hardStop(
      'tape-volts-over-class',
      `${tape.volts} V is more than the ${limitVolts} V that this place takes.`,
      { volts: tape.volts, limitVolts, place: wet ? 'wet' : 'dry' },
      classBasis(c),
    ),
  ];
}

/** Metres of the piece, and what the ways to feed it come to. */
interface Tried {
  cuts: number;
  /** Ways that keep to the lengths, by a size that carries what it must. */
  ways: number;
  /** The least drop of these; null where none has an operating point. */
  best: { dropPct: number; dimmestPct: number } | null;
}

/** Every way to feed a piece, with the feeders that it would really have. */
function tryPiece(c: Case, run: PlanRun, { first, cuts }: { first: number; cuts: number }): Tried {
  const { offer, check } = c;
  const places = run.places.filter(({ place }) => (run.pinned?.place ?? place) === place);
  const carries = ({ index, amps }: Cable) =>
    atMost(cuts * check.cutAmps, amps) &&
    offer.types.some((type) => type.cuts >= cuts && offer.feeders[type.group]?.[index] === true);
  const variants = places
    .flatMap((at) => variantsOf(c, run, at, first, cuts))
    .filter(({ cable, feed }) => carries(cable) && check.lengthFits(cuts, feed));
  let best: Tried['best'] = null;
  for (const variant of variants) {
    const found = check.figures(cuts, variant.feed, feederOhms(variant));
    if (found && (!best || found.worstDropPct < best.dropPct))
      best = { dropPct: found.worstDropPct, dimmestPct: found.dimmestPct ?? 100 };
  }
  return { cuts, ways: variants.length, best };
}

/** What is set, or what leaves a constant current the volts that it needs. */
function dropLimitPct({ tape, limits }: TapePlanInput): number {
  const dropout = tape.load.model === 'constant-current' ? (tape.load.dropoutVolts ?? 0) : 0;
  return Math.min(limits.maxDropPct, ((tape.volts - dropout) / tape.volts) * 100);
}

/** The first piece that can't be fed; the first of all where each can by itself. */
function failing(c: Case, run: PlanRun, pieces: readonly { first: number; cuts: number }[]): Tried {
  const limitPct = dropLimitPct(c.input);
  const { minDimmestPct } = c.input.limits;
  const tried = pieces.map((piece) => tryPiece(c, run, piece));
  const bad = tried.find(
    ({ best }) => !best || !atMost(best.dropPct, limitPct) || !atMost(minDimmestPct, best.dimmestPct),
  );
  return bad ?? tried[0] ?? { cuts: 1, ways: 0, best: null };
}

/** Which limit a run can't meet, even in its shortest sections. */
function runStop(c: Case, r: number): Finding[] {
  const { input, offer, check, choices } = c;
  const run = input.runs[r];
  if (!run) return [];
  const { id, pinned } = run;
  const { minDimmestPct, longestRunMetres } = input.limits;
  const limitPct = dropLimitPct(input);
  const all = choices.runs[r]?.cuts ?? 1;
  const sections = pinned?.sections ?? mostSections(input, run, all);
  const pieces = piecesOf(all, sections);
  const longest = pieces[0]?.cuts ?? 1;
  const metres = longest * input.tape.cutMetres;
  const values = { run: id, sections, metres };
  const tooLong = softStop(
    'plan-longest-run',
    `${id}: even in ${sections} sections of ${metres} m it is longer than the longest run.`,
    {
      ...values,
      limitMetres: Math.min(longestRunMetres ?? Infinity, input.tape.maxRunMetres ?? Infinity),
    },
    'datasheet',
  );
  if (!FEEDS.some((feed) => (pinned?.feed ?? feed) === feed && check.lengthFits(longest, feed)))
    return [tooLong];
  const watts = longest * check.cutWatts;
  const most = offer.types.reduce((high, type) => Math.max(high, type.cuts), 0);
  if (most < longest)
    return [
      softStop(
        'plan-no-driver-large-enough',
        `${id}: no output holds a section of ${metres} m with ${watts} W.`,
        { ...values, watts, limitWatts: most * check.cutWatts },
        'common practice: load <= fraction * rating',
      ),
    ];
  const { cuts, ways, best } = failing(c, run, pieces);
  const piece = { ...values, metres: cuts * input.tape.cutMetres };
  if (ways === 0)
    return [
      hardStop(
        'plan-feeder-too-small',
        `${id}: no size offered carries what its driver can give and keeps the limits.`,
        { ...piece, amps: cuts * check.cutAmps },
        FEEDER_AMPS_BASIS,
      ),
    ];
  if (!best || !atMost(best.dropPct, limitPct))
    return [
      softStop(
        'plan-drop-too-high',
        `${id}: no feed and size keeps the drop within ${limitPct} %.`,
        { ...piece, dropPct: best?.dropPct ?? null, limitPct },
        'common practice',
      ),
    ];
  if (!atMost(minDimmestPct, best.dimmestPct))
    return [
      softStop(
        'plan-too-dim',
        `${id}: no feed and size keeps its dimmest segment at ${minDimmestPct} %.`,
        { ...piece, dimmestPct: best.dimmestPct, limitPct: minDimmestPct },
        'common practice',
      ),
    ];
  // Fed at both ends over feeders so unlike that one end feeds more tape than the sheet allows.
  return [tooLong];
}

/** Why there can be no plan; none where there is one. */
export function stopsOf(c: Case): Finding[] {
  const volts = voltsStop(c);
  if (volts.length > 0) return volts;
  if (c.offer.types.length === 0) return [driverStop(c)];
  return c.choices.runs
    .filter(({ options }) => options.length === 0)
    .flatMap(({ index }) => runStop(c, index));
}
