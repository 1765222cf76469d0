/** 19. What new lighting and its controls save a year: energy, demand, money and carbon. */
import * as z from 'zod/mini';
import { defineCalculation, type Outcome } from '@/lib/engine/contract';
import { notNegative } from '@/lib/sizing/inputs';
import { findingsOf } from './energy-saving-findings';
import { workingOf } from './energy-saving-working';

/** 365 days of 24 hours. */
const HOURS_OF_A_YEAR = 8760;
const MOST_LINES = 10_000;
/** Billing months of a year. */
const MONTHS = 12;

const share = z
  .number()
  .check(z.nonnegative('must not be negative'), z.maximum(1, 'must be at most 1 (the whole)'));
const quantity = z
  .number()
  .check(
    z.int('must be a whole number'),
    z.nonnegative('must not be negative'),
    z.maximum(1_000_000, 'must be at most 1,000,000'),
  );

const lines = z
  .array(
    z.strictObject({
      quantity,
      /** Of one luminaire, ballast or driver included. */
      watts: notNegative,
      hoursPerYear: z
        .number()
        .check(
          z.nonnegative('must not be negative'),
          z.maximum(HOURS_OF_A_YEAR, 'must be at most 8,760: a year has no more hours'),
        ),
      /** Share of the energy that controls leave: 1 without controls. */
      controlFactor: share,
    }),
  )
  .check(z.maxLength(MOST_LINES, 'takes at most 10,000 lines'));

const schema = z.strictObject({
  existing: lines,
  proposed: lines,
  /** Currency units per kWh. */
  energyRate: notNegative,
  /** Currency units per kW and month. */
  demandRate: z.optional(notNegative),
  /** Months of a year in which the peak is billed; 12 unless given. */
  demandMonths: z.optional(
    z.number().check(z.nonnegative('must not be negative'), z.maximum(MONTHS, 'must be at most 12')),
  ),
  /** Share of the connected kW saved that falls into the billed peak; 0 unless given. */
  coincidence: z.optional(share),
  /** Net kWh per lighting kWh saved, with cooling saved and electric heating added; 1 unless given. */
  interactionFactor: z.optional(
    z.number().check(z.nonnegative('must not be negative'), z.maximum(3, 'must be at most 3')),
  ),
  /** Currency units of heating fuel that each lighting kWh saved costs; 0 unless given. */
  fuelPenaltyPerKilowattHour: z.optional(notNegative),
  kgCo2PerKilowattHour: z.optional(
    z.number().check(z.nonnegative('must not be negative'), z.maximum(5, 'must be at most 5 kg')),
  ),
  /** The energy rate is the bill divided by its kWh: demand charges are mixed into it. */
  rateIsBlended: z.optional(z.boolean()),
  /** How much of the blended rate is demand charges, where it is known. */
  demandSharePct: z.optional(
    z.number().check(z.nonnegative('must not be negative'), z.lt(100, 'must be under 100')),
  ),
});

export type EnergySavingInput = z.infer<typeof schema>;

export interface EnergySaving {
  kilowattHoursBefore: number;
  kilowattHoursAfter: number;
  /** Of the lighting itself. */
  kilowattHoursSaved: number;
  /** With what heating and cooling add or take. */
  netKilowattHoursSaved: number;
  /** Connected load before less after. */
  demandKilowattsSaved: number;
  /** Of a year, in currency units: energy and demand less heating fuel. */
  costSaved: number;
  /** Null without a factor. */
  kgCo2Saved: number | null;
  energyCostSaved: number;
  demandCostSaved: number;
  fuelCostAdded: number;
  connectedWattsBefore: number;
  connectedWattsAfter: number;
}

/** A saving with what its findings and working read. */
export interface Saving {
  input: EnergySavingInput;
  coincidence: number;
  demandMonths: number;
  interactionFactor: number;
  result: EnergySaving;
}

type Lines = EnergySavingInput['existing'];
const sum = (all: Lines, of: (line: Lines[number]) => number) =>
  all.reduce((total, line) => total + of(line), 0);
const connectedWatts = (all: Lines) => sum(all, ({ quantity: n, watts }) => n * watts);
const kilowattHours = (all: Lines) =>
  sum(
    all,
    ({ quantity: n, watts, hoursPerYear, controlFactor }) => n * watts * hoursPerYear * controlFactor,
  ) / 1000;

/**
 * Energy, demand, money and carbon saved in a year.
 *
 * kWh = quantity * watts * hours * control factor / 1000; net = lighting kWh saved * interaction factor;
 * cost = net * energyRate + kW * coincidence * demandRate * months - lighting kWh saved * fuel penalty.
 * The fuel penalty counts on the lighting kWh, as published factors per kWh saved do, and reduces costSaved.
 * @param input lines with quantity, watts each, hours a year to 8,760, control factor 0 to 1; rates in currency
 * units per kWh and per kW and month
 * @returns kWh and kW (negative where the load grows), cost in currency units a year, kg CO2 (null without a factor)
 * @throws {EngineError} `invalid-input`
 * Source: NREL/SR-7A40-68558 (2017), Uniform Methods Project ch. 2, commercial and industrial lighting (from memory);
 * interaction and fuel per kWh saved: HVAC Interactive Effects, Bonneville Power Administration, 2012 (read in a copy).
 */
export function energySaving(input: EnergySavingInput): Saving {
  const { existing, proposed, energyRate } = input;
  const coincidence = input.coincidence ?? 0;
  const demandMonths = input.demandMonths ?? MONTHS;
  const interactionFactor = input.interactionFactor ?? 1;
  const kilowattHoursBefore = kilowattHours(existing);
  const kilowattHoursAfter = kilowattHours(proposed);
  const kilowattHoursSaved = kilowattHoursBefore - kilowattHoursAfter;
  const netKilowattHoursSaved = kilowattHoursSaved * interactionFactor;
  const connectedWattsBefore = connectedWatts(existing);
  const connectedWattsAfter = connectedWatts(proposed);
  const demandKilowattsSaved = (connectedWattsBefore - connectedWattsAfter) / 1000;
  const energyCostSaved = netKilowattHoursSaved * energyRate;
  const demandCostSaved = demandKilowattsSaved * coincidence * (input.demandRate ?? 0) * demandMonths;
  const fuelCostAdded = kilowattHoursSaved * (input.fuelPenaltyPerKilowattHour ?? 0);
  const factor = input.kgCo2PerKilowattHour;
  const result: EnergySaving = {
    kilowattHoursBefore,
    kilowattHoursAfter,
    kilowattHoursSaved,
    netKilowattHoursSaved,
    demandKilowattsSaved,
    costSaved: energyCostSaved + demandCostSaved - fuelCostAdded,
    kgCo2Saved: factor === undefined ? null : netKilowattHoursSaved * factor,
    energyCostSaved,
    demandCostSaved,
    fuelCostAdded,
    connectedWattsBefore,
    connectedWattsAfter,
  };
  return { input, coincidence, demandMonths, interactionFactor, result };
}

export const energySavingCalculation = defineCalculation({
  name: 'energy-saving',
  summary: 'Energy, demand, money and carbon that new lighting and its controls save in a year',
  bench: false,
  schema,
  calculate: (input): Outcome<EnergySaving> => {
    const saving = energySaving(input);
    return { result: saving.result, findings: findingsOf(saving), working: workingOf(saving) };
  },
});
