/** How a dimming bus was figured. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import { countingMetres, dropAmps } from './dimming-bus-cable';
import type { Dimmed, Found, Wired } from './dimming-bus-result';
import { ANALOGUE, ANALOGUE_BASIS, DALI, DALI_BASIS, DALI_CABLE_BASIS } from './tables/dimming';

const OHMS_LAW = "Ohm's law";
const DATASHEET = 'datasheet';
const given = (name: string, value: WorkingInput['value'], unit: string): WorkingInput => ({
  name,
  value,
  unit,
});

function wiredSteps({ result }: Found, wired: Wired): WorkingStep[] {
  const { c, section, lengths, limits } = wired;
  const metres = c.dali ? lengths.betweenAny : countingMetres(c);
  const amps = given('I', dropAmps(c), 'A');
  const ohms = given("R'", section.ohmsPerMetre, 'ohm/m');
  const limit = given('Vlimit', c.dropLimitVolts, 'V');
  return [
    {
      key: 'bus-amps',
      name: 'Current of all devices on the pair',
      formula: 'sum of count * I',
      inputs: c.input.devices.flatMap(({ name, count }, i) => [
        given(name, count, ''),
        given(`I of ${name}`, c.unitAmps[i] ?? 0, 'A'),
      ]),
      value: c.amps,
      unit: 'A',
      basis: c.dali ? DALI_BASIS : ANALOGUE_BASIS,
    },
    {
      key: 'bus-drop',
      name: 'Volts lost over both conductors',
      formula: "2 * I * R' * L",
      inputs: [amps, ohms, given('L', metres, 'm')],
      value: result.dropVolts,
      unit: 'V',
      basis: c.dali ? DALI_CABLE_BASIS : OHMS_LAW,
    },
    ...(result.errorPct === null
      ? []
      : [
          {
            key: 'bus-error',
            name: 'Error of the level at the far end',
            formula: '100 * drop / Vfull',
            inputs: [given('drop', result.dropVolts, 'V'), given('Vfull', ANALOGUE.fullVolts, 'V')],
            value: result.errorPct,
            unit: '%',
            basis: ANALOGUE_BASIS,
          },
        ]),
    {
      key: 'bus-metres-by-drop',
      name: 'Longest pair that keeps the drop',
      formula: "L = Vlimit / (2 * I * R')",
      inputs: [limit, amps, ohms],
      value: result.metresByDrop,
      unit: 'm',
      basis: OHMS_LAW,
    },
    {
      key: 'bus-units-alone',
      name: 'Most of the first device alone on one bus',
      formula: 'smallest of floor(limit / what one unit takes)',
      inputs: [
        given('A on one bus', limits[0], 'A'),
        given('I of one unit', c.unitAmps[0] ?? 0, 'A'),
        ...(c.dali ? [given('addresses', DALI.addresses, '')] : []),
      ],
      value: result.devices[0]?.mostAlone ?? null,
      unit: '',
      basis: c.dali ? DALI_BASIS : DATASHEET,
    },
    {
      key: 'bus-segments',
      name: 'Buses that it takes',
      formula: 'most of what current, addresses, drop and length ask for',
      inputs: [
        given('A on one bus', limits[0], 'A'),
        given('I', c.amps, 'A'),
        given('L allowed', result.metresAllowed, 'm'),
      ],
      value: result.segments,
      unit: '',
      basis: c.dali ? DALI_BASIS : DATASHEET,
    },
  ];
}

function dimmerSteps({ input, result }: Found, { watts, mostWatts }: Dimmed): WorkingStep[] {
  return [
    {
      key: 'dimmer-watts',
      name: 'Watts behind the dimmer',
      formula: 'sum of count * P',
      inputs: input.devices.flatMap(({ name, count, watts: own = 0 }) => [
        given(name, count, ''),
        given(`P of ${name}`, own, 'W'),
      ]),
      value: watts,
      unit: 'W',
      basis: DATASHEET,
    },
    {
      key: 'dimmer-most-watts',
      name: 'Watts of LEDs that the dimmer carries',
      formula: 'its rating for LEDs, or its rating times the share that the maker leaves for LEDs',
      inputs: [
        given('LED rating', input.dimmer?.ledMaxWatts ?? null, 'W'),
        given('rating', input.dimmer?.maxWatts ?? null, 'W'),
        given('share', input.dimmer?.ledFraction ?? null, ''),
      ],
      value: mostWatts,
      unit: 'W',
      basis: DATASHEET,
    },
    {
      key: 'bus-segments',
      name: 'Dimmers that it takes',
      formula: 'fewest that carry all units',
      inputs: [given('P', watts, 'W'), given('P on one dimmer', mostWatts, 'W')],
      value: result.segments,
      unit: '',
      basis: DATASHEET,
    },
  ];
}

export function workingOf(found: Found): WorkingStep[] {
  return found.wired === null ? dimmerSteps(found, found.dimmed) : wiredSteps(found, found.wired);
}
