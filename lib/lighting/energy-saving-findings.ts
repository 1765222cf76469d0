/** What a reader of an energy saving must know. */
import { atLeast, atMost, type Finding } from '@/lib/engine/contract';
import { caution, note } from '@/lib/engine/finding';
import type { EnergySavingInput, Saving } from './energy-saving';

const PRACTICE = 'common practice';
const BPA = 'HVAC Interactive Effects, Bonneville Power Administration, 2012, read in a copy';
const FEMP =
  'Wireless Occupancy Sensors for Lighting Controls, US DOE FEMP/PNNL, 2016, read in a copy (corridors save up to 80 %)';
const TARIFFS = 'The Energy Wiz: Projection Inspection, Engineered Systems, read in a copy';

/** The most that the applications guide names for a room that every job has: 80 % saved. */
const LEAST_CONTROL_FACTOR = 0.2;
/** Hours that differ by less are the rounding of a weekly pattern. */
const SAME_HOURS = 0.01;

function ofTheRates({ input, coincidence, result }: Saving): Finding[] {
  const { demandRate, demandSharePct, energyRate } = input;
  const found: Finding[] = [];
  if (demandRate !== undefined && input.coincidence === undefined)
    found.push(
      note(
        'energy-peak-not-counted',
        'No demand saving is counted: whether the lights burn during the billed peak is not given.',
        { demandKilowattsSaved: result.demandKilowattsSaved },
        PRACTICE,
      ),
    );
  if (!input.rateIsBlended) return found;
  const billedKilowatts = result.demandKilowattsSaved * coincidence;
  if (billedKilowatts <= 0) {
    const kept = demandSharePct === undefined ? null : 1 - demandSharePct / 100;
    found.push(
      caution(
        'energy-rate-blended',
        'The energy rate holds demand charges, and the peak is not cut: the saving is overstated.',
        {
          energyRate,
          rateWithoutDemand: kept === null ? null : energyRate * kept,
          overstatedPct: kept === null ? null : (1 / kept - 1) * 100,
        },
        TARIFFS,
      ),
    );
  } else if (result.demandCostSaved > 0)
    found.push(
      caution(
        'energy-demand-counted-twice',
        'The energy rate holds demand charges already, and a demand saving is added to it.',
        { energyRate, billedKilowatts },
        PRACTICE,
      ),
    );
  return found;
}

function ofTheBuilding({ input, interactionFactor }: Saving): Finding[] {
  if (input.interactionFactor === undefined)
    return [
      note(
        'energy-interaction-not-counted',
        'What the lights add to cooling and spare in heating is not counted.',
        {},
        BPA,
      ),
    ];
  if (!atMost(interactionFactor, 1) && input.fuelPenaltyPerKilowattHour === undefined)
    return [
      note(
        'energy-fuel-not-counted',
        'Cooling saved is counted; the heating fuel that takes the place of the lights’ heat is not.',
        { interactionFactor },
        BPA,
      ),
    ];
  return [];
}

/** Mean hours of the connected load; null without a load. */
const meanHours = (lines: EnergySavingInput['existing'], watts: number): number | null =>
  watts === 0
    ? null
    : lines.reduce((total, line) => total + line.quantity * line.watts * line.hoursPerYear, 0) / watts;

function ofTheLines({ input, result }: Saving): Finding[] {
  const found: Finding[] = [];
  const { existing, proposed } = input;
  if (result.kilowattHoursSaved < 0)
    found.push(
      caution(
        'energy-grows',
        'The new lighting uses more energy than the old.',
        {
          kilowattHoursBefore: result.kilowattHoursBefore,
          kilowattHoursAfter: result.kilowattHoursAfter,
        },
        PRACTICE,
      ),
    );
  const least = proposed.reduce((low, { controlFactor }) => Math.min(low, controlFactor), 1);
  if (!atLeast(least, LEAST_CONTROL_FACTOR))
    found.push(
      caution(
        'energy-control-saving-unlikely',
        'New controls are taken to save more than has been measured.',
        { savedPct: (1 - least) * 100, mostPct: (1 - LEAST_CONTROL_FACTOR) * 100 },
        FEMP,
      ),
    );
  const before = meanHours(existing, result.connectedWattsBefore);
  const after = meanHours(proposed, result.connectedWattsAfter);
  if (before !== null && after !== null && !atMost(Math.abs(after - before), SAME_HOURS * before))
    found.push(
      note(
        'energy-hours-differ',
        'The new lights are taken for other hours than the old ones.',
        { hoursBefore: before, hoursAfter: after },
        PRACTICE,
      ),
    );
  return found;
}

export const findingsOf = (saving: Saving): Finding[] => [
  ...ofTheLines(saving),
  ...ofTheRates(saving),
  ...ofTheBuilding(saving),
];
