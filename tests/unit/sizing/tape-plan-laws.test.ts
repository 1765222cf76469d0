/** Laws of tape-plan over random jobs; a failure prints fast-check's seed. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { conductorResistance } from '@/lib/sizing/conductor-resistance';
import { tapeAnalysis } from '@/lib/sizing/tape-analysis';
import { type TapePlan, tapePlanCalculation } from '@/lib/sizing/tape-plan';
import type { TapePlanInput } from '@/lib/sizing/tape-plan-input';
import { randomJob } from '../../support/tape-plan-jobs';

const MARGIN = 1 + 1e-9;
const plan = (input: TapePlanInput): TapePlan => runCalculation(tapePlanCalculation, input).result;

const anyJob = fc
  .record({
    seed: fc.integer({ min: 0, max: 1_000_000 }),
    runs: fc.integer({ min: 1, max: 5 }),
    model: fc.constantFrom('constant-current' as const, 'resistive' as const, 'led-string' as const),
  })
  .map(({ seed, runs, model }) => randomJob(seed, { runs, model, maxSections: 5 }));

/** Every limit, checked again from what the plan says alone. */
function checkPlan(input: TapePlanInput, { runs, drivers }: TapePlan): void {
  const { tape, limits } = input;
  const wattsOf = (drivers ?? []).map(({ outputs }) => outputs.map(() => 0));
  (runs ?? []).forEach(({ sections }, r) => {
    const total = Math.floor((input.runs[r]?.metres ?? 0) / tape.cutMetres + 1e-9);
    expect(sections.reduce((sum, { cuts }) => sum + cuts, 0)).toBe(total);
    for (const section of sections) {
      const { cuts, feed, feederMetres, size, stranding } = section;
      const each = conductorResistance(size, stranding as 'stranded', input.celsius).ohmsPerMetre;
      const ats = { start: [0], end: [cuts], middle: [Math.floor(cuts / 2)], both: [0, cuts] }[feed];
      expect(ats).toHaveLength(feederMetres.length);
      const feeds = ats.map((at, i) => {
        const ohms = (feederMetres[i] ?? 0) * each;
        return { at, volts: tape.volts, positiveOhms: ohms, negativeOhms: ohms };
      });
      const { cutMetres, railOhmsPerMetre, load } = tape;
      const found = tapeAnalysis({ cuts, cutMetres, railOhmsPerMetre, load, feeds });
      expect(found.worstDropPct).toBeLessThanOrEqual(limits.maxDropPct * MARGIN);
      expect((found.dimmestPct ?? 100) * MARGIN).toBeGreaterThanOrEqual(limits.minDimmestPct);
      expect(section.worstDropPct).toBeCloseTo(found.worstDropPct, 9);
      expect(section.watts).toBeCloseTo(found.totalWatts, 9);
      const own = wattsOf[section.driver];
      if (own) own[section.output] = (own[section.output] ?? NaN) + found.totalWatts;
    }
  });
  wattsOf.forEach((outputs, d) => {
    const offered = input.drivers.find(({ sku }) => sku === drivers?.[d]?.sku);
    expect(outputs.length).toBeLessThanOrEqual(offered?.channels ?? 0);
    for (const watts of outputs)
      expect(watts).toBeLessThanOrEqual(limits.loadFraction * (offered?.channelWatts ?? 0) * MARGIN);
    // Class 2 over 20 V: 100 W.
    if (offered?.classLimited) for (const watts of outputs) expect(watts).toBeLessThanOrEqual(100 * MARGIN);
  });
}

describe('laws', () => {
  it('no plan breaks a limit', () => {
    let planned = 0;
    fc.assert(
      fc.property(anyJob, (input) => {
        const result = plan(input);
        if (result.runs) planned++;
        checkPlan(input, result);
      }),
      { numRuns: 60 },
    );
    expect(planned).toBeGreaterThan(30);
  });

  it('the cost adds up from prices, metres and hours, and the bound is met', () => {
    fc.assert(
      fc.property(anyJob, (input) => {
        const { totalCost, runs, drivers, boundPct } = plan(input);
        if (totalCost === null || !runs || !drivers) return;
        const { labour } = input;
        const sections = runs.flatMap((run) => run.sections);
        const metres = (feederMetres: readonly number[]) => feederMetres.reduce((sum, own) => sum + own, 0);
        const cable = sections.reduce((sum, { feederMetres, size }) => {
          const price = input.conductors.find((own) => own.size === size)?.costPerMetre ?? NaN;
          return sum + metres(feederMetres) * (price + labour.hoursPerMetre * labour.ratePerHour);
        }, 0);
        const feeds = sections.reduce((sum, { feederMetres }) => sum + feederMetres.length, 0);
        const bought = drivers.reduce(
          (sum, { sku }) => sum + (input.drivers.find((own) => own.sku === sku)?.cost ?? NaN),
          0,
        );
        const hours = feeds * labour.hoursPerFeed + drivers.length * labour.hoursPerDriver;
        expect(totalCost).toBeCloseTo(bought + cable + hours * labour.ratePerHour, 6);
        expect(boundPct).toBeGreaterThanOrEqual(0);
      }),
      { numRuns: 60 },
    );
  });

  it('one more driver or conductor on offer never makes the plan dearer', () => {
    fc.assert(
      fc.property(anyJob, fc.boolean(), fc.nat(3), (input, driver, which) => {
        const without = driver
          ? { ...input, drivers: input.drivers.filter((_, d) => d !== which || input.drivers.length === 1) }
          : { ...input, conductors: input.conductors.filter((_, c) => c !== which) };
        const [fewer, all] = [plan(without), plan(input)];
        // Only what was searched to the end is known to be the cheapest.
        fc.pre(all.boundPct === 0 || all.boundPct === null);
        expect(all.totalCost ?? Infinity).toBeLessThanOrEqual((fewer.totalCost ?? Infinity) * MARGIN);
      }),
      { numRuns: 40 },
    );
  });

  it('a pinned choice stays, and costs no less than a free one', () => {
    fc.assert(
      fc.property(anyJob, (input) => {
        const free = plan(input);
        fc.pre(free.boundPct === 0);
        const [first, ...rest] = input.runs;
        const section = free.runs?.[0]?.sections[0];
        if (!first || !section) return;
        const pinned = { sections: free.runs?.[0]?.sections.length ?? 1, feed: 'both' as const };
        const again = plan({ ...input, runs: [{ ...first, pinned }, ...rest] });
        expect(again.totalCost ?? Infinity).toBeGreaterThanOrEqual((free.totalCost ?? 0) / MARGIN);
        for (const own of again.runs?.[0]?.sections ?? []) expect(own.feed).toBe('both');
      }),
      { numRuns: 30 },
    );
  });
});
