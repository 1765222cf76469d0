/** What a job's saving is figured with, as people type it: a figure, and where it comes from. */
import { z } from 'zod';

type Ask = { label: string; unit: string; most: number; least?: number; hint?: string };

/** In the order in which the screen asks; money is in the shop's currency (`unit` "money"). */
export const ASSUMPTIONS = {
  energyRate: { label: 'Energy, a kWh', unit: 'money', most: 100 },
  demandRate: { label: 'Demand, a kW and month', unit: 'money', most: 10_000 },
  demandMonths: { label: 'Months the peak is billed', unit: '', most: 12 },
  coincidencePct: {
    label: 'Of the kW saved, in the billed peak',
    unit: '%',
    most: 100,
    hint: 'Nothing unless it is known: a peak that is not cut saves no demand charge.',
  },
  existingControlPct: { label: 'Energy that today’s controls leave', unit: '%', most: 100 },
  newControlPct: { label: 'Energy that the new controls leave', unit: '%', most: 100 },
  interactionPct: {
    label: 'Net of heating and cooling',
    unit: '%',
    most: 300,
    hint: 'Above 100 where cooling is saved, below where electric heat must make up.',
  },
  fuelPenalty: { label: 'Heating fuel, a lighting kWh saved', unit: 'money', most: 100 },
  kgCo2: { label: 'Carbon, a kWh', unit: 'kg', most: 5 },
  maintenance: { label: 'Relamping and access spared, a year', unit: 'money', most: 1e9 },
  incentive: { label: 'Incentive', unit: 'money', most: 1e9 },
  cost: { label: 'Cost of the work', unit: 'money', most: 1e9, hint: 'Empty: the quote’s total before tax.' },
  escalationPct: { label: 'Energy price rises, a year', unit: '%', most: 100, least: -50 },
  discountPct: { label: 'Discount rate, a year', unit: '%', most: 100 },
  years: { label: 'Years looked at', unit: 'years', most: 50, least: 1 },
} as const satisfies Record<string, Ask>;
export type AssumptionKey = keyof typeof ASSUMPTIONS;
export const ASSUMPTION_KEYS = Object.keys(ASSUMPTIONS) as AssumptionKey[];

export interface Assumption {
  /** Null: not known. */
  value: number | null;
  source: string;
}
export interface Assumptions extends Record<AssumptionKey, Assumption> {
  rateIsBlended: boolean;
}

const figure = (key: AssumptionKey) => {
  const { most, least = 0 }: Ask = ASSUMPTIONS[key];
  return z
    .string()
    .trim()
    .max(40, 'A number.')
    .transform((text, context) => {
      if (text === '') return null;
      const value = Number(text.replace(',', '.'));
      const whole = key !== 'years' || Number.isInteger(value);
      if (/^[-+]?(\d+\.?\d*|\.\d+)$/.test(text.replace(',', '.')) && value >= least && value <= most && whole)
        return value;
      context.addIssue({
        code: 'custom',
        message: `A ${key === 'years' ? 'whole ' : ''}number from ${least} to ${most.toLocaleString('en')}.`,
      });
      return z.NEVER;
    });
};
const assumption = (key: AssumptionKey) =>
  z.object({ value: figure(key), source: z.string().trim().max(300, 'At most 300 characters.') });

export const savingForm = z.object({
  jobId: z.uuid(),
  /** Null where nothing has been saved yet. */
  baseVersion: z.number().int().positive().nullable(),
  rateIsBlended: z.boolean(),
  ...(Object.fromEntries(ASSUMPTION_KEYS.map((key) => [key, assumption(key)])) as Record<
    AssumptionKey,
    ReturnType<typeof assumption>
  >),
});
export type SavingForm = z.input<typeof savingForm>;
export type SavingInput = z.output<typeof savingForm>;
