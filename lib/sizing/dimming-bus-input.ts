/** What a dimming bus is asked with, and the same with its defaults filled in. */
import * as z from 'zod/mini';
import { refuse } from '@/lib/engine/contract';
import {
  celsius,
  conductorSize,
  count,
  fraction,
  notNegative,
  percentAbove0,
  positive,
  stranding,
} from './inputs';
import { ANALOGUE, ANALOGUE_ERROR_PCT, DALI } from './tables/dimming';

const text = z.string().check(z.minLength(1, 'must not be empty'), z.maxLength(80, 'is too long'));
const current = z.enum(['source', 'sink']);

const device = z.strictObject({
  name: text,
  count,
  /** Of one unit, on the control pair; the standard's most unless given. */
  amps: z.optional(notNegative),
  /** 0-10 V: whether it sources (as drivers do) or sinks the control current. */
  current: z.optional(current),
  /** DALI: gear, or an input device such as a sensor, which has addresses of its own. */
  kind: z.optional(z.enum(['gear', 'input'])),
  /** DALI: of one unit; 1 unless given. */
  addresses: z.optional(
    z.number().check(z.int('must be a whole number'), z.nonnegative('must not be negative'), z.maximum(64)),
  ),
  /** Of one unit, from the mains; wanted behind a phase-cut dimmer. */
  watts: z.optional(notNegative),
});

const control = z.strictObject({
  /** 0-10 V: what the control may sink (or source). DALI: what the bus supply is sure to give. */
  ratedAmps: positive,
  /** 0-10 V: least current at which an old control works. */
  minAmps: z.optional(notNegative),
  /** DALI: the most that the supplies can give together; 0.25 A unless given. */
  maxAmps: z.optional(positive),
  /** DALI: least volts of the supply. */
  volts: z.optional(positive),
  /** 0-10 V: sink unless given. */
  current: z.optional(current),
});

export const schema = z.strictObject({
  bus: z.enum(['0-10v', '1-10v', 'dali', 'phase-cut']),
  basis: z.enum(['us', 'iec']),
  devices: z
    .array(device)
    .check(z.minLength(1, 'needs at least one device'), z.maxLength(100, 'takes at most 100 kinds')),
  control: z.optional(control),
  /** One way: one leg is a daisy chain from the control or supply; several are a star about it. */
  legs: z.optional(
    z
      .array(
        z.strictObject({
          metres: notNegative,
          /** 0-10 V: units on this leg; all at the longest leg unless given for every leg. */
          units: z.optional(z.number().check(z.int('must be a whole number'), z.nonnegative())),
        }),
      )
      .check(z.minLength(1, 'needs at least one leg'), z.maxLength(100, 'takes at most 100 legs')),
  ),
  /** 0-10 V: units all at the far end of their leg (the worst; taken unless given), or evenly along it. */
  placed: z.optional(z.enum(['at-end', 'along'])),
  /** The section that is there. */
  size: z.optional(conductorSize),
  /** Sections to choose from. */
  sizes: z.optional(z.array(conductorSize).check(z.minLength(1, 'needs at least one size'))),
  /** Of one conductor, from its sheet, instead of a section. */
  ohmsPerMetre: z.optional(notNegative),
  stranding: z.optional(stranding),
  /** Of the conductors. */
  celsius: z.optional(celsius),
  /** 0-10 V: what the drop may falsify the level by, of its 10 V; 1 % unless given. */
  maxErrorPct: z.optional(percentAbove0),
  /** DALI: 2 V unless less is given. */
  maxDropVolts: z.optional(positive.check(z.maximum(DALI.dropVolts, `must be at most ${DALI.dropVolts}`))),
  /** DALI, on one bus. */
  groups: z.optional(count),
  scenes: z.optional(count),
  /** US: how the control pair runs. */
  wiring: z.optional(z.enum(['class-2-separate', 'class-2-with-power', 'class-1'])),
  /** Phase-cut: the dimmer's own figures, by its maker. */
  dimmer: z.optional(
    z.strictObject({
      minWatts: z.optional(notNegative),
      /** Of lamps of the old kind. */
      maxWatts: z.optional(positive),
      /** Of LEDs, where the maker gives it. */
      ledMaxWatts: z.optional(positive),
      /** Or the share of maxWatts that the maker leaves for LEDs. */
      ledFraction: z.optional(fraction),
    }),
  ),
});

export type DimmingBusInput = z.infer<typeof schema>;
export type Device = DimmingBusInput['devices'][number];
export type Bus = DimmingBusInput['bus'];

/** Keys that only some kinds of bus read. */
const READ_BY: Partial<Record<keyof DimmingBusInput, readonly Bus[]>> = {
  control: ['0-10v', '1-10v', 'dali'],
  legs: ['0-10v', '1-10v', 'dali'],
  placed: ['0-10v', '1-10v'],
  size: ['0-10v', '1-10v', 'dali'],
  sizes: ['0-10v', '1-10v', 'dali'],
  ohmsPerMetre: ['0-10v', '1-10v', 'dali'],
  stranding: ['0-10v', '1-10v', 'dali'],
  celsius: ['0-10v', '1-10v', 'dali'],
  maxErrorPct: ['0-10v', '1-10v'],
  maxDropVolts: ['dali'],
  groups: ['dali'],
  scenes: ['dali'],
  wiring: ['0-10v', '1-10v', 'dali'],
  dimmer: ['phase-cut'],
};

export function unreadKeys(input: DimmingBusInput): string[] {
  return Object.entries(READ_BY)
    .filter(([key, buses]) => input[key as keyof DimmingBusInput] !== undefined && !buses.includes(input.bus))
    .map(([key]) => key);
}

/** A wired bus with all that its figures need. */
export interface WiredCase {
  input: DimmingBusInput;
  control: NonNullable<DimmingBusInput['control']>;
  legs: NonNullable<DimmingBusInput['legs']>;
  dali: boolean;
  /** Of one unit, as given or by the standard, in the order of the devices. */
  unitAmps: number[];
  /** Of all devices together. */
  amps: number;
  units: number;
  dropLimitVolts: number;
}

function checkConductor(input: DimmingBusInput): void {
  const { size, sizes, ohmsPerMetre } = input;
  const given = [size, sizes, ohmsPerMetre].filter((one) => one !== undefined).length;
  if (given > 1) refuse(size === undefined ? 'ohmsPerMetre' : 'size', 'stands beside another way to give it');
  if (ohmsPerMetre !== undefined) return;
  if (input.stranding === undefined) refuse('stranding', 'is missing: the resistance depends on it');
  if (input.celsius === undefined) refuse('celsius', 'is missing: the resistance depends on it');
}

function checkLegs(legs: WiredCase['legs'], units: number): void {
  const told = legs.filter((leg) => leg.units !== undefined).length;
  if (told === 0) return;
  if (told < legs.length) {
    const bare = legs.findIndex((leg) => leg.units === undefined);
    refuse(`legs.${bare}.units`, 'is missing: give the units of every leg, or of none');
  }
  const sum = legs.reduce((all, leg) => all + (leg.units ?? 0), 0);
  if (sum !== units) refuse('legs', `the units of all legs come to ${sum}, those of all devices to ${units}`);
}

export function wiredCase(input: DimmingBusInput): WiredCase {
  const dali = input.bus === 'dali';
  const control = input.control ?? refuse('control', 'is missing: its rating decides how many it holds');
  const legs = input.legs ?? refuse('legs', 'is missing: the drop depends on the length');
  if (control.maxAmps !== undefined && control.maxAmps < control.ratedAmps)
    refuse('control.maxAmps', 'must not be below ratedAmps');
  checkConductor(input);
  const standard = dali ? DALI.deviceAmps : ANALOGUE.driverAmps;
  const unitAmps = input.devices.map(({ amps }) => amps ?? standard);
  const units = input.devices.reduce((sum, one) => sum + one.count, 0);
  checkLegs(legs, units);
  return {
    input,
    control,
    legs,
    dali,
    unitAmps,
    amps: input.devices.reduce((sum, one, i) => sum + one.count * (unitAmps[i] ?? 0), 0),
    units,
    dropLimitVolts: dali
      ? (input.maxDropVolts ?? DALI.dropVolts)
      : (ANALOGUE.fullVolts * (input.maxErrorPct ?? ANALOGUE_ERROR_PCT)) / 100,
  };
}
