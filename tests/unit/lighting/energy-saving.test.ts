import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { energySavingCalculation, type EnergySavingInput } from '@/lib/lighting/energy-saving';
import { testSeed } from '../../support/random';

type Line = EnergySavingInput['existing'][number];
const line = (change: Partial<Line> = {}): Line => ({
  quantity: 10,
  watts: 100,
  hoursPerYear: 2000,
  controlFactor: 1,
  ...change,
});
const JOB: EnergySavingInput = {
  existing: [line()],
  proposed: [line({ watts: 40 })],
  energyRate: 0.2,
  interactionFactor: 1,
};
const run = (change: Partial<EnergySavingInput> = {}) =>
  runCalculation(energySavingCalculation, { ...JOB, ...change });
const codes = (change: Partial<EnergySavingInput> = {}) => run(change).findings.map(({ code }) => code);
const path = (change: object) => {
  try {
    runCalculation(energySavingCalculation, { ...JOB, ...change });
  } catch (error) {
    if (error instanceof EngineError) return error.issues[0]?.path;
    throw error;
  }
  return null;
};

describe('figures', () => {
  it('energy, money and carbon of a plain swap', () => {
    const { result } = run({ kgCo2PerKilowattHour: 0.5 });
    expect(result).toMatchObject({
      kilowattHoursBefore: 2000,
      kilowattHoursAfter: 800,
      kilowattHoursSaved: 1200,
      netKilowattHoursSaved: 1200,
      kgCo2Saved: 600,
    });
    expect(result.demandKilowattsSaved).toBeCloseTo(0.6, 12);
    expect(result.costSaved).toBeCloseTo(240, 10);
  });

  it('controls leave their share of the energy and none of the connected load', () => {
    const { result } = run({ proposed: [line({ watts: 40, controlFactor: 0.75 })] });
    expect(result.kilowattHoursAfter).toBeCloseTo(600, 10);
    expect(result.demandKilowattsSaved).toBeCloseTo(0.6, 12);
    expect(run({ existing: [line({ controlFactor: 0.5 })] }).result.kilowattHoursBefore).toBe(1000);
  });

  it('no demand is saved unless it is said how much falls into the peak; twelve months unless given', () => {
    expect(run({ demandRate: 10 }).result.demandCostSaved).toBe(0);
    expect(run({ demandRate: 10, coincidence: 0.5 }).result.demandCostSaved).toBeCloseTo(36, 10);
    expect(run({ demandRate: 10, coincidence: 0.5, demandMonths: 4 }).result.demandCostSaved).toBeCloseTo(
      12,
      10,
    );
  });

  it('interaction counts on energy alone, and carbon follows the net', () => {
    const { result } = run({
      interactionFactor: 1.1,
      kgCo2PerKilowattHour: 0.5,
      demandRate: 10,
      coincidence: 1,
    });
    expect(result.netKilowattHoursSaved).toBeCloseTo(1320, 10);
    expect(result.kgCo2Saved).toBeCloseTo(660, 10);
    expect(result.demandCostSaved).toBeCloseTo(72, 10);
    expect(run().result.kgCo2Saved).toBeNull();
  });

  it('heating fuel is paid for each lighting kWh saved, not for the net', () => {
    const { result } = run({ interactionFactor: 1.1, fuelPenaltyPerKilowattHour: 0.03 });
    expect(result.fuelCostAdded).toBeCloseTo(36, 10);
    expect(result.costSaved).toBeCloseTo(264 - 36, 10);
  });

  it('lights that only go, or only come', () => {
    expect(run({ proposed: [] }).result.kilowattHoursSaved).toBe(2000);
    expect(run({ existing: [] }).result.kilowattHoursSaved).toBe(-800);
    expect(run({ existing: [], proposed: [] }).result.costSaved).toBe(0);
  });
});

describe('laws', () => {
  const lines = fc.array(
    fc.record({
      quantity: fc.integer({ min: 0, max: 500 }),
      watts: fc.double({ min: 0, max: 500, noNaN: true }),
      hoursPerYear: fc.double({ min: 0, max: 8760, noNaN: true }),
      controlFactor: fc.double({ min: 0, max: 1, noNaN: true }),
    }),
    { maxLength: 6 },
  );
  const seed = testSeed();
  const hold = (a: number, b: number, scale: number) => Math.abs(a - b) <= 1e-9 * Math.max(1, scale);

  it(`swapping before and after turns every sign; areas add up to the job (seed ${seed})`, () => {
    fc.assert(
      fc.property(lines, lines, (existing, proposed) => {
        const rates = {
          demandRate: 12,
          coincidence: 0.6,
          kgCo2PerKilowattHour: 0.3,
          fuelPenaltyPerKilowattHour: 0.02,
        };
        const there = run({ existing, proposed, ...rates }).result;
        const back = run({ existing: proposed, proposed: existing, ...rates }).result;
        const scale = there.kilowattHoursBefore + there.kilowattHoursAfter;
        expect(hold(there.costSaved, -back.costSaved, scale)).toBe(true);
        expect(hold(there.kgCo2Saved ?? NaN, -(back.kgCo2Saved ?? NaN), scale)).toBe(true);
        const parts = existing.map(
          (one) => run({ existing: [one], proposed: [], ...rates }).result.costSaved,
        );
        const whole = run({ existing, proposed: [], ...rates }).result.costSaved;
        expect(
          hold(
            parts.reduce((a, b) => a + b, 0),
            whole,
            scale,
          ),
        ).toBe(true);
      }),
      { seed, numRuns: 200 },
    );
  });
});

describe('findings', () => {
  it('a demand rate without coincidence', () => {
    expect(codes({ demandRate: 10 })).toContain('energy-peak-not-counted');
    expect(codes({ demandRate: 10, coincidence: 0 })).not.toContain('energy-peak-not-counted');
    expect(codes()).not.toContain('energy-peak-not-counted');
  });

  it('a blended rate where the peak is not cut', () => {
    expect(codes({ rateIsBlended: true })).toContain('energy-rate-blended');
    expect(codes({ rateIsBlended: true, coincidence: 0.5 })).not.toContain('energy-rate-blended');
    expect(codes({ rateIsBlended: false })).not.toContain('energy-rate-blended');
    expect(codes()).not.toContain('energy-rate-blended');
  });

  it('a demand saving on top of a blended rate', () => {
    const cut = { demandRate: 10, coincidence: 0.5 };
    expect(codes({ rateIsBlended: true, ...cut })).toContain('energy-demand-counted-twice');
    expect(codes({ rateIsBlended: true, coincidence: 0.5 })).not.toContain('energy-demand-counted-twice');
    expect(codes(cut)).not.toContain('energy-demand-counted-twice');
  });

  it('heating and cooling left out, and fuel left out', () => {
    expect(codes({ interactionFactor: undefined })).toContain('energy-interaction-not-counted');
    expect(codes()).not.toContain('energy-interaction-not-counted');
    expect(codes({ interactionFactor: 1.08 })).toContain('energy-fuel-not-counted');
    expect(codes({ interactionFactor: 1.08, fuelPenaltyPerKilowattHour: 0 })).not.toContain(
      'energy-fuel-not-counted',
    );
    expect(codes({ interactionFactor: 0.68 })).not.toContain('energy-fuel-not-counted');
  });

  it('more energy than before', () => {
    expect(codes({ proposed: [line({ watts: 101 })] })).toContain('energy-grows');
    expect(codes({ proposed: [line()] })).not.toContain('energy-grows');
  });

  it('controls that save more than was measured', () => {
    const factor = (controlFactor: number) => codes({ proposed: [line({ controlFactor })] });
    expect(factor(0.19)).toContain('energy-control-saving-unlikely');
    expect(factor(0.2)).not.toContain('energy-control-saving-unlikely');
  });

  it('other hours than before', () => {
    expect(codes({ proposed: [line({ hoursPerYear: 1900 })] })).toContain('energy-hours-differ');
    expect(codes({ proposed: [line({ hoursPerYear: 1985 })] })).not.toContain('energy-hours-differ');
    expect(codes({ proposed: [] })).not.toContain('energy-hours-differ');
  });
});

describe('refusals', () => {
  it('more hours than a year has, by the path', () => {
    expect(path({ existing: [line(), line({ hoursPerYear: 8760.1 })] })).toBe('existing.1.hoursPerYear');
    expect(path({ existing: [line({ hoursPerYear: 8760 })] })).toBeNull();
  });

  it.each([
    ['existing.0.quantity', { existing: [line({ quantity: 1.5 })] }],
    ['proposed.0.watts', { proposed: [line({ watts: -1 })] }],
    ['proposed.0.controlFactor', { proposed: [line({ controlFactor: 1.01 })] }],
    ['energyRate', { energyRate: -0.1 }],
    ['coincidence', { coincidence: 1.2 }],
    ['demandMonths', { demandMonths: 13 }],
    ['demandSharePct', { demandSharePct: 100 }],
  ])('%s', (at, change) => expect(path(change)).toBe(at));
});
