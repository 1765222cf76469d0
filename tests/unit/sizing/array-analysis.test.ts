import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError, WEB_LIMITS } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { arrayAnalysisCalculation, type ArrayInput } from '@/lib/sizing/array-analysis';
import { saturationAt, stringAmps, stringVolts } from '@/lib/sizing/diode';

const led = { saturationAmps: 2.3e-17, emissionCoefficient: 3.4, seriesOhms: 3 };
const solve = (input: ArrayInput) => runCalculation(arrayAnalysisCalculation, input);
const codes = (input: ArrayInput) => solve(input).findings.map(({ code, severity }) => `${severity} ${code}`);
const refused = (input: unknown) => {
  try {
    runCalculation(arrayAnalysisCalculation, input);
  } catch (error) {
    if (error instanceof EngineError) return `${error.code} ${error.issues.map(({ path }) => path).join()}`;
  }
  return '';
};

describe('findings', () => {
  const strings = [
    { ballastOhms: 0, leds: [led, led, led] },
    { ballastOhms: 0, leds: [led, led, { ...led, saturationAmps: 1e-17 }] },
  ];

  it('cautions about one resistor for several strings, with the imbalance', () => {
    const answer = solve({ supply: { volts: 12, sourceOhms: 0 }, sharedOhms: 30, strings });
    const shared = answer.findings.find(({ code }) => code === 'shared-resistor');
    expect(shared?.severity).toBe('caution');
    expect(shared?.values.imbalance).toBe(answer.result.imbalance);
    expect(answer.result.imbalance).toBeGreaterThan(1.1);
    // Less saturation current is more forward volts: the first string has the lower.
    const [first = 0, second = 0] = answer.result.strings.map(({ amps }) => amps);
    expect(shared?.values).toMatchObject({ string: 1, overShare: first / ((first + second) / 2) });
    expect(
      codes({ supply: { volts: 12, sourceOhms: 0 }, sharedOhms: 30, strings: strings.slice(1) }),
    ).toEqual(['note field-built']);
    expect(codes({ supply: { volts: 12, sourceOhms: 0 }, strings })).toEqual(['note field-built']);
  });

  it('shows that one resistor for all drives the lowest-voltage string hotter and hotter', () => {
    // 400 K/W from junction to air, common practice for a small through-hole LED.
    const KELVIN_PER_WATT = 400;
    const parts = [1e-18, 1e-18, 1e-18, 3e-18].map((saturationAmps) => ({ ...led, saturationAmps }));
    const settle = (sharedOhms: number, ballastOhms: number) => {
      let celsius = parts.map(() => 25);
      const shares: number[] = [];
      for (let round = 0; round < 8; round++) {
        const { result, working } = solve({
          supply: { volts: 9, sourceOhms: 0 },
          sharedOhms,
          strings: parts.map((part, i) => ({
            ballastOhms,
            leds: [{ ...part, celsius: celsius[i] ?? 25, saturationCelsius: 25, gapVolts: 3.75 }],
          })),
        });
        celsius = result.strings.map(
          ({ amps, ledVolts }) => 25 + KELVIN_PER_WATT * amps * (ledVolts[0] ?? 0),
        );
        shares.push(Number(working.find(({ key }) => key === 'string-share')?.value));
      }
      return { shares, celsius };
    };
    const shared = settle(70, 0);
    for (let round = 1; round < 4; round++)
      expect(shared.shares[round]).toBeGreaterThan(shared.shares[round - 1] ?? Infinity);
    expect(Math.max(...shared.celsius)).toBe(shared.celsius[3]);
    const own = settle(0, 280);
    expect(own.shares.at(-1)).toBeLessThan(1.05);
    expect(shared.shares.at(-1)).toBeGreaterThan(1.2);
  });

  it('has no imbalance when a string is dark', () => {
    const dark = { ballastOhms: 100, leds: Array.from({ length: 9 }, () => led) };
    const answer = solve({ supply: { volts: 12, sourceOhms: 0 }, strings: [...strings, dark] });
    expect(answer.result.imbalance).toBeNull();
    expect(answer.findings.map(({ code }) => code)).toContain('dark-string');
    expect(solve({ supply: { amps: 0 }, strings }).result).toMatchObject({ supplyVolts: 0, imbalance: null });
  });

  it('cautions about a saturation current given far from its temperature, unless gap volts carry it', () => {
    const at = (more: object) =>
      codes({
        supply: { volts: 5, sourceOhms: 0 },
        strings: [{ ballastOhms: 100, leds: [{ ...led, celsius: 30, ...more }] }],
      });
    expect(at({ saturationCelsius: 25 })).toEqual(['note field-built']);
    expect(at({ saturationCelsius: 24.9 })).toContain('caution saturation-temperature');
    expect(at({ saturationCelsius: 24.9, gapVolts: 3.75 })).toEqual(['note field-built']);
    expect(at({})).toEqual(['note field-built']);
  });
});

describe('temperature law', () => {
  it('doubles as written and is the identity at the same temperature', () => {
    const given = { ...led, gapVolts: 3.75, xti: 3 };
    expect(saturationAt(given, 25, 25)).toBe(led.saturationAmps);
    const k = 1.380649e-23;
    const q = 1.602176634e-19;
    const want =
      2.3e-17 *
      (378.15 / 298.15) ** (3 / 3.4) *
      Math.exp(((q * 3.75) / (3.4 * k)) * (1 / 298.15 - 1 / 378.15));
    expect(saturationAt(given, 25, 105) / want).toBeCloseTo(1, 12);
  });
});

describe('refusals', () => {
  const strings = [{ ballastOhms: 10, leds: [led] }];
  it.each([
    [{ supply: {}, strings }, 'invalid-input supply.volts'],
    [{ supply: { volts: 5, amps: 1 }, strings }, 'invalid-input supply.amps'],
    [{ supply: { amps: 1, sourceOhms: 1 }, strings }, 'invalid-input supply.sourceOhms'],
    [{ supply: { volts: -5 }, strings }, 'invalid-input supply.volts'],
    [{ supply: { volts: 5 }, strings: [] }, 'invalid-input strings'],
    [{ supply: { volts: 5 }, strings: [{ ballastOhms: 10, leds: [] }] }, 'invalid-input strings.0.leds'],
    [
      { supply: { volts: 5 }, strings: [{ ballastOhms: 10, leds: [{ ...led, seriesOhms: -1 }] }] },
      'invalid-input strings.0.leds.0.seriesOhms',
    ],
    [
      {
        supply: { volts: 5 },
        strings: [
          { ballastOhms: 1, leds: [{ ...led, celsius: 200, saturationCelsius: -60, gapVolts: 1e6 }] },
        ],
      },
      'invalid-input strings.0.leds.0.gapVolts',
    ],
    [
      { supply: { volts: 1000 }, strings: [{ ballastOhms: 0, leds: [{ ...led, seriesOhms: 0 }] }] },
      'no-solution strings',
    ],
  ])('%j: %s', (input, want) => {
    expect(refused(input)).toBe(want);
  });

  it('keeps the web to its limit', () => {
    const many = {
      supply: { volts: 12 },
      strings: [{ ballastOhms: 10, leds: Array.from({ length: 5001 }, () => led) }],
    };
    expect(() => runCalculation(arrayAnalysisCalculation, many, WEB_LIMITS)).toThrow(
      expect.objectContaining({ code: 'too-large' }),
    );
  });
});

const log = (low: number, high: number) =>
  fc.double({ min: Math.log(low), max: Math.log(high), noNaN: true }).map(Math.exp);
const anyLed = fc.record({
  saturationAmps: log(1e-30, 1e-6),
  emissionCoefficient: fc.double({ min: 1, max: 6, noNaN: true }),
  seriesOhms: fc.oneof(fc.constant(0), log(1e-6, 100)),
  celsius: fc.double({ min: -40, max: 150, noNaN: true }),
});
const anyStrings = fc.array(
  fc.record({
    ballastOhms: fc.oneof(fc.constant(0), log(1e-6, 1e6)),
    leds: fc.array(anyLed, { minLength: 1, maxLength: 6 }),
  }),
  { minLength: 1, maxLength: 6 },
);
const anySupply = fc.oneof(
  fc.record({ amps: log(1e-9, 100) }),
  fc.record({ volts: log(0.01, 400), sourceOhms: log(1e-6, 1e3) }),
);

describe('laws', () => {
  it('the string law and its inverse agree over all that is physical', () => {
    fc.assert(
      fc.property(
        fc.array(anyLed, { minLength: 1, maxLength: 5 }),
        log(1e-12, 1e3),
        log(1e-15, 1e6),
        (leds, amps, near) => {
          const string = {
            ohms: leds.reduce((sum, { seriesOhms }) => sum + seriesOhms, 0),
            junctions: leds.map(({ saturationAmps, emissionCoefficient }) => ({
              saturationAmps,
              slopeVolts: 0.0257 * emissionCoefficient,
            })),
          };
          const volts = stringVolts(string, amps);
          expect(Math.abs(stringAmps(string, volts) / amps - 1)).toBeLessThan(1e-9);
          expect(Math.abs(stringAmps(string, volts, near) / amps - 1)).toBeLessThan(1e-9);
        },
      ),
      { numRuns: 500 },
    );
  });

  it('Kirchhoff closes at the node and around every string, and power in = power out', () => {
    fc.assert(
      fc.property(
        anySupply,
        anyStrings,
        fc.oneof(fc.constant(0), log(1e-6, 1e3)),
        (supply, strings, sharedOhms) => {
          const { result } = solve({ supply, strings, sharedOhms });
          const near = (a: number, b: number) =>
            expect(Math.abs(a - b)).toBeLessThanOrEqual(1e-9 * Math.max(a, b));
          near(
            result.strings.reduce((sum, { amps }) => sum + amps, 0),
            result.supplyAmps,
          );
          const shared = result.supplyAmps * sharedOhms;
          let watts = result.supplyAmps * shared;
          result.strings.forEach(({ amps, ballastWatts, ledVolts }, i) => {
            const leds = ledVolts.reduce((sum, volts) => sum + volts, 0);
            near(leds + amps * (strings[i]?.ballastOhms ?? 0) + shared, result.supplyVolts);
            watts += ballastWatts + amps * leds;
          });
          near(watts, result.supplyVolts * result.supplyAmps);
          if ('volts' in supply)
            near(result.supplyVolts + result.supplyAmps * supply.sourceOhms, supply.volts);
        },
      ),
      { numRuns: 500 },
    );
  });
});
