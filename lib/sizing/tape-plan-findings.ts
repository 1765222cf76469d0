/** Why there is no plan, and what the reader of one must know. */
import { atMost, type Finding } from '@/lib/engine/contract';
import { caution, hardStop, note, softStop } from '@/lib/engine/finding';
import { CLASS_LIMIT_BASIS, placeLimitVolts, SELV_BASIS } from './class-limits';
import { feederOhms, piecesOf } from './tape-plan-choices';
import { FEEDS, type PlanDriver } from './tape-plan-input';
import { FEEDER_AMPS_BASIS } from './tape-plan-offer';
import { type Case, chosenSections, type TapePlan } from './tape-plan-result';
import type { Found } from './tape-plan-search';
import { type FeederOhms, middleOf } from './tape-plan-section';

const names = (drivers: readonly PlanDriver[]) => drivers.map(({ sku }) => sku).join(', ');
const classBasis = ({ input }: Case) => (input.basis === 'us' ? CLASS_LIMIT_BASIS : SELV_BASIS);

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

interface Tried {
  dropPct: number;
  dimmestPct: number;
}

/** The best that any feed and size makes of a piece, by drop. */
function bestFigures(c: Case, r: number, cuts: number): Tried | null {
  const run = c.input.runs[r];
  let best: Tried | null = null;
  for (const at of run?.places ?? [])
    for (const feed of FEEDS)
      for (const cable of c.offer.cables) {
        if (run?.pinned?.feed && feed !== run.pinned.feed) continue;
        if (run?.pinned?.size && cable.given.size !== run.pinned.size) continue;
        const nearest = Math.min(at.startMetres, at.endMetres ?? Infinity) * cable.ohmsPerMetre;
        const ohms: FeederOhms = feed === 'both' ? [nearest, nearest] : [nearest];
        if (!c.check.lengthFits(cuts, feed) || (feed === 'middle' && middleOf(cuts) < 1)) continue;
        const found = c.check.figures(cuts, feed, ohms);
        if (found && (!best || found.worstDropPct < best.dropPct))
          best = { dropPct: found.worstDropPct, dimmestPct: found.dimmestPct ?? 100 };
      }
  return best;
}

/** Which limit a run can't meet, even in its shortest sections. */
function runStop(c: Case, r: number): Finding {
  const { input, offer, check, choices } = c;
  const run = input.runs[r];
  const id = run?.id ?? '';
  const all = choices.runs[r]?.cuts ?? 1;
  const sections = run?.pinned?.sections ?? Math.min(all, input.limits.maxSections ?? 12);
  const cuts = piecesOf(all, sections)[0]?.cuts ?? 1;
  const metres = cuts * input.tape.cutMetres;
  const values = { run: id, sections, metres };
  const watts = cuts * check.cutWatts;
  if (!FEEDS.some((feed) => (run?.pinned?.feed ?? feed) === feed && check.lengthFits(cuts, feed)))
    return softStop(
      'plan-longest-run',
      `${id}: even in ${sections} sections of ${metres} m it is longer than the longest run.`,
      {
        ...values,
        limitMetres: Math.min(input.limits.longestRunMetres ?? Infinity, input.tape.maxRunMetres ?? Infinity),
      },
      'datasheet',
    );
  const most = offer.types.reduce((high, type) => Math.max(high, type.cuts), 0);
  if (most < cuts)
    return softStop(
      'plan-no-driver-large-enough',
      `${id}: no output holds a section of ${metres} m with ${watts} W.`,
      { ...values, watts, limitWatts: most * check.cutWatts },
      'common practice: load <= fraction * rating',
    );
  const best = bestFigures(c, r, cuts);
  const drop = { ...values, dropPct: best?.dropPct ?? null, limitPct: input.limits.maxDropPct };
  if (!best || !atMost(best.dropPct, input.limits.maxDropPct))
    return softStop(
      'plan-drop-too-high',
      `${id}: no feed and size keeps the drop within ${input.limits.maxDropPct} %.`,
      drop,
      'common practice',
    );
  if (!atMost(input.limits.minDimmestPct, best.dimmestPct))
    return softStop(
      'plan-too-dim',
      `${id}: no feed and size keeps its dimmest segment at ${input.limits.minDimmestPct} %.`,
      { ...values, dimmestPct: best.dimmestPct, limitPct: input.limits.minDimmestPct },
      'common practice',
    );
  return hardStop(
    'plan-feeder-too-small',
    `${id}: no size offered carries what its driver can give and keeps the limits.`,
    { ...values, amps: cuts * check.cutAmps },
    FEEDER_AMPS_BASIS,
  );
}

/** Why there can be no plan; none where there is one. */
export function stopsOf(c: Case): Finding[] {
  const volts = voltsStop(c);
  if (volts.length > 0) return volts;
  if (c.offer.types.length === 0) return [driverStop(c)];
  return c.choices.runs.filter(({ options }) => options.length === 0).map(({ index }) => runStop(c, index));
}

/** What is said of the drivers offered, with or without a plan. */
export function offerFindings(c: Case): Finding[] {
  const { leftOut, types } = c.offer;
  const { volts } = c.input.tape;
  const findings: Finding[] = [];
  if (leftOut.mark.length > 0)
    findings.push(
      caution(
        'class-two-mark-contradicted',
        `${names(leftOut.mark)}: marked Class 2 but rated for more than Class 2 allows at ${volts} V; not used.`,
        { skus: names(leftOut.mark), volts },
        CLASS_LIMIT_BASIS,
      ),
    );
  if (leftOut.volts.length > 0 && types.length > 0)
    findings.push(
      note(
        'drivers-of-other-volts',
        `${names(leftOut.volts)}: not ${volts} V; not used.`,
        { skus: names(leftOut.volts), volts },
        'datasheet',
      ),
    );
  if (leftOut.place.length > 0 && types.length > 0)
    findings.push(
      note(
        'drivers-outside-class',
        `${names(leftOut.place)}: not of the class that this tape needs; not used.`,
        { skus: names(leftOut.place) },
        classBasis(c),
      ),
    );
  return findings;
}

/** Sections whose cheaper feeder only the drop or the dimming rules out. */
function governedByDrop(c: Case, found: Found): number {
  return chosenSections(c, found).filter(({ run, piece, variant }) =>
    c.offer.cables.some((cable) => {
      const pinned = c.input.runs[run]?.pinned?.size;
      if (cable.costPerMetre >= variant.cable.costPerMetre || (pinned && cable.given.size !== pinned))
        return false;
      if (!atMost(piece.cuts * c.check.cutAmps, cable.amps)) return false;
      return !c.check.passes(piece.cuts, variant.feed, feederOhms({ ...variant, cable }));
    }),
  ).length;
}

function wiringFindings({ input, offer }: Case, plan: TapePlan): Finding[] {
  const skus = (wiring: string) =>
    [...new Set(plan.drivers?.filter((own) => own.wiring === wiring).map(({ sku }) => sku))].join(', ');
  const findings: Finding[] = [];
  const [chapter3, article411] = [skus('chapter-3'), skus('article-411')];
  const volts = input.tape.volts;
  if (chapter3 !== '')
    findings.push(
      caution(
        'plan-chapter-3',
        `${chapter3}: neither Class 2 nor Article 411; wire it by Chapter 3.`,
        { skus: chapter3, volts },
        CLASS_LIMIT_BASIS,
      ),
    );
  if (article411 !== '')
    findings.push(
      note(
        'plan-article-411',
        `${article411}: not Class 2; a listed low-voltage lighting system of Article 411.`,
        { skus: article411, volts },
        CLASS_LIMIT_BASIS,
      ),
    );
  const used = new Set(plan.bill?.conductors.map(({ size, stranding }) => `${size} ${stranding}`));
  const unrated = offer.cables.filter(
    ({ given }) => given.amps === undefined && used.has(`${given.size} ${given.stranding}`),
  );
  if (unrated.length > 0) {
    const sizes = [...new Set(unrated.map(({ given }) => given.size))].join(', ');
    findings.push(
      note(
        'plan-feeder-rating-from-table',
        `${sizes}: the cable's own rating is not given; the table's is used.`,
        { sizes },
        FEEDER_AMPS_BASIS,
      ),
    );
  }
  return findings;
}

/** What is said of the plan. */
export function planFindings(c: Case, found: Found, plan: TapePlan): Finding[] {
  const { input, choices } = c;
  const findings = wiringFindings(c, plan);
  const cut = plan.runs?.filter(({ sections }) => sections.length > 1) ?? [];
  if (cut.length > 0)
    findings.push(
      caution(
        'plan-separate-sections',
        `${cut.length} runs are cut into sections: separate both rails between them, one output to each.`,
        { runs: cut.length },
        'common practice: outputs of separate drivers are not joined, nor class-limited outputs unless listed for it',
      ),
    );
  const governed = governedByDrop(c, found);
  if (governed > 0)
    findings.push(
      note(
        'plan-drop-governs',
        `${governed} sections have a larger feeder because of drop or dimming.`,
        { sections: governed },
        'common practice',
      ),
    );
  const short = input.runs.filter(
    ({ metres }, r) => !atMost(metres, (choices.runs[r]?.cuts ?? 0) * input.tape.cutMetres),
  );
  if (short.length > 0)
    findings.push(
      note(
        'plan-run-ends-short',
        `${short.map(({ id }) => id).join(', ')}: not a whole number of cuts; the tape ends up to ${input.tape.cutMetres} m short.`,
        { runs: short.map(({ id }) => id).join(', '), cutMetres: input.tape.cutMetres },
        'datasheet',
      ),
    );
  if (plan.boundPct !== null && plan.boundPct > 0)
    findings.push(
      note(
        'plan-bound-open',
        `A cheaper plan may exist: at most ${plan.boundPct} % cheaper.`,
        { boundPct: plan.boundPct },
        'bound by linear programming',
      ),
    );
  return findings;
}
