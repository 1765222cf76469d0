import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { paybackCalculation, type PaybackInput } from '@/lib/lighting/payback';
import { changesOfSign, internalRate, netPresentValue } from '@/lib/lighting/payback-rate';
import { testSeed } from '../../support/random';

const JOB: PaybackInput = { cost: 10_000, incentive: 1_000, annualSaving: 3_000, discountPct: 5, years: 10 };
const run = (change: Partial<PaybackInput> = {}) => runCalculation(paybackCalculation, { ...JOB, ...change });
const figures = (change: Partial<PaybackInput> = {}) => run(change).result;
const codes = (change: Partial<PaybackInput> = {}) => run(change).findings.map(({ code }) => code);
const path = (change: object) => {
  try {
    runCalculation(paybackCalculation, { ...JOB, ...change });
  } catch (error) {
    if (error instanceof EngineError) return error.issues[0]?.path;
    throw error;
  }
  return null;
};

describe('figures', () => {
  it('the incentive comes off the cost, maintenance counts in the first year', () => {
    expect(figures().simplePaybackYears).toBe(3);
    expect(figures({ annualMaintenanceSaving: 600 }).simplePaybackYears).toBe(2.5);
    expect(figures().cashFlows).toEqual([-9000, ...Array<number>(10).fill(3000)]);
  });

  it('energy savings escalate from the second year on, maintenance does not', () => {
    const { cashFlows } = figures({ escalationPct: 10, annualMaintenanceSaving: 100, years: 3 });
    expect(cashFlows).toEqual([-9000, 3100, expect.closeTo(3400, 9), expect.closeTo(3730, 9)]);
  });

  it('without discount the net present value is the plain sum, and the ratio that of the sums', () => {
    const { netPresentValue: worth, savingsToInvestmentRatio } = figures({ discountPct: 0 });
    expect(worth).toBeCloseTo(21_000, 8);
    expect(savingsToInvestmentRatio).toBeCloseTo(30 / 9, 12);
  });

  it('an incentive that covers the cost: payback 0, no rate, no ratio', () => {
    for (const incentive of [10_000, 12_000])
      expect(figures({ incentive })).toMatchObject({
        simplePaybackYears: 0,
        internalRatePct: null,
        savingsToInvestmentRatio: null,
        discountedPaybackYears: 0,
      });
    expect(figures({ cost: 0.3, incentive: 0.1 + 0.2 }).internalRatePct).toBeNull();
    expect(figures({ cost: 0.1 + 0.2, incentive: 0.3 }).internalRatePct).toBeNull();
  });

  it('no saving, or a loss: no payback and no rate', () => {
    for (const annualSaving of [0, -500])
      expect(figures({ annualSaving })).toMatchObject({
        simplePaybackYears: null,
        internalRatePct: null,
        discountedPaybackYears: null,
      });
    expect(figures({ annualSaving: 0 }).netPresentValue).toBe(-9000);
  });

  it('more than one change of sign: no rate', () => {
    // Energy savings shrink under what maintenance costs.
    const turning = { annualSaving: 3000, escalationPct: -30, annualMaintenanceSaving: -800 };
    expect(changesOfSign(figures(turning).cashFlows)).toBe(2);
    expect(figures(turning).internalRatePct).toBeNull();
    expect(figures(turning).simplePaybackYears).toBeCloseTo(9000 / 2200, 12);
  });

  it('a rate below zero where the years do not bring the cost back, 0 where they just do', () => {
    expect(figures({ years: 2 }).internalRatePct).toBeLessThan(0);
    expect(figures({ years: 2 }).internalRatePct).toBeGreaterThan(-100);
    expect(figures({ years: 3 }).internalRatePct).toBe(0);
    expect(figures({ years: 1, annualSaving: 18_000 }).internalRatePct).toBeCloseTo(100, 9);
  });

  it('the cap of a programme', () => {
    expect(figures({ incentive: 6600, incentiveCapPct: 30 })).toMatchObject({
      incentiveAllowed: 3000,
      netCost: 7000,
    });
    expect(figures({ incentive: 600, incentiveCapPct: 30 }).incentiveAllowed).toBe(600);
  });
});

describe('laws', () => {
  const seed = testSeed();
  const money = (min: number, max: number) => fc.double({ min, max, noNaN: true });
  const jobs = fc.record({
    cost: money(1, 1e6),
    incentive: money(0, 1e5),
    annualSaving: money(0.01, 1e6),
    annualMaintenanceSaving: money(0, 1e5),
    escalationPct: money(-20, 20),
    discountPct: money(0, 30),
    years: fc.integer({ min: 1, max: 40 }),
  });

  it(`at the internal rate the flows are worth nothing; above it less, below it more (seed ${seed})`, () => {
    fc.assert(
      fc.property(jobs, (job) => {
        const { internalRatePct, cashFlows, netCost } = figures(job);
        expect(internalRatePct === null).toBe(netCost <= 0);
        if (internalRatePct === null) return;
        const rate = internalRatePct / 100;
        const size = cashFlows.reduce((sum, flow, k) => sum + Math.abs(flow) / (1 + rate) ** k, 0);
        // Near -100 % the last digits of a percentage are many of what is left of 1 + rate.
        const digits = 1e-9 + (job.years * 1e-15) / (1 + rate);
        expect(Math.abs(netPresentValue(rate, cashFlows))).toBeLessThanOrEqual(digits * size);
        expect(netPresentValue(rate + (1 + rate) * 1e-3, cashFlows)).toBeLessThan(0);
        expect(netPresentValue(rate - (1 + rate) * 1e-3, cashFlows)).toBeGreaterThan(0);
      }),
      { seed, numRuns: 300 },
    );
  });

  it(`money’s unit does not matter, and the ratio says what the net present value says (seed ${seed})`, () => {
    fc.assert(
      fc.property(jobs, (job) => {
        const plain = figures(job);
        const cents = figures({
          ...job,
          cost: job.cost * 128,
          incentive: job.incentive * 128,
          annualSaving: job.annualSaving * 128,
          annualMaintenanceSaving: job.annualMaintenanceSaving * 128,
        });
        expect(cents.simplePaybackYears).toBe(plain.simplePaybackYears);
        expect(cents.internalRatePct).toBe(plain.internalRatePct);
        expect(cents.netPresentValue).toBe(plain.netPresentValue * 128);
        if (plain.savingsToInvestmentRatio !== null && Math.abs(plain.savingsToInvestmentRatio - 1) > 1e-9)
          expect(plain.savingsToInvestmentRatio > 1).toBe(plain.netPresentValue > 0);
      }),
      { seed, numRuns: 300 },
    );
  });

  it(`a discounted payback exists where the net present value is not below zero (seed ${seed})`, () => {
    fc.assert(
      fc.property(jobs, (job) => {
        const { discountedPaybackYears, netPresentValue: worth, netCost, simplePaybackYears } = figures(job);
        if (Math.abs(worth) <= 1e-9 * Math.abs(netCost)) return;
        expect(discountedPaybackYears !== null).toBe(worth > 0);
        if (discountedPaybackYears !== null && job.escalationPct <= 0)
          expect(discountedPaybackYears).toBeGreaterThanOrEqual((simplePaybackYears ?? NaN) * (1 - 1e-9));
      }),
      { seed, numRuns: 300 },
    );
  });

  it('the rate of flows that start with money in, or hold none, is not told', () => {
    expect(internalRate([1000, -500, -600])).toBeNull();
    expect(internalRate([0, 0])).toBeNull();
    expect(internalRate([-5])).toBeNull();
    expect(internalRate([-1e-9, 1e9])).toBeCloseTo(1e18, -4);
    expect(internalRate([-1e9, 1e-9])).toBeCloseTo(-1, 12);
  });
});

describe('findings', () => {
  it.each([
    ['payback-incentive-covers-cost', { incentive: 10_000 }, { incentive: 9_999 }],
    ['payback-incentive-covers-cost', { incentive: 10_001 }, { cost: 0, incentive: 0 }],
    ['payback-no-saving', { annualSaving: 0 }, { annualSaving: 1 }],
    ['payback-beyond-years', { years: 2 }, { years: 3 }],
    ['payback-below-discount', { years: 3 }, { years: 4 }],
    ['payback-first-year-plain', { escalationPct: 3 }, { escalationPct: 0 }],
    ['payback-escalation-over-discount', { escalationPct: 5.1 }, { escalationPct: 5 }],
    ['payback-no-single-rate', { escalationPct: -30, annualMaintenanceSaving: -800 }, { escalationPct: -30 }],
    ['payback-incentive-capped', { incentiveCapPct: 9 }, { incentiveCapPct: 10 }],
  ] as const)('%s', (code, raises, doesNot) => {
    expect(codes(raises)).toContain(code);
    expect(codes(doesNot)).not.toContain(code);
  });
});

describe('refusals', () => {
  it.each([
    ['cost', { cost: -1 }],
    ['incentive', { incentive: -1 }],
    ['discountPct', { discountPct: -0.1 }],
    ['years', { years: 0 }],
    ['years', { years: 2.5 }],
    ['escalationPct', { escalationPct: 101 }],
    ['incentiveCapPct', { incentiveCapPct: 101 }],
  ])('%s', (at, change) => expect(path(change)).toBe(at));
});
