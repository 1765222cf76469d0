/**
 * conductor-size over random circuits: the rule written a second time, literally and by trying every size, and what
 * must hold whatever the figures.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { conductorResistance } from '@/lib/sizing/conductor-resistance';
import { conductorSize } from '@/lib/sizing/conductor-size';
import type { ConductorSizeInput } from '@/lib/sizing/conductor-size-input';
import { IEC_60898_RATINGS, NEC_240_6 } from '@/lib/sizing/tables/breakers';
import { ALL_SIZES } from '@/lib/sizing/tables/conductors';
import { IEC_B_52, IEC_SIZES, iecAmbientFactor, iecGroupFactor } from '@/lib/sizing/tables/iec-ampacity';
import { type Column, NEC_310_16, necAmbientFactor, necCountFactor } from '@/lib/sizing/tables/nec-ampacity';

const column = fc.constantFrom<Column>(60, 75, 90);
const amps = fc.double({ min: 0, max: 260, noNaN: true });
const shared = {
  system: fc.constantFrom('single-phase' as const, 'three-phase' as const),
  volts: fc.constantFrom(120, 208, 230, 277, 400, 480),
  amps,
  metres: fc.double({ min: 0, max: 300, noNaN: true }),
  maxDropPct: fc.double({ min: 0.5, max: 20, noNaN: true }),
  continuous: fc.boolean(),
};
const usInput = fc.record({
  basis: fc.constant('us' as const),
  ...shared,
  ambientCelsius: fc.integer({ min: -20, max: 80 }),
  loadedConductors: fc.integer({ min: 1, max: 45 }),
  terminalCelsius: column,
  insulationCelsius: column,
});
const iecInput = fc.record({
  basis: fc.constant('iec' as const),
  ...shared,
  ambientCelsius: fc.integer({ min: -20, max: 75 }),
  loadedConductors: fc.constantFrom(2, 3),
  groupedCircuits: fc.integer({ min: 1, max: 20 }),
  insulation: fc.constantFrom('PVC70' as const, 'XLPE90' as const),
  installMethod: fc.constantFrom('A1' as const, 'A2' as const, 'B1' as const, 'B2' as const, 'C' as const),
  zeOhms: fc.double({ min: 0, max: 1, noNaN: true }),
  curve: fc.constantFrom('B' as const, 'C' as const, 'D' as const),
});

function dropPct(input: ConductorSizeInput, size: string, celsius: number): number {
  const { ohmsPerMetre } = conductorResistance(size, 'stranded', celsius);
  const factor = input.system === 'three-phase' ? Math.sqrt(3) : 2;
  return ((factor * input.amps * input.metres * ohmsPerMetre) / input.volts) * 100;
}

/** The US paragraph of the design, by trial of every size from AWG 14 up. */
function usTwin(input: ConductorSizeInput) {
  const load = (input.continuous ? 1.25 : 1) * input.amps;
  const device = NEC_240_6.find((rating) => rating >= load);
  for (const [size, row] of Object.entries(NEC_310_16)) {
    const a1 = row[input.terminalCelsius as Column];
    const insulation = input.insulationCelsius as Column;
    const factor = necAmbientFactor(insulation, input.ambientCelsius);
    const a2 = row[insulation] * (factor ?? 0) * necCountFactor(input.loadedConductors);
    const ampacity = Math.min(a1, a2);
    const next = NEC_240_6.find((rating) => rating >= ampacity) ?? 0;
    const cap = { 'AWG 14': 15, 'AWG 12': 20, 'AWG 10': 30 }[size] ?? Infinity;
    if (ampacity === 0 || a1 < load || a2 < input.amps) continue;
    if (device === undefined || device > next || device > cap) continue;
    if (dropPct(input, size, 75) <= input.maxDropPct) return { size, ampacity, overcurrentAmps: device };
  }
  return { size: null, ampacity: null, overcurrentAmps: null };
}

/** The IEC paragraph of the design, by trial of every size from 1.5 mm2 up. */
function iecTwin(input: ConductorSizeInput & { groupedCircuits: number; zeOhms: number }) {
  const { insulation = 'PVC70', installMethod, curve = 'B' } = input;
  const device = IEC_60898_RATINGS.find((rating) => rating >= input.amps);
  const celsius = insulation === 'PVC70' ? 70 : 90;
  const toEarth = input.system === 'three-phase' ? input.volts / Math.sqrt(3) : input.volts;
  for (const [place, size] of IEC_SIZES.entries()) {
    const table =
      IEC_B_52[insulation][input.loadedConductors as 2 | 3].amps[installMethod as 'A1'][place] ?? 0;
    const ca = iecAmbientFactor(insulation, input.ambientCelsius) ?? 0;
    const ampacity = table * ca * (iecGroupFactor(input.groupedCircuits) ?? 0);
    if (device === undefined || ampacity === 0 || device > ampacity) continue;
    if (dropPct(input, size, celsius) > input.maxDropPct) continue;
    const ohms = (of: string) => conductorResistance(of, 'stranded', celsius).ohmsPerMetre;
    const protective = place > IEC_SIZES.indexOf('16 mm2') ? '16 mm2' : size;
    const zs = input.zeOhms + (ohms(size) + ohms(protective)) * input.metres;
    if (zs <= (0.95 * toEarth) / ({ B: 5, C: 10, D: 20 }[curve] * device))
      return { size, ampacity, overcurrentAmps: device };
  }
  return { size: null, ampacity: null, overcurrentAmps: null };
}

const bigger = (a: string | null, b: string | null) =>
  (a === null ? Infinity : ALL_SIZES.indexOf(a)) - (b === null ? Infinity : ALL_SIZES.indexOf(b));

describe('conductor-size, US', () => {
  it('is what trying every size gives', () => {
    fc.assert(
      fc.property(usInput, (input) => {
        expect(conductorSize(input).result).toMatchObject(usTwin(input));
      }),
      { numRuns: 1000 },
    );
  });

  it('never gives a smaller conductor for more load, more metres, more heat or more company', () => {
    fc.assert(
      fc.property(usInput, amps, fc.double({ min: 1, max: 3, noNaN: true }), (input, more, factor) => {
        const { size } = conductorSize(input).result;
        const heavier = [
          { ...input, amps: input.amps + more },
          { ...input, metres: input.metres * factor },
          { ...input, ambientCelsius: input.ambientCelsius + 5 },
          { ...input, loadedConductors: input.loadedConductors * 2 },
          { ...input, continuous: true },
        ];
        for (const harder of heavier)
          expect(bigger(conductorSize(harder).result.size, size) >= 0 || size === null).toBe(true);
      }),
    );
  });
});

describe('conductor-size, IEC', () => {
  it('is what trying every size gives', () => {
    fc.assert(
      fc.property(iecInput, (input) => {
        expect(conductorSize(input).result).toMatchObject(iecTwin(input));
      }),
      { numRuns: 1000 },
    );
  });

  it('never gives a smaller conductor for more load, more metres, a worse loop or a slower curve', () => {
    fc.assert(
      fc.property(iecInput, amps, fc.double({ min: 1, max: 3, noNaN: true }), (input, more, factor) => {
        const { size } = conductorSize(input).result;
        const heavier = [
          { ...input, amps: input.amps + more },
          { ...input, metres: input.metres * factor },
          { ...input, zeOhms: input.zeOhms * factor },
          { ...input, curve: 'D' as const },
        ];
        for (const harder of heavier)
          expect(bigger(conductorSize(harder).result.size, size) >= 0 || size === null).toBe(true);
      }),
    );
  });
});

describe('conductor-size, both', () => {
  it('keeps its word: what is answered satisfies every limit, what is not carries a stop', () => {
    fc.assert(
      fc.property(fc.oneof(usInput, iecInput), (input) => {
        const { result, findings } = conductorSize(input);
        const stopped = findings.some(({ severity }) => severity === 'stop');
        expect(stopped).toBe(result.size === null);
        if (result.size === null) return;
        expect(result.dropPct).toBeLessThanOrEqual(input.maxDropPct * (1 + 1e-9));
        expect(result.overcurrentAmps).toBeGreaterThanOrEqual(input.amps * (1 - 1e-9));
        if (result.zsOhms !== null)
          expect(result.zsOhms).toBeLessThanOrEqual((result.zsMaxOhms ?? 0) * (1 + 1e-9));
      }),
    );
  });
});
