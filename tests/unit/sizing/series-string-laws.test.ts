/** What holds for every plan of series strings; and that no other set of drivers or split is better, tried one by one. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { seriesStringCalculation, type SeriesStringInput } from '@/lib/sizing/series-string';
import { voltageDrop } from '@/lib/sizing/voltage-drop';

type Driver = SeriesStringInput['drivers'][number];
const base: Omit<SeriesStringInput, 'count' | 'drivers'> = {
  module: {
    forwardVolts: 12,
    forwardVoltsMin: 11.4,
    forwardVoltsMax: 12.6,
    voltsPerKelvin: -0.01,
    maxAmps: 0.5,
  },
  ambientMinCelsius: -10,
  ambientMaxCelsius: 40,
  riseCelsius: 25,
  loadFraction: 0.9,
};
const run = (input: SeriesStringInput) => runCalculation(seriesStringCalculation, input);

const FEEDER = { metres: 40, size: 'AWG 20' };
type Rank = [cost: number, drivers: number, strings: number, squares: number];

/** Every set of drivers with every split of the modules, tried one by one, by the rules on volts, amps and watts themselves. */
function bruteForce(input: SeriesStringInput): Rank | null {
  const { module } = input;
  const c = module.voltsPerKelvin ?? 0;
  const hot = module.forwardVoltsMin + c * (input.ambientMaxCelsius + (input.riseCelsius ?? 0) - 25);
  const cold = module.forwardVoltsMax + c * (input.ambientMinCelsius - 25);
  const drop = ({ amps, maxVolts: volts }: Driver) =>
    input.feeder
      ? voltageDrop({ system: 'dc', volts, amps, ...FEEDER, stranding: 'stranded', celsius: 75 }).dropVolts
      : 0;
  const fits = (driver: Driver, n: number) =>
    n * hot >= driver.minVolts * (1 - 1e-9) && n * cold + drop(driver) <= driver.maxVolts * (1 + 1e-9);
  const watts = (driver: Driver, strings: readonly number[]) =>
    strings.reduce((sum, n) => sum + driver.amps * (n * module.forwardVolts + drop(driver)), 0);
  /** Ways to feed at most `left` modules from one driver, longest string first. */
  const ways = (driver: Driver, left: number): number[][] => {
    const found: number[][] = [];
    const add = (strings: number[], rest: number) => {
      if (strings.length > 0) found.push(strings);
      if (strings.length === (driver.channels ?? 1)) return;
      for (let n = Math.min(rest, strings.at(-1) ?? rest); n >= 1; n--)
        if (fits(driver, n)) add([...strings, n], rest - n);
    };
    add([], left);
    return found.filter(
      (strings) => watts(driver, strings) <= input.loadFraction * driver.maxWatts * (1 + 1e-9),
    );
  };
  let best: Rank | null = null;
  const better = (a: Rank, b: Rank) => {
    const at = a.findIndex((value, k) => value !== b[k]);
    return at >= 0 && (a[at] ?? 0) < (b[at] ?? 0);
  };
  const search = (from: number, left: number, [cost, drivers, strings, squares]: Rank) => {
    const rank: Rank = [cost, drivers, strings, squares];
    if (left === 0 && (best === null || better(rank, best))) best = rank;
    if (left === 0) return;
    for (const [index, driver] of input.drivers.entries()) {
      if (index < from || driver.amps > (module.maxAmps ?? Infinity)) continue;
      for (const way of ways(driver, left))
        search(index, left - way.reduce((a, b) => a + b, 0), [
          cost + driver.cost,
          drivers + 1,
          strings + way.length,
          squares + way.reduce((sum, n) => sum + n * n, 0),
        ]);
    }
  };
  search(0, input.count, [0, 0, 0, 0]);
  return best;
}

const anyDriver = fc.record({
  amps: fc.constantFrom(0.35, 0.5, 0.7),
  minVolts: fc.integer({ min: 0, max: 50 }),
  width: fc.integer({ min: 0, max: 60 }),
  maxWatts: fc.integer({ min: 3, max: 60 }),
  cost: fc.integer({ min: 0, max: 6 }),
  channels: fc.integer({ min: 1, max: 3 }),
});
const anyInput = (most: number) =>
  fc
    .record({
      count: fc.integer({ min: 1, max: most }),
      drivers: fc.array(anyDriver, { minLength: 1, maxLength: 3 }),
      forwardVoltsMax: fc.integer({ min: 12, max: 14 }),
      voltsPerKelvin: fc.constantFrom(0, -0.01, -0.02),
      maxAmps: fc.constantFrom(0.35, 0.5, 1),
      loadFraction: fc.constantFrom(0.8, 1),
      feeder: fc.option(fc.constant(FEEDER), { nil: undefined }),
    })
    .map(({ drivers, forwardVoltsMax, voltsPerKelvin, maxAmps, feeder, ...rest }): SeriesStringInput => ({
      ...base,
      ...rest,
      ...(feeder ? { feeder } : {}),
      module: { ...base.module, forwardVoltsMax, voltsPerKelvin, maxAmps },
      drivers: drivers.map(({ width, ...driver }, index) => ({
        ...driver,
        sku: `driver ${index}`,
        maxVolts: driver.minVolts + width + 1,
      })),
    }));

describe('laws', () => {
  it('no set of drivers and no split is better than the plan, tried one by one', () => {
    let planned = 0;
    fc.assert(
      fc.property(anyInput(9), (input) => {
        const { result } = run(input);
        const best = bruteForce(input);
        if (best !== null) planned++;
        const squares = result.strings.reduce((sum, { modules }) => sum + modules * modules, 0);
        expect(
          result.cost === null ? null : [result.cost, result.drivers.length, result.strings.length, squares],
        ).toEqual(best);
      }),
      { numRuns: 400 },
    );
    expect(planned).toBeGreaterThan(100);
  });

  it('every plan keeps every limit, feeds every module once and adds up', () => {
    fc.assert(
      fc.property(anyInput(60), (input) => {
        const { result, findings } = run(input);
        expect(findings.some(({ severity }) => severity === 'stop')).toBe(result.cost === null);
        if (result.cost === null) return;
        expect(result.strings.reduce((sum, { modules }) => sum + modules, 0)).toBe(input.count);
        for (const string of result.strings) {
          expect(string.hotVolts).toBeGreaterThanOrEqual(string.minVolts * (1 - 1e-9));
          expect(string.coldVolts).toBeLessThanOrEqual(string.maxVolts * (1 + 1e-9));
          expect(string.amps).toBeLessThanOrEqual(input.module.maxAmps ?? Infinity);
        }
        for (const { driver, sku, strings, modules, watts } of result.drivers) {
          const own = result.strings.filter((string) => string.driver === driver);
          const sheet = input.drivers.find((offered) => offered.sku === sku);
          expect(own.map(({ channel }) => channel)).toEqual(own.map((_, index) => index + 1));
          expect(own).toHaveLength(strings);
          expect(strings).toBeLessThanOrEqual(sheet?.channels ?? 1);
          expect(own.reduce((sum, string) => sum + string.modules, 0)).toBe(modules);
          expect(own.reduce((sum, string) => sum + string.watts, 0)).toBeCloseTo(watts, 9);
          expect(watts).toBeLessThanOrEqual(input.loadFraction * (sheet?.maxWatts ?? 0) * (1 + 1e-9));
        }
        expect(result.purchase.reduce((sum, { quantity }) => sum + quantity, 0)).toBe(result.drivers.length);
        expect(result.drivers.reduce((sum, { cost }) => sum + cost, 0)).toBeCloseTo(result.cost, 9);
      }),
      { numRuns: 400 },
    );
  });

  it('another driver to choose from never costs more, a tighter limit never less', () => {
    const cost = (input: SeriesStringInput) => run(input).result.cost ?? Infinity;
    fc.assert(
      fc.property(anyInput(40), anyDriver, (input, { width, ...more }) => {
        const before = cost(input);
        const extra = { ...more, sku: 'extra', maxVolts: more.minVolts + width + 1 };
        expect(cost({ ...input, drivers: [...input.drivers, extra] })).toBeLessThanOrEqual(before);
        expect(cost({ ...input, loadFraction: input.loadFraction * 0.8 })).toBeGreaterThanOrEqual(before);
        expect(cost({ ...input, ambientMinCelsius: -30 })).toBeGreaterThanOrEqual(before);
        expect(cost({ ...input, riseCelsius: 45 })).toBeGreaterThanOrEqual(before);
      }),
      { numRuns: 200 },
    );
  });

  it('the numbers that it says would split do, and none between them', () => {
    let seen = 0;
    fc.assert(
      fc.property(anyInput(30), (input) => {
        const values = run(input).findings.find(({ code }) => code === 'count-does-not-split')?.values;
        if (!values) return;
        seen++;
        const fits = (count: number) => run({ ...input, count }).result.cost !== null;
        const [below, above] = [(values.countBelow ?? 0) as number, values.countAbove as number];
        if (below > 0) expect(fits(below)).toBe(true);
        expect(fits(above)).toBe(true);
        for (let count = below + 1; count < above; count++) expect(fits(count)).toBe(false);
      }),
      { numRuns: 400 },
    );
    expect(seen).toBeGreaterThan(10);
  });
});
