/** Lengths of a bus, the volts that they cost, and the smallest section that keeps them. */
import { atMost, ceilWithin } from '@/lib/engine/contract';
import { conductorResistance } from './conductor-resistance';
import type { WiredCase } from './dimming-bus-input';
import { CONTROL_SIZES, DALI } from './tables/dimming';

export interface Lengths {
  /** From the control or supply to the farthest device. */
  farthest: number;
  /** Between the two devices that lie farthest apart. */
  betweenAny: number;
  /** All legs together. */
  total: number;
}

export interface Section {
  /** null where only a resistance was given. */
  size: string | null;
  /** Of one conductor. */
  ohmsPerMetre: number;
}

export function lengthsOf({ legs }: WiredCase): Lengths {
  const [longest = 0, next = 0] = legs.map(({ metres }) => metres).sort((one, other) => other - one);
  return {
    farthest: longest,
    betweenAny: longest + next,
    total: legs.reduce((sum, { metres }) => sum + metres, 0),
  };
}

/** Sections to look at, the one of most resistance first. */
export function sectionsOf({ input }: WiredCase): Section[] {
  if (input.ohmsPerMetre !== undefined) return [{ size: null, ohmsPerMetre: input.ohmsPerMetre }];
  const sizes = input.size === undefined ? (input.sizes ?? CONTROL_SIZES[input.basis]) : [input.size];
  return [...sizes]
    .map((size) => ({
      size,
      ohmsPerMetre: conductorResistance(size, input.stranding ?? 'solid', input.celsius ?? 20).ohmsPerMetre,
    }))
    .sort((one, other) => other.ohmsPerMetre - one.ohmsPerMetre);
}

/**
 * Metres at whose end the whole current would lose as much as it loses on its way: with the units of every leg told,
 * the leg counts for its share; with N units evenly along, a leg counts for (N + 1)/(2N) of its length.
 */
export function countingMetres(c: WiredCase): number {
  const along = c.input.placed === 'along';
  return c.legs.reduce((most, { metres, units }) => {
    const own = units ?? c.units;
    const share = own / c.units;
    const place = along && own > 0 ? (own + 1) / (2 * own) : 1;
    return Math.max(most, metres * share * place);
  }, 0);
}

/**
 * DALI: the current that flows while a device pulls the bus low is all that the supplies can give, whatever the
 * devices take; 0-10 V: what the drivers source.
 */
export const dropAmps = (c: WiredCase): number => (c.dali ? (c.control.maxAmps ?? DALI.supplyAmps) : c.amps);

/** Out and back: 2 * I * R' * L. */
export const pairDrop = (amps: number, ohmsPerMetre: number, metres: number): number =>
  2 * amps * ohmsPerMetre * metres;

/** The length that costs the volts allowed; null where nothing limits it. */
export function metresByDrop(c: WiredCase, { ohmsPerMetre }: Section): number | null {
  const perMetre = pairDrop(dropAmps(c), ohmsPerMetre, 1);
  return perMetre > 0 ? c.dropLimitVolts / perMetre : null;
}

/** Smallest section whose drop `drop` keeps within the limit; the largest where none does. */
export function smallestSection(
  sections: readonly Section[],
  drop: (section: Section) => number,
  limitVolts: number,
): Section {
  const kept = sections.find((section) => atMost(drop(section), limitVolts));
  return kept ?? sections.at(-1) ?? { size: null, ohmsPerMetre: 0 };
}

/**
 * DALI: buses that the length alone needs, each with its own supply. What is over the limit is cut off a
 * leg as buses of their own; of what is left no two legs on one bus may come to more than the limit.
 */
export function segmentsByLength(metres: readonly number[], limit: number): number {
  let cut = 0;
  const rests = metres.map((leg) => {
    const whole = Math.max(0, ceilWithin(leg / limit) - 1);
    cut += whole;
    return leg - whole * limit;
  });
  const long = rests.filter((leg) => !atMost(2 * leg, limit));
  const short = rests.filter((leg) => atMost(2 * leg, limit));
  if (long.length === 0) return cut + 1;
  const room = limit - Math.min(...long);
  const homeless = short.some((leg) => leg > 0 && !atMost(leg, room));
  return cut + long.length + (homeless ? 1 : 0);
}
