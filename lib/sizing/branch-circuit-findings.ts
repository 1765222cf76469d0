/** What is wrong with a plan of branch circuits, or worth knowing about it. */
import { atLeast, atMost, type Finding } from '@/lib/engine/contract';
import { caution, hardStop, note, softStop } from '@/lib/engine/finding';
import type { BranchCase, LoadLimits } from './branch-circuit-limits';
import type { SizedBin } from './branch-circuit-sizing';
import { INRUSH_BASIS } from './inrush';
import { standardRatings } from './tables/breakers';
import { NEC_LOAD_BASIS, NEC_OVERCURRENT_BASIS } from './tables/nec-ampacity';

export const LOAD_BASIS = {
  us: NEC_LOAD_BASIS,
  iec: 'IEC 60364-4-43:2008 433.1, Ib <= In (from memory)',
} as const;
const CONTROL_BASIS = 'datasheet (control)';

/** One unit alone is too much for one circuit. */
export function unitTooLarge({ input }: BranchCase, { load, byLoad, byInrush }: LoadLimits): Finding {
  return softStop(
    'unit-over-breaker',
    `One ${load.name} alone is too much for ${input.breakerAmps} A: ${byLoad ?? 'any'} fit by load, ${byInrush ?? 'any'} by inrush.`,
    { name: load.name, breakerAmps: input.breakerAmps, unitsByLoad: byLoad, unitsByInrush: byInrush },
    byLoad === 0 ? LOAD_BASIS[input.basis] : INRUSH_BASIS[input.basis],
  );
}

/** Once for all loads without a figure, by name: the answer is one question to each maker. */
function inrushUnchecked({ input, limits }: BranchCase): Finding[] {
  const without = (by: 'byBreakerInrush' | 'byControlInrush') => {
    const loads = limits.filter((limit) => limit[by] === null).map(({ load }) => load);
    const names = loads.map(({ name }) => name).join(', ');
    return { names, units: loads.reduce((sum, { quantity }) => sum + quantity, 0) };
  };
  const [breaker, control] = [without('byBreakerInrush'), without('byControlInrush')];
  const findings: Finding[] = [];
  if (breaker.units > 0)
    findings.push(
      caution(
        'inrush-not-checked',
        `Inrush not checked: ask the maker for the most units on this breaker (${breaker.names}).`,
        { ...breaker, breakerAmps: input.breakerAmps },
        INRUSH_BASIS[input.basis],
      ),
    );
  if (input.control && control.units > 0)
    findings.push(
      caution(
        'control-inrush-not-checked',
        `The inrush through the control is not checked: compare with its listed rating (${control.names}).`,
        { ...control, control: input.control.kind ?? 'switch' },
        CONTROL_BASIS,
      ),
    );
  return findings;
}

/** A luminaire on three phases stands between two lines or between line and neutral: either may suit. */
function supplyFinding({ input }: BranchCase, { load }: LoadLimits): Finding[] {
  const { ratedVoltsMin: min, ratedVoltsMax: max } = load;
  const suits = (volts: number) => atLeast(volts, min ?? 0) && atMost(volts, max ?? Infinity);
  if (suits(input.volts) || (input.system === 'three-phase' && suits(input.volts / Math.sqrt(3)))) return [];
  return [
    hardStop(
      'supply-outside-rating',
      `${input.volts} V is outside what ${load.name} is rated for.`,
      { supplyVolts: input.volts, ratedVoltsMin: min ?? null, ratedVoltsMax: max ?? null },
      'datasheet',
    ),
  ];
}

function breakerNotes(c: BranchCase): Finding[] {
  const { basis, breakerAmps, curve } = c.input;
  const findings: Finding[] = [];
  if (!standardRatings(basis).some((rating) => atMost(rating, breakerAmps) && atLeast(rating, breakerAmps)))
    findings.push(
      caution(
        'rating-not-standard',
        `${breakerAmps} A is no standard rating: look at the breaker again.`,
        { breakerAmps },
        basis === 'us' ? NEC_OVERCURRENT_BASIS : 'IEC 60898-1 preferred ratings (read in a summary)',
      ),
    );
  const curveCounts = c.limits.some(
    ({ load }) => load.unitsPerBreaker === undefined && load.unitsPerB16 !== undefined,
  );
  if (basis === 'iec' && curve === undefined && curveCounts)
    findings.push(
      note(
        'curve-taken-as-b',
        'The curve of the breaker is not given: B is taken, which holds the fewest drivers.',
        { breakerAmps },
        INRUSH_BASIS.iec,
      ),
    );
  return findings;
}

/** What the loads and the breaker say, whatever the circuits. */
export function loadFindings(c: BranchCase): Finding[] {
  return [...c.limits.flatMap((limit) => supplyFinding(c, limit)), ...inrushUnchecked(c), ...breakerNotes(c)];
}

/** Each code once, from the circuit that shows it first: the fullest come first. */
export function conductorFindings(circuits: readonly SizedBin[]): Finding[] {
  const seen = new Map<string, Finding>();
  const fullest = [...circuits].sort((a, b) => b.amps - a.amps);
  for (const finding of fullest.flatMap(({ sized }) => sized.findings))
    if (!seen.has(finding.code)) seen.set(finding.code, finding);
  return [...seen.values()];
}
