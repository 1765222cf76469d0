/** Conductor sizes from small to large, each with what it carries, loses and lets through; and the choice of one. */
import { atMost, type Finding, type WorkingStep } from '@/lib/engine/contract';
import type { SizeRequest } from './conductor-size-input';
import { NEC_TABLE_8, type Stranding } from './tables/conductors';
import { type VoltageDrop, voltageDrop } from './voltage-drop';

export interface Rung {
  size: string;
  stranding: Stranding;
  /** A: the lower of both columns (US), or Iz (IEC). */
  ampacity: number;
  /** The load, and the overcurrent device that goes with it. */
  carries: boolean;
  drop: VoltageDrop;
  dropFits: boolean;
  zsOhms: number | null;
  faultFits: boolean;
}

export interface Ladder {
  /** Smallest first. May begin below the least size, to tell whether that one governs. */
  rungs: Rung[];
  /** Place of the least size that may be used. */
  least: number;
  overcurrentAmps: number | null;
  zsMaxOhms: number | null;
  /** C, of the conductor for its drop. */
  celsius: number;
  findings: (chosen: Rung | null) => Finding[];
  steps: (rung: Rung) => WorkingStep[];
}

export type GovernedBy = 'ampacity' | 'voltage-drop' | 'fault-loop' | 'minimum-size';

export interface Choice {
  rung: Rung | null;
  governedBy: GovernedBy | null;
  /** What no rung satisfies. */
  failed: GovernedBy[];
}

/** Solid conductors end at AWG 8: above, the stranded row is taken. */
export function strandingOf(size: string, wanted: Stranding): Stranding {
  const unmade = wanted === 'solid' && NEC_TABLE_8[size]?.solid === null;
  return unmade ? 'stranded' : wanted;
}

/** Drop of one size over the request's run. */
export function dropOf(
  request: SizeRequest,
  size: string,
  celsius: number,
): Pick<Rung, 'stranding' | 'drop' | 'dropFits'> {
  const { system, volts, amps, metres, powerFactor } = request;
  const stranding = strandingOf(size, request.stranding ?? 'stranded');
  const drop = voltageDrop({ system, volts, amps, metres, size, stranding, celsius, powerFactor });
  return { stranding, drop, dropFits: atMost(drop.dropPct, request.maxDropPct) };
}

/**
 * The smallest rung that satisfies all, and what made it so large. Every test gets easier from rung to rung, so the
 * largest of the first that pass is the answer. What asks for it governs; where two do, the load before the least size
 * before drop and fault loop: those would have been met anyway.
 */
export function choose({ rungs, least }: Ladder): Choice {
  const first: [GovernedBy, number][] = [
    ['ampacity', rungs.findIndex((rung) => rung.carries)],
    ['minimum-size', least],
    ['voltage-drop', rungs.findIndex((rung) => rung.dropFits)],
    ['fault-loop', rungs.findIndex((rung) => rung.faultFits)],
  ];
  const failed = first.filter(([, at]) => at < 0).map(([name]) => name);
  if (failed.length > 0) return { rung: null, governedBy: null, failed };
  let governedBy: GovernedBy = 'ampacity';
  let place = -1;
  for (const [name, at] of first) if (at > place) [governedBy, place] = [name, at];
  return { rung: rungs[place] ?? null, governedBy, failed };
}
