/** tape-plan: what is planned, what is refused, and what stops it. */
import { describe, expect, it } from 'vitest';
import { EngineError, WEB_LIMITS } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { tapePlanCalculation } from '@/lib/sizing/tape-plan';
import type { TapePlanInput } from '@/lib/sizing/tape-plan-input';
import { EXAMPLES } from '../../support/engine-examples';
import { randomJob } from '../../support/tape-plan-jobs';

const example = EXAMPLES['tape-plan'] as unknown as TapePlanInput;
const plan = (change: Partial<TapePlanInput> = {}) =>
  runCalculation(tapePlanCalculation, { ...example, ...change }, WEB_LIMITS);
const codes = (change: Partial<TapePlanInput> = {}) => plan(change).findings.map(({ code }) => code);
const refusal = (change: Partial<TapePlanInput>) => {
  try {
    plan(change);
  } catch (error) {
    if (error instanceof EngineError) return { code: error.code, path: error.issues[0]?.path };
  }
  throw new Error('not refused');
};

describe('a job small enough to plan by hand', () => {
  // 2 m of 9.6 W/m, one place at the start: one section, one feeder of 4 m, one driver of 60 W.
  const byHand: Partial<TapePlanInput> = {
    runs: [{ id: 'cove', metres: 2, places: [{ place: 'closet', startMetres: 4 }] }],
  };

  it('takes one section, the shorter feeder, the cheapest size and driver', () => {
    const { result } = plan(byHand);
    expect(result.runs).toMatchObject([
      {
        id: 'cove',
        sections: [{ cuts: 40, feed: 'start', feederMetres: [4], size: 'AWG 18', driver: 0, output: 0 }],
      },
    ]);
    expect(result.drivers).toMatchObject([{ sku: 'D-60', place: 'closet', wiring: 'class-2' }]);
    // 38 + 4 m x 0.60 + (0.25 + 0.5 + 4 x 0.02) h x 75 = 38 + 2.40 + 62.25.
    expect(result.totalCost).toBeCloseTo(102.65, 9);
    expect(result.boundPct).toBe(0);
    expect(result.bill).toMatchObject({ feeds: 1, driverCost: 38, conductorCost: 2.4, labourCost: 62.25 });
  });

  it('keeps what is pinned', () => {
    const [run] = byHand.runs ?? [];
    const pinned = { sections: 2, feed: 'both' as const, size: 'AWG 16', place: 'closet' };
    const { result } = plan({ runs: [{ ...(run as TapePlanInput['runs'][number]), pinned }] });
    expect(result.runs?.[0]?.sections).toMatchObject([
      { feed: 'both', size: 'AWG 16' },
      { feed: 'both', size: 'AWG 16' },
    ]);
  });
});

describe('refused', () => {
  const [run] = example.runs as [TapePlanInput['runs'][number]];
  it('too many runs for a request', () => {
    const runs = Array.from({ length: 61 }, (_, r) => ({ ...run, id: `${r}` }));
    expect(refusal({ runs })).toEqual({ code: 'too-large', path: 'runs' });
  });
  it('a run that is shorter than a cut, and one of too many cuts', () => {
    expect(refusal({ runs: [{ ...run, metres: 0.04 }] })).toEqual({
      code: 'invalid-input',
      path: 'runs.0.metres',
    });
    expect(refusal({ runs: [{ ...run, metres: 251 }] })).toEqual({
      code: 'too-large',
      path: 'runs.0.metres',
    });
  });
  it('names that are there twice, and pins on what is not there', () => {
    expect(refusal({ runs: [run, run] }).path).toBe('runs.1.id');
    expect(refusal({ runs: [{ ...run, pinned: { size: 'AWG 10' } }] }).path).toBe('runs.0.pinned.size');
    expect(refusal({ runs: [{ ...run, pinned: { place: 'attic' } }] }).path).toBe('runs.0.pinned.place');
    expect(refusal({ runs: [{ ...run, pinned: { sections: 151 } }] }).path).toBe('runs.0.pinned.sections');
  });
});

describe('what stops a plan', () => {
  it('answers with nulls and names the run', () => {
    const { result, findings } = plan({ limits: { ...example.limits, longestRunMetres: 5, maxSections: 1 } });
    expect(result).toEqual({ totalCost: null, boundPct: null, runs: null, drivers: null, bill: null });
    expect(findings[0]).toMatchObject({ severity: 'stop', hard: false, values: { run: 'cove' } });
  });
  it('is not there where there is a plan', () => {
    expect(plan().findings.filter(({ severity }) => severity === 'stop')).toEqual([]);
    expect(codes()).not.toContain('plan-bound-open');
  });
});

describe('seeded jobs', () => {
  it('plans the same twice', () => {
    const job = randomJob(1, { runs: 4 });
    expect(runCalculation(tapePlanCalculation, job)).toEqual(runCalculation(tapePlanCalculation, job));
  });
});
