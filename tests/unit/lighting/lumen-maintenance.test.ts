import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { lumenMaintenanceCalculation, type LumenMaintenanceInput } from '@/lib/lighting/lumen-maintenance';
import { testSeed } from '../../support/random';

const every = (step: number, to: number) => Array.from({ length: to / step + 1 }, (_, k) => k * step);
/** Light that falls exactly as the curve says. */
const falling = (alpha: number, b = 1, hours = every(1000, 6000)) =>
  hours.map((at) => ({ hours: at, maintenance: b * Math.exp(-alpha * at) }));
const TEST: LumenMaintenanceInput = { points: falling(1e-5), sampleSize: 20, threshold: 0.7 };
const run = (change: Partial<LumenMaintenanceInput> = {}) =>
  runCalculation(lumenMaintenanceCalculation, { ...TEST, ...change });
const figures = (change: Partial<LumenMaintenanceInput> = {}) => run(change).result;
const codes = (change: Partial<LumenMaintenanceInput> = {}) => run(change).findings.map(({ code }) => code);
const between = (inSituCelsius: number, alphas = [2e-6, 6e-6], celsius = [55, 85]) => ({
  points: undefined,
  cases: celsius.map((caseCelsius, k) => ({ caseCelsius, points: falling(alphas[k] ?? NaN) })),
  inSituCelsius,
});
const refusal = (change: object) => {
  try {
    runCalculation(lumenMaintenanceCalculation, { ...TEST, ...change });
  } catch (error) {
    if (error instanceof EngineError) return error.issues[0]?.path;
    throw error;
  }
  return null;
};

describe('figures', () => {
  it('finds alpha, b and the hours of light that falls exactly as the curve says', () => {
    const { alpha, b, calculatedHours, reportedHours, capped } = figures();
    expect(alpha).toBeCloseTo(1e-5, 15);
    expect(b).toBeCloseTo(1, 12);
    expect(calculatedHours).toBeCloseTo(Math.log(1 / 0.7) / 1e-5, 4);
    expect(reportedHours).toBe(calculatedHours);
    expect(capped).toBe(false);
  });

  it('takes the last 5,000 h to 10,000 h, the last half beyond, and nothing before 1,000 h', () => {
    // Light that falls faster at first: what is taken shows in alpha.
    const bent = (to: number, knee: number) =>
      every(500, to).map((hours) => ({
        hours,
        maintenance: Math.exp(-1e-5 * hours - 1e-4 * Math.max(0, knee - hours)),
      }));
    const alpha = (to: number, knee: number) => figures({ points: bent(to, knee) }).alpha;
    expect(alpha(6000, 1000)).toBeCloseTo(1e-5, 12);
    expect(alpha(6000, 1500)).not.toBeCloseTo(1e-5, 7);
    expect(alpha(10_000, 5000)).toBeCloseTo(1e-5, 12);
    expect(alpha(10_000, 5500)).not.toBeCloseTo(1e-5, 7);
    expect(alpha(16_000, 8000)).toBeCloseTo(1e-5, 12);
    expect(alpha(16_000, 8500)).not.toBeCloseTo(1e-5, 7);
  });

  it('counts a reading within 48 h of its nominal hour', () => {
    const at = (first: number) =>
      figures({
        points: [{ hours: first, maintenance: 0.5 }, ...falling(1e-5, 1, every(1000, 6000).slice(2))],
        threshold: 0.3,
      }).alpha;
    expect(at(951)).toBeCloseTo(1e-5, 12);
    expect(at(952)).toBeLessThan(0);
  });

  it('caps at six times the test from twenty units on, at five and a half below', () => {
    const slow = { points: falling(1e-7) };
    expect(figures({ ...slow, sampleSize: 20 })).toMatchObject({ reportedHours: 36_000, capped: true });
    expect(figures({ ...slow, sampleSize: 19 })).toMatchObject({ reportedHours: 33_000, capped: true });
    expect(figures(slow).calculatedHours).toBeGreaterThan(3e6);
  });

  it('a projection that just reaches the cap is not capped', () => {
    const alpha = Math.log(1 / 0.7) / 36_000;
    expect(figures({ points: falling(alpha) }).capped).toBe(false);
    expect(figures({ points: falling(alpha * 0.999) }).capped).toBe(true);
  });

  it('without decay only the cap is told', () => {
    for (const alpha of [0, -1e-6])
      expect(figures({ points: falling(alpha) })).toMatchObject({
        calculatedHours: null,
        reportedHours: 36_000,
        capped: true,
      });
    // Readings that are all the same leave a slope of rounding errors alone.
    expect(figures({ points: falling(0, 0.93) }).alpha).toBe(0);
  });

  it('a threshold passed within the test is read off between its two readings', () => {
    const points = [1, 0.95, 0.9, 0.86, 0.82, 0.78, 0.75].map((maintenance, k) => ({
      hours: k * 1000,
      maintenance,
    }));
    expect(figures({ points, threshold: 0.8 })).toMatchObject({
      reportedHours: expect.closeTo(4500, 6),
      passedAtHours: expect.closeTo(4500, 6),
      capped: false,
      notation: 'L80(6k) = 4500',
    });
    expect(figures({ points, threshold: 0.82 }).reportedHours).toBe(4000);
    expect(figures({ points, threshold: 0.7 }).passedAtHours).toBeNull();
  });

  it('light that starts under the threshold lasts no hours, rather than less than none', () => {
    expect(figures({ points: falling(1e-5, 0.6) })).toMatchObject({
      calculatedHours: 0,
      reportedHours: 0,
      capped: false,
    });
  });

  it('light that is above the threshold when the test ends has lasted that long', () => {
    const points = falling(1e-5).map((one) => ({ ...one }));
    points[6] = { hours: 6000, maintenance: 0.9401 };
    points[5] = { hours: 5000, maintenance: 0.9402 };
    points[4] = { hours: 4000, maintenance: 0.9403 };
    const { calculatedHours, reportedHours } = figures({ points, threshold: 0.94 });
    expect(calculatedHours).toBeLessThan(6000);
    expect(reportedHours).toBe(6000);
  });

  it('between two cases alpha follows Arrhenius, and the shorter test sets the cap', () => {
    const { alpha, b, activationKelvin, passedAtHours } = figures(between(70));
    const [cold, hot, at] = [328.15, 358.15, 343.15];
    const wanted = Math.log(6e-6 / 2e-6) / (1 / cold - 1 / hot);
    expect(activationKelvin).toBeCloseTo(wanted, 4);
    expect(alpha).toBeCloseTo(2e-6 * Math.exp(wanted * (1 / cold - 1 / at)), 12);
    expect(b).toBeCloseTo(1, 9);
    expect(passedAtHours).toBeNull();
    const cases = between(70).cases.map((one, k) => ({
      ...one,
      points: falling(1e-7, 1, every(1000, k === 0 ? 9000 : 7000)),
    }));
    expect(figures({ ...between(70), cases }).reportedHours).toBe(42_000);
  });

  it('takes the two cases next to the temperature in use, in whatever order they come', () => {
    const alphas = [8e-6, 2e-6, 4e-6];
    const three = (celsius: number) => figures(between(celsius, alphas, [105, 55, 85])).alpha;
    expect(three(70)).toBeGreaterThan(2e-6);
    expect(three(70)).toBeLessThan(4e-6);
    expect(three(95)).toBeGreaterThan(4e-6);
    expect(three(85)).toBeCloseTo(4e-6, 14);
  });

  it('cooler than tested: the coolest case stands; a case without decay: the hotter one stands', () => {
    expect(figures(between(40)).alpha).toBeCloseTo(2e-6, 14);
    expect(figures(between(70, [0, 6e-6])).alpha).toBeCloseTo(6e-6, 14);
    expect(figures(between(70, [2e-6, -1e-6])).calculatedHours).toBeNull();
  });
});

describe('laws', () => {
  const seed = testSeed();
  it(`recovers any curve, and lower thresholds last longer (seed ${seed})`, () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-7, max: 4e-5, noNaN: true }),
        fc.double({ min: 0.9, max: 1.05, noNaN: true }),
        fc.integer({ min: 6, max: 30 }),
        fc.double({ min: 0.3, max: 0.85, noNaN: true }),
        (alpha, b, thousands, threshold) => {
          const points = falling(alpha, b, every(1000, thousands * 1000));
          const got = figures({ points, threshold });
          expect(Math.abs(got.alpha / alpha - 1)).toBeLessThan(1e-6);
          expect(Math.abs(got.b / b - 1)).toBeLessThan(1e-9);
          const lower = figures({ points, threshold: threshold * 0.9 });
          expect(lower.reportedHours).toBeGreaterThanOrEqual(got.reportedHours);
          expect(got.reportedHours).toBeLessThanOrEqual(got.capHours * (1 + 1e-9));
        },
      ),
      { seed, numRuns: 300 },
    );
  });

  it(`a case between two others decays no faster than the hotter and no slower than the cooler (seed ${seed})`, () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-7, max: 1e-5, noNaN: true }),
        fc.double({ min: 1, max: 10, noNaN: true }),
        fc.double({ min: 55, max: 85, noNaN: true }),
        (alpha, times, celsius) => {
          const got = figures(between(celsius, [alpha, alpha * times]));
          expect(got.alpha).toBeGreaterThanOrEqual(alpha * (1 - 1e-6));
          expect(got.alpha).toBeLessThanOrEqual(alpha * times * (1 + 1e-6));
        },
      ),
      { seed, numRuns: 200 },
    );
  });
});

describe('findings', () => {
  const bumpy = falling(1e-5).map((one) => (one.hours === 3000 ? { ...one, maintenance: 0.95 } : one));
  const passed = { points: falling(1e-4) };
  it.each([
    ['maintenance-cooler-than-tested', between(54), between(55)],
    ['maintenance-not-interpolated', between(70, [0, 6e-6]), between(70)],
    ['maintenance-hotter-lasts-longer', between(70, [6e-6, 2e-6]), between(70)],
    ['maintenance-no-decay', { points: falling(0) }, { points: falling(1e-9) }],
    [
      'maintenance-readings-sparse',
      { points: falling(1e-5, 1, [0, 1000, 2000, 4000, 5000, 6000]) },
      { points: falling(1e-5, 1, [0, 1000, 2048, 3000, 4000, 5000, 6000]) },
    ],
    ['maintenance-poor-fit', { points: bumpy }, {}],
    ['maintenance-passed-in-test', passed, {}],
    ['maintenance-capped', { points: falling(1e-6) }, passed],
    ['maintenance-claim-not-supported', { claimedHours: 50_000 }, { claimedHours: 30_000 }],
  ] as [string, Partial<LumenMaintenanceInput>, Partial<LumenMaintenanceInput>][])(
    '%s',
    (code, raises, doesNot) => {
      expect(codes(raises)).toContain(code);
      expect(codes(doesNot)).not.toContain(code);
    },
  );

  it('says every time that the LEDs are not the luminaire', () => {
    for (const change of [{}, passed, between(70)])
      expect(codes(change)).toContain('maintenance-of-the-leds-alone');
  });
});

describe('refusals', () => {
  it.each([
    ['sampleSize', { sampleSize: 9 }],
    ['points', { points: falling(1e-5, 1, every(1000, 5000)) }],
    ['points', { points: falling(1e-5, 1, [0, 500, 6000]) }],
    ['points.2.hours', { points: falling(1e-5, 1, [0, 2000, 2000, 6000]) }],
    [
      'points.1.maintenance',
      {
        points: [
          { hours: 0, maintenance: 1 },
          { hours: 6000, maintenance: 97 },
        ],
      },
    ],
    ['points', { points: undefined }],
    ['cases', { cases: between(70).cases, inSituCelsius: 70 }],
    ['inSituCelsius', { inSituCelsius: 70 }],
    ['inSituCelsius', { ...between(70), inSituCelsius: undefined }],
    ['inSituCelsius', between(85.1)],
    ['cases.1.caseCelsius', between(70, [1e-6, 2e-6], [85, 85])],
    [
      'cases.1.points',
      {
        ...between(70),
        cases: [
          { caseCelsius: 55, points: falling(1e-5) },
          { caseCelsius: 85, points: falling(1e-5, 1, every(1000, 4000)) },
        ],
      },
    ],
    ['threshold', { threshold: 1 }],
  ])('%s', (at, change) => expect(refusal(change)).toBe(at));

  it('not at the bounds themselves', () => {
    expect(refusal({ sampleSize: 10 })).toBeNull();
    expect(refusal(between(85))).toBeNull();
  });
});
