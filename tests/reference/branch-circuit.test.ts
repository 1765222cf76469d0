/**
 * branch-circuit against figures as read (data/04-branch.json names each source): units per breaker by load and by
 * inrush. inrush-method is from memory and only shows the arithmetic.
 */
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { branchCircuitCalculation } from '@/lib/sizing/branch-circuit';
import type { BranchLoad } from '@/lib/sizing/branch-circuit-input';
import entries from './data/04-branch.json';

interface Entry {
  id: string;
  inputs: Record<string, unknown>;
  expected: Record<string, unknown>;
}
const all = entries as unknown as Entry[];
const one = (id: string) => {
  const found = all.find((entry) => entry.id === id);
  if (!found) throw new Error(id);
  return found;
};
const branch = (change: object, load: Partial<BranchLoad>) =>
  runCalculation(branchCircuitCalculation, {
    basis: 'us',
    volts: 120,
    system: 'single-phase',
    loads: [{ name: 'driver', quantity: 1, voltAmps: 10, ...load }],
    breakerAmps: 20,
    continuous: true,
    metres: 5,
    maxDropPct: 5,
    ...change,
  }).result;
const mcb = (name: string) => ({
  basis: 'iec',
  volts: 230,
  curve: name[0],
  breakerAmps: Number(name.slice(1)),
});

describe('by load', () => {
  it('cont-fixtures: eight luminaires of 2 A on 20 A, 80 %', () => {
    const { inputs, expected } = one('cont-fixtures');
    const voltAmps = 120 * (inputs['I_each_A'] as number);
    expect(branch({}, { voltAmps }).unitsByLoad).toBe(expected['max_count']);
    // 8 x 2 A = 16 A, which is exactly 80 %: equal is allowed, nine are not.
    expect(branch({}, { voltAmps, quantity: 9 }).circuits).toHaveLength(2);
  });

  it('count-230V-30W: no 80 % on the IEC basis', () => {
    const { inputs, expected } = one('count-230V-30W');
    const got = branch(mcb('B16'), { voltAmps: inputs['input_W'] as number });
    expect(got.unitsByLoad).toBe(expected['max_count']);
  });

  it('driver-nominal: 75 W drivers of 0.87 efficiency on 16 A', () => {
    const { inputs, expected } = one('driver-nominal');
    const voltAmps = (inputs['P_W'] as number) / (inputs['efficiency'] as number);
    expect(branch(mcb('B16'), { voltAmps }).unitsByLoad).toBe(expected['count']);
  });
});

describe('by inrush', () => {
  // The table prints percents of C16 = 100, so that B16 = 60, cut to whole units as counts are.
  it.each(all.filter(({ id }) => id.startsWith('mcb-rel-')))('$id', ({ inputs, expected }) => {
    const got = branch(mcb(String(inputs['mcb'])), { unitsPerB16: 60, quantity: 200, voltAmps: 1 });
    expect(got.unitsByInrush).toBe(expected['percent']);
  });

  it.each(Object.entries(one('inrush-method').expected))('inrush-method, %s (from memory)', (_, example) => {
    const { mcb: breaker, Ipk, k, N } = example as { mcb: string; Ipk: number; k: number; N: number };
    expect(branch(mcb(breaker), { inrushAmps: Ipk, pulseFactor: k }).unitsByInrush).toBe(N);
  });
});
