/** Tapes of every kind, drawn at random, against ngspice run on the spot on the same circuit. */
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { tapeAnalysisCalculation } from '@/lib/sizing/tape-analysis';
import type { TapeFeed } from '@/lib/sizing/tape-circuit';
import type { TapeInput, TapeLoad } from '@/lib/sizing/tape-operating-point';
import { operatingPoint } from '../support/ngspice';
import { type Random, seeded, testSeed } from '../support/random';
import { netlistOf } from '../support/tape-netlist';

function randomLoad(random: Random, volts: number): TapeLoad {
  const model = random.pick(['constant-current', 'resistive', 'led-string', 'led-string'] as const);
  if (model === 'constant-current') return { model, amps: random.decades(1e-4, 0.02) };
  if (model === 'resistive') return { model, ohms: random.decades(20, 5000) };
  return {
    model,
    leds: Math.max(1, Math.round(volts / random.between(3.2, 4.4))),
    ballastOhms: random.chance(0.15) ? 0 : random.between(10, 300),
    saturationAmps: random.decades(1e-20, 1e-16),
    emissionCoefficient: random.between(2.2, 3.6),
    seriesOhms: random.between(0.5, 4),
  };
}

/** One to five feeds anywhere, zero-ohm conductors among them; now and then a second source. */
function randomFeeds(random: Random, cuts: number, volts: number): TapeFeed[] {
  const ohms = () => (random.chance(0.2) ? 0 : random.decades(0.01, 1));
  const places = new Set(Array.from({ length: random.whole(1, 5) }, () => random.whole(0, cuts)));
  return [...places].map((at, i): TapeFeed => {
    const other = i > 0 && random.chance(0.15);
    return {
      at,
      volts: other ? volts * random.between(0.96, 1.04) : volts,
      positiveOhms: ohms() + (other ? 0.01 : 0),
      negativeOhms: ohms(),
      ...(other ? { sourceOhms: random.decades(1e-3, 0.5) } : {}),
    };
  });
}

/** Bad joints, one at a boundary and rail at most; now and then none at all, or one that is good. */
function randomJoints(random: Random, cuts: number) {
  const places = new Set(
    Array.from({ length: random.whole(0, 3) }, () => random.whole(1, Math.max(1, cuts - 1))),
  );
  return [...places].map((at) => ({
    at,
    rail: random.pick(['positive', 'negative'] as const),
    ohms: random.chance(0.2) ? 0 : random.decades(0.01, 20),
  }));
}

function randomTape(random: Random): TapeInput {
  const cuts = random.whole(1, 60);
  const volts = random.pick([5, 12, 24, 48]);
  return {
    cuts,
    cutMetres: random.between(0.02, 0.17),
    railOhmsPerMetre: { positive: random.decades(0.05, 0.4), negative: random.decades(0.05, 0.4) },
    load: randomLoad(random, volts),
    feeds: randomFeeds(random, cuts, volts),
    ...(random.chance(0.5) ? { sourceOhms: random.decades(1e-3, 0.5) } : {}),
    celsius: random.between(-20, 90),
    ...(cuts > 1 && random.chance(0.5) ? { joints: randomJoints(random, cuts) } : {}),
  };
}

const total = (amps: readonly number[]) => amps.reduce((sum, own) => sum + own, 0);

describe('random tapes against ngspice', () => {
  const seed = testSeed();
  const random = seeded(seed);
  const tapes = Array.from({ length: 40 }, () => randomTape(random));

  it.each(tapes.map((input, i) => ({ i, model: input.load.model, feeds: input.feeds.length, input })))(
    `seed ${seed}, tape $i: $model, $feeds feeds`,
    ({ input }) => {
      const spice = operatingPoint(netlistOf(input));
      const at = (name: string) => spice.get(name) ?? NaN;
      const across = Array.from({ length: input.cuts }, (_, k) => at(`p${k + 1}`) - at(`n${k + 1}`));
      if (input.load.model === 'constant-current' && Math.min(...across) < 0) {
        expect(() => runCalculation(tapeAnalysisCalculation, input)).toThrow(/no physical solution/);
        return;
      }
      const { result } = runCalculation(tapeAnalysisCalculation, input);
      const near = (got: number, want: number, floor: number) =>
        expect(Math.abs(got - want), `${got} against ${want}`).toBeLessThanOrEqual(
          1e-6 * Math.abs(want) + floor,
        );
      result.loadVolts.forEach((volts, k) => near(volts, across[k] ?? NaN, 0));
      const loads = result.loadAmps.map((_, k) => at(`vm${k + 1}#branch`));
      const feeds = result.feeds.map((_, i) => at(`vf${i}#branch`));
      // ngspice's own currents do not quite add up: a feed's is the difference of two nearly equal volts over milliohms.
      const noise = 20 * Math.abs(total(loads) - total(feeds));
      expect(noise).toBeLessThan(1e-7 * (1 + total(loads)));
      result.loadAmps.forEach((amps, k) => near(amps, loads[k] ?? NaN, 1e-11));
      result.feeds.forEach(({ amps }, i) => near(amps, feeds[i] ?? NaN, 1e-10 + noise));
    },
  );
});
