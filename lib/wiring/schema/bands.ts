/**
 * What a meter should say, from the solved circuit: the lowest and the highest over the corners of what is not
 * known on the day, widened by the meter's own error. Pure: the engine is run again at each corner.
 */
import type { BranchCircuit, CircuitKind, ResistorArray, TapeRun } from '@/lib/circuits/schema/electrical';
import { figureCircuit, type TapeResult } from '@/lib/circuits/schema/figure';
import { conductorResistance } from '@/lib/sizing/conductor-resistance';
import { bandOver as bandOf, COLD_CELSIUS, METER_PCT, SUPPLY_PCT } from '@/lib/sizing/fault-finder-band';
import type { ShopSettings } from '@/lib/units/settings';

export { judge, type Verdict } from '@/lib/sizing/fault-finder-band';

/** Unless the circuit states its own window. */
const SUPPLY_TOLERANCE = SUPPLY_PCT / 100;

export interface Band {
  nominal: number;
  low: number;
  high: number;
}

export type ReadingKind =
  'volts-start' | 'volts-middle' | 'volts-end' | 'driver-amps' | 'breaker-amps' | 'string-amps';

export interface Expected extends Band {
  kind: ReadingKind;
  /** Which circuit or string of several, from 1. */
  index: number;
  unit: 'V' | 'A';
  /** Mains side: asked only of crew marked qualified. */
  mains: boolean;
}

/** What was figured, and the band over it and its corners, with the engine's meter. */
export function bandOver(nominal: number, corners: readonly number[], unit: 'V' | 'A'): Band {
  return { nominal, ...bandOf([nominal, ...corners], METER_PCT[unit === 'V' ? 'volts' : 'amps']) };
}

/** The run with its supply and the temperature of its copper set: rails and feeders are copper alike. */
function tapeCorner(run: TapeRun, supply: number, celsius: number): TapeRun {
  if (!run.tape || !run.driver) return run;
  const ohms = (at: number) => conductorResistance(run.feederSize, run.feederStranding, at).ohmsPerMetre;
  const ratio = ohms(celsius) / ohms(run.conductorCelsius);
  const { positive, negative } = run.tape.railOhmsPerMetre;
  return {
    ...run,
    conductorCelsius: celsius,
    driver: { ...run.driver, volts: run.driver.volts * supply },
    tape: { ...run.tape, railOhmsPerMetre: { positive: positive * ratio, negative: negative * ratio } },
  };
}

interface TapeReadings {
  start: number;
  middle: number;
  end: number;
  amps: number;
}

function tapeReadings(run: TapeRun, settings: ShopSettings): TapeReadings | null {
  const figured = figureCircuit('tape-run', run, settings);
  if (!figured.ok) return null;
  const { loadVolts, feeds } = figured.answer.result as TapeResult;
  const [start, middle, end] = [0, Math.floor((loadVolts.length - 1) / 2), loadVolts.length - 1].map(
    (index) => loadVolts[index],
  );
  const amps = feeds.reduce((sum, feed) => sum + feed.amps, 0);
  if (start === undefined || middle === undefined || end === undefined) return null;
  return [start, middle, end, amps].every(Number.isFinite) ? { start, middle, end, amps } : null;
}

function tapeBands(run: TapeRun, settings: ShopSettings): Expected[] {
  const nominal = tapeReadings(run, settings);
  if (!nominal) return [];
  const corners = [1 - SUPPLY_TOLERANCE, 1 + SUPPLY_TOLERANCE].flatMap((supply) =>
    [COLD_CELSIUS, Math.max(COLD_CELSIUS, run.conductorCelsius)].flatMap(
      (celsius) => tapeReadings(tapeCorner(run, supply, celsius), settings) ?? [],
    ),
  );
  const expected = (kind: ReadingKind, of: keyof TapeReadings, unit: 'V' | 'A'): Expected => ({
    kind,
    index: 1,
    unit,
    mains: false,
    ...bandOver(
      nominal[of],
      corners.map((corner) => corner[of]),
      unit,
    ),
  });
  return [
    expected('volts-start', 'start', 'V'),
    expected('volts-middle', 'middle', 'V'),
    expected('volts-end', 'end', 'V'),
    expected('driver-amps', 'amps', 'A'),
  ];
}

/** Drivers draw constant volt-amperes: the lower the supply, the more amps. Conductors hardly count beside it. */
function branchBands(circuit: BranchCircuit, result: unknown): Expected[] {
  const { circuits } = result as { circuits: { voltAmps: number }[] };
  const divisor = circuit.system === 'three-phase' ? Math.sqrt(3) : 1;
  return circuits.map(({ voltAmps }, index) => {
    const amps = (supply: number) => voltAmps / (circuit.volts * supply * divisor);
    const corners = [amps(1 - SUPPLY_TOLERANCE), amps(1 + SUPPLY_TOLERANCE)];
    return {
      kind: 'breaker-amps',
      index: index + 1,
      unit: 'A',
      mains: true,
      ...bandOver(amps(1), corners, 'A'),
    };
  });
}

interface SolvedString {
  leds: number;
  ballastOhms: number | null;
  amps: number | null;
}

/** The array states its supply's own window (a battery's), its LEDs' spread and its resistors' tolerance. */
function arrayBands(array: ResistorArray, result: unknown): Expected[] {
  const tolerance = array.tolerancePct / 100;
  const strings = (result as { strings: SolvedString[] | null }).strings ?? [];
  return strings.flatMap(({ leds, ballastOhms, amps }, index): Expected[] => {
    if (ballastOhms === null || amps === null) return [];
    const at = (volts: number, forward: number, ohms: number) => Math.max(0, (volts - leds * forward) / ohms);
    const corners = [
      at(array.supplyMinVolts, array.forwardVoltsMax, ballastOhms * (1 + tolerance)),
      at(array.supplyMaxVolts, array.forwardVoltsMin, ballastOhms * (1 - tolerance)),
    ];
    const band = bandOver(amps, corners, 'A');
    return [{ kind: 'string-amps', index: index + 1, unit: 'A', mains: false, ...band }];
  });
}

/** The readings that a crew takes on a circuit, with their bands. Empty where the circuit has no figures. */
export function expectedReadings(
  kind: CircuitKind,
  electrical: unknown,
  result: unknown,
  settings: ShopSettings,
): Expected[] {
  if (kind === 'tape-run') return tapeBands(electrical as TapeRun, settings);
  if (kind === 'branch-circuit') return branchBands(electrical as BranchCircuit, result);
  return arrayBands(electrical as ResistorArray, result);
}
