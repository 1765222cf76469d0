/**
 * The fit against ngspice, whose diode it must read back; against a general least-squares library on noisy readings,
 * whose residual it must never exceed; and the spread of samples against measured ones (data/led-fit.json).
 */
import { levenbergMarquardt } from 'ml-levenberg-marquardt';
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { thermalVolts } from '@/lib/sizing/diode';
import { ledFitCalculation, type LedFitInput } from '@/lib/sizing/led-fit';
import { N_SCALE, operatingPoint } from '../support/ngspice';
import { seeded, testSeed } from '../support/random';
import entries from './data/led-fit.json';

const fit = (points: LedFitInput['points'], more: Partial<LedFitInput> = {}) =>
  runCalculation(ledFitCalculation, { points, celsius: 25, ...more }).result;
const expectNear = (got: number | null | undefined, want: number, relative: number) =>
  expect(Math.abs((got ?? NaN) - want), `${got} against ${want}`).toBeLessThanOrEqual(
    relative * Math.abs(want),
  );

const seed = testSeed();
const random = seeded(seed);

describe(`a diode swept by ngspice, TEST_SEED=${seed}`, () => {
  it.each(Array.from({ length: 12 }, (_, k) => k))('sweep %i', () => {
    const celsius = random.between(-20, 90);
    const is = random.decades(1e-24, 1e-14);
    const n = random.between(1.5, 4);
    const rs = random.between(0.5, 8);
    const from = random.decades(1e-4, 3e-3);
    const amps = Array.from({ length: random.whole(5, 12) }, (_, k) => from * 10 ** (k * 0.3));
    const values = operatingPoint([
      `.options temp=${celsius}`,
      ...amps.flatMap((own, k) => [`I${k} 0 a${k} DC ${own}`, `D${k} a${k} 0 M`]),
      `.model M D(IS=${is} N=${n * N_SCALE} RS=${rs} EG=1.11 XTI=0 TNOM=${celsius})`,
    ]);
    const points = amps.map((own, k) => ({ amps: own, volts: values.get(`a${k}`) ?? NaN }));
    const result = fit(points, { celsius });
    expectNear(result.emissionCoefficient, n, 1e-6);
    expectNear(result.seriesOhms, rs, 1e-5);
    expectNear(Math.log(result.saturationAmps ?? NaN), Math.log(is), 1e-6);
    expect(result.residualVolts).toBeLessThan(1e-8);
  });
});

describe(`noisy readings against a general least-squares library, TEST_SEED=${seed}`, () => {
  it.each(Array.from({ length: 20 }, (_, k) => k))('readings %i', () => {
    const is = random.decades(1e-24, 1e-12);
    const n = random.between(1.5, 4);
    const rs = random.between(0.5, 8);
    const noise = random.decades(1e-4, 0.02);
    const slope = n * thermalVolts(25);
    const points = Array.from({ length: random.whole(6, 20) }, (_, k) => {
      const amps = 0.001 * 10 ** (k * 0.21);
      return { amps, volts: slope * Math.log1p(amps / is) + amps * rs + random.between(-noise, noise) };
    });
    const result = fit(points);
    const judge = levenbergMarquardt(
      { x: points.map(({ amps }) => amps), y: points.map(({ volts }) => volts) },
      ([a = NaN, logIs = NaN, ohms = NaN]) =>
        (amps) =>
          a * Math.log1p(amps / Math.exp(logIs)) + amps * ohms,
      {
        // From the truth: it need not find the valley, only its lowest place.
        initialValues: [slope, Math.log(is), rs],
        minValues: [1e-6, -300, 0],
        maxValues: [10, 0, 1000],
        gradientDifference: [1e-6, 1e-4, 1e-4],
        centralDifference: true,
        maxIterations: 500,
        errorTolerance: 0,
        improvementThreshold: 0,
      },
    );
    const rms = Math.sqrt(judge.parameterError / points.length);
    expect(result.residualVolts).toBeLessThanOrEqual(rms * (1 + 1e-9));
    // And the judge has come as near as to be one.
    expect(rms).toBeLessThanOrEqual((result.residualVolts ?? NaN) * 1.02);
  });
});

interface Measured {
  id: string;
  inputs: { I_mA: number; samples: number[] };
  expected: { mean_V: number; spread_V: number };
  tolerance: number;
}

describe('measured samples: mean and spread at the working current', () => {
  it.each(entries as unknown as Measured[])('$id', ({ inputs, expected, tolerance }) => {
    const workingAmps = inputs.I_mA / 1000;
    const slope = 2.5 * thermalVolts(25);
    // One curve through each measured point: the source gives no other reading.
    const points = inputs.samples.flatMap((volts, i) =>
      [0.002, 0.005, 0.012, 0.03].map((amps) => ({
        sample: `${i + 1}`,
        amps,
        volts: volts + slope * Math.log(amps / workingAmps) + 4 * (amps - workingAmps),
      })),
    );
    const { spread } = fit(points, { workingAmps });
    expectNear(spread?.meanVolts, expected.mean_V, tolerance);
    expectNear((spread?.maxVolts ?? NaN) - (spread?.minVolts ?? NaN), expected.spread_V, 1e-9);
  });
});
