/** One string of a resistor array: its resistor, currents and watts. */
import { atLeast, atMost } from '@/lib/engine/contract';
import { nextPreferred } from './e-series';
import type { SupplyWindow } from './supply-window';
import type { ESeries } from './tables/e-series';

export interface LedRange {
  forwardVolts: number;
  forwardVoltsMin: number;
  forwardVoltsMax: number;
  /** Wanted at nominal supply and forward volts. */
  amps: number;
  maxAmps: number;
}

export interface ArrayString {
  leds: number;
  ballastOhmsExact: number | null;
  ballastOhms: number | null;
  amps: number | null;
  ampsMin: number | null;
  ampsMax: number | null;
  ballastWatts: number | null;
  ballastWattsMax: number | null;
  ballastRatedWatts: number | null;
}

export interface ResistorArray {
  perString: number | null;
  strings: ArrayString[];
  supplyAmps: number | null;
  supplyWatts: number | null;
  efficiency: number | null;
  /** Next standard value that keeps the worst current at maxAmps; null where the chosen one does. */
  saferOhms: number | null;
}

/** The input with its defaults filled in; what figures, findings and working read. */
export interface Case {
  supply: SupplyWindow;
  led: LedRange;
  series: ESeries;
  tolerance: number;
  /** Ascending. */
  ratedWatts: number[];
  loadFraction: number;
  derate: number;
  ampsWanted: number;
}

/** Whether the LEDs leave the resistor any volts at nominal supply and forward volts. */
const fits = (c: Case, leds: number) => !atLeast(leds * c.led.forwardVolts, c.supply.volts);

/**
 * One string of `leds` LEDs with the next standard resistor.
 * @returns ohm, A, W; nulls where the LEDs need all the supply's volts; ballastRatedWatts null where no rating is
 * large enough.
 */
export function arrayString(c: Case, leds: number): ArrayString {
  const { supply, led, tolerance } = c;
  if (!fits(c, leds)) {
    return {
      leds,
      ballastOhmsExact: null,
      ballastOhms: null,
      amps: null,
      ampsMin: null,
      ampsMax: null,
      ballastWatts: null,
      ballastWattsMax: null,
      ballastRatedWatts: null,
    };
  }
  const ballastOhmsExact = (supply.volts - leds * led.forwardVolts) / led.amps;
  const ballastOhms = nextPreferred(ballastOhmsExact, c.series);
  const amps = (supply.volts - leds * led.forwardVolts) / ballastOhms;
  const lowestOhms = ballastOhms * (1 - tolerance);
  const ampsMax = (supply.maxVolts - leds * led.forwardVoltsMin) / lowestOhms;
  const ballastWattsMax = ampsMax * ampsMax * lowestOhms;
  const rated = c.ratedWatts.find((watts) => atLeast(watts * c.derate * c.loadFraction, ballastWattsMax));
  return {
    leds,
    ballastOhmsExact,
    ballastOhms,
    amps,
    ampsMin: Math.max(0, (supply.minVolts - leds * led.forwardVoltsMax) / (ballastOhms * (1 + tolerance))),
    ampsMax,
    ballastWatts: amps * amps * ballastOhms,
    ballastWattsMax,
    ballastRatedWatts: rated ?? null,
  };
}

/** Next standard value with which the worst current stays within maxAmps; null where the chosen one does. */
export function saferOhms(c: Case, string: ArrayString): number | null {
  if (string.ampsMax === null || atMost(string.ampsMax, c.led.maxAmps)) return null;
  const worstVolts = c.supply.maxVolts - string.leds * c.led.forwardVoltsMin;
  return nextPreferred(worstVolts / (c.led.maxAmps * (1 - c.tolerance)), c.series);
}

/** The whole string, and the shorter last one if there is one. */
export function distinct(strings: ArrayString[]): ArrayString[] {
  const first = strings[0];
  const last = strings.at(-1);
  if (!first || !last) return [];
  return first.leds === last.leds ? [first] : [first, last];
}
