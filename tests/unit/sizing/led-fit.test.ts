import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { thermalVolts } from '@/lib/sizing/diode';
import { ledFitCalculation, type LedFitInput } from '@/lib/sizing/led-fit';

interface Law {
  is: number;
  n: number;
  rs: number;
}
const WHITE: Law = { is: 1e-18, n: 3.2, rs: 5 };
const AMPS = [0.001, 0.003, 0.01, 0.03];

const lawVolts = ({ is, n, rs }: Law, amps: number, celsius = 25) =>
  n * thermalVolts(celsius) * Math.log1p(amps / is) + amps * rs;
const readings = (law: Law, amps: readonly number[] = AMPS, sample?: string) =>
  amps.map((own) => ({
    amps: own,
    volts: lawVolts(law, own),
    ...(sample === undefined ? {} : { sample }),
  }));
const run = (change: Partial<LedFitInput> = {}) =>
  runCalculation(ledFitCalculation, { points: readings(WHITE), celsius: 25, ...change });
const codes = (answer: ReturnType<typeof run>) => answer.findings.map(({ code }) => code);
const refused = (input: object) => {
  try {
    runCalculation(ledFitCalculation, { celsius: 25, ...input });
  } catch (error) {
    if (error instanceof EngineError) return error.issues.map(({ path }) => path);
  }
  return [];
};
const expectNear = (got: number | null, want: number, relative: number) =>
  expect(Math.abs((got ?? NaN) - want), `${got} against ${want}`).toBeLessThanOrEqual(
    relative * Math.abs(want),
  );

describe('figures', () => {
  it('reads the law back out of exact readings', () => {
    const { result } = run();
    expectNear(result.saturationAmps, WHITE.is, 1e-9);
    expectNear(result.emissionCoefficient, WHITE.n, 1e-11);
    expectNear(result.seriesOhms, WHITE.rs, 1e-10);
    expect(result.residualVolts).toBeLessThan(1e-12);
  });

  it('tells the volts at the readings’ currents, or at those that are asked for, the working current with them', () => {
    expect(run().result.forwardVoltsAt.map(({ amps }) => amps)).toEqual(AMPS);
    const asked = run({ atAmps: [0.02, 0.005, 0.02], workingAmps: 0.015 }).result.forwardVoltsAt;
    expect(asked.map(({ amps }) => amps)).toEqual([0.005, 0.015, 0.02]);
    for (const { amps, volts } of asked) expectNear(volts, lawVolts(WHITE, amps), 1e-12);
  });

  it('the same readings taken hotter are another n', () => {
    const { result } = run({ celsius: 85 });
    expectNear(result.emissionCoefficient, (WHITE.n * thermalVolts(25)) / thermalVolts(85), 1e-10);
  });

  it('residual is the root of the mean square, and what no parameter can take away', () => {
    const points = readings(WHITE, [0.001, 0.002, 0.005, 0.01, 0.02, 0.05]).map((point, i) => ({
      ...point,
      volts: point.volts + (i % 2 === 0 ? 0.01 : -0.01),
    }));
    const { result } = run({ points });
    const { saturationAmps: is, emissionCoefficient: n, seriesOhms: rs } = result;
    const misses = (law: Law) => points.map(({ amps, volts }) => volts - lawVolts(law, amps));
    const rms = (all: number[]) => Math.sqrt(all.reduce((sum, e) => sum + e * e, 0) / all.length);
    const law = { is: is ?? NaN, n: n ?? NaN, rs: rs ?? NaN };
    expectNear(result.residualVolts, rms(misses(law)), 1e-6);
    expectNear(result.residualMaxVolts, Math.max(...misses(law).map(Math.abs)), 1e-6);
    for (const change of [{ n: law.n * 1.001 }, { rs: law.rs + 0.01 }, { is: law.is * 1.01 }])
      expect(rms(misses({ ...law, ...change }))).toBeGreaterThan(result.residualVolts ?? NaN);
  });

  it('several samples: each by itself, and their mean and spread at the working current', () => {
    const laws = [WHITE, { ...WHITE, rs: 6 }, { ...WHITE, is: 3e-18 }];
    const points = laws.flatMap((law, i) => readings(law, AMPS, `s${i}`));
    const { result } = run({ points, workingAmps: 0.02 });
    expect(result.samples.map(({ sample, points: count }) => [sample, count])).toEqual([
      ['s0', 4],
      ['s1', 4],
      ['s2', 4],
    ]);
    laws.forEach((law, i) => {
      expectNear(result.samples[i]?.seriesOhms ?? null, law.rs, 1e-9);
      expectNear(result.samples[i]?.workingVolts ?? null, lawVolts(law, 0.02), 1e-11);
    });
    const [a = NaN, b = NaN, c = NaN] = laws.map((law) => lawVolts(law, 0.02));
    const mean = (a + b + c) / 3;
    expectNear(result.spread?.meanVolts ?? null, mean, 1e-12);
    expectNear(
      result.spread?.standardDeviationVolts ?? null,
      Math.sqrt(((a - mean) ** 2 + (b - mean) ** 2 + (c - mean) ** 2) / 2),
      1e-8,
    );
    expect(result.spread).toMatchObject({ amps: 0.02 });
    expectNear(result.spread?.minVolts ?? null, Math.min(a, b, c), 1e-12);
    expectNear(result.spread?.maxVolts ?? null, Math.max(a, b, c), 1e-12);
  });

  it('one sample has no spread, and neither have several without a working current', () => {
    expect(run({ workingAmps: 0.02 }).result.spread).toBeNull();
    const points = ['a', 'b'].flatMap((sample) => readings(WHITE, AMPS, sample));
    expect(run({ points }).result.spread).toBeNull();
  });

  it('Rs stays at zero where the readings bend the other way', () => {
    const points = readings(WHITE).map((point) => ({ ...point, volts: point.volts - 8 * point.amps }));
    const answer = run({ points });
    expect(answer.result.seriesOhms).toBe(0);
    expect(answer.result.residualVolts).toBeGreaterThan(0.001);
    expect(codes(answer)).toContain('fit-no-series-ohms');
  });
});

describe('findings', () => {
  it('always says that it is field-built, and nothing else of a sound fit', () =>
    expect(codes(run({ workingAmps: 0.02 }))).toEqual(['field-built']));

  it('fit-ill-conditioned: three of four readings at nearly one current', () => {
    const answer = run({ points: readings(WHITE, [0.001, 0.009, 0.0095, 0.01]) });
    expect(answer.findings.find(({ code }) => code === 'fit-ill-conditioned')).toMatchObject({
      severity: 'caution',
      values: { points: 4 },
    });
    expect(answer.result.conditionNumber).toBeGreaterThan(30);
    expect(run().result.conditionNumber).toBeLessThan(10);
  });

  it('fit-unusual-emission, unless the package holds several junctions', () => {
    const package9 = { is: 1e-18, n: 9.6, rs: 15 };
    expect(codes(run({ points: readings(package9) }))).toContain('fit-unusual-emission');
    expect(codes(run({ points: readings(package9), junctions: 3 }))).not.toContain('fit-unusual-emission');
    expect(codes(run({ points: readings({ ...WHITE, n: 0.8 }) }))).toContain('fit-unusual-emission');
  });

  it('fit-residual-large: one reading is wrong', () => {
    const points = readings(WHITE, [...AMPS, 0.1]).map((point, i) =>
      i === 2 ? { ...point, volts: point.volts + 0.3 } : point,
    );
    expect(codes(run({ points }))).toContain('fit-residual-large');
  });

  it('fit-working-amps-not-given: only where there is a spread to tell', () => {
    const points = ['a', 'b'].flatMap((sample) => readings(WHITE, AMPS, sample));
    expect(codes(run({ points }))).toContain('fit-working-amps-not-given');
    expect(codes(run({ points, workingAmps: 0.02 }))).not.toContain('fit-working-amps-not-given');
    expect(codes(run())).not.toContain('fit-working-amps-not-given');
  });

  it.each([0.0005, 0.05])('fit-beyond-readings: at %d A', (workingAmps) => {
    expect(codes(run({ workingAmps }))).toContain('fit-beyond-readings');
  });
  it('not at the ends of the readings', () =>
    expect(codes(run({ workingAmps: 0.03 }))).not.toContain('fit-beyond-readings'));

  it.each([
    ['a resistor', (amps: number) => amps * 100],
    ['volts that fall', (amps: number) => 0.01 / amps],
    ['volts that stay', () => 3],
    ['out of range', (amps: number) => 1e200 * amps],
  ])('not-an-led-curve: %s', (_, volts) => {
    const answer = run({ points: AMPS.map((amps) => ({ amps, volts: volts(amps) })), workingAmps: 0.02 });
    expect(answer.findings.find(({ code }) => code === 'not-an-led-curve')).toMatchObject({
      severity: 'stop',
      hard: false,
    });
    expect(answer.result).toMatchObject({
      saturationAmps: null,
      emissionCoefficient: null,
      seriesOhms: null,
      residualVolts: null,
      spread: null,
    });
    expect(answer.result.forwardVoltsAt.every(({ volts: own }) => own === null)).toBe(true);
  });

  it('not-an-led-curve names the sample that fails', () => {
    const points = [
      ...readings(WHITE, AMPS, 'good'),
      ...AMPS.map((amps) => ({ amps, volts: 3, sample: 'bad' })),
    ];
    const answer = run({ points, workingAmps: 0.02 });
    expect(answer.findings.find(({ code }) => code === 'not-an-led-curve')?.values.samples).toBe('bad');
    expect(answer.result.samples[0]?.seriesOhms).not.toBeNull();
    expect(answer.result.spread).toBeNull();
  });
});

describe('refused by path', () => {
  it('fewer than four readings, fewer than four currents, less than a decade', () => {
    expect(refused({ points: readings(WHITE).slice(1) })).toEqual(['points']);
    expect(refused({ points: readings(WHITE, [0.001, 0.001, 0.003, 0.01]) })).toEqual(['points']);
    expect(refused({ points: readings(WHITE, [0.001, 0.002, 0.004, 0.0099]) })).toEqual(['points']);
    expect(refused({ points: readings(WHITE, [0.001, 0.002, 0.004, 0.01]) })).toEqual([]);
  });

  it('each sample needs its own decade', () => {
    const points = [...readings(WHITE, AMPS, 'a'), ...readings(WHITE, [0.01, 0.02, 0.03, 0.04], 'b')];
    expect(refused({ points })).toEqual(['points']);
  });

  it('a reading without its sample among named ones', () => {
    const points = [...readings(WHITE, AMPS, 'a'), ...readings(WHITE)];
    expect(refused({ points })).toEqual(['points.4.sample']);
  });

  it('no current, no volts', () => {
    const points = readings(WHITE);
    expect(refused({ points: [...points, { volts: 0, amps: 0.02 }] })).toEqual(['points.4.volts']);
    expect(refused({ points: [...points, { volts: 1, amps: 0 }] })).toEqual(['points.4.amps']);
  });
});

describe('laws', () => {
  const law = fc.record({
    is: fc.double({ min: -30, max: -9, noNaN: true }).map((power) => 10 ** power),
    n: fc.double({ min: 1, max: 5, noNaN: true }),
    rs: fc.double({ min: 0.01, max: 20, noNaN: true }),
  });
  const ladder = fc
    .tuple(fc.double({ min: -4, max: -2, noNaN: true }), fc.array(fc.double({ min: 0, max: 1, noNaN: true })))
    .map(([from, more]) =>
      [...[0, 0.35, 0.7, 1, 1.4], ...more.slice(0, 10)].map((step) => 10 ** (from + step)),
    );

  it('recovers any LED from exact readings, whatever their order', () => {
    fc.assert(
      fc.property(law, ladder, (led, amps) => {
        const points = readings(led, amps);
        const { result } = run({ points });
        expectNear(result.emissionCoefficient, led.n, 1e-6);
        expectNear(result.seriesOhms, led.rs, 1e-3);
        expectNear(Math.log(result.saturationAmps ?? NaN), Math.log(led.is), 1e-6);
        expect(result.residualVolts).toBeGreaterThanOrEqual(0);
        expect(result.residualVolts).toBeLessThan(1e-12);
        expect(run({ points: [...points].reverse() }).result.seriesOhms).toBe(result.seriesOhms);
      }),
      { numRuns: 300 },
    );
  });

  it('with noise: residual never above the truth’s own, Rs never below 0, order without effect', () => {
    const noise = fc.array(fc.double({ min: -0.05, max: 0.05, noNaN: true }), {
      minLength: 15,
      maxLength: 15,
    });
    fc.assert(
      fc.property(law, ladder, noise, (led, amps, errors) => {
        const points = readings(led, amps).map((point, i) => ({
          ...point,
          volts: point.volts + (errors[i] ?? 0),
        }));
        const { result } = run({ points });
        if (result.residualVolts === null) return;
        const own = Math.sqrt(points.reduce((sum, _, i) => sum + (errors[i] ?? 0) ** 2, 0) / points.length);
        expect(result.residualVolts).toBeLessThanOrEqual(own * (1 + 1e-9) + 1e-14);
        expect(result.residualVolts).toBeGreaterThanOrEqual(0);
        expect(result.seriesOhms).toBeGreaterThanOrEqual(0);
        expect(run({ points: [...points].reverse() }).result).toMatchObject({
          saturationAmps: result.saturationAmps,
          emissionCoefficient: result.emissionCoefficient,
          residualVolts: result.residualVolts,
        });
      }),
      { numRuns: 300 },
    );
  });
});
