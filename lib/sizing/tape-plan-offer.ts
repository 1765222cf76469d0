/** What the offered drivers and conductors can do here: which count, what each channel holds, which feeder it takes. */
import { atLeast, atMost, EngineError, floorWithin, refuse } from '@/lib/engine/contract';
import { overClassTwo, type Wiring, wiringOf } from './class-limits';
import { conductorResistance } from './conductor-resistance';
import type { PlanConductor, PlanDriver, TapePlanInput } from './tape-plan-input';
import type { SectionCheck } from './tape-plan-section';
import { NEC_TABLE_8 } from './tables/conductors';
import { IEC_B_52, IEC_SIZES, ONE_SQUARE_AMPS } from './tables/iec-ampacity';
import { NEC_240_4_D, NEC_310_16, SMALL_COPPER_AMPS } from './tables/nec-ampacity';

/** 310.3(A): the least size of Chapter 3 wiring, as an area. */
const CHAPTER_3_SQUARE = NEC_TABLE_8['AWG 14']?.squareMillimetres ?? Infinity;
/** Flexible cords below 1 mm2, BS 7671 Table 4F3A, from memory: the cable's own rating prevails. */
const CORD_AMPS: Readonly<Record<string, number>> = { '0.5 mm2': 3, '0.75 mm2': 6 };

export const FEEDER_AMPS_BASIS =
  "NEC 2023 Table 310.16 at 60 C with 240.4(D); IEC 60364-5-52:2009 Table B.52.2, method B2 (read in extracts); under AWG 14 and 1.5 mm2 from memory: the cable's own rating prevails";

export interface Cable {
  /** As offered. */
  index: number;
  given: PlanConductor;
  /** One conductor at its temperature. */
  ohmsPerMetre: number;
  squareMillimetres: number;
  amps: number;
  /** With the labour of laying it. */
  costPerMetre: number;
}

export interface DriverType {
  /** As offered. */
  index: number;
  given: PlanDriver;
  wiring: Wiring;
  channels: number;
  /** Cuts that one channel holds within load fraction and class limit. */
  cuts: number;
  /** Cost with the labour of fitting it. */
  cost: number;
  /** Which set of feeders it takes: an index of `Offer.feeders`. */
  group: number;
}

export interface Offer {
  cables: Cable[];
  types: DriverType[];
  /** Per group: which cables its outputs may feed. */
  feeders: boolean[][];
  leftOut: { volts: PlanDriver[]; mark: PlanDriver[]; place: PlanDriver[] };
}

/** What a conductor of the size may carry, A, where the cable's own rating is not given. */
export function tableAmps(size: string): number {
  const us = NEC_310_16[size]?.[60];
  if (us !== undefined) return Math.min(us, NEC_240_4_D[size] ?? us);
  const metric = (IEC_SIZES as readonly string[]).indexOf(size);
  if (metric >= 0) return IEC_B_52.PVC70[2].amps.B2[metric] ?? 0;
  return SMALL_COPPER_AMPS[size] ?? CORD_AMPS[size] ?? ONE_SQUARE_AMPS.PVC70[2].B2;
}

function cablesOf({ conductors, celsius, labour }: TapePlanInput): Cable[] {
  return conductors.map((given, index) => {
    try {
      return {
        index,
        given,
        ...conductorResistance(given.size, given.stranding, celsius),
        amps: given.amps ?? tableAmps(given.size),
        costPerMetre: given.costPerMetre + labour.hoursPerMetre * labour.ratePerHour,
      };
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      return refuse(`conductors.${index}.stranding`, error.issues[0]?.message ?? 'is not made');
    }
  });
}

/** A source whose own limit protects what it feeds: its mark counts only where the class does. */
function limitedSource(wiring: Wiring, given: PlanDriver): boolean {
  return wiring === 'class-2' || (wiring === 'selv' && given.classLimited);
}

/**
 * Behind a limited source a feeder carries its load; behind any other it must carry all that the output gives, as
 * nothing else protects it, and Chapter 3 wiring starts at AWG 14.
 */
function takes(wiring: Wiring, given: PlanDriver, cable: Cable): boolean {
  const carries = limitedSource(wiring, given) || atMost(given.channelWatts / given.volts, cable.amps);
  return carries && (wiring !== 'chapter-3' || atLeast(cable.squareMillimetres, CHAPTER_3_SQUARE));
}

/** Sorts the drivers out and figures what a channel of each holds. */
export function offerOf(input: TapePlanInput, check: SectionCheck): Offer {
  const { basis, tape, limits, labour } = input;
  const where = { basis, volts: tape.volts, wet: input.wet === true, insulated: input.insulated === true };
  const cables = cablesOf(input);
  const offer: Offer = { cables, types: [], feeders: [], leftOut: { volts: [], mark: [], place: [] } };
  const groups = new Map<string, number>();
  input.drivers.forEach((given, index) => {
    const output = {
      amps: given.channelWatts / tape.volts,
      classLimited: given.classLimited,
      selv: given.selv === true,
    };
    const sameVolts = atMost(given.volts, tape.volts) && atLeast(given.volts, tape.volts);
    if (!sameVolts) return void offer.leftOut.volts.push(given);
    if (overClassTwo(where, output)) return void offer.leftOut.mark.push(given);
    const wiring = wiringOf(where, output);
    if (wiring === null || (tape.classLimitedOnly === true && !limitedSource(wiring, given)))
      return void offer.leftOut.place.push(given);
    const mask = cables.map((cable) => takes(wiring, given, cable));
    const group = groups.get(mask.join()) ?? offer.feeders.push(mask) - 1;
    groups.set(mask.join(), group);
    const watts = Math.min(given.channelWatts, (given.totalWatts ?? Infinity) / given.channels);
    offer.types.push({
      index,
      given,
      wiring,
      group,
      channels: given.channels,
      cuts: check.cutWatts > 0 ? floorWithin((limits.loadFraction * watts) / check.cutWatts) : Infinity,
      cost: given.cost + labour.hoursPerDriver * labour.ratePerHour,
    });
    return undefined;
  });
  return offer;
}
