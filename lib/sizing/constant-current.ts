/** What a linear regulator and a multi-channel sink have in common: set resistor, headroom, junction, findings. */
import { atLeast, atMost, type Finding, type WorkingStep } from '@/lib/engine/contract';
import { caution, note, softStop } from '@/lib/engine/finding';
import type { SourceLed } from './led-range';
import { E_SERIES_BASIS } from './tables/e-series';

export const DATASHEET = 'datasheet';
export const COMMON_PRACTICE = 'common practice';

/** Forward volts given at a current further off than this share say little about those at the set current. */
const OTHER_CURRENT_SHARE = 0.1;

/** What is left of a supply's volts; equal within the contract's margin leaves nothing, and lacks nothing. */
export function leftOver(volts: number, needed: number): number {
  const left = volts - needed;
  return left < 0 && atLeast(volts, needed) ? 0 : left;
}

/** Lowest supply under which the current falls: what the string, and the electronics over it, need. */
export function noHeadroom(perString: number, headroomVolts: number, minVolts: number): Finding {
  const neededVolts = minVolts - headroomVolts;
  return softStop(
    'no-headroom',
    `${perString} in series need a supply of ${neededVolts} V; it falls to ${minVolts} V, where the current is no longer held.`,
    { perString, neededVolts, minVolts, headroomVolts },
    DATASHEET,
  );
}

/** Whether the LEDs take the current can't be said. */
export const maxAmpsNotGiven = (ampsMax: number): Finding =>
  caution(
    'led-max-amps-not-given',
    `Whether the LED takes ${ampsMax} A is not checked: its highest current is not given.`,
    { ampsMax },
    DATASHEET,
  );

/** @param saferOhms next standard value that keeps the worst current at maxAmps */
export function ledFindings(
  led: SourceLed,
  ampsWanted: number,
  ampsMax: number | null,
  saferOhms: (maxAmps: number) => number,
): Finding[] {
  const findings: Finding[] = [];
  if (led.maxAmps === undefined) findings.push(maxAmpsNotGiven(ampsMax ?? ampsWanted));
  else if (ampsMax !== null && !atMost(ampsMax, led.maxAmps)) {
    const safer = saferOhms(led.maxAmps);
    findings.push(
      softStop(
        'source-over-led-amps',
        `The source can give ${ampsMax} A, above the LED's ${led.maxAmps} A; a set resistor of ${safer} ohm keeps it within.`,
        { ampsMax, maxAmps: led.maxAmps, saferOhms: safer },
        `${DATASHEET}; ${E_SERIES_BASIS}`,
      ),
    );
  }
  if (led.amps !== undefined && !atMost(Math.abs(led.amps - ampsWanted), OTHER_CURRENT_SHARE * ampsWanted))
    findings.push(
      note(
        'forward-volts-at-other-amps',
        `The forward volts are given at ${led.amps} A, the source is set for ${ampsWanted} A.`,
        { ledAmps: led.amps, amps: ampsWanted },
        DATASHEET,
      ),
    );
  return findings;
}

export interface Cooling {
  ambientCelsius: number;
  thermalCelsiusPerWatt: number;
  maxJunctionCelsius: number;
}

/** Tj = Ta + Rth * P. @returns celsius */
export const junctionAt = (
  { ambientCelsius, thermalCelsiusPerWatt }: Omit<Cooling, 'maxJunctionCelsius'>,
  watts: number,
) => ambientCelsius + thermalCelsiusPerWatt * watts;

/** Watts at which the junction reaches its limit, 0 where the air is hotter; null without thermal resistance to speak of. */
export function wattsAllowed(cooling: Cooling): number | null {
  const spare = cooling.maxJunctionCelsius - cooling.ambientCelsius;
  if (spare < 0) return 0;
  const watts = spare / cooling.thermalCelsiusPerWatt;
  return Number.isFinite(watts) ? watts : null;
}

/** A junction that gets too hot, with the thermal resistance that would do; null where no heat sink helps. */
export function junctionFindings(cooling: Cooling, watts: number): Finding[] {
  const junctionCelsius = junctionAt(cooling, watts);
  const { maxJunctionCelsius, ambientCelsius } = cooling;
  if (atMost(junctionCelsius, maxJunctionCelsius)) return [];
  const spare = maxJunctionCelsius - ambientCelsius;
  const neededCelsiusPerWatt = spare > 0 ? spare / watts : null;
  return [
    softStop(
      'junction-too-hot',
      `${watts} W heat the junction to ${junctionCelsius} C, above its ${maxJunctionCelsius} C.`,
      { junctionCelsius, maxJunctionCelsius, watts, neededCelsiusPerWatt },
      DATASHEET,
    ),
  ];
}

export function junctionStep(
  cooling: Omit<Cooling, 'maxJunctionCelsius'>,
  watts: number | null,
): WorkingStep {
  return {
    key: 'junction-celsius',
    name: 'Junction temperature at the worst watts',
    formula: 'Tj = Ta + Rth * P',
    inputs: [
      { name: 'Ta', value: cooling.ambientCelsius, unit: 'C' },
      { name: 'Rth', value: cooling.thermalCelsiusPerWatt, unit: 'K/W' },
      { name: 'P', value: watts, unit: 'W' },
    ],
    value: watts === null ? null : junctionAt(cooling, watts),
    unit: 'C',
    basis: DATASHEET,
  };
}
