/** 11. A dimming bus: devices, current, addresses and length; the section, and how many buses it takes. */
import { atMost, defineCalculation, type Outcome, refuse } from '@/lib/engine/contract';
import {
  countingMetres,
  dropAmps,
  lengthsOf,
  metresByDrop,
  pairDrop,
  type Section,
  sectionsOf,
  segmentsByLength,
  smallestSection,
} from './dimming-bus-cable';
import { findingsOf } from './dimming-bus-findings';
import { type DimmingBusInput, schema, type WiredCase, wiredCase } from './dimming-bus-input';
import { pack, type Units, unitsThatFit } from './dimming-bus-packing';
import type { DimmingBus, Found, Wired } from './dimming-bus-result';
import { workingOf } from './dimming-bus-working';
import { ANALOGUE, DALI } from './tables/dimming';

const finite = (value: number): number | null => (value < Infinity ? value : null);

function unitsOf({ input, unitAmps, dali }: WiredCase): Units[] {
  return input.devices.map(({ count, kind, addresses = 1 }, i) => {
    const gear = dali && kind !== 'input' ? addresses : 0;
    const inputs = dali && kind === 'input' ? addresses : 0;
    return { count, uses: [unitAmps[i] ?? 0, gear, inputs] };
  });
}

const sumOf = (units: readonly Units[], i: number) =>
  units.reduce((sum, { count, uses }) => sum + count * (uses[i] ?? 0), 0);

const devicesOf = (
  input: DimmingBusInput,
  amps: readonly (number | null)[],
  units: readonly Units[],
  limits: readonly number[],
): DimmingBus['devices'] => {
  const used = limits.map((_, i) => sumOf(units, i));
  return input.devices.map(({ name, count }, i) => {
    const uses = units[i]?.uses ?? [];
    return {
      name,
      count,
      amps: amps[i] ?? null,
      mostAlone: finite(unitsThatFit(uses, limits)),
      moreFit: finite(unitsThatFit(uses, limits, used)),
    };
  });
};

/** What one bus holds, the section that keeps the drop on it, and how many buses that makes. */
function planWired(c: WiredCase): Wired {
  const lengths = lengthsOf(c);
  const addresses = c.dali ? DALI.addresses : Infinity;
  const rated = c.dali ? Math.min(c.control.ratedAmps, DALI.supplyAmps) : c.control.ratedAmps;
  const units = unitsOf(c);
  const used = [0, 1, 2].map((i) => sumOf(units, i));
  const limits = [rated, addresses, addresses] as const;
  const packed = pack(units, limits);
  const sections = sectionsOf(c);
  if (c.dali) {
    // What is longer than a bus may be is cut; the section is for a bus that may be.
    const metres = Math.min(lengths.betweenAny, DALI.metres);
    const drop = (one: Section) => pairDrop(dropAmps(c), one.ohmsPerMetre, metres);
    return { c, lengths, limits, used, packed, section: smallestSection(sections, drop, c.dropLimitVolts) };
  }
  // More than one bus: which units go together is not known, so all of a bus's count at the far end.
  const drop = (one: Section) =>
    packed.segments === 1
      ? pairDrop(c.amps, one.ohmsPerMetre, countingMetres(c))
      : pairDrop(packed.fullest[0] ?? 0, one.ohmsPerMetre, lengths.farthest);
  const section = smallestSection(sections, drop, c.dropLimitVolts);
  if (atMost(drop(section), c.dropLimitVolts)) return { c, lengths, limits, used, packed, section };
  const byDrop = c.dropLimitVolts / pairDrop(1, section.ohmsPerMetre, lengths.farthest);
  const kept = [Math.min(rated, byDrop), addresses, addresses] as const;
  return { c, lengths, limits: kept, used, packed: pack(units, kept), section };
}

/** What makes the most buses, and how many. */
function segmentsOf(wired: Wired, allowed: number | null): Pick<DimmingBus, 'segments' | 'governedBy'> {
  const { c, packed, limits, used } = wired;
  const byLength =
    c.dali && allowed !== null
      ? segmentsByLength(
          c.legs.map(({ metres }) => metres),
          allowed,
        )
      : 1;
  if (packed.segments === null)
    return { segments: null, governedBy: limits[0] < c.control.ratedAmps && !c.dali ? 'drop' : 'current' };
  const segments = Math.max(packed.segments, byLength);
  if (segments === 1) return { segments, governedBy: null };
  if (byLength >= packed.segments)
    return { segments, governedBy: (allowed ?? 0) < DALI.metres ? 'drop' : 'length' };
  const [amps = 0, gear = 0, inputs = 0] = used;
  if (Math.max(gear / limits[1], inputs / limits[2]) > amps / limits[0])
    return { segments, governedBy: 'addresses' };
  return { segments, governedBy: !c.dali && limits[0] < c.control.ratedAmps ? 'drop' : 'current' };
}

function wiredBus(c: WiredCase): Found {
  const { input, dali, control } = c;
  const wired = planWired(c);
  const { section, lengths, packed, limits } = wired;
  const dropMetres = dali ? lengths.betweenAny : countingMetres(c);
  const dropVolts = pairDrop(dropAmps(c), section.ohmsPerMetre, dropMetres);
  const byDrop = metresByDrop(c, section);
  const allowed = dali ? Math.min(DALI.metres, byDrop ?? Infinity) : byDrop;
  const segmentAmps = packed.segments === null ? null : (packed.fullest[0] ?? 0);
  const segmented =
    packed.segments === 1 ? dropVolts : pairDrop(segmentAmps ?? 0, section.ohmsPerMetre, lengths.farthest);
  const result: DimmingBus = {
    ok: false,
    section: section.size,
    ...segmentsOf(wired, allowed),
    amps: c.amps,
    ratedAmps: control.ratedAmps,
    addresses: dali ? { gear: wired.used[1] ?? 0, inputs: wired.used[2] ?? 0, most: DALI.addresses } : null,
    metres: lengths,
    dropVolts,
    dropLimitVolts: c.dropLimitVolts,
    errorPct: dali ? null : (dropVolts / ANALOGUE.fullVolts) * 100,
    farVolts: dali && control.volts !== undefined ? control.volts - dropVolts : null,
    metresByDrop: byDrop,
    metresAllowed: allowed,
    segmentAmps,
    segmentDropVolts: dali || packed.segments === null ? null : segmented,
    watts: null,
    devices: devicesOf(input, c.unitAmps, unitsOf(c), limits),
  };
  return { input, result, wired, dimmed: null };
}

const NO_BUS = {
  section: null,
  amps: null,
  ratedAmps: null,
  addresses: null,
  metres: null,
  dropVolts: null,
  dropLimitVolts: null,
  errorPct: null,
  farVolts: null,
  metresByDrop: null,
  metresAllowed: null,
  segmentAmps: null,
  segmentDropVolts: null,
} as const;

function phaseCut(input: DimmingBusInput): Found {
  const dimmer = input.dimmer ?? refuse('dimmer', 'is missing: its least and most load by its maker');
  const { minWatts, maxWatts, ledMaxWatts, ledFraction } = dimmer;
  if (minWatts !== undefined && maxWatts !== undefined && minWatts > maxWatts)
    refuse('dimmer.minWatts', 'must not be above maxWatts');
  if (ledFraction !== undefined && maxWatts === undefined)
    refuse('dimmer.maxWatts', 'is missing: ledFraction is a share of it');
  if (ledFraction !== undefined && ledMaxWatts !== undefined)
    refuse('dimmer.ledFraction', 'stands beside ledMaxWatts: give one of the two');
  const units = input.devices.map(({ count, watts }, i) => ({
    count,
    uses: [watts ?? refuse(`devices.${i}.watts`, 'is missing: the dimmer carries it')],
  }));
  const watts = sumOf(units, 0);
  const derated = maxWatts === undefined ? undefined : maxWatts * (ledFraction ?? 1);
  const mostWatts = ledMaxWatts ?? derated ?? null;
  const limits = [mostWatts ?? Infinity];
  const packed = pack(units, limits);
  const none = input.devices.map(() => null);
  const result: DimmingBus = {
    ok: false,
    segments: packed.segments,
    governedBy: packed.segments === 1 ? null : 'load',
    ...NO_BUS,
    watts,
    devices: devicesOf(input, none, units, limits),
  };
  return { input, result, wired: null, dimmed: { watts, mostWatts, packed } };
}

/**
 * One bus as drawn, checked, and how many it takes otherwise.
 * 0-10 V and 1-10 V: the currents that the drivers source add up in the control; over both conductors they lift the
 * level at the far end by 2*I*R'*L. DALI: 64 addresses, 250 mA, 2 V and 300 m between any two devices; the drop counts
 * at the current that the supplies can give, which flows while a device pulls the bus low. Phase-cut: connected watts
 * between the dimmer's least and most load, by its maker.
 * @returns A, V, m, W; section null where only a resistance is given.
 * @throws {EngineError} `invalid-input` with the field; what a kind of bus needs and is not given is named too.
 * Source: IEC 60929 Annex E; IEC 62386-101 and the technical note on cable length; resistances as conductor-resistance.
 */
export function dimmingBus(input: DimmingBusInput): Found {
  return input.bus === 'phase-cut' ? phaseCut(input) : wiredBus(wiredCase(input));
}

export const dimmingBusCalculation = defineCalculation({
  name: 'dimming-bus',
  summary: '0-10 V, DALI or phase-cut dimming: current, addresses, length, section, how many buses',
  bench: false,
  schema,
  calculate: (input): Outcome<DimmingBus> => {
    const found = dimmingBus(input);
    const findings = findingsOf(found);
    const ok = !findings.some(({ severity }) => severity === 'stop');
    return { result: { ...found.result, ok }, findings, working: workingOf(found) };
  },
});
