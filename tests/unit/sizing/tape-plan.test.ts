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
  });
});

/** Each finding: a job that raises it, and one like it that does not. */
const [cove] = example.runs as [TapePlanInput['runs'][number]];
const [single] = example.drivers as [TapePlanInput['drivers'][number]];
const unmarked = { ...single, sku: 'N-60', classLimited: false };
const strong = { ...unmarked, sku: 'N-700', channelWatts: 700 };
const thick = { size: 'AWG 8', stranding: 'stranded' as const, costPerMetre: 6, amps: 50 };
const iec = { basis: 'iec' as const, drivers: [{ ...single, selv: true }] };
const tape = (change: Partial<TapePlanInput['tape']>) => ({ ...example.tape, ...change });
const limits = (change: Partial<TapePlanInput['limits']>) => ({ ...example.limits, ...change });
const at = (volts: number, change: Partial<TapePlanInput['drivers'][number]> = {}) => ({
  tape: tape({ volts }),
  drivers: [{ ...single, volts, ...change }],
});

const RAISED: [
  code: string,
  severity: string,
  hard: boolean,
  raises: Partial<TapePlanInput>,
  not: Partial<TapePlanInput>,
][] = [
  ['no-driver-of-these-volts', 'stop', false, { drivers: [{ ...single, volts: 12 }] }, { drivers: [single] }],
  ['no-selv-driver', 'stop', true, { basis: 'iec', drivers: [single] }, iec],
  [
    'no-class-limited-driver',
    'stop',
    true,
    { tape: tape({ classLimitedOnly: true }), drivers: [unmarked] },
    { tape: tape({ classLimitedOnly: true }) },
  ],
  [
    'no-class-limited-driver',
    'stop',
    true,
    { drivers: [{ ...single, channelWatts: 120 }] },
    { drivers: [{ ...single, channelWatts: 100 }] },
  ],
  ['tape-volts-over-class', 'stop', true, { ...at(36), wet: true }, at(36)],
  [
    'tape-volts-over-class',
    'stop',
    true,
    { ...iec, ...at(61, { selv: true }) },
    { ...iec, ...at(61, { selv: true }), insulated: true },
  ],
  [
    'tape-volts-over-class',
    'stop',
    true,
    { ...iec, ...at(121, { selv: true }), insulated: true },
    { ...iec, ...at(120, { selv: true }), insulated: true },
  ],
  [
    'plan-longest-run',
    'stop',
    false,
    { limits: limits({ longestRunMetres: 5, maxSections: 1 }) },
    { limits: limits({ longestRunMetres: 5, maxSections: 2 }) },
  ],
  [
    'plan-no-driver-large-enough',
    'stop',
    false,
    { drivers: [single], limits: limits({ maxSections: 1 }) },
    { drivers: [single], limits: limits({ maxSections: 2 }) },
  ],
  [
    'plan-drop-too-high',
    'stop',
    false,
    { limits: limits({ maxDropPct: 0.1, maxSections: 2 }) },
    { limits: limits({ maxDropPct: 5, maxSections: 2 }) },
  ],
  [
    'plan-too-dim',
    'stop',
    false,
    {
      tape: tape({ load: { model: 'resistive', ohms: 1200 } }),
      limits: limits({ minDimmestPct: 99.99, maxSections: 2 }),
    },
    {
      tape: tape({ load: { model: 'resistive', ohms: 1200 } }),
      limits: limits({ minDimmestPct: 90, maxSections: 2 }),
    },
  ],
  [
    'plan-feeder-too-small',
    'stop',
    true,
    { drivers: [strong] },
    { drivers: [strong], conductors: [thick], runs: [cove] },
  ],
  [
    'class-two-mark-contradicted',
    'caution',
    false,
    { drivers: [single, { ...single, sku: 'X', channelWatts: 101 }] },
    { drivers: [single, { ...single, sku: 'X', channelWatts: 100 }] },
  ],
  [
    'drivers-of-other-volts',
    'note',
    false,
    { drivers: [single, { ...single, sku: 'X', volts: 12 }] },
    { drivers: [single] },
  ],
  [
    'drivers-outside-class',
    'note',
    false,
    { tape: tape({ classLimitedOnly: true }), drivers: [single, unmarked] },
    { drivers: [single, unmarked] },
  ],
  [
    'plan-chapter-3',
    'caution',
    false,
    { drivers: [strong], conductors: [thick], runs: [cove] },
    { drivers: [{ ...strong, channelWatts: 600 }], conductors: [thick], runs: [cove] },
  ],
  ['plan-article-411', 'note', false, { drivers: [unmarked] }, { drivers: [single] }],
  ['plan-feeder-rating-from-table', 'note', false, {}, { runs: [cove] }],
  ['plan-separate-sections', 'caution', false, { limits: limits({ longestRunMetres: 5 }) }, {}],
  [
    'plan-drop-governs',
    'note',
    false,
    {
      runs: [
        { ...cove, places: [{ place: 'closet', startMetres: 20 }], pinned: { sections: 1, feed: 'both' } },
      ],
    },
    { runs: [cove] },
  ],
  ['plan-run-ends-short', 'note', false, { runs: [{ ...cove, metres: 7.52 }] }, { runs: [cove] }],
];

describe('findings', () => {
  it.each(RAISED)('%s is raised where it should be, and only there', (code, severity, hard, raises, not) => {
    const found = plan(raises).findings.find((own) => own.code === code);
    expect(found).toMatchObject({ severity, hard });
    expect(codes(not)).not.toContain(code);
  });

  it('plan-bound-open is raised where the search ends early, and the plan still stands', () => {
    const large = runCalculation(tapePlanCalculation, randomJob(5, { runs: 40 }));
    expect(large.result.boundPct).toBeGreaterThan(0);
    expect(large.findings.map(({ code }) => code)).toContain('plan-bound-open');
    expect(codes()).not.toContain('plan-bound-open');
  });

  it('feeders behind a driver that is not limited carry its rating', () => {
    const size = (drivers: TapePlanInput['drivers']) =>
      plan({ drivers, runs: [{ ...cove, metres: 1 }] }).result.runs?.[0]?.sections[0]?.size;
    expect(size([{ ...single, channelWatts: 96 }])).toBe('AWG 18');
    // 200 W at 24 V are 8.3 A: more than the 7 A of the AWG 18 offered.
    expect(size([{ ...unmarked, channelWatts: 200 }])).toBe('AWG 16');
  });
});

describe('seeded jobs', () => {
  it('plans the same twice', () => {
    const job = randomJob(1, { runs: 4 });
    expect(runCalculation(tapePlanCalculation, job)).toEqual(runCalculation(tapePlanCalculation, job));
  });
});
