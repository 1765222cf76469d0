/** 7. Modules in series strings on constant-current drivers: the cheapest drivers whose windows hold, hot and cold. */
import * as z from 'zod/mini';
import { defineCalculation, EngineError, type Limits, type Outcome, refuse } from '@/lib/engine/contract';
import { celsius, conductorSize, count, fraction, notNegative, positive, stranding } from './inputs';
import { checkForwardVolts, forwardVoltsShape } from './led-range';
import { findingsOf } from './series-string-findings';
import { cheapestPlan } from './series-string-plan';
import {
  type DriverWindow,
  type ModuleVolts,
  moduleVolts,
  type Option,
  optionsOfAll,
  stringWatts,
  windowOf,
} from './series-string-window';
import { workingOf } from './series-string-working';

const driver = z.strictObject({
  sku: z.string().check(z.minLength(1, 'is missing'), z.maxLength(100, 'must be at most 100 characters')),
  /** Of each channel. */
  amps: positive,
  minVolts: notNegative,
  maxVolts: positive,
  /** Of all channels together. */
  maxWatts: positive,
  cost: notNegative,
  /** 1 unless given. */
  channels: z.optional(count),
  /** What an open string carries; maxVolts unless given. */
  openCircuitVolts: z.optional(positive),
});

const schema = z.strictObject({
  module: z.strictObject({
    ...forwardVoltsShape,
    /** How the forward volts change with temperature: below zero for LEDs; not counted unless given. */
    voltsPerKelvin: z.optional(
      z.number().check(z.maximum(0, 'must not be above zero: forward volts fall as LEDs warm')),
    ),
    maxAmps: z.optional(positive),
    /** What module, connectors and cable are insulated for. */
    insulationVolts: z.optional(positive),
  }),
  count,
  ambientMinCelsius: celsius,
  ambientMaxCelsius: celsius,
  /** How far the LEDs warm over the ambient in use; 0 unless given. */
  riseCelsius: z.optional(notNegative),
  /** From the driver to the string and back, one for each string. */
  feeder: z.optional(
    z.strictObject({
      /** One way. */
      metres: notNegative,
      size: conductorSize,
      /** Stranded unless given. */
      stranding: z.optional(stranding),
      /** Of the conductor; 75 unless given. */
      celsius: z.optional(celsius),
    }),
  ),
  drivers: z
    .array(driver)
    .check(z.minLength(1, 'needs at least one driver'), z.maxLength(500, 'takes at most 500')),
  loadFraction: fraction,
});

export type SeriesStringInput = z.infer<typeof schema>;

export interface PlannedDriver {
  /** Counted from 1. */
  driver: number;
  sku: string;
  strings: number;
  modules: number;
  /** At typical forward volts, with the feeders. */
  watts: number;
  /** Of maxWatts. */
  loadPct: number;
  cost: number;
}

export interface PlannedString {
  driver: number;
  /** Counted from 1. */
  channel: number;
  sku: string;
  modules: number;
  amps: number;
  /** What the modules need hot, which the driver's minVolts must not be above. */
  hotVolts: number;
  /** What modules and feeder need at a cold start, which the driver's maxVolts must not be below. */
  coldVolts: number;
  minVolts: number;
  maxVolts: number;
  watts: number;
}

export interface SeriesString {
  moduleHotVolts: number;
  moduleColdVolts: number;
  /** What to buy. */
  purchase: { sku: string; quantity: number; cost: number }[];
  drivers: PlannedDriver[];
  strings: PlannedString[];
  cost: number | null;
}

/** The input with what its drivers can do; what the plan, findings and working read. */
export interface Case {
  input: SeriesStringInput;
  ofModule: ModuleVolts;
  windows: DriverWindow[];
  plan: Option[] | null;
}

function check(input: SeriesStringInput, limits: Limits): ModuleVolts {
  checkForwardVolts(input.module, 'module');
  if (input.ambientMinCelsius > input.ambientMaxCelsius)
    refuse('ambientMinCelsius', 'must not be above ambientMaxCelsius');
  const skus = new Set<string>();
  for (const [index, { sku, minVolts, maxVolts, openCircuitVolts }] of input.drivers.entries()) {
    if (skus.has(sku)) refuse(`drivers.${index}.sku`, 'is offered twice');
    skus.add(sku);
    if (minVolts > maxVolts) refuse(`drivers.${index}.minVolts`, 'must not be above maxVolts');
    if (openCircuitVolts !== undefined && openCircuitVolts < maxVolts)
      refuse(`drivers.${index}.openCircuitVolts`, 'must not be below maxVolts');
  }
  if (input.count > limits.maxCuts) {
    const message = `must be at most ${limits.maxCuts} here`;
    throw new EngineError('too-large', `count: ${message}`, [{ path: 'count', message }]);
  }
  const ofModule = moduleVolts(input);
  if (ofModule.hotVolts <= 0) refuse('module.voltsPerKelvin', 'leaves the hot module no forward volts');
  return ofModule;
}

function caseOf(input: SeriesStringInput, limits: Limits): Case {
  const ofModule = check(input, limits);
  const windows = input.drivers.map((_, index) => windowOf(input, ofModule, index));
  const options = optionsOfAll(input, windows, input.count);
  return { input, ofModule, windows, plan: cheapestPlan(options, input.count) };
}

function stringsOf(
  { input, ofModule }: Case,
  { window, modules, strings }: Option,
  driver: number,
): PlannedString[] {
  const longer = modules % strings;
  return Array.from({ length: strings }, (_, index) => {
    const length = Math.floor(modules / strings) + (index < longer ? 1 : 0);
    return {
      driver,
      channel: index + 1,
      sku: window.sku,
      modules: length,
      amps: window.amps,
      hotVolts: length * ofModule.hotVolts,
      coldVolts: length * ofModule.coldVolts + window.feederDropVolts,
      minVolts: window.minVolts,
      maxVolts: window.maxVolts,
      watts: stringWatts(input, window, length),
    };
  });
}

function purchaseOf(plan: readonly Option[]): SeriesString['purchase'] {
  const bought = new Map<string, { sku: string; quantity: number; cost: number }>();
  for (const { window } of plan) {
    const row = bought.get(window.sku) ?? { sku: window.sku, quantity: 0, cost: 0 };
    row.quantity++;
    row.cost = row.quantity * window.cost;
    bought.set(window.sku, row);
  }
  return [...bought.values()];
}

/**
 * The cheapest drivers for `count` modules and the split of the modules over strings, one string a channel:
 * modules * hot >= minVolts, modules * cold + feeder drop <= maxVolts, driver amps <= maxAmps, watts of a driver at
 * typical forward volts <= loadFraction * maxWatts. Of plans of the same cost the one with the fewest drivers, then the
 * fewest strings, then the most even split.
 * @returns V, A, W, cost in the unit of the drivers' cost; empty lists and a null cost where no driver fits.
 * @throws {EngineError} `invalid-input` with the field, `too-large` where count is above the limit.
 * Source: datasheets of module and driver; Ohm's law for the feeder.
 */
function seriesString(c: Case): SeriesString {
  const plan = c.plan ?? [];
  const strings = plan.flatMap((option, index) => stringsOf(c, option, index + 1));
  const drivers = plan.map(({ window, modules, strings: used }, index) => {
    const watts = window.amps * (modules * c.input.module.forwardVolts + used * window.feederDropVolts);
    return {
      driver: index + 1,
      sku: window.sku,
      strings: used,
      modules,
      watts,
      loadPct: (watts / window.maxWatts) * 100,
      cost: window.cost,
    };
  });
  const purchase = purchaseOf(plan);
  return {
    moduleHotVolts: c.ofModule.hotVolts,
    moduleColdVolts: c.ofModule.coldVolts,
    purchase,
    drivers,
    strings,
    cost: c.plan === null ? null : purchase.reduce((sum, { cost }) => sum + cost, 0),
  };
}

export const seriesStringCalculation = defineCalculation({
  name: 'series-string',
  summary: 'Modules in series on constant-current drivers: cheapest drivers and strings within their windows',
  bench: false,
  schema,
  calculate: (input, limits): Outcome<SeriesString> => {
    const c = caseOf(input, limits);
    const result = seriesString(c);
    return { result, findings: findingsOf(c, result), working: workingOf(c, result) };
  },
});
