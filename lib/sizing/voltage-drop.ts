/** 2. Voltage drop along one cable. */
import * as z from 'zod/mini';
import {
  atLeast,
  defineCalculation,
  type Finding,
  type Outcome,
  type WorkingStep,
} from '@/lib/engine/contract';
import { conductorResistance } from './conductor-resistance';
import { celsius, conductorSize, notNegative, positive, stranding, system } from './inputs';
import type { Stranding } from './tables/conductors';

export type System = 'dc' | 'single-phase' | 'three-phase';

const schema = z.strictObject({
  system,
  volts: positive,
  amps: notNegative,
  metres: notNegative,
  size: conductorSize,
  stranding,
  celsius,
  powerFactor: z.optional(
    z.number().check(z.minimum(0, 'must be at least 0'), z.maximum(1, 'must be at most 1')),
  ),
  reactanceOhmsPerMetre: z.optional(notNegative),
});

export interface VoltageDropInput {
  system: System;
  /** Source volts; line to line for three-phase. */
  volts: number;
  amps: number;
  /** One way. */
  metres: number;
  size: string;
  stranding: Stranding;
  celsius: number;
  powerFactor?: number | undefined;
  reactanceOhmsPerMetre?: number | undefined;
}

export interface VoltageDrop {
  dropVolts: number;
  dropPct: number;
  lossWatts: number;
  loadVolts: number;
}

const LENGTH_FACTOR: Record<System, number> = { dc: 2, 'single-phase': 2, 'three-phase': Math.sqrt(3) };
const CONDUCTORS: Record<System, number> = { dc: 2, 'single-phase': 2, 'three-phase': 3 };
const BASIS =
  'IEC 60364-5-52 Annex G (formula, read in an extract); NEC Ch. 9 Table 9 note 2 has the same form';

/**
 * drop = f * I * L * (R * pf + X * sin), f = 2 for DC and single-phase, sqrt 3 for three-phase (line to line);
 * loss = 2 or 3 conductors * I^2 * R * L.
 * @returns dropVolts V, dropPct % of the source volts, lossWatts W, loadVolts V
 * @throws {EngineError} `invalid-input` where the conductor is not listed.
 * Source: IEC 60364-5-52 Annex G.
 */
export function voltageDrop(input: VoltageDropInput): VoltageDrop {
  const { ohmsPerMetre } = conductorResistance(input.size, input.stranding, input.celsius);
  const powerFactor = input.system === 'dc' ? 1 : (input.powerFactor ?? 1);
  const reactance = input.system === 'dc' ? 0 : (input.reactanceOhmsPerMetre ?? 0);
  const sine = Math.sqrt(Math.max(0, 1 - powerFactor * powerFactor));
  const impedance = ohmsPerMetre * powerFactor + reactance * sine;
  const dropVolts = LENGTH_FACTOR[input.system] * input.amps * input.metres * impedance;
  return {
    dropVolts,
    dropPct: (dropVolts / input.volts) * 100,
    lossWatts: CONDUCTORS[input.system] * input.amps * input.amps * ohmsPerMetre * input.metres,
    loadVolts: input.volts - dropVolts,
  };
}

function findingsOf(input: VoltageDropInput, result: VoltageDrop): Finding[] {
  if (!atLeast(result.dropVolts, input.volts)) return [];
  return [
    {
      code: 'drop-exceeds-supply',
      severity: 'stop',
      hard: false,
      message: 'The drop is as large as the supply: this current can not flow through this cable.',
      values: { dropVolts: result.dropVolts, volts: input.volts },
      basis: BASIS,
    },
  ];
}

function working(input: VoltageDropInput, result: VoltageDrop): WorkingStep[] {
  const { ohmsPerMetre } = conductorResistance(input.size, input.stranding, input.celsius);
  const conductors = CONDUCTORS[input.system];
  const current = { name: 'I', value: input.amps, unit: 'A' };
  const length = { name: 'L', value: input.metres, unit: 'm' };
  const resistance = { name: 'R', value: ohmsPerMetre, unit: 'ohm/m' };
  return [
    {
      key: 'voltage-drop',
      name: 'Voltage drop',
      formula: 'dU = f * I * L * (R * pf + X * sin)',
      inputs: [
        { name: 'f', value: LENGTH_FACTOR[input.system], unit: '' },
        current,
        length,
        resistance,
        { name: 'pf', value: input.system === 'dc' ? 1 : (input.powerFactor ?? 1), unit: '' },
        { name: 'X', value: input.system === 'dc' ? 0 : (input.reactanceOhmsPerMetre ?? 0), unit: 'ohm/m' },
      ],
      value: result.dropVolts,
      unit: 'V',
      basis: BASIS,
    },
    {
      key: 'voltage-drop-percent',
      name: 'Voltage drop of the supply',
      formula: 'dU / U * 100',
      inputs: [
        { name: 'dU', value: result.dropVolts, unit: 'V' },
        { name: 'U', value: input.volts, unit: 'V' },
      ],
      value: result.dropPct,
      unit: '%',
      basis: BASIS,
    },
    {
      key: 'cable-loss',
      name: 'Heat lost in the cable',
      formula: 'P = n * I^2 * R * L',
      inputs: [{ name: 'n', value: conductors, unit: '' }, current, resistance, length],
      value: result.lossWatts,
      unit: 'W',
      basis: BASIS,
    },
  ];
}

export const voltageDropCalculation = defineCalculation({
  name: 'voltage-drop',
  summary: 'Voltage drop and loss along a DC, single-phase or three-phase cable',
  bench: false,
  schema,
  calculate: (input): Outcome<VoltageDrop> => {
    const result = voltageDrop(input);
    return { result, findings: findingsOf(input, result), working: working(input, result) };
  },
});
