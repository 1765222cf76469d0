/**
 * Energy, demand and carbon against printed examples (data/lighting/energy.json: source and provenance beside each),
 * and the tables of defaults against their sources.
 */
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { energySavingCalculation, type EnergySavingInput } from '@/lib/lighting/energy-saving';
import { CARBON_FACTORS, KG_PER_POUND } from '@/lib/lighting/tables/carbon';
import { INTERACTION } from '@/lib/lighting/tables/interaction';
import { CONTROL_FACTORS } from '@/lib/lighting/tables/operation';
import entries from './data/lighting/energy.json';

const figures = (id: string) => {
  const found = entries.find((one) => one.id === id);
  if (!found) throw new Error(`no entry ${id}`);
  return { ...found.inputs, ...found.expected } as unknown as Record<string, number>;
};
const line = (quantity: number, watts: number, hoursPerYear: number, controlFactor = 1) => ({
  quantity,
  watts,
  hoursPerYear,
  controlFactor,
});
const run = (input: Partial<EnergySavingInput>) =>
  runCalculation(energySavingCalculation, { existing: [], proposed: [], energyRate: 0, ...input });
const within = (got: number | null, want: number | undefined, tolerance: number) =>
  expect(Math.abs((got ?? NaN) - (want ?? NaN)), `${got} against ${want}`).toBeLessThanOrEqual(tolerance);
const building = (name: string) => {
  const found = INTERACTION.find((one) => one.building === name);
  if (!found) throw new Error(`no building ${name}`);
  return found;
};

describe('printed examples', () => {
  it('EN-01: ten high bays of 456 W', () => {
    const { qty = NaN, watts = NaN, hours = NaN, rate = NaN, kWh, cost } = figures('EN-01');
    const { result } = run({ existing: [line(qty, watts, hours)], energyRate: rate });
    within(result.kilowattHoursBefore, kWh, 1e-9);
    within(result.costSaved, cost, 1e-9);
  });

  it('EN-02: 226 W for ten hours', () => {
    const { watts = NaN, hours_per_day = NaN, rate = NaN, kWh_per_day, cost_per_day } = figures('EN-02');
    const { result } = run({ existing: [line(1, watts, hours_per_day)], energyRate: rate });
    within(result.kilowattHoursSaved, kWh_per_day, 1e-12);
    within(result.costSaved, cost_per_day, 1e-12);
  });

  it('EN-03: parking lot lights, with and without a demand saving', () => {
    const of = figures('EN-03');
    const lights = [line(of.qty ?? NaN, of.watt_reduction_each ?? NaN, of.hours ?? NaN)];
    const rates = { existing: lights, energyRate: of.rate_kWh ?? NaN, demandRate: of.rate_kW ?? NaN };
    const night = run(rates).result;
    within(night.demandKilowattsSaved, of.kW, 1e-9);
    within(night.kilowattHoursSaved, of.kWh, 1e-9);
    within(night.costSaved, of.energy_saving, 0.01);
    const peak = run({ ...rates, coincidence: 1 }).result;
    within(peak.demandCostSaved, of.demand_saving_if_coincident, 0.01);
    within(peak.costSaved, (of.energy_saving ?? NaN) + (of.demand_saving_if_coincident ?? NaN), 0.01);
  });

  it('EN-04: a blended rate where the peak is not cut overstates by two thirds', () => {
    const {
      avg_rate = NaN,
      demand_share = NaN,
      rate_without_demand,
      overstatement_percent,
    } = figures('EN-04');
    const { findings } = run({
      existing: [line(1, 100, 1000)],
      energyRate: avg_rate,
      rateIsBlended: true,
      demandSharePct: demand_share * 100,
    });
    const values = findings.find(({ code }) => code === 'energy-rate-blended')?.values;
    within(values?.rateWithoutDemand as number, rate_without_demand, 1e-12);
    within(values?.overstatedPct as number, overstatement_percent, 0.1);
  });

  it.each([
    ['EN-05', 'Office 20,000-100,000 sf', 'fuel'],
    ['EN-06', 'Retail 5,000-50,000 sf', 'electricResistance'],
    ['EN-13', 'Warehouse', 'electricResistance'],
  ] as const)('%s: %s, heated by %s', (id, name, heating) => {
    const { lighting_kWh_saved = NaN, net_kWh, gas_therms } = figures(id);
    const table = building(name);
    const { result } = run({
      existing: [line(1, lighting_kWh_saved, 1000)],
      interactionFactor: table[heating],
      // At one currency unit a therm the fuel's cost is its therms.
      fuelPenaltyPerKilowattHour: heating === 'fuel' ? table.thermsPerKilowattHour : 0,
    });
    within(result.netKilowattHoursSaved, net_kWh, 0.01);
    if (gas_therms !== undefined) within(result.fuelCostAdded, -gas_therms, 0.01);
  });

  it('EN-07: the control factor counts on the proposed watts, never on the baseline', () => {
    const of = figures('EN-07');
    const hours = of.hours ?? NaN;
    const { result } = run({
      existing: [line(of.qty ?? NaN, of.existing_W ?? NaN, hours)],
      proposed: [line(of.qty ?? NaN, of.proposed_W ?? NaN, hours, 1 - (of.control_savings_fraction ?? NaN))],
      interactionFactor: of.interaction_factor,
      energyRate: of.rate ?? NaN,
    });
    within(result.kilowattHoursBefore, of.baseline_kWh, 0.01);
    within(result.kilowattHoursAfter, of.proposed_kWh, 0.01);
    within(result.kilowattHoursSaved, of.lighting_kWh_saved, 0.01);
    within(result.netKilowattHoursSaved, of.net_kWh, 0.01);
    within(result.costSaved, of.cost_saving, 0.01);
  });

  it('EN-08 (from memory, beside EN-03): coincidence on the kW saved', () => {
    const of = figures('EN-08');
    const { result } = run({
      existing: [line(1, (of.kW_reduction ?? NaN) * 1000, 0)],
      demandRate: of.rate_kW,
      coincidence: of.coincidence_factor,
      demandMonths: of.months,
    });
    within(result.costSaved, of.saving, 0.01);
  });

  it('EN-09 and EN-10: carbon by the grid’s factor', () => {
    const uk = figures('EN-09');
    const factor = CARBON_FACTORS.find(
      ({ area, year }) => area === 'UK' && year === 2024,
    )?.kgCo2PerKilowattHour;
    const kg = (kilowattHours: number, kgCo2PerKilowattHour: number | undefined) =>
      run({ existing: [line(1, kilowattHours, 1000)], kgCo2PerKilowattHour }).result.kgCo2Saved;
    within(kg(uk.kWh ?? NaN, factor), uk.kgCO2e, 1e-6);
    const us = figures('EN-10');
    const average = CARBON_FACTORS.find(({ area, year }) => area === 'US average' && year === 2022);
    within(kg(us.kWh ?? NaN, average?.kgCo2PerKilowattHour), us.kgCO2, 0.1);
    within((kg(us.kWh ?? NaN, average?.kgCo2PerKilowattHour) ?? NaN) / KG_PER_POUND, us.lbCO2, 0.1);
  });

  it.each([
    ['EN-11', 'Occupancy sensor, breakroom', 'uncontrolled_kWh', 'saved_kWh'],
    ['EN-12', 'Occupancy sensor, any room', 'controlled_W', 'saved_W'],
  ])('%s: what %s leaves', (id, use, before, saved) => {
    const of = figures(id);
    const want = of[saved] ?? (of.controlled_W ?? NaN) - (of.adjusted_W ?? NaN);
    const factor = CONTROL_FACTORS.find((one) => one.use === use)?.value ?? NaN;
    const { result } = run({
      existing: [line(1, of[before] ?? NaN, 1000)],
      proposed: [line(1, of[before] ?? NaN, 1000, factor)],
    });
    within(result.kilowattHoursSaved, want, 1e-9);
  });
});
