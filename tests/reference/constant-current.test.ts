/**
 * Constant-current circuits against published figures (data/constant-current.json names the source of each) and
 * against ngspice run on the spot.
 */
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { currentSinkCalculation, type CurrentSinkInput } from '@/lib/sizing/current-sink';
import {
  linearCurrentSourceCalculation,
  type LinearCurrentSourceInput,
} from '@/lib/sizing/linear-current-source';
import { seriesStringCalculation, type SeriesStringInput } from '@/lib/sizing/series-string';
import { operatingPoint } from '../support/ngspice';
import { seeded, testSeed } from '../support/random';
import entries from './data/constant-current.json';

interface Entry {
  id: string;
  inputs: Record<string, number>;
  expected: Record<string, number | boolean>;
  tolerance: number;
}
interface SinkEntry {
  id: string;
  inputs: { Vref: number; ratio: number[]; R_ohm: number };
  expected: { I_mA: number[] };
  tolerance: number;
}
const entry = (id: string): Entry => {
  const found = (entries as unknown as Entry[]).find((one) => one.id === id);
  if (!found) throw new Error(`no entry ${id}`);
  return found;
};
const expectNear = (got: unknown, want: unknown, relative: number) =>
  expect(Math.abs((got as number) - (want as number)), `${got} against ${want}`).toBeLessThanOrEqual(
    relative * Math.abs(want as number),
  );

/** LEDs whose forward volts do not vary, as in the sources. */
function source(volts: number, forwardVolts: number, perString: number, amps: number, more: object = {}) {
  const input: LinearCurrentSourceInput = {
    supply: { volts },
    led: { forwardVolts, forwardVoltsMin: forwardVolts, forwardVoltsMax: forwardVolts, maxAmps: 2 },
    perString,
    amps,
    dropoutVolts: 2.5,
    thermalCelsiusPerWatt: 80,
    maxJunctionCelsius: 125,
    ambientCelsius: 50,
    series: 'E24',
    ...more,
  };
  return runCalculation(linearCurrentSourceCalculation, input);
}

describe('adjustable regulator as current source, published', () => {
  const sheet = entry('regulator-data').expected as Record<string, number>;

  it('takes the typical reference of the sheet where none is given', () => {
    const answer = source(12, 3.2, 1, 0.1);
    expect(answer.working.find(({ key }) => key === 'set-ohms-exact')?.inputs[0]?.value).toBe(sheet.Vref_typ);
  });

  it.each(['regulator-3.9R', 'regulator-4.7R'])('%s: current and watts of a standard set resistor', (id) => {
    const { inputs, expected, tolerance } = entry(id);
    const ohms = inputs.R_ohm ?? NaN;
    const { result } = source(12, 3.2, 1, 1.25 / ohms);
    expect(result.setOhms).toBe(ohms);
    expectNear(result.amps, expected.I_A, tolerance);
    expectNear(result.setWatts, expected.P_R_W, tolerance);
  });

  it('the spread of the reference is the spread of the current', () => {
    const { result } = source(12, 3.2, 1, 0.1, { referenceMaxVolts: sheet.Vref_max });
    expectNear(
      (result.ampsMax ?? 0) / (result.amps ?? 1),
      (sheet.Vref_max ?? 0) / (sheet.Vref_typ ?? 1),
      1e-12,
    );
  });

  it('regulator-need-350mA', () => {
    const { inputs, expected, tolerance } = entry('regulator-need-350mA');
    expectNear(source(12, 3.2, 1, inputs.I_A ?? NaN).result.setOhmsExact, expected.R_ohm, tolerance);
  });

  it('regulator-trap-12V-3led: does not regulate, though published as working', () => {
    const { inputs, expected, tolerance } = entry('regulator-trap-12V-3led');
    const { V = NaN, Vf = NaN, n = NaN } = inputs;
    const headroom = entry('regulator-headroom').expected.headroom_V as number;
    const answer = source(V, Vf, n, 0.3, { dropoutVolts: headroom });
    const stop = answer.findings.find(({ code }) => code === 'no-headroom');
    expect(stop !== undefined).toBe(!expected.in_regulation);
    expectNear(stop?.values.neededVolts, expected.V_needed, tolerance);
  });

  it('regulator-thermal: from its own numbers, not from the watts that are printed', () => {
    const { inputs, expected, tolerance } = entry('regulator-thermal');
    const { Tj, Ta, theta, Vin = NaN, Vf = NaN } = inputs;
    const limits = {
      maxJunctionCelsius: Tj,
      ambientCelsius: Ta,
      thermalCelsiusPerWatt: theta,
      series: 'E96',
    };
    const answer = source(Vin, Vf, 1, 0.1, limits);
    const step = (key: string) => answer.working.find((one) => one.key === key)?.value;
    expectNear(step('regulator-watts-allowed'), expected.P_max_W, tolerance);
    expectNear(
      step('regulator-amps-allowed'),
      (expected.I_mA_excluding_set_resistor as number) / 1000,
      tolerance,
    );
    // Printed 117 mA counts the set resistor's volts as the chip's: its own watts at 117 mA are below the limit.
    const printed = source(Vin, Vf, 1, (expected.published_mA as number) / 1000, limits);
    expect(printed.findings.map(({ code }) => code)).not.toContain('junction-too-hot');
    const more = source(Vin, Vf, 1, 0.14, limits);
    expect(more.findings.map(({ code }) => code)).toContain('junction-too-hot');
  });
});

describe('linear current source against ngspice', () => {
  const seed = testSeed();
  const random = seeded(seed);
  it.each(Array.from({ length: 12 }, (_, k) => k))(`circuit %i, TEST_SEED=${seed}`, () => {
    const leds = random.whole(1, 8);
    const reference = random.between(0.2, 1.3);
    const wanted = random.decades(0.01, 0.7);
    const supply = leds * 4.5 + reference + random.between(2, 12);
    const diodes = Array.from(
      { length: leds },
      (_, k) => `D${k} n${k} ${k + 1 === leds ? '0' : `n${k + 1}`} led`,
    );
    // The chip: a transconductance of 1e4 S holds the reference between output and adjusting pin but for I / 1e4,
    // which is as if the set resistor had 1e-4 ohm more.
    const netlist = (ohms: number) => [
      `V1 in 0 ${supply}`,
      `Vr ref n0 ${reference}`,
      'G1 in out ref out 1e4',
      `R1 out n0 ${ohms - 1e-4}`,
      ...diodes,
      `.model led D(IS=1e-18 N=3.2 RS=${random.between(0.1, 1)})`,
    ];
    const exact = reference / wanted;
    const typical = { referenceVolts: reference, series: 'E96' as const };
    const { setOhms } = source(supply, 3.2, leds, wanted, typical).result;
    expect(setOhms).toBeGreaterThanOrEqual(exact * (1 - 1e-9));
    const spice = operatingPoint(netlist(setOhms));
    const value = (name: string) => spice.get(name) ?? NaN;
    const amps = -value('v1#branch');
    // The engine with the forward volts that the circuit has at its current.
    const { result } = source(supply, value('n0') / leds, leds, wanted, typical);
    expectNear(result.amps, amps, 1e-6);
    // The 1e-4 ohm stand in the chip here.
    expectNear(result.regulatorWatts, (value('in') - value('out')) * amps, 1e-4);
    expectNear(result.setWatts, (value('out') - value('n0')) * amps, 1e-3);
    expectNear(result.efficiency, value('n0') / value('in'), 1e-6);
  });
});

/** A sink whose LEDs do not vary. */
function sink(volts: number, forwardVolts: number, more: Partial<CurrentSinkInput>) {
  const input: CurrentSinkInput = {
    referenceVolts: 1.2,
    currentRatio: 40,
    ampsPerChannel: 0.02,
    channels: 24,
    strings: 24,
    supply: { volts },
    led: { forwardVolts, forwardVoltsMin: forwardVolts, forwardVoltsMax: forwardVolts, maxAmps: 1 },
    perString: 1,
    dropoutVolts: 0.5,
    maxPackageWatts: 100,
    thermalCelsiusPerWatt: 30,
    ambientCelsius: 25,
    series: 'E96',
    ...more,
  };
  return runCalculation(currentSinkCalculation, input);
}

describe('multi-channel sink, published table of the set resistor', () => {
  const rows = (entries as unknown as SinkEntry[])
    .filter(({ id }) => id.startsWith('sink-'))
    .flatMap(({ id, inputs, expected, tolerance }) =>
      inputs.ratio.map((ratio, k) => ({
        id,
        ...inputs,
        ratio,
        amps: (expected.I_mA[k] ?? NaN) / 1000,
        tolerance,
      })),
    );
  it.each(rows)('$id at a ratio of $ratio', ({ Vref, ratio, R_ohm, amps, tolerance }) => {
    const wanted = { referenceVolts: Vref, currentRatio: ratio, ampsPerChannel: amps };
    expectNear(sink(5, 3, wanted).result.setOhmsExact, R_ohm, tolerance);
    // And the other way: a resistor of the series gives the printed current.
    const { result } = sink(5, 3, { ...wanted, ampsPerChannel: (Vref * ratio) / R_ohm });
    if (result.setOhms === R_ohm) expectNear(result.ampsPerChannel, amps, tolerance);
    else expect(result.setOhms).toBeGreaterThan(R_ohm);
  });

  it('has rows whose resistor is of the series, and rows whose resistor is not', () => {
    const made = rows.filter(({ R_ohm }) => [1370, 1600, 2400, 24000].includes(R_ohm));
    for (const { Vref, ratio, R_ohm } of made) {
      const series = R_ohm === 1370 ? 'E96' : 'E24';
      const wanted = {
        referenceVolts: Vref,
        currentRatio: ratio,
        ampsPerChannel: (Vref * ratio) / R_ohm,
        series,
      } as const;
      expect(sink(5, 3, wanted).result.setOhms).toBe(R_ohm);
    }
    expect(made.length).toBeGreaterThan(4);
    expect(made.length).toBeLessThan(rows.length);
  });
});

describe('multi-channel sink against ngspice', () => {
  const seed = testSeed();
  const random = seeded(seed);
  it.each(Array.from({ length: 8 }, (_, k) => k))(`circuit %i, TEST_SEED=${seed}`, () => {
    const [leds, strings] = [random.whole(1, 4), random.whole(1, 12)];
    const [reference, ratio] = [random.between(0.5, 1.3), random.between(10, 100)];
    const wanted = random.decades(0.005, 0.1);
    const supply = leds * 4 + random.between(1, 4);
    const made = {
      referenceVolts: reference,
      currentRatio: ratio,
      ampsPerChannel: wanted,
      perString: leds,
      strings,
    };
    const { setOhms } = sink(supply, 3, made).result;
    // The set resistor's current, mirrored into each channel.
    const spice = operatingPoint([
      `V1 in 0 ${supply}`,
      `Vr ref 0 ${reference}`,
      `R1 ref 0 ${setOhms}`,
      `.model led D(IS=1e-18 N=3.2 RS=${random.between(0.5, 5)})`,
      ...Array.from({ length: strings }, (_, s) => [
        `F${s} s${s}n${leds} 0 Vr ${-ratio}`,
        ...Array.from(
          { length: leds },
          (__, k) => `D${s}x${k} ${k === 0 ? 'in' : `s${s}n${k}`} s${s}n${k + 1} led`,
        ),
      ]).flat(),
    ]);
    const value = (name: string) => spice.get(name) ?? NaN;
    const channelVolts = value(`s0n${leds}`);
    const supplyAmps = -value('v1#branch');
    const { result } = sink(supply, (supply - channelVolts) / leds, made);
    expectNear(result.ampsPerChannel, supplyAmps / strings, 1e-6);
    expectNear(result.packageWatts, channelVolts * supplyAmps, 1e-6);
    expectNear(result.headroomVolts + 0.5, channelVolts, 1e-6);
  });
});

/** Modules whose volts do not vary, on a driver that is large enough for any string. */
function string(
  volts: number,
  voltsPerKelvin: number,
  more: Partial<SeriesStringInput>,
  window: [number, number],
) {
  const [minVolts, maxVolts] = window;
  return runCalculation(seriesStringCalculation, {
    module: { forwardVolts: volts, forwardVoltsMin: volts, forwardVoltsMax: volts, voltsPerKelvin },
    count: 10,
    ambientMinCelsius: 25,
    ambientMaxCelsius: 25,
    drivers: [{ sku: 'driver', amps: 0.3, minVolts, maxVolts, maxWatts: 1e6, cost: 1 }],
    loadFraction: 1,
    ...more,
  });
}

describe('series strings within a window, published', () => {
  it.each(['string-window-440W', 'string-window-550W'])('%s', (id) => {
    const { inputs, expected, tolerance } = entry(id);
    const {
      V_cold_25C = NaN,
      V_hot_25C = NaN,
      percentPerKelvin = NaN,
      T_min_C = NaN,
      T_max_C = NaN,
    } = inputs;
    const window: [number, number] = [inputs.V_min ?? NaN, inputs.V_max ?? NaN];
    // The source has one rating for cold and one for hot, each with its own volts per kelvin.
    const cold = string(
      V_cold_25C,
      (percentPerKelvin / 100) * V_cold_25C,
      { ambientMinCelsius: T_min_C },
      window,
    );
    const hot = string(
      V_hot_25C,
      (percentPerKelvin / 100) * V_hot_25C,
      { ambientMaxCelsius: T_max_C },
      window,
    );
    const step = (answer: typeof cold, key: string) => answer.working.find((one) => one.key === key)?.value;
    expectNear(cold.result.moduleColdVolts, expected.V_cold, tolerance);
    expectNear(hot.result.moduleHotVolts, expected.V_hot, tolerance);
    expect(step(cold, 'string-most')).toBe(expected.most);
    if (expected.fewest !== undefined) expect(step(hot, 'string-fewest')).toBe(expected.fewest);
  });

  it('string-led-125C', () => {
    const { inputs, expected, tolerance } = entry('string-led-125C');
    const { V_25C = NaN, voltsPerKelvin = NaN, T_C = NaN, I_A = NaN } = inputs;
    const { result } = string(V_25C, voltsPerKelvin, { riseCelsius: T_C - 25 }, [0, 100]);
    expectNear(result.moduleHotVolts, expected.V, tolerance);
    expectNear(result.moduleHotVolts * I_A, expected.P_W, tolerance);
  });
});
