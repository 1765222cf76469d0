/** US basis: AWG sizes by Table 310.16, 240.4 and 240.6(A); behind a Class 2 source by the class limit. */
import { atLeast, atMost, type Finding, refuse, type WorkingStep } from '@/lib/engine/contract';
import { caution, note } from '@/lib/engine/finding';
import { dropOf, type Ladder, type Rung } from './conductor-ladder';
import type { SizeRequest } from './conductor-size-input';
import { ampacityStep, overcurrentStep } from './conductor-size-steps';
import { nextStandardRating } from './tables/breakers';
import { US_SIZES } from './tables/conductors';
import {
  ARTICLE_411_AMPS,
  CLASS_TWO_BASIS,
  classTwoLimitAmps,
  type Column,
  COLUMNS,
  NEC_240_4_D,
  NEC_310_16,
  NEC_AMPACITY_BASIS,
  NEC_LOAD_BASIS,
  NEC_OVERCURRENT_BASIS,
  necAmbientFactor,
  necCountFactor,
  SMALL_COPPER_AMPS,
} from './tables/nec-ampacity';

/** The drop is figured with the conductor at 75 C, the temperature of Chapter 9 Table 8. */
const DROP_CELSIUS = 75;
const NM_COLUMN = 60;
const LEAST_SIZE = 'AWG 14';

interface UsCase {
  request: SizeRequest;
  terminal: Column;
  insulation: Column;
  ambientFactor: number | null;
  countFactor: number;
  /** A, with the 125 % of a continuous load. */
  neededAmps: number;
  /** Within what a Class 2 source may give: any size, and no overcurrent device. */
  classTwo: boolean;
  overcurrentAmps: number | null;
}

function column(path: 'terminalCelsius' | 'insulationCelsius', value: number | undefined): Column {
  if (value === undefined) return refuse(path, 'is needed on the US basis: 60, 75 or 90');
  return COLUMNS.find((one) => one === value) ?? refuse(path, 'must be 60, 75 or 90 on the US basis');
}

function classTwoLimit({ system, volts }: SizeRequest): number | null {
  return system === 'dc' ? classTwoLimitAmps(volts) : null;
}

function usCase(request: SizeRequest): UsCase {
  const { continuous, amps, installMethod, breakerAmps } = request;
  const terminal = column('terminalCelsius', request.terminalCelsius);
  const insulation = column('insulationCelsius', request.insulationCelsius ?? 90);
  if (installMethod !== undefined && installMethod !== 'raceway' && installMethod !== 'NM')
    refuse('installMethod', 'must be "raceway" or "NM" on the US basis');
  const neededAmps = continuous ? 1.25 * amps : amps;
  const limit = classTwoLimit(request);
  const classTwo = breakerAmps === undefined && limit !== null && atMost(amps, limit);
  return {
    request,
    terminal: installMethod === 'NM' && terminal > NM_COLUMN ? NM_COLUMN : terminal,
    insulation,
    ambientFactor: necAmbientFactor(insulation, request.ambientCelsius),
    countFactor: necCountFactor(request.loadedConductors),
    neededAmps,
    classTwo,
    overcurrentAmps: classTwo ? null : (breakerAmps ?? nextStandardRating('us', neededAmps)),
  };
}

const table = (size: string, at: Column) => NEC_310_16[size]?.[at] ?? SMALL_COPPER_AMPS[size] ?? 0;

/** A1 uncorrected at the terminals, A2 corrected at the insulation. */
function columns(c: UsCase, size: string): { a1: number; a2: number; ampacity: number } {
  const a1 = table(size, c.terminal);
  const a2 = table(size, c.insulation) * (c.ambientFactor ?? 0) * c.countFactor;
  return { a1, a2, ampacity: Math.min(a1, a2) };
}

/**
 * Not over the next standard rating at or above the ampacity, nor over what 240.4(D) gives a small conductor. Under
 * AWG 14 no standard rating is small enough: there the load alone tells, as long as no breaker is given.
 */
function protectedBy({ request, overcurrentAmps, neededAmps }: UsCase, size: string, ampacity: number) {
  const small = SMALL_COPPER_AMPS[size];
  if (small !== undefined) return atMost(request.breakerAmps ?? 0, small);
  const next = nextStandardRating('us', ampacity);
  if (overcurrentAmps === null || next === null || !atMost(neededAmps, overcurrentAmps)) return false;
  return atMost(overcurrentAmps, Math.min(next, NEC_240_4_D[size] ?? next));
}

function rungOf(c: UsCase, size: string): Rung {
  const { a1, a2, ampacity } = columns(c, size);
  const loadFits = ampacity > 0 && atLeast(a1, c.neededAmps) && atLeast(a2, c.request.amps);
  return {
    size,
    ampacity,
    carries: loadFits && (c.classTwo || protectedBy(c, size, ampacity)),
    ...dropOf(c.request, size, c.request.celsius ?? DROP_CELSIUS),
    zsOhms: null,
    faultFits: true,
  };
}

function classFindings({ request, classTwo }: UsCase): Finding[] {
  const limitAmps = classTwoLimit(request);
  if (limitAmps === null) return [];
  // A breaker that is given tells that the source is none of Class 2.
  if (request.breakerAmps !== undefined && atMost(request.amps, limitAmps)) return [];
  const values = { amps: request.amps, limitAmps, volts: request.volts };
  if (classTwo)
    return [
      note(
        'class-two-source',
        'Sized for a Class 2 source: only one that is marked so counts. Behind any other, AWG 14 at least and an overcurrent device.',
        values,
        CLASS_TWO_BASIS,
      ),
    ];
  return [
    caution(
      'over-class-two',
      `No Class 2 source gives this: a listed low-voltage lighting system (to ${ARTICLE_411_AMPS} A) or power wiring.`,
      { ...values, articleAmps: ARTICLE_411_AMPS },
      `${CLASS_TWO_BASIS}; NEC 2023 411.6 (read in an extract)`,
    ),
  ];
}

function countFindings({ request }: UsCase): Finding[] {
  const circuits = request.groupedCircuits ?? 1;
  if (request.loadedConductors >= 2 * circuits) return [];
  return [
    caution(
      'grouped-not-counted',
      'On the US basis loadedConductors counts all current-carrying conductors in the raceway; the grouped circuits are not multiplied in.',
      { loadedConductors: request.loadedConductors, groupedCircuits: circuits },
      NEC_AMPACITY_BASIS,
    ),
  ];
}

function findingsOf(c: UsCase, chosen: Rung | null): Finding[] {
  const { terminal, insulation, overcurrentAmps } = c;
  const findings = [...classFindings(c), ...countFindings(c)];
  if (insulation < terminal)
    findings.push(
      caution(
        'insulation-below-terminals',
        `The terminals take ${terminal} C, the insulation only ${insulation} C: choose a conductor for the terminals.`,
        { terminalCelsius: terminal, insulationCelsius: insulation },
        NEC_AMPACITY_BASIS,
      ),
    );
  if (chosen && overcurrentAmps !== null && !atMost(overcurrentAmps, chosen.ampacity))
    findings.push(
      note(
        'rounded-up-overcurrent',
        `${overcurrentAmps} A is the next standard rating above the ampacity of ${chosen.ampacity} A. Not for receptacle circuits with several outlets.`,
        { overcurrentAmps, ampacity: chosen.ampacity },
        NEC_OVERCURRENT_BASIS,
      ),
    );
  return findings;
}

function stepsOf(c: UsCase, rung: Rung): WorkingStep[] {
  const { a1, a2, ampacity } = columns(c, rung.size);
  const size = { name: 'size', value: rung.size, unit: '' };
  return [
    {
      key: 'load-with-continuous',
      name: 'Load that the conductor and its breaker are chosen for',
      formula: 'I * k',
      inputs: [
        { name: 'I', value: c.request.amps, unit: 'A' },
        { name: 'k', value: c.request.continuous ? 1.25 : 1, unit: '' },
      ],
      value: c.neededAmps,
      unit: 'A',
      basis: NEC_LOAD_BASIS,
    },
    {
      key: 'ampacity-at-terminals',
      name: 'Ampacity in the column of the terminals',
      formula: 'A1 = table(size, terminals)',
      inputs: [size, { name: 'terminals', value: c.terminal, unit: 'C' }],
      value: a1,
      unit: 'A',
      basis: NEC_AMPACITY_BASIS,
    },
    {
      key: 'ampacity-corrected',
      name: 'Ampacity in the column of the insulation, corrected',
      formula: 'A2 = table(size, insulation) * Ft * Fn',
      inputs: [
        size,
        { name: 'insulation', value: c.insulation, unit: 'C' },
        { name: 'Ft', value: c.ambientFactor, unit: '' },
        { name: 'Fn', value: c.countFactor, unit: '' },
      ],
      value: a2,
      unit: 'A',
      basis: NEC_AMPACITY_BASIS,
    },
    ampacityStep(
      'min(A1, A2)',
      [
        { name: 'A1', value: a1, unit: 'A' },
        { name: 'A2', value: a2, unit: 'A' },
      ],
      ampacity,
      NEC_AMPACITY_BASIS,
    ),
    ...(c.classTwo
      ? []
      : [overcurrentStep(c.neededAmps, c.request.breakerAmps, c.overcurrentAmps, NEC_OVERCURRENT_BASIS)]),
  ];
}

function leastSize({ request, classTwo }: UsCase): number {
  const rule = classTwo ? 0 : US_SIZES.indexOf(LEAST_SIZE);
  if (request.minimumSize === undefined) return rule;
  const wanted = US_SIZES.indexOf(request.minimumSize);
  return wanted < 0 ? refuse('minimumSize', 'must be an AWG size on the US basis') : Math.max(rule, wanted);
}

/** Sizes AWG 24 to 4/0 with what each carries. @throws {EngineError} `invalid-input` with the field. */
export function usLadder(request: SizeRequest): Ladder {
  const c = usCase(request);
  return {
    rungs: US_SIZES.map((size) => rungOf(c, size)),
    least: leastSize(c),
    overcurrentAmps: c.overcurrentAmps,
    zsMaxOhms: null,
    celsius: request.celsius ?? DROP_CELSIUS,
    findings: (chosen) => findingsOf(c, chosen),
    steps: (rung) => stepsOf(c, rung),
  };
}
