/**
 * Voltage drop against published tables and worked examples; data/02-voltage-drop.json names the source of each.
 * Lists that are lumped or of another temperature are told apart in the notes there.
 */
import { describe, expect, it } from 'vitest';
import { conductorResistance } from '@/lib/sizing/conductor-resistance';
import { conductorSize } from '@/lib/sizing/conductor-size';
import { voltageDrop } from '@/lib/sizing/voltage-drop';
import entries from './data/02-voltage-drop.json';

interface Entry {
  id: string;
  inputs: Record<string, number>;
  expected: Record<string, number | boolean>;
  tolerance: number;
}
const all = entries as unknown as Entry[];
const starting = (prefix: string) => all.filter(({ id }) => id.startsWith(prefix));
const one = (id: string) => {
  const found = all.find((entry) => entry.id === id);
  if (!found) throw new Error(id);
  return found;
};
const FOOT = 0.3048;
const within = (got: number, wanted: number, tolerance: number) =>
  expect(Math.abs(got - wanted)).toBeLessThanOrEqual(tolerance * Math.abs(wanted));
const single = (volts: number, amps: number, metres: number, size: string, celsius: number) =>
  voltageDrop({ system: 'single-phase', volts, amps, metres, size, stranding: 'stranded', celsius });

describe('BS 7671 Appendix 4, mV per ampere and metre of two cores', () => {
  it.each(starting('bs7671-mvam'))('$id', ({ inputs, expected }) => {
    const size = `${inputs['area_mm2'] ?? 0} mm2`;
    // Printed with two figures, the last rounded either way; and the table's reactance is nothing at these sizes.
    const at = (celsius: number) => single(230, 1, 1, size, celsius).dropVolts * 1000;
    within(at(70), expected['PVC70_mV_A_m'] as number, 0.035);
    within(at(90), expected['XLPE90_mV_A_m'] as number, 0.035);
  });

  it.each(starting('bs7671-ex'))('$id', ({ inputs, expected }) => {
    const { length_m: metres, area_mm2: area, I_A: amps, V: volts } = inputs as Record<string, number>;
    const { dropVolts, dropPct } = single(volts ?? 0, amps ?? 0, metres ?? 0, `${area ?? 0} mm2`, 70);
    within(dropVolts, expected['drop_V'] as number, 0.035);
    expect(dropPct <= 5).toBe(expected['within_5_percent']);
  });
});

describe('IEC 60364-5-52 Annex G', () => {
  // 0.0225 ohm mm2/m stands for a conductor at its working temperature: 1.25 of what it has at 20 C.
  it.each(starting('iec-g52-ex'))('$id, within the rounding of 0.0225', ({ inputs, expected }) => {
    const { I_A: amps, L_m: metres, area_mm2: area, V: volts } = inputs as Record<string, number>;
    const { dropVolts, dropPct } = single(volts ?? 0, amps ?? 0, metres ?? 0, `${area ?? 0} mm2`, 70);
    within(dropVolts, expected['drop_V'] as number, 0.04);
    within(dropPct, expected['drop_percent'] as number, 0.04);
  });
});

describe('US worked figures', () => {
  it('vd-120V-12awg-K: 12.9 ohm circular mil per foot is Table 8 at 75 C', () => {
    const { inputs, expected } = one('vd-120V-12awg-K');
    const drop = single(120, inputs['I_A'] ?? 0, (inputs['L_ft'] ?? 0) * FOOT, 'AWG 12', 75);
    within(drop.dropVolts, expected['drop_V'] as number, 0.005);
    within(drop.dropPct, expected['drop_percent'] as number, 0.005);
  });

  it.each(starting('vd-24V-'))(
    '$id: longest feeder of the printed list',
    ({ inputs, expected, tolerance }) => {
      const size = `AWG ${inputs['awg'] ?? 0}`;
      // The lists are for solid wire at 20 C and cut to whole feet.
      const { ohmsPerMetre } = conductorResistance(size, 'solid', 20);
      const feet = (inputs['drop_V'] ?? 0) / (2 * (inputs['I_A'] ?? 1) * ohmsPerMetre * FOOT);
      expect(Math.abs(feet - (expected['max_one_way_ft'] as number))).toBeLessThanOrEqual(
        tolerance * feet + 1,
      );
      const metres = (expected['max_one_way_ft'] as number) * FOOT;
      const { dropVolts } = voltageDrop({
        system: 'dc',
        volts: 24,
        amps: inputs['I_A'] ?? 0,
        metres,
        size,
        stranding: 'solid',
        celsius: 20,
      });
      within(dropVolts, inputs['drop_V'] ?? 0, tolerance + 1 / (expected['max_one_way_ft'] as number));
    },
  );
});

describe('extra-low voltage', () => {
  it('vd-20A-2.5mm2: the standard’s highest resistance is 7 % over that of pure copper', () => {
    const { expected } = one('vd-20A-2.5mm2');
    const at = (celsius: number) =>
      voltageDrop({
        system: 'dc',
        volts: 12,
        amps: 20,
        metres: 5,
        size: '2.5 mm2',
        stranding: 'stranded',
        celsius,
      }).dropVolts;
    within(at(20) / (7.41 / (17.241 / 2.5)), expected['drop_V'] as number, 0.001);
    within(at(30) / at(20), (expected['at_30C_V'] as number) / (expected['drop_V'] as number), 0.001);
  });

  it('vd-led-size-24V: the area asked for lies under the least size there is for its current', () => {
    const { inputs, expected } = one('vd-led-size-24V');
    const amps = expected['I_A'] as number;
    const at = (size: string) =>
      voltageDrop({
        system: 'dc',
        volts: 24,
        amps,
        metres: inputs['cable_m'] ?? 0,
        size,
        stranding: 'stranded',
        celsius: 20,
      }).dropPct;
    expect(at('0.5 mm2')).toBeLessThanOrEqual(5);
    within((0.5 * at('0.5 mm2')) / 5, expected['area_mm2'] as number, 0.02);
  });

  it('vd-12V-CM-3pc: 3 % of 12 V at 10 A over 21 ft out and back, AWG 12 by area', () => {
    const { result } = conductorSize({
      basis: 'us',
      system: 'dc',
      volts: 12,
      amps: 10,
      metres: (21 / 2) * FOOT,
      maxDropPct: 3,
      continuous: false,
      ambientCelsius: 25,
      loadedConductors: 2,
      terminalCelsius: 60,
      // The source's 10.75 ohm circular mil per foot is copper at some 30 C.
      celsius: 30,
      stranding: 'solid',
    });
    expect(result.size).toBe('AWG 12');
  });
});
