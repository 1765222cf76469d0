/** From change lines, hours and assumptions to what the job saves. Pure: the engine's two calculations do the figuring. */
import type { Answer } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { type EnergySaving, energySavingCalculation } from '@/lib/lighting/energy-saving';
import { type Payback, paybackCalculation } from '@/lib/lighting/payback';
import type { Assumptions } from './schema';

export interface SavingLine {
  area: string;
  /** Null where the area's hours are not known: the line is left out, and said. */
  hoursPerYear: number | null;
  oldQuantity: number;
  oldWatts: number;
  newQuantity: number;
  newWatts: number;
}

export interface AreaSaving {
  area: string;
  kilowattHoursBefore: number;
  kilowattHoursAfter: number;
}

export interface Figured {
  energy: Answer<EnergySaving>;
  /** Null without a cost or a rate. */
  payback: Answer<Payback> | null;
  areas: AreaSaving[];
  /** Areas whose hours are not known. */
  leftOut: string[];
}

const known = <K extends string>(key: K, value: number | null, factor = 1) =>
  value === null ? {} : ({ [key]: value * factor } as Record<K, number>);

function energyOf(lines: readonly SavingLine[], a: Assumptions): Answer<EnergySaving> {
  const [before, after] = [a.existingControlPct.value, a.newControlPct.value];
  const hours = (line: SavingLine) => line.hoursPerYear ?? 0;
  return runCalculation(energySavingCalculation, {
    existing: lines.map((line) => ({
      quantity: Math.round(line.oldQuantity),
      watts: line.oldWatts,
      hoursPerYear: hours(line),
      controlFactor: (before ?? 100) / 100,
    })),
    proposed: lines.map((line) => ({
      quantity: Math.round(line.newQuantity),
      watts: line.newWatts,
      hoursPerYear: hours(line),
      controlFactor: (after ?? before ?? 100) / 100,
    })),
    energyRate: a.energyRate.value ?? 0,
    rateIsBlended: a.rateIsBlended,
    ...known('demandRate', a.demandRate.value),
    ...known('demandMonths', a.demandMonths.value),
    ...known('coincidence', a.coincidencePct.value, 0.01),
    ...known('interactionFactor', a.interactionPct.value, 0.01),
    ...known('fuelPenaltyPerKilowattHour', a.fuelPenalty.value),
    ...known('kgCo2PerKilowattHour', a.kgCo2.value),
  });
}

/** @param quoted the quote's total before tax, in currency units; null where there is no quote */
export function figureSaving(all: readonly SavingLine[], a: Assumptions, quoted: number | null): Figured {
  const lines = all.filter((line) => line.hoursPerYear !== null);
  const energy = energyOf(lines, a);
  const cost = a.cost.value ?? quoted;
  const payback =
    cost === null || a.energyRate.value === null
      ? null
      : runCalculation(paybackCalculation, {
          cost,
          incentive: a.incentive.value ?? 0,
          annualSaving: energy.result.costSaved,
          ...known('annualMaintenanceSaving', a.maintenance.value),
          ...known('escalationPct', a.escalationPct.value),
          discountPct: a.discountPct.value ?? 0,
          years: a.years.value ?? 10,
        });
  const areas = [...new Set(lines.map(({ area }) => area))].map((area): AreaSaving => {
    const { kilowattHoursBefore, kilowattHoursAfter } = energyOf(
      lines.filter((line) => line.area === area),
      a,
    ).result;
    return { area, kilowattHoursBefore, kilowattHoursAfter };
  });
  const leftOut = [...new Set(all.filter((line) => line.hoursPerYear === null).map(({ area }) => area))];
  return { energy, payback, areas, leftOut };
}
