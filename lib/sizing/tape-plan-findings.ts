/** What the reader of a plan must know, and of the drivers offered. */
import { atMost, type Finding } from '@/lib/engine/contract';
import { caution, note } from '@/lib/engine/finding';
import { CLASS_LIMIT_BASIS } from './class-limits';
import { feederOhms } from './tape-plan-choices';
import { FEEDER_AMPS_BASIS } from './tape-plan-offer';
import { type Case, chosenSections, type TapePlan } from './tape-plan-result';
import type { Found } from './tape-plan-search';
import { classBasis, names } from './tape-plan-stops';

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
