/**
 * Dimming buses against published limits, tables and worked examples (data/dimming-bus.json names the source of each),
 * and the drop of a chain of drivers against ngspice run on the spot.
 */
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { dimmingBusCalculation } from '@/lib/sizing/dimming-bus';
import type { DimmingBusInput } from '@/lib/sizing/dimming-bus-input';
import { operatingPoint } from '../support/ngspice';
import { seeded, testSeed } from '../support/random';
import entries from './data/dimming-bus.json';

type Figures = Record<string, number | number[]>;
interface Entry {
  id: string;
  inputs: Record<string, number>;
  expected: Figures;
  tolerance: number;
}
const all = entries as unknown as Entry[];
const entry = (id: string): Entry => {
  const found = all.find((one) => one.id === id);
  if (!found) throw new Error(`no entry ${id}`);
  return found;
};
const FOOT = 0.3048;
const expectNear = (got: number | null | undefined, want: unknown, relative: number) =>
  expect(Math.abs((got ?? NaN) - (want as number)), `${got} against ${want as number}`).toBeLessThanOrEqual(
    relative * Math.abs(want as number) + 1e-12,
  );

const pair = (change: Partial<DimmingBusInput>) =>
  runCalculation(dimmingBusCalculation, {
    bus: '0-10v',
    basis: 'us',
    devices: [{ name: 'driver', count: 1 }],
    control: { ratedAmps: 1 },
    legs: [{ metres: 10 }],
    stranding: 'solid',
    celsius: 20,
    ...change,
  });
const dali = (change: Partial<DimmingBusInput>) =>
  pair({ bus: 'dali', basis: 'iec', control: { ratedAmps: 0.25 }, ...change });
const has = ({ findings }: ReturnType<typeof pair>, code: string) =>
  findings.some((finding) => finding.code === code);

describe('0-10 V, published', () => {
  it('010v-2mA: what a driver counts with where its sheet is not given', () =>
    expectNear(pair({}).result.amps, (entry('010v-2mA').expected.max_mA_per_driver as number) / 1000, 0));

  it('010v-count: drivers on one control', () => {
    const { inputs, expected } = entry('010v-count');
    const { result } = pair({ control: { ratedAmps: (inputs.control_sink_mA ?? NaN) / 1000 } });
    expect(result.devices[0]?.mostAlone).toBe(expected.max_drivers);
  });

  it('010v-1mA and 010v-field: what is found in the field, over the standard told', () => {
    const of = (milliamps: number) =>
      has(
        pair({ devices: [{ name: 'driver', count: 1, amps: milliamps / 1000 }] }),
        'bus-unit-over-standard',
      );
    const [least = NaN, most = NaN] = entry('010v-field').expected.range_mA as number[];
    expect([of(least), of(entry('010v-1mA').expected.typ_mA as number), of(most)]).toEqual([
      false,
      false,
      true,
    ]);
  });

  it('010v-len: length for 0.1 V of drop', () => {
    const { inputs, expected, tolerance } = entry('010v-len');
    const devices = [{ name: 'all', count: 1, amps: (inputs.I_mA ?? NaN) / 1000 }];
    const exact = pair({ devices, ohmsPerMetre: (inputs.ohm_per_kft ?? NaN) / 1000 / FOOT }).result;
    expectNear(exact.dropLimitVolts, inputs.drop_V, 1e-12);
    expectNear((exact.metresByDrop ?? NaN) / FOOT, expected.one_way_ft, tolerance);
    // And by the section's own table.
    const sized = pair({ devices, size: `AWG ${inputs.awg}` }).result;
    expectNear((sized.metresByDrop ?? NaN) / FOOT, expected.one_way_ft, 0.005);
  });

  it('010v-levels: the error counts against the full level', () => {
    const { result } = pair({ size: 'AWG 18' });
    expectNear(
      result.errorPct,
      (100 * (result.dropVolts ?? NaN)) / (entry('010v-levels').expected.full_at_V as number),
      1e-12,
    );
  });

  it.each(['010v-drop-18-10', '010v-drop-18-25', '010v-drop-20-50'])('%s', (id) => {
    const { inputs, expected, tolerance } = entry(id);
    const change = {
      devices: [{ name: 'driver', count: inputs.n ?? NaN }],
      legs: [{ metres: (inputs.L_ft ?? NaN) * FOOT }],
    };
    const exact = pair({ ...change, ohmsPerMetre: (inputs.R20_ohm_per_kft ?? NaN) / 1000 / FOOT });
    expectNear(exact.result.dropVolts, expected.drop_V, tolerance);
    expectNear(pair({ ...change, size: `AWG ${inputs.awg}` }).result.dropVolts, expected.drop_V, 0.005);
  });
});

describe('DALI, published', () => {
  const limits = entry('dali-limits').expected as Record<string, number> & { bus_V: number[] };

  it('dali-limits: addresses, current, drop, groups, scenes', () => {
    const { result } = dali({});
    expect(result.addresses?.most).toBe(limits.addresses);
    expectNear(result.amps, (limits.device_mA ?? NaN) / 1000, 0);
    expectNear(result.dropLimitVolts, limits.drop_V, 0);
    const most = (limits.bus_mA ?? NaN) / 1000;
    expect(has(dali({ control: { ratedAmps: most } }), 'dali-supply-over-limit')).toBe(false);
    expect(has(dali({ control: { ratedAmps: most + 0.001 } }), 'dali-supply-over-limit')).toBe(true);
    const { groups = NaN, scenes = NaN } = limits;
    expect(has(dali({ groups, scenes }), 'dali-over-groups')).toBe(false);
    expect(has(dali({ groups: groups + 1 }), 'dali-over-groups')).toBe(true);
    expect(has(dali({ scenes: scenes + 1 }), 'dali-over-groups')).toBe(true);
  });

  it('dali-levels: the least sent less the drop allowed is the least received', () => {
    const levels = entry('dali-levels').expected as Record<string, number[]>;
    const [sent = NaN] = levels.high_tx ?? [];
    const [received = NaN] = levels.high_rx ?? [];
    const atLimit = (volts: number) =>
      dali({ control: { ratedAmps: 0.25, volts }, ohmsPerMetre: 0.04, legs: [{ metres: 100 }] });
    expectNear(atLimit(sent).result.farVolts, received, 1e-12);
    expect(has(atLimit(sent), 'dali-low-volts')).toBe(false);
    expect(has(atLimit(sent - 0.01), 'dali-low-volts')).toBe(true);
    expectNear(limits.bus_V[0], received, 0);
  });

  it('dali-300m: between any two, the total may be more', () => {
    const most = entry('dali-300m').expected.max_m_between_any_two as number;
    const change = { size: '1.5 mm2' } as const;
    expect(dali({ ...change, legs: [{ metres: most }] }).result.ok).toBe(true);
    expect(dali({ ...change, legs: [{ metres: most + 1 }] }).result.ok).toBe(false);
    const star = dali({ ...change, legs: [150, 150, 150].map((metres) => ({ metres })) });
    expect(star.result).toMatchObject({ ok: true, metres: { betweenAny: 300, total: 450 } });
  });

  it('dali-drop: 300 m of 1.5 mm2, and what is left', () => {
    const { inputs, expected, tolerance } = entry('dali-drop');
    const { L_m = NaN, area_mm2 = NaN, conductivity = NaN } = inputs;
    const { result } = dali({ legs: [{ metres: L_m }], ohmsPerMetre: 1 / (conductivity * area_mm2) });
    expectNear(result.dropVolts, expected.drop_V, tolerance);
    expectNear((result.dropLimitVolts ?? NaN) - (result.dropVolts ?? NaN), expected.left_V, 0.005);
    // The section's own table is a little worse than the handbook's round conductivity, never better.
    const sized = dali({ legs: [{ metres: L_m }], size: `${area_mm2} mm2` }).result.dropVolts ?? NaN;
    expect(sized).toBeGreaterThanOrEqual(expected.drop_V as number);
    expectNear(sized, expected.drop_V, 0.02);
  });

  it.each(all.filter(({ id }) => id.startsWith('dali-len-')).map(({ id }) => id))('%s', (id) => {
    const { inputs, expected, tolerance } = entry(id);
    const { area_mm2 = NaN, conductivity = NaN } = inputs;
    const { result } = dali({ ohmsPerMetre: 1 / (conductivity * area_mm2) });
    expectNear(result.metresByDrop, expected.L_m, tolerance);
    expect(result.metresAllowed).toBe(Math.min(300, result.metresByDrop ?? NaN));
    // A stranded or solid conductor by IEC 60228 is at most a few per cent thinner than its name.
    expectNear(dali({ size: `${area_mm2} mm2` }).result.metresByDrop, expected.L_m, 0.05);
  });

  it('dali-table: a master’s table by length, no smaller than what the drop asks for', () => {
    const table = entry('dali-table').expected as Record<string, number>;
    const section = (metres: number) => dali({ legs: [{ metres }] }).result.section;
    expect(section(99)).toBe(`${table['<100m']} mm2`);
    expect(section(101)).toBe('0.5 mm2');
    expect(section(150)).toBe(`${table['100-150m']} mm2`);
    expect(section(300)).toBe(`${table['>150m']} mm2`);
  });

  it('dali-budget: sensors beside 64 gear on a supply of 160 mA', () => {
    const { inputs, expected } = entry('dali-budget');
    const sensor = (count: number) =>
      dali({
        devices: [
          { name: 'gear', count: inputs.gears ?? NaN, amps: (inputs.gear_mA ?? NaN) / 1000 },
          { name: 'sensor', count, amps: (inputs.sensor_mA ?? NaN) / 1000, kind: 'input' },
        ],
        control: { ratedAmps: (inputs.supply_mA ?? NaN) / 1000 },
      }).result;
    const most = expected.max_sensors as number;
    expect(sensor(1).devices[1]?.moreFit).toBe(most - 1);
    expect(sensor(most)).toMatchObject({ ok: true, segments: 1 });
    expect(sensor(most + 1)).toMatchObject({ ok: false, segments: 2, governedBy: 'current' });
  });

  it('dali-hot: 1.5 mm2 at 75 C', () => {
    const { inputs, expected, tolerance } = entry('dali-hot');
    const celsius = inputs.T_C ?? NaN;
    // Annealed copper, as the entry's own note counts it.
    const annealed = (0.017241 * (1 + 0.00393 * (celsius - 20))) / (inputs.area_mm2 ?? NaN);
    expectNear(dali({ ohmsPerMetre: annealed }).result.metresByDrop, expected.L_m, tolerance);
    const sized = dali({ size: `${inputs.area_mm2} mm2`, celsius }).result.metresByDrop;
    expectNear(sized, expected.L_m, 0.04);
    expect(sized).toBeLessThan(expected.L_m as number);
  });
});

describe('a chain of drivers against ngspice', () => {
  const seed = testSeed();
  const random = seeded(seed);
  it.each(Array.from({ length: 10 }, (_, k) => k))(`chain %i, TEST_SEED=${seed}`, () => {
    const count = random.whole(1, 30);
    const amps = random.decades(1e-4, 4e-3);
    const metres = random.between(5, 80);
    const ohmsPerMetre = random.decades(0.005, 0.06);
    const level = random.between(1, 9);
    const piece = (ohmsPerMetre * metres) / count;
    // The control holds its level at the start of the pair; every driver sources its current from minus to plus.
    const spice = operatingPoint([
      `V1 p0 n0 ${level}`,
      'Rg n0 0 0.001',
      ...Array.from({ length: count }, (_, k) => [
        `Rp${k} p${k} p${k + 1} ${piece}`,
        `Rn${k} n${k} n${k + 1} ${piece}`,
        `I${k} n${k + 1} p${k + 1} DC ${amps}`,
      ]).flat(),
    ]);
    const seen = (spice.get(`p${count}`) ?? NaN) - (spice.get(`n${count}`) ?? NaN);
    const { result } = pair({
      devices: [{ name: 'driver', count, amps }],
      legs: [{ metres }],
      ohmsPerMetre,
      placed: 'along',
      maxErrorPct: 100,
    });
    expectNear(result.dropVolts, seen - level, 1e-6);
    expectNear(result.amps, spice.get('v1#branch'), 1e-9);
  });
});
