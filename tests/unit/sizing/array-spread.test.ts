import { describe, expect, it } from 'vitest';
import { WEB_LIMITS } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { arraySpreadCalculation, type ArraySpreadInput } from '@/lib/sizing/array-spread';
import { normal, uniform } from '@/lib/sizing/random';

const led = { saturationAmps: 2.3e-17, emissionCoefficient: 3.4, seriesOhms: 3 };
const string = { ballastOhms: 68, leds: [led, led, led] };
const base: ArraySpreadInput = {
  supply: { volts: 12, sourceOhms: 0 },
  strings: [string, string],
  forwardVolts: { distribution: 'normal', spreadVolts: 0.05 },
  draws: 4000,
  seed: 7,
};
const run = (change: Partial<ArraySpreadInput> = {}) =>
  runCalculation(arraySpreadCalculation, { ...base, ...change }, WEB_LIMITS);

describe('draws', () => {
  it('the same seed gives the same figures, another seed others', () => {
    expect(run()).toEqual(run());
    expect(run({ seed: 8 }).result.stringAmps.p50).not.toBe(run().result.stringAmps.p50);
  });

  it('no spread gives the nominal current throughout', () => {
    const { result } = run({ forwardVolts: { distribution: 'uniform', spreadVolts: 0 }, draws: 5 });
    const [nominal] = result.nominal.stringAmps;
    expect(result.stringAmps).toEqual({
      min: nominal,
      p1: nominal,
      p5: nominal,
      p50: nominal,
      p95: nominal,
      p99: nominal,
      max: nominal,
    });
    expect(result.imbalance?.p99).toBe(1);
  });

  it('spreads as the slope of the load line says: sigma of the current = sqrt(3) * sigma / (dV/dI)', () => {
    const { result } = run({ draws: 10_000 });
    const amps = result.nominal.stringAmps[0] ?? 0;
    const slope = 68 + 9 + (3 * 3.4 * 0.0256926) / amps;
    const sigma = (result.stringAmps.p95 - result.stringAmps.p5) / (2 * 1.6449);
    // 20,000 currents: the quantiles of a normal spread are known to about 1.5 %.
    expect(sigma / ((Math.sqrt(3) * 0.05) / slope)).toBeGreaterThan(0.95);
    expect(sigma / ((Math.sqrt(3) * 0.05) / slope)).toBeLessThan(1.05);
    expect(result.stringAmps.p50 / amps).toBeCloseTo(1, 2);
  });

  it('counts the draws in which every string is within its limits', () => {
    const { p5, p95 } = run().result.stringAmps;
    const share = (run({ minAmps: p5, maxAmps: p95 }).result.yieldPct ?? 0) / 100;
    // Two strings that do not know of each other: 0.9 squared.
    expect(Math.abs(share - 0.81)).toBeLessThan(0.03);
    expect(run().result.yieldPct).toBeNull();
    expect(run({ maxAmps: 1 }).result.yieldPct).toBe(100);
  });

  it('has no imbalance once a string was dark', () => {
    expect(run({ supply: { volts: 5 }, draws: 50 }).result.imbalance).toBeNull();
  });
});

describe('limits and refusals', () => {
  it('keeps the web to its draws', () => {
    expect(() => run({ draws: 10_001 })).toThrow(expect.objectContaining({ code: 'too-large' }));
  });

  it('names the field', () => {
    expect(() => run({ minAmps: 2, maxAmps: 1 })).toThrow(/^minAmps/);
    expect(() => run({ seed: -1 })).toThrow(/^seed/);
    expect(() => run({ draws: 0 })).toThrow(/^draws/);
  });

  it('is field-built', () => {
    expect(run({ draws: 1 }).findings[0]?.code).toBe('field-built');
  });
});

describe('random numbers', () => {
  it('are even, and normal with mean 0 and variance 1', () => {
    const next = uniform(1);
    const n = 100_000;
    let sum = 0;
    let squares = 0;
    const bins = new Array<number>(10).fill(0);
    for (let i = 0; i < n; i++) {
      const own = normal(next);
      sum += own;
      squares += own * own;
      const bin = Math.floor(next() * 10);
      bins[bin] = (bins[bin] ?? 0) + 1;
    }
    expect(Math.abs(sum / n)).toBeLessThan(0.015);
    expect(Math.abs(squares / n - 1)).toBeLessThan(0.02);
    for (const own of bins) expect(Math.abs(own / n - 0.1)).toBeLessThan(0.005);
  });
});
