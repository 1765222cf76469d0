/** What the search for a fault asks of a circuit, whatever its kind. */
/**
 * Where a meter is held. feed: at the driver's terminals of that feed. cut: at the load of that segment (tape) or
 * across that module (string). string: across the LEDs of that string. positive-conductor, negative-conductor: along
 * that conductor of that feed, from the driver's terminal to the tape or string.
 */
export const PLACES = ['feed', 'cut', 'string', 'positive-conductor', 'negative-conductor'] as const;
export type Place = (typeof PLACES)[number];

export interface Quantity {
  at: Place;
  /** From 1. */
  index: number;
  quantity: 'volts' | 'amps';
}

export interface Reading extends Quantity {
  measured: number;
}

export type CauseCode =
  | 'joint-in-feed'
  | 'joint-in-tape'
  | 'joint-in-string'
  | 'feeder-resistance'
  | 'supply-setting'
  | 'feed-missing'
  | 'feed-reversed'
  | 'open-rail'
  | 'open-segments'
  | 'open-string'
  | 'open-module'
  | 'shorted-leds'
  | 'shorted-modules';

/** Half widths of what is not known on the day, with their defaults filled in. */
export interface Tolerances {
  supplyPct: number;
  currentPct: number;
  resistorPct: number;
  /** Of each LED's forward volts, either way. */
  spreadVolts: number;
  /** Conductors at 20 C, over the same at working temperature. */
  coldShare: number;
}

/** A circuit's answer. */
export interface Solved {
  read: (quantity: Quantity) => number;
  /** Through the bad joint that was put in, A. */
  jointAmps?: number;
}

export type Rail = 'positive' | 'negative';

/** The figure that explains the readings. */
export interface Parameter {
  low: number;
  high: number;
  scale: 'log' | 'linear' | 'whole';
  unit: 'ohm' | 'V' | 'A' | '';
}

/** One cause at one place, or at any place along a tape. */
export interface Family {
  cause: CauseCode;
  at: 'feed' | 'boundary' | 'cut' | 'string';
  rail: Rail | null;
  /** Places in order that are tried first; null where the cause has none that readings could tell. */
  grid: readonly number[] | null;
  /** null where nothing is to be fitted but the place. */
  parameter: Parameter | null;
  /** Added to the score: orders causes that explain the readings alike, and decides nothing else. */
  surprise?: (value: number) => number;
  /** @throws {EngineError} `no-solution` where the circuit with this fault has no operating point. */
  solve: (place: number, value: number) => Solved;
}

export interface Model {
  /** What is not known on the day: each may be at its low end (-1), as drawn (0) or at its high end (1). */
  axes: readonly string[];
  solve: (ends: readonly number[]) => Solved;
  /** All that can be read on it. */
  quantities: readonly Quantity[];
  families: readonly Family[];
}

/** A driver whose conductors are unplugged: nothing flows that any meter shows. */
export const OPEN_OHMS = 1e9;

/** A joint from what no meter shows to what hardly lets anything through, beside the load that it feeds. */
export function jointOhms(volts: number, amps: number): Parameter {
  const load = volts / Math.max(Math.abs(amps), 1e-6);
  return { low: load * 1e-5, high: load * 100, scale: 'log', unit: 'ohm' };
}

/** A feeder this many times its resistance: longer or thinner, or shorter or thicker than drawn. */
export const FEEDER_FACTOR: Parameter = { low: 0.1, high: 1000, scale: 'log', unit: '' };

/** Nobody draws a cable with a quarter, or lays one of four times, the resistance: then a joint comes first. */
export const feederSurprise = (factor: number) => (factor > 4 || factor < 1 / 4 ? 1 : 0);
export const jointSurprise = () => 0.5;

export const settingOf = (drawn: number, unit: 'V' | 'A'): Parameter => ({
  low: drawn / 10,
  high: drawn * 2,
  scale: 'linear',
  unit,
});

export const wholeFrom1 = (high: number): Parameter => ({ low: 1, high, scale: 'whole', unit: '' });
