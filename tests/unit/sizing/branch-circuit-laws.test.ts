/** branch-circuit over random loads: nothing is lost, nothing is overfull, and no more circuits than need be. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { branchCircuit } from '@/lib/sizing/branch-circuit';
import type { BranchCircuitInput } from '@/lib/sizing/branch-circuit-input';
import { INSTANT_TRIP } from '@/lib/sizing/tables/breakers';

const load = fc.record({
  name: fc.constant(''),
  quantity: fc.integer({ min: 1, max: 120 }),
  voltAmps: fc.double({ min: 1, max: 200, noNaN: true }),
  unitsPerBreaker: fc.option(fc.integer({ min: 1, max: 90 }), { nil: undefined }),
  unitsPerB16: fc.option(fc.integer({ min: 4, max: 60 }), { nil: undefined }),
});
const named = (loads: (typeof load extends fc.Arbitrary<infer T> ? T : never)[]) =>
  loads.map((one, place) => ({ ...one, name: `load ${place}` }));
const input = fc
  .record({
    basis: fc.constantFrom('us' as const, 'iec' as const),
    volts: fc.constantFrom(120, 230, 277),
    system: fc.constantFrom('single-phase' as const, 'three-phase' as const),
    loads: fc.array(load, { minLength: 1, maxLength: 4 }).map(named),
    breakerAmps: fc.constantFrom(10, 15, 16, 20, 32),
    curve: fc.constantFrom('B' as const, 'C' as const),
    continuous: fc.boolean(),
    metres: fc.double({ min: 0, max: 150, noNaN: true }),
    spacingMetres: fc.double({ min: 0, max: 5, noNaN: true }),
    maxDropPct: fc.double({ min: 1, max: 8, noNaN: true }),
  })
  .map((one): BranchCircuitInput => one);

/** Most of one load on one circuit, as the design writes it. */
function most(
  { basis, volts, system, breakerAmps, curve = 'B', continuous }: BranchCircuitInput,
  place: number,
  loads: BranchCircuitInput['loads'],
): number {
  const { voltAmps, unitsPerBreaker, unitsPerB16 } = loads[place] ?? { voltAmps: 1 };
  const perAmp = system === 'three-phase' ? volts * Math.sqrt(3) : volts;
  const byLoad = Math.floor(
    (breakerAmps * perAmp) / (basis === 'us' && continuous ? 1.25 : 1) / voltAmps + 1e-9,
  );
  const scaled =
    basis === 'us' || unitsPerB16 === undefined
      ? Infinity
      : Math.floor(unitsPerB16 * (breakerAmps / 16) * (INSTANT_TRIP[curve] / 3) + 1e-9);
  return Math.min(byLoad, unitsPerBreaker ?? scaled);
}

describe('branch-circuit', () => {
  it('puts every unit on a circuit, once, and no circuit over its fractions, its drop or its breaker', () => {
    fc.assert(
      fc.property(input, (one) => {
        const { result, findings } = branchCircuit(one);
        if (result.circuits.length === 0) {
          expect(findings.map(({ code }) => code)).toContain('unit-over-breaker');
          expect(one.loads.some((_, place) => most(one, place, one.loads) < 1)).toBe(true);
          return;
        }
        const counts = new Map<string, number>();
        for (const circuit of result.circuits) {
          let share = 0;
          for (const { name, quantity } of circuit.units) {
            expect(Number.isInteger(quantity) && quantity > 0).toBe(true);
            counts.set(name, (counts.get(name) ?? 0) + quantity);
            share +=
              quantity /
              most(
                one,
                one.loads.findIndex((of) => of.name === name),
                one.loads,
              );
          }
          expect(share).toBeLessThanOrEqual(1 + 1e-6);
          if (circuit.dropPct !== null)
            expect(circuit.dropPct).toBeLessThanOrEqual(one.maxDropPct * (1 + 1e-9));
          const factor = one.basis === 'us' && one.continuous ? 1.25 : 1;
          expect(circuit.amps * factor).toBeLessThanOrEqual(one.breakerAmps * (1 + 1e-9));
        }
        expect([...counts]).toEqual(
          expect.arrayContaining(one.loads.map(({ name, quantity }) => [name, quantity])),
        );
      }),
      { numRuns: 500 },
    );
  });

  it('needs no more circuits of one kind than its count says, while a conductor serves them', () => {
    fc.assert(
      fc.property(input, (several) => {
        const one = {
          ...several,
          loads: several.loads.slice(0, 1),
          metres: 1,
          spacingMetres: 0,
          maxDropPct: 50,
        };
        const { result } = branchCircuit(one);
        if (result.circuits.length === 0) return;
        const [only] = one.loads;
        expect(result.circuits).toHaveLength(Math.ceil((only?.quantity ?? 0) / most(one, 0, one.loads)));
        const sizes = result.circuits.map(({ units }) => units[0]?.quantity ?? 0);
        expect(Math.max(...sizes) - Math.min(...sizes)).toBeLessThanOrEqual(1);
      }),
    );
  });

  it('opens a circuit of a mix only when the first unit of what is left has no room: under twice the fractions', () => {
    fc.assert(
      fc.property(input, (several) => {
        const one = { ...several, metres: 1, spacingMetres: 0, maxDropPct: 50 };
        const { result } = branchCircuit(one);
        if (result.circuits.length === 0) return;
        const shares = one.loads.reduce(
          (sum, { quantity }, place) => sum + quantity / most(one, place, one.loads),
          0,
        );
        expect(result.circuits.length).toBeGreaterThanOrEqual(Math.ceil(shares - 1e-6));
        expect(result.circuits.length).toBeLessThanOrEqual(Math.max(one.loads.length, Math.ceil(2 * shares)));
      }),
    );
  });

  it('numbered case 1: shares one kind anew over all circuits, where cutting each in two took one too many', () => {
    const row = (quantity: number) =>
      branchCircuit({
        basis: 'us',
        system: 'single-phase',
        volts: 120,
        breakerAmps: 32,
        continuous: true,
        metres: 135.9627149034856,
        spacingMetres: 3.02e-13,
        maxDropPct: 1,
        loads: [{ name: 'a', quantity, voltAmps: 69.81818188800001 }],
      }).result.circuits;
    expect(row(77).length).toBeLessThanOrEqual(row(87).length);
    expect(row(77).reduce((sum, { units }) => sum + (units[0]?.quantity ?? 0), 0)).toBe(77);
    for (const { size } of row(77)) expect(size).not.toBeNull();
  });

  it('never needs fewer circuits for more units, a smaller breaker count or a longer run', () => {
    fc.assert(
      fc.property(input, (several) => {
        const one = { ...several, loads: several.loads.slice(0, 1) };
        const [only] = one.loads;
        const now = branchCircuit(one).result;
        if (!only || now.circuits.some(({ size }) => size === null)) return;
        const harder = [
          { ...one, loads: [{ ...only, quantity: only.quantity + 10 }] },
          { ...one, loads: [{ ...only, voltAmps: only.voltAmps * 1.5 }] },
          { ...one, metres: one.metres * 2 },
        ];
        for (const other of harder) {
          const then = branchCircuit(other).result;
          const unanswered = then.circuits.length === 0 || then.circuits.some(({ size }) => size === null);
          expect(unanswered || then.circuits.length >= now.circuits.length).toBe(true);
        }
      }),
    );
  });
});
