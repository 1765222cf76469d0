/**
 * tape-plan against an exact mixed-integer program (HiGHS, a general solver) over the same choices, and its class
 * limits against figures as read (data/05-class2.json and data/elv-limits.json name each source). The seed of a job is in its test's name.
 */
import { beforeAll, describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { classTwoAmps, wiringOf } from '@/lib/sizing/class-limits';
import { tapePlanCalculation } from '@/lib/sizing/tape-plan';
import { randomJob } from '../support/tape-plan-jobs';
import { judge } from '../support/tape-plan-milp';
import classTwo from './data/05-class2.json';
import elv from './data/elv-limits.json';

interface Entry {
  id: string;
  inputs: { V?: number };
  expected: Record<string, number>;
  tolerance: number;
}
const entries = [...classTwo, ...elv] as unknown as Entry[];
const one = (id: string): Entry => {
  const found = entries.find((entry) => entry.id === id);
  if (!found) throw new Error(id);
  return found;
};
const at = (entry: Entry, key: string): number => entry.expected[key] ?? NaN;

describe('against HiGHS', () => {
  let ask: Awaited<ReturnType<typeof judge>>;
  beforeAll(async () => {
    ask = await judge();
  });

  const seeds = Array.from({ length: 36 }, (_, seed) => seed);
  it.each(seeds)('job of seed %i: never dearer, and as cheap as what is proven', (seed) => {
    const model = seed % 2 === 0 ? 'resistive' : 'constant-current';
    const job = randomJob(seed, { runs: 1 + (seed % 9), model, cutMetres: [0.5], maxSections: 3 });
    const { result } = runCalculation(tapePlanCalculation, job);
    const judged = ask(job);
    const cost = result.totalCost ?? Infinity;
    expect(cost).toBeLessThanOrEqual(judged.cost * (1 + 1e-7));
    // Cheaper than the proven best would mean that a limit or a cost is not the same on both sides.
    if (judged.proven) expect(cost).toBeGreaterThanOrEqual(judged.cost * (1 - 1e-7));
    if (cost < Infinity) expect(result.boundPct).toBe(0);
  });
});

describe('class limits', () => {
  it.each([12, 15, 24, 36, 48, 60])('class2-at-%iV', (volts) => {
    const entry = one(`class2-at-${volts}V`);
    const amps = classTwoAmps({ volts, wet: false }) ?? NaN;
    expect(Math.abs(amps - at(entry, 'max_A'))).toBeLessThanOrEqual(entry.tolerance);
    expect(amps * volts).toBeCloseTo(at(entry, 'max_VA'), 3);
  });

  it('ul1310: to 60 V dry, 30 V wet', () => {
    const limits = one('ul1310');
    const [dry, wet] = [at(limits, 'dry_V'), at(limits, 'wet_V')];
    expect(classTwoAmps({ volts: dry, wet: false })).not.toBeNull();
    expect(classTwoAmps({ volts: dry + 1, wet: false })).toBeNull();
    expect(classTwoAmps({ volts: wet, wet: true })).not.toBeNull();
    expect(classTwoAmps({ volts: wet + 1, wet: true })).toBeNull();
  });

  it('nec411-2023: 25 A, 60 V DC, 30 V DC in wet places; else Chapter 3', () => {
    const limits = one('nec411-2023');
    const [amps, dry, wet] = [
      at(limits, 'output_circuit_max_A'),
      at(limits, 'max_dc_V'),
      at(limits, 'wet_dc_V'),
    ];
    const wiring = (volts: number, own: number, isWet = false) =>
      wiringOf(
        { basis: 'us', volts, wet: isWet, insulated: true },
        { amps: own, classLimited: false, selv: false },
      );
    expect(wiring(dry, amps)).toBe('article-411');
    expect(wiring(dry, amps + 0.1)).toBe('chapter-3');
    expect(wiring(dry + 1, 1)).toBe('chapter-3');
    expect(wiring(wet, 1, true)).toBe('article-411');
    expect(wiring(wet + 1, 1, true)).toBe('chapter-3');
  });

  it('iec61140-elv and iec60598: SELV to 120 V DC; bare parts 60 V, other than dry 30 V', () => {
    const selv = (volts: number, wet: boolean, insulated: boolean) =>
      wiringOf({ basis: 'iec', volts, wet, insulated }, { amps: 1, classLimited: false, selv: true });
    const whole = at(one('iec61140-elv'), 'dc_V');
    const bare = at(one('iec60598'), 'ordinary_load_dc_V');
    const wet = at(one('iec60598'), 'other_than_ordinary_dc_V');
    expect([selv(whole, true, true), selv(whole + 1, false, true)]).toEqual(['selv', null]);
    expect([selv(bare, false, false), selv(bare + 1, false, false)]).toEqual(['selv', null]);
    expect([selv(wet, true, false), selv(wet + 1, true, false)]).toEqual(['selv', null]);
  });
});
