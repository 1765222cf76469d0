/** How many modules a driver's window holds, hot and cold, and which numbers of modules one driver can feed. */
import { atMost, ceilWithin, floorWithin } from '@/lib/engine/contract';
import type { SeriesStringInput } from './series-string';
import { voltageDrop } from './voltage-drop';

/** Forward volts are given at this temperature of the LEDs. */
const RATED_CELSIUS = 25;
/** A warm feeder drops more: 75 C unless given, as in `conductor-size`. */
const FEEDER_CELSIUS = 75;

type Offered = SeriesStringInput['drivers'][number];

/** Why one driver can feed no string, the nearest last. */
export const REASONS = ['insulation', 'amps', 'window', 'watts', 'count'] as const;
export type Reason = (typeof REASONS)[number];

export interface DriverWindow extends Offered {
  index: number;
  channels: number;
  /** What an open string can carry. */
  openVolts: number;
  feederDropVolts: number;
  /** Fewest modules of a string that stay at or over minVolts hot, most that stay at or under maxVolts cold. */
  fewest: number;
  most: number;
  limitWatts: number;
  reason: Reason | null;
}

export interface ModuleVolts {
  hotCelsius: number;
  hotVolts: number;
  coldCelsius: number;
  coldVolts: number;
}

/**
 * Lowest and highest forward volts of one module: hot = VfMin + c * (ambientMax + rise - 25), cold =
 * VfMax + c * (ambientMin - 25), before it has warmed itself.
 * @returns celsius, V
 */
export function moduleVolts(input: SeriesStringInput): ModuleVolts {
  const { forwardVoltsMin, forwardVoltsMax, voltsPerKelvin = 0 } = input.module;
  const hotCelsius = input.ambientMaxCelsius + (input.riseCelsius ?? 0);
  return {
    hotCelsius,
    hotVolts: forwardVoltsMin + voltsPerKelvin * (hotCelsius - RATED_CELSIUS),
    coldCelsius: input.ambientMinCelsius,
    coldVolts: forwardVoltsMax + voltsPerKelvin * (input.ambientMinCelsius - RATED_CELSIUS),
  };
}

/** Drop of one string's feeder at the driver's current, out and back. */
function feederDrop({ feeder }: SeriesStringInput, driver: Offered): number {
  if (!feeder) return 0;
  return voltageDrop({
    system: 'dc',
    volts: driver.maxVolts,
    amps: driver.amps,
    metres: feeder.metres,
    size: feeder.size,
    stranding: feeder.stranding ?? 'stranded',
    celsius: feeder.celsius ?? FEEDER_CELSIUS,
  }).dropVolts;
}

/** Watts out of the driver at typical forward volts. */
export const stringWatts = (
  input: SeriesStringInput,
  { amps, feederDropVolts }: DriverWindow,
  modules: number,
) => amps * (modules * input.module.forwardVolts + feederDropVolts);

/** Most modules on one driver over `strings` channels by watts <= loadFraction * maxWatts. */
function mostByWatts(input: SeriesStringInput, window: DriverWindow, strings: number): number {
  const volts = window.limitWatts / window.amps - strings * window.feederDropVolts;
  return Math.max(0, floorWithin(volts / input.module.forwardVolts));
}

function reasonOf(input: SeriesStringInput, window: DriverWindow): Reason | null {
  const { maxAmps, insulationVolts } = input.module;
  if (insulationVolts !== undefined && !atMost(window.openVolts, insulationVolts)) return 'insulation';
  if (maxAmps !== undefined && !atMost(window.amps, maxAmps)) return 'amps';
  if (window.fewest > window.most) return 'window';
  if (window.fewest > mostByWatts(input, window, 1)) return 'watts';
  return window.fewest > input.count ? 'count' : null;
}

export function windowOf(input: SeriesStringInput, ofModule: ModuleVolts, index: number): DriverWindow {
  const driver = input.drivers[index] as Offered;
  const feederDropVolts = feederDrop(input, driver);
  const window: DriverWindow = {
    ...driver,
    index,
    channels: driver.channels ?? 1,
    openVolts: driver.openCircuitVolts ?? driver.maxVolts,
    feederDropVolts,
    fewest: Math.max(1, ceilWithin(driver.minVolts / ofModule.hotVolts)),
    most: Math.max(0, floorWithin((driver.maxVolts - feederDropVolts) / ofModule.coldVolts)),
    limitWatts: input.loadFraction * driver.maxWatts,
    reason: null,
  };
  return { ...window, reason: reasonOf(input, window) };
}

/** One driver that feeds `modules` over `strings` channels. */
export interface Option {
  window: DriverWindow;
  modules: number;
  strings: number;
}

/**
 * Every number of modules up to `upTo` that one driver can feed, each over as few channels as it takes. With k
 * strings that is k * fewest to k * most, at most what the watts allow. Both ends grow with k, or the upper one falls
 * for good where feeders eat the watts: what k strings leave out between two of these ranges no larger k fills.
 * One at a time: all drivers' together can be many more than the few that are kept.
 */
function* optionsOf(input: SeriesStringInput, window: DriverWindow, upTo: number): Generator<Option> {
  if (window.reason !== null && window.reason !== 'count') return;
  let covered = 0;
  for (let strings = 1; strings <= window.channels && strings * window.fewest <= upTo; strings++) {
    const high = Math.min(upTo, strings * window.most, mostByWatts(input, window, strings));
    for (let modules = Math.max(strings * window.fewest, covered + 1); modules <= high; modules++)
      yield { window, modules, strings };
    covered = Math.max(covered, high);
  }
}

export function* optionsOfAll(
  input: SeriesStringInput,
  windows: readonly DriverWindow[],
  upTo: number,
): Generator<Option> {
  for (const window of windows) yield* optionsOf(input, window, upTo);
}
