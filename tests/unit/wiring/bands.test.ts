/**
 * Expected readings and their bands against cases worked by hand: supply 5 %, copper from 20 C to working
 * temperature, meter 1 % volts and 3 % clamp (the meter's error is common practice).
 */
import { describe, expect, it } from 'vitest';
import { type ResistorArray, startingPoint, type TapeRun } from '@/lib/circuits/schema/electrical';
import { figureCircuit } from '@/lib/circuits/schema/figure';
import { DEFAULT_SETTINGS } from '@/lib/units/settings';
import { bandOver, expectedReadings, judge } from '@/lib/wiring/schema/bands';

const IEC = { ...DEFAULT_SETTINGS, basis: 'iec', units: 'metric' } as const;

/** Two cuts of 0.5 m, 0.1 A each, rails of 0.1 ohm/m: the whole ladder fits on a line of paper. */
const run = (over: Partial<TapeRun> = {}): TapeRun => ({
  ...(startingPoint('tape-run', 'iec') as TapeRun),
  tape: {
    ratedVolts: 24,
    wattsPerMetre: 4.8,
    cutMetres: 0.5,
    railOhmsPerMetre: { positive: 0.1, negative: 0.1 },
    load: { model: 'constant-current', amps: 0.1 },
    longestRunMetres: null,
    lumensPerMetre: null,
  },
  runMetres: 1,
  driverMetres: 0,
  feed: 'start',
  feederSize: '1.5 mm2',
  feederStranding: 'solid',
  conductorCelsius: 20,
  driver: { volts: 24, watts: 60, classTwo: false },
  ...over,
});

const tape = (over: Partial<TapeRun> = {}) => expectedReadings('tape-run', run(over), null, IEC);
const of = (readings: ReturnType<typeof tape>, kind: string) => {
  const found = readings.find((reading) => reading.kind === kind);
  if (!found) throw new Error(`no ${kind}`);
  return found;
};

describe('a tape run', () => {
  it('at 20 C with no feeder: only the supply and the meter widen the band', () => {
    const readings = tape();
    // Half a cut of both rails, 0.05 ohm, carries 0.2 A: 0.01 V. The next 0.1 ohm carries 0.1 A: 0.01 V more.
    expect(of(readings, 'volts-start').nominal).toBeCloseTo(23.99, 9);
    expect(of(readings, 'volts-end').nominal).toBeCloseTo(23.98, 9);
    expect(of(readings, 'volts-start').low).toBeCloseTo((24 * 0.95 - 0.01) * 0.99, 9);
    expect(of(readings, 'volts-start').high).toBeCloseTo((24 * 1.05 - 0.01) * 1.01, 9);
    expect(of(readings, 'driver-amps')).toMatchObject({ unit: 'A', mains: false });
    expect(of(readings, 'driver-amps').low).toBeCloseTo(0.2 * 0.97, 9);
    expect(of(readings, 'driver-amps').high).toBeCloseTo(0.2 * 1.03, 9);
  });

  it('reaches from cold copper to working temperature', () => {
    // IEC 60228 class 1, 1.5 mm2: 12.1 ohm/km at 20 C; at 70 C times 1 + 0.00393 * 50 (IEC 60028).
    const warmer = 1 + 0.00393 * 50;
    const feeder = 2 * 10 * 0.0121 * 0.2;
    const start = of(tape({ driverMetres: 10, conductorCelsius: 70 }), 'volts-start');
    // The rails' 0.01 V are as given, at working temperature; cold they are less.
    expect(start.nominal).toBeCloseTo(24 - feeder * warmer - 0.01, 6);
    expect(start.low).toBeCloseTo((24 * 0.95 - feeder * warmer - 0.01) * 0.99, 6);
    expect(start.high).toBeCloseTo((24 * 1.05 - feeder - 0.01 / warmer) * 1.01, 6);
  });

  it('without a tape or a driver there is nothing to expect', () => {
    expect(tape({ tape: null })).toEqual([]);
  });
});

describe('a branch circuit', () => {
  it('draws constant volt-amperes, each breaker its own, on the mains side', () => {
    const circuit = { ...startingPoint('branch-circuit', 'us'), volts: 120 };
    const result = { circuits: [{ voltAmps: 12 * 37 }, { voltAmps: 240 }] };
    const [first, second] = expectedReadings('branch-circuit', circuit, result, DEFAULT_SETTINGS);
    expect(first).toMatchObject({ kind: 'breaker-amps', mains: true, index: 1 });
    expect(first?.nominal).toBeCloseTo(3.7, 9);
    expect(first?.low).toBeCloseTo((3.7 / 1.05) * 0.97, 9);
    expect(first?.high).toBeCloseTo((3.7 / 0.95) * 1.03, 9);
    expect(second?.nominal).toBeCloseTo(2, 9);
  });

  it('of three phases shares its volt-amperes over the root of three', () => {
    const circuit = { ...startingPoint('branch-circuit', 'iec'), volts: 400, system: 'three-phase' };
    const [only] = expectedReadings('branch-circuit', circuit, { circuits: [{ voltAmps: 692.820323 }] }, IEC);
    expect(only?.nominal).toBeCloseTo(1, 6);
  });
});

describe('an array on the bench', () => {
  it('stays within its supply’s window, its LEDs’ spread and its resistor’s tolerance', () => {
    const array: ResistorArray = {
      ...(startingPoint('resistor-array', 'us') as ResistorArray),
      ...{ supplyVolts: 9, supplyMinVolts: 8.5, supplyMaxVolts: 9.5, count: 1, perString: 1 },
    };
    const figured = figureCircuit('resistor-array', array, DEFAULT_SETTINGS);
    if (!figured.ok) throw new Error(figured.message);
    const [only] = expectedReadings('resistor-array', array, figured.answer.result, DEFAULT_SETTINGS);
    // Next E24 value over 290 ohm is 300 ohm.
    expect(only?.nominal).toBeCloseTo((9 - 3.2) / 300, 12);
    expect(only?.low).toBeCloseTo(((8.5 - 3.4) / (300 * 1.05)) * 0.97, 12);
    expect(only?.high).toBeCloseTo(((9.5 - 3) / (300 * 0.95)) * 1.03, 12);
    const { strings } = figured.answer.result as { strings: { ampsMax: number }[] };
    expect(only?.high).toBeCloseTo((strings[0]?.ampsMax ?? 0) * 1.03, 12);
  });
});

describe('a reading against its band', () => {
  const band = bandOver(23, [22, 24], 'V');

  it('is widened by the meter', () => {
    expect(band.low).toBeCloseTo(21.78, 12);
    expect(band.high).toBeCloseTo(24.24, 12);
  });

  it.each([
    [band.low, 'in'],
    [band.high, 'in'],
    [23, 'in'],
    [band.low - 1.2299, 'near'],
    [band.low - 1.2301, 'out'],
    [band.high + 1.2299, 'near'],
    [band.high + 1.2301, 'out'],
    [0, 'out'],
  ] as const)('%f is %s: near is within half a band more', (value, verdict) => {
    expect(judge(band, value)).toBe(verdict);
  });
});
