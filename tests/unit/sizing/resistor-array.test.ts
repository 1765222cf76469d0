import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError, WEB_LIMITS } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { nextPreferred } from '@/lib/sizing/e-series';
import { type ResistorArrayInput, resistorArrayCalculation } from '@/lib/sizing/resistor-array';
import { E_SERIES, E_SERIES_NAMES } from '@/lib/sizing/tables/e-series';

const base: ResistorArrayInput = {
  supply: { volts: 24, tolerancePct: 5 },
  led: { forwardVolts: 3, forwardVoltsMin: 2.8, forwardVoltsMax: 3.2, amps: 0.02, maxAmps: 0.03 },
  count: 20,
  resistor: { series: 'E24', tolerancePct: 5, ratedWatts: [1, 0.125, 0.5, 0.25], loadFraction: 0.5 },
  ambientCelsius: 40,
};
const run = (change: Partial<ResistorArrayInput> = {}) =>
  runCalculation(resistorArrayCalculation, { ...base, ...change });
const stops = (answer: ReturnType<typeof run>) =>
  answer.findings.filter(({ severity }) => severity === 'stop').map(({ code }) => code);
const refused = (change: object) => {
  try {
    runCalculation(resistorArrayCalculation, { ...base, ...change });
  } catch (error) {
    if (error instanceof EngineError) return error.issues.map(({ path }) => path);
  }
  return [];
};

describe('choice of the number in series', () => {
  it('takes the largest number that keeps the current within limits at both ends of the window', () => {
    const { result } = run();
    const n = result.perString ?? 0;
    expect(n).toBeGreaterThan(1);
    const [string] = result.strings;
    expect(string?.ampsMax).toBeLessThanOrEqual(0.03);
    expect(string?.ampsMin).toBeGreaterThanOrEqual(0.01);
    const next = run({ perString: n + 1 }).result.strings[0];
    expect((next?.ampsMax ?? 1) > 0.03 || (next?.ampsMin ?? 0) < 0.01).toBe(true);
  });

  it('gives a shorter last string its own resistor', () => {
    const { result } = run({ count: 11, perString: 5 });
    expect(result.strings.map(({ leds }) => leds)).toEqual([5, 5, 1]);
    expect(result.strings[0]?.ballastOhms).toBe(470);
    expect(result.strings[2]?.ballastOhms).toBe(1100);
    expect(result.supplyAmps).toBeCloseTo((2 * 9) / 470 + 21 / 1100, 12);
  });

  it('answers with nulls and a stop where no number fits', () => {
    const answer = run({ led: { ...base.led, forwardVolts: 30, forwardVoltsMin: 28, forwardVoltsMax: 32 } });
    expect(answer.result).toEqual({
      perString: null,
      strings: [],
      supplyAmps: null,
      supplyWatts: null,
      efficiency: null,
      saferOhms: null,
    });
    expect(stops(answer)).toEqual(['no-count-fits']);
  });
});

describe('worst cases', () => {
  it('figures currents and watts at the ends of window, forward volts and tolerance', () => {
    const [string] = run({ perString: 6 }).result.strings;
    expect(string?.ballastOhms).toBe(300);
    expect(string?.ampsMax).toBeCloseTo((25.2 - 16.8) / 285, 12);
    expect(string?.ampsMin).toBeCloseTo((22.8 - 19.2) / 315, 12);
    expect(string?.ballastWattsMax).toBeCloseTo((8.4 * 8.4) / 285, 12);
    // 0.2476 W at a load fraction of one half needs 0.5 W.
    expect(string?.ballastRatedWatts).toBe(0.5);
  });

  it('takes the middle of a window, and volts within it', () => {
    const window = run({ supply: { minVolts: 11, maxVolts: 14.4 }, perString: 3 });
    expect(window.working.find(({ key }) => key === 'supply-watts')?.inputs[0]?.value).toBeCloseTo(12.7, 12);
    const nominal = run({ supply: { volts: 12, minVolts: 11, maxVolts: 14.4 }, perString: 3 });
    expect(nominal.result.strings[0]?.ballastOhmsExact).toBeCloseTo(150, 9);
    expect(nominal.result.strings[0]?.ampsMax).toBeCloseTo((14.4 - 8.4) / 142.5, 12);
  });

  it('stops above maxAmps with the resistor that keeps within it', () => {
    const answer = run({ perString: 7, led: { ...base.led, maxAmps: 0.025 } });
    expect(stops(answer)).toContain('over-max-amps');
    const safer = answer.result.saferOhms ?? 0;
    expect((25.2 - 7 * 2.8) / (safer * 0.95)).toBeLessThanOrEqual(0.025);
    expect(answer.result.strings[0]?.ballastOhms).toBe(150);
    const finding = answer.findings.find(({ code }) => code === 'over-max-amps');
    expect(finding?.values.saferOhms).toBe(safer);
    expect(run({ perString: 5 }).result.saferOhms).toBeNull();
  });

  it('stops where no rating is large enough, and derates by ambient', () => {
    const answer = run({ perString: 6, ambientCelsius: 154 });
    expect(answer.result.strings[0]?.ballastRatedWatts).toBeNull();
    expect(stops(answer)).toContain('no-rating');
    const derated = run({ perString: 6, ambientCelsius: 112.5 });
    // Half way between 70 and 155 C: twice the rating.
    expect(derated.result.strings[0]?.ballastRatedWatts).toBe(1);
  });

  it('always says that it is field-built', () => {
    for (const answer of [run(), run({ perString: 8 }), run({ perString: 7 })]) {
      expect(answer.findings[0]).toMatchObject({
        severity: 'note',
        message: 'field-built; not a listed luminaire or kit',
      });
    }
    expect(resistorArrayCalculation.bench).toBe(true);
  });
});

describe('refusals', () => {
  it.each([
    [{ supply: {} }, ['supply.volts']],
    [{ supply: { minVolts: 11 } }, ['supply.maxVolts']],
    [{ supply: { maxVolts: 11 } }, ['supply.minVolts']],
    [{ supply: { minVolts: 14, maxVolts: 11 } }, ['supply.minVolts']],
    [{ supply: { minVolts: 11, maxVolts: 14, tolerancePct: 5 } }, ['supply.tolerancePct']],
    [{ supply: { minVolts: 11, maxVolts: 14, volts: 15 } }, ['supply.volts']],
    [{ led: { ...base.led, forwardVoltsMin: 3.3 } }, ['led.forwardVoltsMin']],
    [{ led: { ...base.led, forwardVolts: 3.3 } }, ['led.forwardVolts']],
    [{ perString: 21 }, ['perString']],
    [{ perString: 1.5 }, ['perString']],
    [{ resistor: { ...base.resistor, ratedWatts: [] } }, ['resistor.ratedWatts']],
    [{ resistor: { ...base.resistor, tolerancePct: 100 } }, ['resistor.tolerancePct']],
    [{ resistor: { ...base.resistor, derateFromCelsius: 155 } }, ['resistor.derateToCelsius']],
    [{ ohms: 5 }, ['ohms']],
  ])('%j', (change, paths) => {
    expect(refused(change)).toEqual(paths);
  });

  it('keeps the web to its limit', () => {
    const large = { ...base, count: 5001 };
    expect(() => runCalculation(resistorArrayCalculation, large, WEB_LIMITS)).toThrow(
      expect.objectContaining({ code: 'too-large' }),
    );
  });
});

describe('laws', () => {
  it('the preferred value is the smallest of its series that is not below', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -3, max: 8, noNaN: true }),
        fc.constantFrom(...E_SERIES_NAMES),
        (log, series) => {
          const ohms = 10 ** log;
          const value = nextPreferred(ohms, series);
          expect(value).toBeGreaterThanOrEqual(ohms * (1 - 1.1e-9));
          const widest = Math.max(
            ...E_SERIES[series].map((v, i, all) => (all[i + 1] ?? (all[0] ?? 0) * 10) / v),
          );
          expect(value).toBeLessThan(ohms * widest * (1 + 1e-8));
          expect(nextPreferred(value, series)).toBe(value);
        },
      ),
    );
  });

  it('power in = LED watts + resistor watts, and min <= nominal <= max', () => {
    const volts = fc.double({ min: 5, max: 60, noNaN: true });
    const forward = fc.double({ min: 1.5, max: 4, noNaN: true });
    fc.assert(
      fc.property(
        volts,
        forward,
        fc.integer({ min: 1, max: 40 }),
        fc.constantFrom(...E_SERIES_NAMES),
        (v, vf, count, series) => {
          const { result } = run({
            supply: { volts: v, tolerancePct: 3 },
            led: {
              forwardVolts: vf,
              forwardVoltsMin: vf * 0.95,
              forwardVoltsMax: vf * 1.05,
              amps: 0.02,
              maxAmps: 0.1,
            },
            resistor: { ...base.resistor, series },
            count,
          });
          if (result.supplyWatts === null) return;
          let watts = 0;
          for (const s of result.strings) {
            watts += (s.ballastWatts ?? 0) + s.leds * vf * (s.amps ?? 0);
            expect(s.ampsMin).toBeLessThanOrEqual(s.amps ?? 0);
            expect(s.amps).toBeLessThanOrEqual(s.ampsMax ?? 0);
          }
          expect(Math.abs(watts / result.supplyWatts - 1)).toBeLessThan(1e-9);
          expect(result.strings.reduce((sum, { leds }) => sum + leds, 0)).toBe(count);
        },
      ),
    );
  });
});
