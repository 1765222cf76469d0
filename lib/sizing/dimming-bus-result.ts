/** What a dimming bus answers, and what its findings and working read beside it. */
import type { Lengths, Section } from './dimming-bus-cable';
import type { DimmingBusInput, WiredCase } from './dimming-bus-input';
import type { Packed } from './dimming-bus-packing';

export interface DimmingBus {
  /** As drawn, all on one bus: nothing stops it. */
  ok: boolean;
  /** The smallest that keeps the drop, or the one that is there. */
  section: string | null;
  /** Buses (controls, supplies, dimmers) that it takes; null where one unit alone is too much. */
  segments: number | null;
  /** What makes it more than one. */
  governedBy: 'current' | 'addresses' | 'length' | 'drop' | 'load' | null;
  /** Of all devices together, on the control pair. */
  amps: number | null;
  /** What the control or supply holds. */
  ratedAmps: number | null;
  addresses: { gear: number; inputs: number; most: number } | null;
  metres: Lengths | null;
  /** As drawn: at the farthest device, or between the two farthest of a DALI bus. */
  dropVolts: number | null;
  dropLimitVolts: number | null;
  /** 0-10 V: the drop in the level's 10 V. */
  errorPct: number | null;
  /** DALI, where the supply's volts are given. */
  farVolts: number | null;
  /** The longest that keeps the drop with this section and current. */
  metresByDrop: number | null;
  /** The same under the limit on length, where there is one. */
  metresAllowed: number | null;
  /** Of the fullest of the buses that it takes. */
  segmentAmps: number | null;
  /** At its end, were all its units there. */
  segmentDropVolts: number | null;
  /** Behind a phase-cut dimmer. */
  watts: number | null;
  /** Per kind: most of it alone on one bus, and how many more fit beside what is drawn. */
  devices: {
    name: string;
    count: number;
    amps: number | null;
    mostAlone: number | null;
    moreFit: number | null;
  }[];
}

/** A wired bus with what was found; what findings and working read. */
export interface Wired {
  c: WiredCase;
  section: Section;
  lengths: Lengths;
  /** A, gear and input addresses that one bus holds. */
  limits: readonly [amps: number, gear: number, inputs: number];
  used: readonly number[];
  packed: Packed;
}
export interface Dimmed {
  watts: number;
  mostWatts: number | null;
  packed: Packed;
}
export type Found = { input: DimmingBusInput; result: DimmingBus } & (
  { wired: Wired; dimmed: null } | { wired: null; dimmed: Dimmed }
);
