/** 20. Whether the job pays: payback, net present value, rate of return, savings to investment. */
import * as z from 'zod/mini';
import { atMost, defineCalculation, type Outcome } from '@/lib/engine/contract';
import { notNegative } from '@/lib/sizing/inputs';
import { findingsOf } from './payback-findings';
import { internalRate, netPresentValue } from './payback-rate';
import { workingOf } from './payback-working';

const schema = z.strictObject({
  /** All in currency units. The whole job, before the incentive. */
  cost: notNegative,
  incentive: notNegative,
  /** Of the first year: energy and demand. Below zero where the new lighting costs more to run. */
  annualSaving: z.number(),
  /** Relamping and access spared, the same every year. */
  annualMaintenanceSaving: z.optional(z.number()),
  /** By how much annualSaving grows from each year to the next; 0 unless given. */
  escalationPct: z.optional(
    z.number().check(z.minimum(-50, 'must be at least -50'), z.maximum(100, 'must be at most 100')),
  ),
  discountPct: z.number().check(z.nonnegative('must not be negative'), z.maximum(100, 'must be at most 100')),
  years: z
    .number()
    .check(
      z.int('must be a whole number'),
      z.minimum(1, 'must be at least 1'),
      z.maximum(100, 'must be at most 100'),
    ),
  /** The most of the cost that the incentive's programme pays. */
  incentiveCapPct: z.optional(
    z.number().check(z.nonnegative('must not be negative'), z.maximum(100, 'must be at most 100')),
  ),
});

export type PaybackInput = z.infer<typeof schema>;

export interface Payback {
  /** Net cost over the first year's saving; 0 where the incentive covers the cost, null without a saving. */
  simplePaybackYears: number | null;
  netPresentValue: number;
  /** Percent a year; null where no single rate makes the flows worth nothing. */
  internalRatePct: number | null;
  /** Present value of all savings over the net cost; null without a net cost. */
  savingsToInvestmentRatio: number | null;
  incentiveAllowed: number;
  netCost: number;
  /** Years until the discounted savings have paid the net cost, on a line within the year; null if never. */
  discountedPaybackYears: number | null;
  /** Year 0, then one for each year's end. */
  cashFlows: number[];
}

/** A payback with what its findings and working read. */
export interface Paid {
  input: PaybackInput;
  firstYear: number;
  presentSavings: number;
  result: Payback;
}

function discountedPayback(netCost: number, savings: readonly number[], rate: number): number | null {
  if (netCost <= 0) return 0;
  let owed = netCost;
  let factor = 1;
  for (const [year, saving] of savings.entries()) {
    factor /= 1 + rate;
    const worth = saving * factor;
    if (worth >= owed) return year + owed / worth;
    owed -= worth;
  }
  return null;
}

/**
 * Net cost at year 0; at the end of year k a saving of annualSaving * (1 + escalation)^(k - 1) +
 * annualMaintenanceSaving: the first year is not escalated, maintenance never.
 * @param input money in currency units, percentages a year, whole years 1 to 100
 * @returns years, currency units, percent; nulls as each key says, never Infinity
 * @throws {EngineError} `invalid-input`
 * Source: NIST Handbook 135 and ASTM E917 for present values and the ratio (from memory); escalation from the second
 * year on is a convention that the reader is told.
 */
export function payback(input: PaybackInput): Paid {
  const { cost, incentive, annualSaving, discountPct, years } = input;
  const maintenance = input.annualMaintenanceSaving ?? 0;
  const growth = 1 + (input.escalationPct ?? 0) / 100;
  const most = input.incentiveCapPct === undefined ? incentive : (cost * input.incentiveCapPct) / 100;
  const incentiveAllowed = Math.min(incentive, most);
  // Equal but for the last bits is equal: no rate of return on a rounding error.
  const paysNothing = atMost(cost, incentiveAllowed);
  const netCost = paysNothing ? Math.min(0, cost - incentiveAllowed) : cost - incentiveAllowed;
  const savings = Array.from({ length: years }, (_, k) => annualSaving * growth ** k + maintenance);
  const firstYear = annualSaving + maintenance;
  const cashFlows = [0 - netCost, ...savings];
  const rate = discountPct / 100;
  const presentSavings = netPresentValue(rate, [0, ...savings]);
  const simple = firstYear > 0 ? netCost / firstYear : null;
  const internal = paysNothing ? null : internalRate(cashFlows);
  const result: Payback = {
    simplePaybackYears: paysNothing ? 0 : simple,
    netPresentValue: presentSavings - netCost,
    internalRatePct: internal === null ? null : internal * 100,
    savingsToInvestmentRatio: paysNothing ? null : presentSavings / netCost,
    incentiveAllowed,
    netCost,
    discountedPaybackYears: discountedPayback(netCost, savings, rate),
    cashFlows,
  };
  return { input, firstYear, presentSavings, result };
}

export const paybackCalculation = defineCalculation({
  name: 'payback',
  summary: 'Simple payback, net present value, internal rate and savings to investment of a job',
  bench: false,
  schema,
  calculate: (input): Outcome<Payback> => {
    const paid = payback(input);
    return { result: paid.result, findings: findingsOf(paid), working: workingOf(paid) };
  },
});
