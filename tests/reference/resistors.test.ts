/**
 * Ballast resistors against published figures (data/06-resistors.json and data/07-led.json name the source of
 * each) and against facts of the trade (common practice, no source).
 */
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { nextPreferred } from '@/lib/sizing/e-series';
import { resistorCodeCalculation } from '@/lib/sizing/resistor-code';
import { type ResistorArrayInput, resistorArrayCalculation } from '@/lib/sizing/resistor-array';
import { E_SERIES, type ESeries } from '@/lib/sizing/tables/e-series';
import ledEntries from './data/07-led.json';
import resistorEntries from './data/06-resistors.json';

interface Entry {
  id: string;
  inputs: Record<string, unknown>;
  expected: Record<string, unknown>;
  tolerance: number;
}
const starting = (entries: readonly unknown[], prefix: string) =>
  (entries as Entry[]).filter(({ id }) => id.startsWith(prefix));

/** A string on fixed volts with forward volts that do not vary: the sources' own picture. */
function array(volts: number, forwardVolts: number, amps: number, perString: number, more: object = {}) {
  const input: ResistorArrayInput = {
    supply: { volts },
    led: { forwardVolts, forwardVoltsMin: forwardVolts, forwardVoltsMax: forwardVolts, amps, maxAmps: 1 },
    count: perString,
    perString,
    resistor: { series: 'E24', tolerancePct: 0, ratedWatts: [0.125, 0.25, 0.5, 1], loadFraction: 0.5 },
    ambientCelsius: 25,
    ...more,
  };
  return runCalculation(resistorArrayCalculation, input);
}
const step = (answer: ReturnType<typeof array>, key: string) => answer.working.find((s) => s.key === key);

describe('preferred values, IEC 60063', () => {
  it.each(starting(resistorEntries, 'eseries-E'))('$id is listed as published', ({ inputs, expected }) => {
    const listed = E_SERIES[inputs.series as ESeries];
    expect(listed).toEqual(expected.values);
    expect(listed).toHaveLength(expected.count as number);
  });

  it.each(starting(resistorEntries, 'eseries-ratio'))(
    '$id: steps of 10^(1/n)',
    ({ inputs, expected, tolerance }) => {
      const listed = E_SERIES[inputs.series as ESeries];
      const ratio = 10 ** (1 / listed.length);
      expect(Math.abs(ratio - (expected.ratio as number))).toBeLessThanOrEqual(tolerance);
      // No listed value is further from the geometric one than its step's rounding allows.
      listed.forEach((value, i) => expect(Math.abs(value / (10 * ratio ** i) - 1)).toBeLessThan(0.07));
    },
  );

  it('keeps the E24 values that do not follow 10^(i/24)', () => {
    const off = starting(resistorEntries, 'eseries-off')[0]?.expected.values as Record<string, number>;
    for (const [value, formula] of Object.entries(off)) {
      expect(nextPreferred(Number(value), 'E24')).toBe(Number(value));
      expect(E_SERIES.E24).not.toContain(formula);
    }
  });
});

describe('colour code, IEC 60062', () => {
  const code = (input: object) => runCalculation(resistorCodeCalculation, input).result;

  it.each(starting(resistorEntries, 'bands-'))('$id', ({ inputs, expected }) => {
    const bands = inputs.bands as string[];
    const read = code({ bands });
    expect(read.ohms).toBeCloseTo(expected.R_ohm as number, 9);
    expect(read.tolerancePct).toBe(expected.tolerance_percent);
    // And back: four bands, or five for 1 %.
    expect(code({ ohms: read.ohms, tolerancePct: read.tolerancePct }).bands).toEqual(bands);
  });

  it.each(starting(resistorEntries, 'colour-'))('$id', ({ inputs, expected }) => {
    const colour = inputs.colour as string;
    const { digit, multiplier, tolerance_percent, tempco_ppm_K } = expected as Record<string, number | null>;
    if (digit !== null && digit !== undefined && digit > 0)
      expect(code({ bands: [colour, 'black', 'black'] }).ohms).toBe(digit * 10);
    const multiplied = code({ bands: ['brown', 'black', colour] }).ohms;
    expect(multiplied / (10 * (multiplier ?? NaN))).toBeCloseTo(1, 12);
    const toleranced = () => code({ bands: ['brown', 'black', 'black', colour] }).tolerancePct;
    if (tolerance_percent === null) expect(toleranced).toThrow(/bands\.3/);
    else expect(toleranced()).toBe(tolerance_percent);
    const kelvin = () => code({ bands: ['brown', 'black', 'black', 'black', 'brown', colour] }).ppmPerKelvin;
    if (tempco_ppm_K === null) expect(kelvin).toThrow(/bands\.5/);
    else expect(kelvin()).toBe(tempco_ppm_K);
  });
});

describe('series resistor, published worked examples', () => {
  it.each(starting(resistorEntries, 'ledR-tab'))('$id', ({ inputs, expected, tolerance }) => {
    const { V, Vf, I_mA } = inputs as { V: number; Vf: number; I_mA: number };
    const string = array(V, Vf, I_mA / 1000, 1).result.strings[0];
    const exact = expected.R_exact_ohm as number;
    expect(Math.abs((string?.ballastOhmsExact ?? 0) - exact)).toBeLessThanOrEqual(tolerance * exact);
    expect(string?.ballastOhms).toBe(expected.R_E24_ohm);
  });

  it.each(starting(resistorEntries, 'ledR-').filter(({ id }) => !id.startsWith('ledR-tab')))(
    '$id',
    ({ inputs, expected, tolerance }) => {
      const { V, Vf, n, I_mA } = inputs as { V: number; Vf: number; n: number; I_mA: number };
      const want = expected as { R_ohm: number; P_R_mW: number; efficiency_percent: number };
      const answer = array(V, Vf, I_mA / 1000, n);
      const near = (got: number | null | undefined, wanted: number) =>
        expect(Math.abs((got ?? 0) / wanted - 1)).toBeLessThanOrEqual(tolerance);
      near(answer.result.strings[0]?.ballastOhmsExact, want.R_ohm);
      near(step(answer, 'ballast-watts-exact')?.value as number, want.P_R_mW / 1000);
      near(answer.result.efficiency, want.efficiency_percent / 100);
    },
  );

  it.each(starting(ledEntries, 'eff-').filter(({ id }) => id !== 'eff-9V-2led'))(
    '$id',
    ({ inputs, expected, tolerance }) => {
      const { V, Vf, n } = inputs as { V: number; Vf: number; n: number };
      const efficiency = (array(V, Vf, 0.02, n).result.efficiency ?? 0) * 100;
      expect(Math.abs(efficiency - (expected.efficiency_percent as number))).toBeLessThanOrEqual(
        tolerance * 100,
      );
    },
  );

  it('eff-9V-2led: two LEDs of 7.2 V together at 30 mA', () => {
    const answer = array(9, 3.6, 0.03, 2);
    expect(answer.result.strings[0]?.ballastOhmsExact).toBeCloseTo(60, 9);
    expect(step(answer, 'ballast-watts-exact')?.value).toBeCloseTo(0.054, 9);
    expect(answer.result.efficiency).toBeCloseTo(0.8, 9);
  });

  it.each(starting(ledEntries, 'imb-').filter(({ inputs }) => 'dVf' in inputs))(
    '$id: the highest current is the one with forward volts at their lowest',
    ({ inputs, expected, tolerance }) => {
      const { V, n, Vf, R, dVf } = inputs as { V: number; n: number; Vf: number; R: number; dVf: number };
      const led = {
        forwardVolts: Vf,
        forwardVoltsMin: Vf + dVf,
        forwardVoltsMax: Vf,
        amps: 0.02,
        maxAmps: 1,
      };
      // The source's resistor is a standard value: the current that asks for it exactly.
      const string = array(V, Vf, (V - n * Vf) / R, n, {
        led: { ...led, amps: (V - n * Vf) / R },
      }).result.strings[0];
      expect(string?.ballastOhms).toBe(R);
      expect(Math.abs((string?.amps ?? 0) * 1000 - (expected.I_mA as number))).toBeLessThanOrEqual(tolerance);
      expect(Math.abs((string?.ampsMax ?? 0) * 1000 - (expected.I_new_mA as number))).toBeLessThanOrEqual(
        tolerance,
      );
    },
  );
});

describe('derating, published charts', () => {
  const derate = (ambientCelsius: number, derateToCelsius: number) => {
    const resistor = { series: 'E24', tolerancePct: 0, ratedWatts: [1], loadFraction: 1, derateToCelsius };
    const rated = step(array(9, 3.2, 0.02, 1, { ambientCelsius, resistor }), 'ballast-rated-watts');
    return rated?.inputs.find(({ name }) => name === 'derate')?.value as number;
  };

  it.each(starting(resistorEntries, 'derate-').filter(({ expected }) => 'fraction' in expected))(
    '$id',
    ({ id, inputs, expected, tolerance }) => {
      // The military chart ends at 150 C, the chip makers' at 155 C.
      const factor = derate(inputs.T_C as number, id.startsWith('derate-mil') ? 150 : 155);
      expect(Math.abs(factor - (expected.fraction as number))).toBeLessThanOrEqual(tolerance);
    },
  );

  it('derate-hp-100: a 0.75 W chip carries 0.5 W at 100 C', () => {
    expect(Math.abs(0.75 * derate(100, 155) - 0.5)).toBeLessThanOrEqual(0.04);
  });
});

describe('facts of the trade (common practice, no source)', () => {
  it('9 V, one LED of 3.2 V at 20 mA: 290 ohm and 0.116 W exact, next E24 value 300 ohm', () => {
    const answer = array(9, 3.2, 0.02, 1);
    expect(answer.result.strings[0]?.ballastOhmsExact).toBeCloseTo(290, 9);
    expect(step(answer, 'ballast-watts-exact')?.value).toBeCloseTo(0.116, 12);
    expect(answer.result.strings[0]?.ballastOhms).toBe(300);
  });

  it('two in series: 130 ohm, 0.052 W', () => {
    const answer = array(9, 3.2, 0.02, 2);
    expect(answer.result.strings[0]?.ballastOhmsExact).toBeCloseTo(130, 9);
    expect(answer.result.strings[0]?.ballastOhms).toBe(130);
    expect(step(answer, 'ballast-watts-exact')?.value).toBeCloseTo(0.052, 12);
    expect(answer.result.strings[0]?.ballastWatts).toBeCloseTo(0.052, 12);
  });

  it('three in series do not fit: nulls and a stop', () => {
    const { result, findings } = array(9, 3.2, 0.02, 3);
    expect(result).toMatchObject({ perString: 3, supplyAmps: null, supplyWatts: null, efficiency: null });
    expect(result.strings).toEqual([
      {
        leds: 3,
        ballastOhmsExact: null,
        ballastOhms: null,
        amps: null,
        ampsMin: null,
        ampsMax: null,
        ballastWatts: null,
        ballastWattsMax: null,
        ballastRatedWatts: null,
      },
    ]);
    expect(findings.filter(({ severity }) => severity === 'stop').map(({ code }) => code)).toEqual([
      'does-not-fit',
    ]);
  });
});
