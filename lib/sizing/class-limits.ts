/**
 * What an extra-low-voltage DC output counts as, and so how its circuit is wired. US: a source marked Class 2 within
 * Chapter 9 Table 11(B); else a low-voltage lighting system of Article 411; else the wiring methods of Chapter 3.
 * IEC: SELV. Read in extracts: the licensed standard prevails.
 */
import { atMost } from '@/lib/engine/contract';
import { ARTICLE_411_AMPS, CLASS_TWO_BASIS, classTwoLimitAmps } from './tables/nec-ampacity';

/** Where the output's conductors and tape are. */
export interface LowVoltagePlace {
  basis: 'us' | 'iec';
  volts: number;
  wet: boolean;
  /** No bare live part can be touched: sleeved tape, closed joints. */
  insulated: boolean;
}

export interface LowVoltageOutput {
  /** Most that the output gives: its rating. */
  amps: number;
  /** US: marked Class 2. IEC: marked as a limited power source. */
  classLimited: boolean;
  /** IEC: marked SELV. */
  selv: boolean;
}

export type Wiring = 'class-2' | 'article-411' | 'chapter-3' | 'selv';

/** Class 2 and Article 411 in dry places, and where wet contact may occur. */
const US_DRY_VOLTS = 60;
const US_WET_VOLTS = 30;
const SELV_VOLTS = 120;
const BARE_DRY_VOLTS = 60;
const BARE_WET_VOLTS = 30;

export const CLASS_LIMIT_BASIS = `${CLASS_TWO_BASIS}, 411.3 and 411.6`;
export const SELV_BASIS =
  'IEC 61140:2016, ELV to 120 V DC; IEC 60598-1:2008 8.2.3, bare parts 60 V DC, 30 V other than dry (read in extracts)';

/** Highest volts that Class 2 and Article 411 take here, V DC. */
export function usLowVolts(wet: boolean): number {
  return wet ? US_WET_VOLTS : US_DRY_VOLTS;
}

/**
 * Highest DC volts that the place takes, V. US: over 60 V (30 V wet) only without bare live parts, by Chapter 3:
 * no limit here. IEC: SELV to 120 V, with bare live parts 60 V, 30 V wet.
 */
export function placeLimitVolts({ basis, wet, insulated }: LowVoltagePlace): number | null {
  if (basis === 'us') return insulated ? null : usLowVolts(wet);
  if (insulated) return SELV_VOLTS;
  return wet ? BARE_WET_VOLTS : BARE_DRY_VOLTS;
}

/** Most that a source marked Class 2 may give at these volts, A; null where there is no such source. */
export function classTwoAmps({ volts, wet }: Pick<LowVoltagePlace, 'volts' | 'wet'>): number | null {
  return atMost(volts, usLowVolts(wet)) ? classTwoLimitAmps(volts) : null;
}

/** A mark that the rating contradicts: more than Table 11(B) lets a Class 2 source give. */
export function overClassTwo(place: LowVoltagePlace, output: LowVoltageOutput): boolean {
  const limitAmps = classTwoLimitAmps(place.volts);
  return (
    place.basis === 'us' && output.classLimited && (limitAmps === null || !atMost(output.amps, limitAmps))
  );
}

/**
 * How the circuit of an output is wired; null where it may not be used at all.
 * Source: NEC 2023 Ch. 9 Table 11(B), 411.3 (60 V DC, 30 V wet) and 411.6 (25 A); IEC: SELV sources only.
 */
export function wiringOf(place: LowVoltagePlace, output: LowVoltageOutput): Wiring | null {
  const limitVolts = placeLimitVolts(place);
  if (limitVolts !== null && !atMost(place.volts, limitVolts)) return null;
  if (place.basis === 'iec') return output.selv ? 'selv' : null;
  if (overClassTwo(place, output)) return null;
  const low = atMost(place.volts, usLowVolts(place.wet));
  if (low && output.classLimited) return 'class-2';
  return low && atMost(output.amps, ARTICLE_411_AMPS) ? 'article-411' : 'chapter-3';
}
