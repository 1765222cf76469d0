/** What stops a dimming bus as drawn, and what to know before it is pulled. */
import { atLeast, atMost, type Finding } from '@/lib/engine/contract';
import { caution, note, softStop } from '@/lib/engine/finding';
import { dimmerFindings } from './dimming-bus-dimmer';
import { type DimmingBusInput, unreadKeys } from './dimming-bus-input';
import type { Found, Wired } from './dimming-bus-result';
import { wiringFindings } from './dimming-bus-wiring';
import {
  ANALOGUE,
  ANALOGUE_BASIS,
  ANALOGUE_LONG_METRES,
  DALI,
  DALI_BASIS,
  DALI_CABLE_BASIS,
} from './tables/dimming';

const DATASHEET = 'datasheet';
const PRACTICE = 'common practice';

function unitCurrents({ c }: Wired): Finding[] {
  const limitAmps = c.dali ? DALI.deviceAmps : ANALOGUE.driverAmps;
  const basis = c.dali ? DALI_BASIS : ANALOGUE_BASIS;
  const bare = c.input.devices.filter(({ amps }) => amps === undefined).map(({ name }) => name);
  const over = c.input.devices.filter(({ amps }) => amps !== undefined && !atMost(amps, limitAmps));
  return [
    ...(bare.length === 0
      ? []
      : [
          note(
            'bus-current-assumed',
            `${bare.join(', ')}: taken at the ${limitAmps} A that the standard allows.`,
            { names: bare.join(', '), limitAmps },
            basis,
          ),
        ]),
    ...over.map(({ name, amps = 0 }) =>
      note(
        'bus-unit-over-standard',
        `${name} takes ${amps} A, more than the ${limitAmps} A of one unit by the standard.`,
        { name, amps, limitAmps },
        basis,
      ),
    ),
  ];
}

function current({ c, packed, limits, lengths }: Wired): Finding[] {
  const { ratedAmps, minAmps } = c.control;
  const rated = c.dali ? Math.min(ratedAmps, DALI.supplyAmps) : ratedAmps;
  const findings: Finding[] = [];
  if (packed.segments === null)
    findings.push(
      softStop(
        'bus-unit-too-much',
        `One unit alone is more than a bus holds: ${limits[0]} A over ${lengths.farthest} m.`,
        { amps: Math.max(...c.unitAmps), limitAmps: limits[0] },
        DATASHEET,
      ),
    );
  if (!atMost(c.amps, rated))
    findings.push(
      softStop(
        'bus-over-current',
        `All devices together take ${c.amps} A; the control or supply holds ${rated} A.`,
        { amps: c.amps, ratedAmps: rated, segments: packed.segments },
        DATASHEET,
      ),
    );
  if (!c.dali && minAmps !== undefined && !atLeast(c.amps, minAmps))
    findings.push(
      softStop(
        'control-under-min-current',
        `The drivers give ${c.amps} A; the control needs ${minAmps} A to work down to its lowest level.`,
        { amps: c.amps, minAmps },
        DATASHEET,
      ),
    );
  return findings;
}

function direction({ c }: Wired): Finding[] {
  if (c.dali) return [];
  const own = c.control.current ?? 'sink';
  const same = c.input.devices.filter((device) => (device.current ?? 'source') === own);
  if (same.length === 0) return [];
  const names = same.map(({ name }) => name).join(', ');
  return [
    softStop(
      'control-current-direction',
      `The control and ${names} both ${own} the control current: one has to source it, the other to sink it.`,
      { names, direction: own },
      ANALOGUE_BASIS,
    ),
  ];
}

function drop({ wired, result }: Found): Finding[] {
  if (wired === null || result.dropVolts === null) return [];
  const { c } = wired;
  if (atMost(result.dropVolts, c.dropLimitVolts)) return [];
  return [
    softStop(
      'bus-drop-over-limit',
      `The pair loses ${result.dropVolts} V at its end; ${c.dropLimitVolts} V are allowed.`,
      {
        dropVolts: result.dropVolts,
        limitVolts: c.dropLimitVolts,
        metresByDrop: result.metresByDrop,
      },
      c.dali ? DALI_CABLE_BASIS : PRACTICE,
    ),
  ];
}

function dali({ wired, result }: Found): Finding[] {
  if (wired === null || !wired.c.dali) return [];
  const { c, used, lengths } = wired;
  const { control, input } = c;
  const findings: Finding[] = [];
  const [, gear = 0, inputs = 0] = used;
  if (!atMost(gear, DALI.addresses))
    findings.push(
      softStop(
        'dali-over-addresses',
        `The gear needs ${gear} addresses; a bus has ${DALI.addresses}.`,
        { addresses: gear, most: DALI.addresses },
        DALI_BASIS,
      ),
    );
  if (!atMost(inputs, DALI.addresses))
    findings.push(
      softStop(
        'dali-over-input-addresses',
        `The input devices need ${inputs} addresses; a bus has ${DALI.addresses} for them.`,
        { addresses: inputs, most: DALI.addresses },
        DALI_BASIS,
      ),
    );
  if (!atMost(lengths.betweenAny, DALI.metres))
    findings.push(
      softStop(
        'dali-too-long',
        `${lengths.betweenAny} m lie between the two farthest devices; ${DALI.metres} m are allowed.`,
        { metres: lengths.betweenAny, limitMetres: DALI.metres },
        DALI_CABLE_BASIS,
      ),
    );
  const most = Math.max(control.ratedAmps, control.maxAmps ?? 0);
  if (!atMost(most, DALI.supplyAmps))
    findings.push(
      softStop(
        'dali-supply-over-limit',
        `The supplies can give ${most} A; ${DALI.supplyAmps} A is the most on one bus.`,
        { amps: most, limitAmps: DALI.supplyAmps },
        DALI_BASIS,
      ),
    );
  if (result.farVolts !== null && !atLeast(result.farVolts, DALI.leastReceivedVolts))
    findings.push(
      softStop(
        'dali-low-volts',
        `${result.farVolts} V are left at the far end; a device needs ${DALI.leastReceivedVolts} V.`,
        { farVolts: result.farVolts, leastVolts: DALI.leastReceivedVolts },
        DALI_BASIS,
      ),
    );
  return [...findings, ...groupsAndScenes(input)];
}

function groupsAndScenes({ groups = 0, scenes = 0 }: DimmingBusInput): Finding[] {
  if (atMost(groups, DALI.groups) && atMost(scenes, DALI.scenes)) return [];
  return [
    softStop(
      'dali-over-groups',
      `${groups} groups and ${scenes} scenes are wanted; a bus has ${DALI.groups} and ${DALI.scenes}.`,
      { groups, scenes, mostGroups: DALI.groups, mostScenes: DALI.scenes },
      DALI_BASIS,
    ),
  ];
}

function analogue({ c, lengths }: Wired): Finding[] {
  if (c.dali) return [];
  const findings: Finding[] = [];
  if (!atMost(lengths.farthest, ANALOGUE_LONG_METRES))
    findings.push(
      caution(
        'control-run-long',
        `No standard limits ${lengths.farthest} m, but over ${ANALOGUE_LONG_METRES} m interference shows as flicker.`,
        { metres: lengths.farthest, limitMetres: ANALOGUE_LONG_METRES },
        PRACTICE,
      ),
    );
  if (c.input.bus === '1-10v')
    findings.push(
      note(
        'no-off-at-minimum',
        'Drivers for 1-10 V stay lit at the lowest level: a switch in the mains turns them off.',
        {},
        PRACTICE,
      ),
    );
  return findings;
}

function unread(input: DimmingBusInput): Finding[] {
  const keys = unreadKeys(input);
  if (keys.length === 0) return [];
  const named = keys.join(', ');
  return [note('inputs-not-used', `Not used for this bus: ${named}.`, { keys: named }, PRACTICE)];
}

export function findingsOf(found: Found): Finding[] {
  const { input, wired } = found;
  if (wired === null) return [...dimmerFindings(found.dimmed, input), ...unread(input)];
  return [
    ...current(wired),
    ...direction(wired),
    ...drop(found),
    ...dali(found),
    ...analogue(wired),
    ...wiringFindings(input),
    ...unitCurrents(wired),
    ...unread(input),
  ];
}
