/**
 * The drivers of series strings against HiGHS, a solver of mixed-integer programs: one variable for each driver that
 * could be bought and for the modules on each of its channels, with the rules on volts, amps and watts as they stand.
 */
import loadHighs from 'highs';
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { seriesStringCalculation, type SeriesStringInput } from '@/lib/sizing/series-string';
import { type Random, seeded, testSeed } from '../support/random';

const CASES = 40;
const highs = await loadHighs();

function anyInput(random: Random): SeriesStringInput {
  const forwardVolts = random.between(3, 15);
  return {
    module: {
      forwardVolts,
      forwardVoltsMin: forwardVolts * random.between(0.93, 1),
      forwardVoltsMax: forwardVolts * random.between(1, 1.07),
      voltsPerKelvin: -forwardVolts * random.between(0, 0.001),
      maxAmps: 0.5,
    },
    count: random.whole(1, 12),
    ambientMinCelsius: random.between(-30, 10),
    ambientMaxCelsius: random.between(20, 50),
    riseCelsius: random.between(0, 40),
    drivers: Array.from({ length: random.whole(1, 3) }, (_, index) => {
      const maxVolts = forwardVolts * random.between(2, 7);
      const amps = random.pick([0.2, 0.35, 0.5, 0.7]);
      const channels = random.whole(1, 2);
      return {
        sku: `driver ${index}`,
        amps,
        minVolts: maxVolts * random.between(0.2, 0.7),
        maxVolts,
        maxWatts: amps * maxVolts * channels * random.between(0.6, 1.2),
        cost: Math.round(random.between(500, 6000)) / 100,
        channels,
      };
    }),
    loadFraction: random.between(0.7, 1),
  };
}

/** The program in CPLEX's LP format. Every driver that is bought feeds a module at least: `count` of each are enough. */
function programOf(input: SeriesStringInput): string {
  const { module, count, loadFraction } = input;
  const c = module.voltsPerKelvin ?? 0;
  const hot = module.forwardVoltsMin + c * (input.ambientMaxCelsius + (input.riseCelsius ?? 0) - 25);
  const cold = module.forwardVoltsMax + c * (input.ambientMinCelsius - 25);
  const costs: string[] = [];
  const rows: string[] = [];
  const modules: string[] = [];
  const binaries: string[] = [];
  for (const [d, driver] of input.drivers.entries()) {
    if (driver.amps > (module.maxAmps ?? Infinity)) continue;
    for (let unit = 0; unit < count; unit++) {
      const bought = `y_${d}_${unit}`;
      binaries.push(bought);
      costs.push(`${driver.cost} ${bought}`);
      // One like another: bought in order.
      if (unit > 0) rows.push(`${bought} - y_${d}_${unit - 1} <= 0`);
      const own = Array.from({ length: driver.channels ?? 1 }, (_, channel) => {
        const [used, on] = [`z_${d}_${unit}_${channel}`, `n_${d}_${unit}_${channel}`];
        binaries.push(used);
        modules.push(on);
        rows.push(
          `${used} - ${bought} <= 0`,
          `${on} - ${count} ${used} <= 0`,
          `${hot} ${on} - ${driver.minVolts} ${used} >= 0`,
          `${cold} ${on} - ${driver.maxVolts} ${used} <= 0`,
        );
        return `${driver.amps * module.forwardVolts} ${on}`;
      });
      rows.push(`${own.join(' + ')} - ${loadFraction * driver.maxWatts} ${bought} <= 0`);
    }
  }
  if (modules.length === 0) return '';
  return [
    'Minimize',
    ` cost: ${costs.join(' + ')}`,
    'Subject To',
    ...rows.map((row, index) => ` r${index}: ${row}`),
    ` all: ${modules.join(' + ')} = ${count}`,
    'General',
    ` ${modules.join(' ')}`,
    'Binary',
    ` ${binaries.join(' ')}`,
    'End',
  ].join('\n');
}

function leastCost(input: SeriesStringInput): number | null {
  const program = programOf(input);
  if (program === '') return null;
  const solution = highs.solve(program, {
    output_flag: false,
    mip_rel_gap: 0,
    mip_feasibility_tolerance: 1e-9,
    primal_feasibility_tolerance: 1e-9,
  });
  if (solution.Status === 'Infeasible') return null;
  if (solution.Status !== 'Optimal') throw new Error(`HiGHS ends with ${solution.Status}`);
  return solution.ObjectiveValue;
}

describe('series-string against HiGHS', () => {
  const seed = testSeed();
  const random = seeded(seed);
  const inputs = Array.from({ length: CASES }, () => anyInput(random));
  const answers = inputs.map((input) => runCalculation(seriesStringCalculation, input).result.cost);

  it.each(inputs.map((input, index) => ({ index, input })))(
    `plan $index, TEST_SEED=${seed}`,
    ({ index, input }) => {
      const [cost, least] = [answers[index], leastCost(input)];
      if (least === null) expect(cost).toBeNull();
      else expect(cost).toBeCloseTo(least, 6);
    },
  );

  it(`some of them have a plan and some have none, TEST_SEED=${seed}`, () => {
    const planned = answers.filter((cost) => cost !== null).length;
    expect(planned).toBeGreaterThanOrEqual(5);
    expect(planned).toBeLessThan(CASES);
  });
});
