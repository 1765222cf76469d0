/**
 * Payback, net present value and rate of return against worked examples (data/lighting/finance.json: source and
 * provenance beside each) and against the finance package `financial` of the npm registry on 1,000 random jobs.
 */
import { irr, npv } from 'financial';
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { paybackCalculation, type PaybackInput } from '@/lib/lighting/payback';
import { seeded, testSeed } from '../support/random';
import entries from './data/lighting/finance.json';

const figures = (id: string) => {
  const found = entries.find((one) => one.id === id);
  if (!found) throw new Error(`no entry ${id}`);
  return { ...found.inputs, ...found.expected } as unknown as Record<string, number>;
};
/** What an entry does not name stays as it is here. */
type Given = { [K in keyof PaybackInput]?: PaybackInput[K] | undefined };
const result = (input: Given) =>
  runCalculation(paybackCalculation, {
    cost: 0,
    incentive: 0,
    annualSaving: 0,
    discountPct: 0,
    years: 10,
    ...input,
  }).result;
const within = (got: number | null, want: number | undefined, tolerance: number) =>
  expect(Math.abs((got ?? NaN) - (want ?? NaN)), `${got} against ${want}`).toBeLessThanOrEqual(tolerance);
/** One currency unit at the end of each year, worth today. */
const uniform = (rate: number, years: number) =>
  years === 0 ? 0 : result({ annualSaving: 1, discountPct: rate * 100, years }).netPresentValue;
/** One currency unit at the end of the last year alone. */
const single = (rate: number, years: number) => uniform(rate, years) - uniform(rate, years - 1);

describe('worked examples', () => {
  it('FI-01: simple payback', () => {
    const {
      net_cost = NaN,
      annual_saving = NaN,
      simple_payback_years,
      five_year_cash_flow,
    } = figures('FI-01');
    const job = { cost: net_cost, annualSaving: annual_saving, years: 5 };
    within(result(job).simplePaybackYears, simple_payback_years, 0.01);
    // The source rounds the payback to 3.1 years first and prints 4275.
    within(result(job).netPresentValue, five_year_cash_flow, 1e-9);
  });

  it.each(['FI-02', 'FI-11'])('%s: equal flows', (id) => {
    const of = figures(id);
    const [first = NaN, saving = NaN, ...rest] = of.cash_flows as unknown as number[];
    const got = result({
      cost: -first,
      annualSaving: saving,
      discountPct: (of.rate ?? NaN) * 100,
      years: rest.length + 1,
    });
    within(got.netPresentValue, of.NPV, 0.01);
    within((got.internalRatePct ?? NaN) / 100, of.IRR, 1e-5);
    if (of.simple_payback_years) within(got.simplePaybackYears, of.simple_payback_years, 1e-9);
    if (of.discounted_payback) within(got.discountedPaybackYears, of.discounted_payback, 0.002);
  });

  it('FI-03: five years simple, just over 15 % a year', () => {
    const of = figures('FI-03');
    const got = result({ cost: of.cost, annualSaving: of.annual_saving, years: of.years });
    within(got.simplePaybackYears, of.simple_payback_years, 1e-9);
    within((got.internalRatePct ?? NaN) / 100, of.IRR, 1e-5);
  });

  it.each(['FI-04', 'FI-05', 'FI-06'])('%s: present values of one and of many years', (id) => {
    const { discount_rate = NaN, years = NaN, SPV, UPV } = figures(id);
    within(uniform(discount_rate, years), UPV, 0.0001);
    within(single(discount_rate, years), SPV, 0.0001);
  });

  it('FI-07, FI-08, FI-09: printed factor tables', () => {
    const compound = figures('FI-07');
    within(1 / single(compound.rate ?? NaN, compound.n ?? NaN), compound.compound_factor, 0.0001);
    const { rate_per_period = NaN, n = NaN, P_over_A, F_over_P, A_over_P } = figures('FI-08');
    within(uniform(rate_per_period, n), P_over_A, 0.001);
    within(1 / single(rate_per_period, n), F_over_P, 0.0001);
    within(1 / uniform(rate_per_period, n), A_over_P, 0.0001);
    const future = figures('FI-09');
    const [rate = NaN, years = NaN] = [future.rate, future.n];
    within(uniform(rate, years) / single(rate, years), future.FV_annuity, 0.001);
  });

  it('FI-10: savings to investment', () => {
    const of = figures('FI-10');
    // The residual value comes off the investment: its present value is the source's.
    const got = result({
      cost: of.PV_investment,
      annualSaving: of.annual_energy_saving,
      annualMaintenanceSaving: of.annual_OM_saving,
      discountPct: (of.discount_rate ?? NaN) * 100,
      years: of.years,
    });
    within(got.netPresentValue, of.net_savings, 0.02);
    within(got.netPresentValue + got.netCost, of.PV_savings, 0.01);
    within(got.savingsToInvestmentRatio, of.SIR, 0.0001);
  });

  it('FI-12: a present value with escalation; its first payment is escalated already', () => {
    const { annual = NaN, discount = NaN, escalation = NaN, years, UPV_star = NaN } = figures('FI-12');
    const got = result({
      annualSaving: annual * (1 + escalation),
      escalationPct: escalation * 100,
      discountPct: discount * 100,
      years,
    });
    within(got.netPresentValue / annual, UPV_star, 0.0001);
  });

  it('FI-13: no saving is no payback, neither 0 nor Infinity', () => {
    const { cost, annual_saving: annualSaving } = figures('FI-13');
    expect(result({ cost, annualSaving })).toMatchObject({ simplePaybackYears: null, internalRatePct: null });
  });

  it('FI-14: an incentive under the cap of its programme', () => {
    const of = figures('FI-14');
    const got = result({
      cost: of.gross_cost,
      incentive: of.rebate_requested,
      incentiveCapPct: (of.rebate_cap_fraction ?? NaN) * 100,
    });
    expect(got).toMatchObject({ incentiveAllowed: of.rebate_allowed, netCost: of.net_cost });
  });

  it('FI-15: escalation from the second year on', () => {
    const of = figures('FI-15');
    const got = result({
      cost: of.cost,
      annualSaving: of.saving_year1,
      escalationPct: (of.escalation ?? NaN) * 100,
      discountPct: (of.rate ?? NaN) * 100,
      years: of.years,
    });
    within(got.netPresentValue, of.NPV, 0.01);
    within((got.internalRatePct ?? NaN) / 100, of.IRR, 1e-5);
  });

  it('FI-16: relamping that is spared', () => {
    const of = figures('FI-16');
    const lamps = of.lamps ?? NaN;
    within(
      result({
        cost: lamps * (of.led_installed_each ?? NaN),
        annualSaving: of.annual_energy_saving,
        annualMaintenanceSaving: of.annual_relamp_saving,
      }).simplePaybackYears,
      of.simple_payback_years,
      0.001,
    );
  });

  it('FI-17: the option that pays back sooner is not the one that is worth more', () => {
    const of = figures('FI-17');
    const rates = { discountPct: (of.rate ?? NaN) * 100, years: of.years };
    const [costA = NaN, costB = NaN, savingA = NaN, savingB = NaN] = [
      of.investment_A,
      of.investment_B,
      of.saving_A,
      of.saving_B,
    ];
    const a = result({ cost: costA, annualSaving: savingA, ...rates });
    const b = result({ cost: costB, annualSaving: savingB, ...rates });
    within(a.netPresentValue, of.NPV_A, 0.01);
    within(b.netPresentValue, of.NPV_B, 0.01);
    expect(a.simplePaybackYears).toBeLessThan(b.simplePaybackYears ?? NaN);
    const more = result({ cost: costB - costA, annualSaving: savingB - savingA, ...rates });
    within((more.internalRatePct ?? NaN) / 100, of.incremental_IRR, 1e-5);
  });
});

describe('the finance package of the registry', () => {
  const seed = testSeed();
  it(`agrees on net present value and rate for 1,000 random jobs (seed ${seed})`, () => {
    const random = seeded(seed);
    let rates = 0;
    for (let job = 0; job < 1000; job++) {
      const cost = random.decades(100, 1e6);
      const input = {
        cost,
        incentive: cost * random.between(0, 0.9),
        annualSaving: cost * random.decades(0.02, 2),
        annualMaintenanceSaving: cost * random.between(0, 0.1),
        escalationPct: random.between(-5, 8),
        discountPct: random.between(0, 20),
        years: random.whole(1, 30),
      };
      const got = result(input);
      const growth = 1 + input.escalationPct / 100;
      const flows = [
        input.incentive - cost,
        ...Array.from(
          { length: input.years },
          (_, k) => input.annualSaving * growth ** k + input.annualMaintenanceSaving,
        ),
      ];
      const size = flows.reduce((sum, flow) => sum + Math.abs(flow), 0);
      within(got.netPresentValue, npv(input.discountPct / 100, flows), 1e-9 * size);
      // Its Newton search from 10 % can end nowhere (NaN), or below -100 %, where no rate has a meaning.
      const found = [0.1, (got.internalRatePct ?? NaN) / 100 + 0.05].map((guess) => irr(flows, guess, 1e-9));
      const rate = found.find((one) => one > -1);
      if (rate === undefined) continue;
      rates += 1;
      within((got.internalRatePct ?? NaN) / 100, rate, 1e-6 * (1 + Math.abs(rate)));
    }
    expect(rates).toBeGreaterThanOrEqual(990);
  });
});
