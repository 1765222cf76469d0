/** "How it was figured" of a branch circuit: its counts, its row, and the conductor of its fullest circuit. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import { LOAD_BASIS } from './branch-circuit-findings';
import { type BranchCase, fraction, type LoadLimits, unitsIn } from './branch-circuit-limits';
import type { SizedBin } from './branch-circuit-sizing';
import type { Rung } from './conductor-ladder';
import { rungSteps } from './conductor-size';
import { INRUSH_BASIS } from './inrush';

function byLoad(c: BranchCase, { load, byLoad: units }: LoadLimits): WorkingStep {
  return {
    key: 'units-by-load',
    name: 'Most units on one circuit by load',
    formula: 'floor((In * U * f / k - other) / VA)',
    inputs: [
      { name: 'In', value: c.input.breakerAmps, unit: 'A' },
      { name: 'U * f', value: c.voltAmpsPerAmp, unit: 'V' },
      { name: 'k', value: c.continuousFactor, unit: '' },
      { name: 'other', value: c.input.existing?.otherVoltAmps ?? 0, unit: 'VA' },
      { name: 'VA', value: load.voltAmps, unit: 'VA' },
    ],
    value: units,
    unit: '',
    basis: LOAD_BASIS[c.input.basis],
  };
}

function byInrush(c: BranchCase, { load, byInrush: units }: LoadLimits): WorkingStep {
  const { basis, breakerAmps, control } = c.input;
  const inputs: WorkingInput[] = [
    { name: 'units per breaker', value: load.unitsPerBreaker ?? null, unit: '' },
    { name: 'N(B16)', value: load.unitsPerB16 ?? null, unit: '' },
    { name: 'In', value: breakerAmps, unit: 'A' },
    { name: 'curve', value: c.curve ?? null, unit: '' },
    { name: 'k', value: load.pulseFactor ?? null, unit: '' },
    { name: 'Ipk', value: load.inrushAmps ?? null, unit: 'A' },
    { name: 'control', value: control?.ratedInrushAmps ?? null, unit: 'A' },
  ];
  return {
    key: 'units-by-inrush',
    name: 'Most units on the breaker by inrush',
    formula:
      basis === 'us'
        ? 'maker’s count; control / Ipk'
        : 'floor(N(B16) * In/16 * m/3) or floor(k * m * In / Ipk)',
    inputs,
    value: units,
    unit: '',
    basis: INRUSH_BASIS[basis],
  };
}

function mixedShare(c: BranchCase, circuit: SizedBin): WorkingStep {
  return {
    key: 'mixed-share',
    name: 'Share of a circuit that its units take, q/N added up',
    formula: 'q1/N1 + q2/N2 + ...',
    inputs: c.limits.map(({ load, most }, place) => ({
      name: load.name || `load ${place + 1}`,
      value: `${circuit.bin[place] ?? 0} of ${most === Infinity ? 'any' : most}`,
      unit: '',
    })),
    value: fraction(c, circuit.bin, 'most'),
    unit: '',
    basis: 'common practice',
  };
}

function row({ input }: BranchCase, { bin, request }: SizedBin): WorkingStep {
  return {
    key: 'row-length',
    name: 'Length that the load of a row counts for',
    formula: 'L1 + s * (n - 1) / 2',
    inputs: [
      { name: 'L1', value: input.metres, unit: 'm' },
      { name: 's', value: input.spacingMetres ?? 0, unit: 'm' },
      { name: 'n', value: unitsIn(bin), unit: '' },
    ],
    value: request.metres,
    unit: 'm',
    basis: 'drop along evenly spaced equal loads (arithmetic)',
  };
}

/** Of an existing circuit the conductor that is there, of a new one the one that was chosen or came nearest. */
function conductorSteps(
  { input }: BranchCase,
  { request, sized }: SizedBin,
  rung: Rung | null,
): WorkingStep[] {
  if (!input.existing) return sized.working;
  return rung ? rungSteps(request, sized.ladder, rung) : [];
}

/** @param circuits none where not even one unit fits */
export function workingOf(
  c: BranchCase,
  circuits: readonly SizedBin[],
  rung: (circuit: SizedBin) => Rung | null,
): WorkingStep[] {
  const [only] = c.limits;
  const [first] = [...circuits].sort((a, b) => b.amps - a.amps);
  const counts =
    c.limits.length === 1 && only
      ? [byLoad(c, only), byInrush(c, only)]
      : first
        ? [mixedShare(c, first)]
        : [];
  return first ? [...counts, row(c, first), ...conductorSteps(c, first, rung(first))] : counts;
}
