import { describe, expect, it } from 'vitest';
import { EngineError, WEB_LIMITS } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { tapeAnalysisCalculation } from '@/lib/sizing/tape-analysis';
import type { TapeInput } from '@/lib/sizing/tape-operating-point';

const led = {
  model: 'led-string',
  leds: 7,
  ballastOhms: 61.7,
  saturationAmps: 2.5e-20,
  emissionCoefficient: 2.6,
  seriesOhms: 1.2,
} as const;
const start = { at: 0, volts: 24, positiveOhms: 0.05, negativeOhms: 0.05 };
const end = { ...start, at: 50 };
const base: TapeInput = {
  cuts: 50,
  cutMetres: 0.1,
  railOhmsPerMetre: { positive: 0.12, negative: 0.12 },
  load: led,
  feeds: [start],
};
const solve = (change: Partial<TapeInput> = {}) =>
  runCalculation(tapeAnalysisCalculation, { ...base, ...change });
const codes = (change: Partial<TapeInput>) =>
  solve(change).findings.map(({ code, hard }) => `${code} ${hard}`);
const refused = (change: object, limits = WEB_LIMITS) => {
  try {
    runCalculation(tapeAnalysisCalculation, { ...base, ...change }, limits);
  } catch (error) {
    if (error instanceof EngineError) return `${error.code} ${error.issues.map(({ path }) => path).join()}`;
  }
  return '';
};
const total = (amps: readonly number[]) => amps.reduce((sum, own) => sum + own, 0);

describe('the ladder by hand', () => {
  it('puts the load in the middle of its piece, behind both conductors', () => {
    const { result } = solve({
      cuts: 1,
      cutMetres: 2,
      railOhmsPerMetre: { positive: 0.1, negative: 0.3 },
      load: { model: 'constant-current', amps: 2 },
      feeds: [{ at: 1, volts: 10, positiveOhms: 0.25, negativeOhms: 0.5, sourceOhms: 0.125 }],
    });
    // 2 A through 0.125 + 0.25 + 0.5 ohm and half of 2 m of both rails, 0.4 ohm.
    expect(result).toEqual({
      feeds: [{ amps: 2, watts: 20 }],
      loadVolts: [10 - 2 * 1.275],
      loadAmps: [2],
      minVolts: 10 - 2 * 1.275,
      maxVolts: 10 - 2 * 1.275,
      worstDropPct: 25.5,
      dimmestPct: 100,
      totalWatts: 20,
    });
  });

  it.each(['positive', 'negative'] as const)('puts a bad joint in the %s rail between two cuts', (rail) => {
    const change = {
      cuts: 3,
      cutMetres: 1,
      load: { model: 'constant-current', amps: 1 },
      joints: [{ at: 2, rail, ohms: 0.5 }],
    } as const;
    const rails = { railOhmsPerMetre: { positive: 0, negative: 0 } };
    const ends = [
      { at: 0, volts: 10, positiveOhms: 0, negativeOhms: 0 },
      { at: 3, volts: 10, positiveOhms: 0, negativeOhms: 0 },
    ];
    // Fed at the start, the joint carries the last cut's 1 A; fed at the end, the first two cuts' 2 A.
    expect(solve({ ...change, ...rails, feeds: ends.slice(0, 1) }).result.loadVolts).toEqual([10, 10, 9.5]);
    expect(solve({ ...change, ...rails, feeds: ends.slice(1) }).result.loadVolts).toEqual([9, 9, 10]);
    // Fed at both ends without resistance, nothing has to flow through it.
    expect(solve({ ...change, ...rails, feeds: ends }).result.loadVolts).toEqual([10, 10, 10]);
    expect(refused({ ...change, joints: [{ at: 3, rail, ohms: 1 }] })).toBe('invalid-input joints.0.at');
    expect(refused({ ...change, joints: [{ at: 0, rail, ohms: 1 }] })).toBe('invalid-input joints.0.at');
  });

  it('keeps positive and negative conductors apart: fed at one end, returned at the other', () => {
    const { result } = solve({
      cuts: 2,
      cutMetres: 1,
      railOhmsPerMetre: { positive: 1, negative: 1 },
      load: { model: 'constant-current', amps: 1 },
      feeds: [
        { at: 0, volts: 24, positiveOhms: 0, negativeOhms: 1e12 },
        { at: 2, volts: 24, positiveOhms: 1e12, negativeOhms: 0 },
      ],
    });
    // Load 1: 2 A over half a piece of +, 2 A over half and 1 A over a whole piece of -.
    expect(result.loadVolts[0]).toBeCloseTo(24 - 1 - 2, 9);
    expect(result.loadVolts[1]).toBeCloseTo(24 - 2 - 1, 9);
    expect(result.feeds[0]?.amps).toBeCloseTo(2, 9);
  });
});

describe('sources', () => {
  it('a missing feed is an open circuit, not 0 V', () => {
    const one = solve().result;
    const far = solve({ feeds: [start, { ...end, positiveOhms: 1e15, negativeOhms: 1e15 }] }).result;
    expect(far.minVolts / one.minVolts).toBeCloseTo(1, 9);
    expect(codes({})).toEqual([]);
  });

  it('feeds of one source share its resistance', () => {
    const shared = solve({ feeds: [start, end], sourceOhms: 0.2 }).result;
    const amps = total(shared.feeds.map((feed) => feed.amps));
    const without = solve({
      feeds: [
        { ...start, volts: 24 - 0.2 * amps },
        { ...end, volts: 24 - 0.2 * amps },
      ],
    }).result;
    expect(shared.minVolts).toBeCloseTo(without.minVolts, 9);
    expect(shared.totalWatts).toBeCloseTo(24 * amps, 9);
  });

  it('groups by name, and without one by volts', () => {
    const named = (a?: string, b?: string, volts = 24) => ({
      feeds: [
        { ...start, ...(a ? { source: a } : {}) },
        { ...end, volts, ...(b ? { source: b } : {}) },
      ],
    });
    expect(codes(named())).toEqual([]);
    expect(codes(named('A', 'A'))).toEqual([]);
    expect(codes(named('A'))).toEqual([]);
    expect(codes(named(undefined, 'B'))).toEqual([]);
    expect(codes(named('A', 'B'))).toEqual(['two-sources true']);
    expect(codes(named('A', 'A', 23.9))).toEqual(['two-sources true']);
    expect(codes(named(undefined, undefined, 23.9))).toEqual(['two-sources true']);
  });

  it('answers two sources, each behind its own resistance, and says when one absorbs', () => {
    const other = { ...end, volts: 20, sourceOhms: 0.3 };
    const answer = solve({ feeds: [start, other], sourceOhms: 0.1 });
    expect(answer.findings.map(({ code, severity, hard }) => [code, severity, hard])).toEqual([
      ['two-sources', 'stop', true],
      ['backfeed', 'stop', false],
    ]);
    const [first, second] = answer.result.feeds;
    expect(second?.amps).toBeLessThan(-0.1);
    expect(second?.watts).toBeCloseTo(20 * (second?.amps ?? 0), 12);
    const inSeries = solve({
      feeds: [
        { ...start, positiveOhms: 0.15 },
        { ...other, sourceOhms: 0, positiveOhms: 0.35 },
      ],
    }).result;
    expect(first?.amps).toBeCloseTo(inSeries.feeds[0]?.amps ?? NaN, 9);
    expect(answer.result.worstDropPct).toBeCloseTo(((24 - answer.result.minVolts) / 24) * 100, 9);
  });
});

describe('constant current', () => {
  const load = { model: 'constant-current', amps: 0.06, dropoutVolts: 18 } as const;

  it('stops below the dropout volts: the figures are not valid', () => {
    expect(codes({ load })).toEqual([]);
    const answer = solve({ load: { ...load, amps: 0.2 } });
    expect(answer.findings).toMatchObject([{ code: 'below-dropout', severity: 'stop' }]);
    const low = answer.result.loadVolts.filter((volts) => volts < 18).length;
    expect(answer.findings[0]?.values.segments).toBe(low);
  });

  it('has no solution where the volts would be negative', () => {
    expect(refused({ load: { ...load, amps: 0.9 } })).toBe('no-solution load.amps');
    expect(() => solve({ load: { ...load, amps: 0.9 } })).toThrow(/no physical solution/);
  });

  it('has no dimmest share where nothing is drawn', () => {
    expect(solve({ load: { ...load, amps: 0 } }).result).toMatchObject({ dimmestPct: null, minVolts: 24 });
  });
});

describe('zero ohms', () => {
  const bare = { positiveOhms: 0, negativeOhms: 0 };
  const noRails = { positive: 0, negative: 0 };

  it.each([
    ['rails', { railOhmsPerMetre: noRails }],
    ['positive rail', { railOhmsPerMetre: { positive: 0, negative: 0.1 } }],
    ['negative rail', { railOhmsPerMetre: { positive: 0.1, negative: 0 } }],
    ['feeders', { feeds: [{ ...start, ...bare }] }],
    [
      'feeders at both ends',
      {
        feeds: [
          { ...start, ...bare },
          { ...end, ...bare },
        ],
      },
    ],
    [
      'feeders twice at one place',
      {
        feeds: [
          { ...start, ...bare },
          { ...start, ...bare },
        ],
      },
    ],
    [
      'rails and feeders',
      {
        railOhmsPerMetre: noRails,
        feeds: [
          { ...start, ...bare },
          { ...end, ...bare },
        ],
      },
    ],
    [
      'rails and feeders behind a source',
      {
        railOhmsPerMetre: noRails,
        feeds: [
          { ...start, ...bare },
          { ...end, ...bare },
        ],
        sourceOhms: 0.1,
      },
    ],
    ['a run of no length', { cutMetres: 0 }],
  ])('%s: the currents add up and the limit of tiny resistances is met', (_, change) => {
    const { result } = solve(change);
    expect(total(result.feeds.map(({ amps }) => amps)) / total(result.loadAmps)).toBeCloseTo(1, 12);
    const tiny = <T extends { positiveOhms: number; negativeOhms: number }>(feed: T) => ({
      ...feed,
      positiveOhms: feed.positiveOhms + 1e-7,
      negativeOhms: feed.negativeOhms + 1e-7,
    });
    const rails = { ...base.railOhmsPerMetre, ...(change as Partial<TapeInput>).railOhmsPerMetre };
    const near = solve({
      ...change,
      feeds: ((change as Partial<TapeInput>).feeds ?? base.feeds).map(tiny),
      railOhmsPerMetre: { positive: rails.positive + 1e-9, negative: rails.negative + 1e-9 },
    }).result;
    expect(near.minVolts).toBeCloseTo(result.minVolts, 5);
    result.feeds.forEach(({ amps }, i) => expect(near.feeds[i]?.amps).toBeCloseTo(amps, 3));
  });

  it('two sources of other volts with nothing between them have no solution', () => {
    const feeds = [
      { ...start, ...bare },
      { ...start, ...bare, volts: 23 },
    ];
    expect(refused({ feeds })).toBe('no-solution feeds.1');
    expect(codes({ feeds: [feeds[0] ?? start, { ...start, ...bare, source: 'B' }] })).toEqual([]);
  });

  it('sources that meet at one place behind resistances of their own share by them', () => {
    const of = (source: string, sourceOhms: number, at: number) => ({
      ...start,
      ...bare,
      at,
      source,
      sourceOhms,
    });
    const feeds = [of('A', 0.1, 0), of('A', 0.1, 0), of('B', 0.3, 0), of('B', 0.3, 0)];
    const amps = solve({ feeds }).result.feeds.map((feed) => feed.amps);
    expect(amps[0]).toBeCloseTo(amps[1] ?? NaN, 12);
    expect((amps[0] ?? 0) / (amps[2] ?? 1)).toBeCloseTo(3, 9);
  });

  it('LEDs with nothing to limit their current have no solution', () => {
    const load = { ...led, leds: 1, ballastOhms: 0, seriesOhms: 0 };
    expect(refused({ load, railOhmsPerMetre: noRails, feeds: [{ ...start, ...bare, volts: 60 }] })).toBe(
      'no-solution load',
    );
  });
});

describe('refusals', () => {
  it.each([
    [{ cuts: 5001 }, 'too-large cuts'],
    [{ cuts: 1e12 }, 'too-large cuts'],
    [{ cuts: 0 }, 'invalid-input cuts'],
    [{ cutMetres: -1 }, 'invalid-input cutMetres'],
    [{ feeds: [] }, 'invalid-input feeds'],
    [{ feeds: [{ ...start, at: 51 }] }, 'invalid-input feeds.0.at'],
    [{ feeds: [{ ...start, at: 0.5 }] }, 'invalid-input feeds.0.at'],
    [{ feeds: [{ ...start, volts: 0 }] }, 'invalid-input feeds.0.volts'],
    [
      {
        feeds: [
          { ...start, sourceOhms: 0.1 },
          { ...end, sourceOhms: 0.2 },
        ],
      },
      'invalid-input feeds.1.sourceOhms',
    ],
    [{ load: { model: 'resistive', ohms: 0 } }, 'invalid-input load.ohms'],
    [{ load: { model: 'lamp' } }, 'invalid-input load.model'],
    [{ limitPct: 5 }, 'invalid-input limitPct'],
  ])('%j: %s', (change, want) => {
    expect(refused(change)).toBe(want);
  });
});

describe('hard to settle', () => {
  it('a run of 100,000 cuts, dark at its far end', () => {
    const { result } = solve({ cuts: 100_000 });
    expect(total(result.loadAmps) / (result.feeds[0]?.amps ?? NaN)).toBeCloseTo(1, 9);
    expect(result.dimmestPct).toBeLessThan(1e-3);
    expect(result.loadVolts.every((volts, k) => k === 0 || volts <= (result.loadVolts[k - 1] ?? 0))).toBe(
      true,
    );
  });

  it.each([24, 18, 16, 14, 10, 5, 0.1])(
    'LEDs near and under cut-off, without any ballast, at %d V',
    (volts) => {
      for (const seriesOhms of [0, 1e-6, 1]) {
        const load = { ...led, ballastOhms: 0, seriesOhms };
        const { result } = solve({
          load,
          feeds: [
            { ...start, volts },
            { ...end, volts },
          ],
        });
        const sum = total(result.feeds.map(({ amps }) => amps));
        expect(total(result.loadAmps) / sum).toBeCloseTo(1, 9);
        expect(result.minVolts).toBeGreaterThan(0);
      }
    },
  );

  it('loads that all but short the feed keep their digits', () => {
    const { result } = solve({
      load: { model: 'resistive', ohms: 0.001 },
      feeds: [{ ...start, positiveOhms: 100, negativeOhms: 43 }],
      railOhmsPerMetre: { positive: 1e-6, negative: 0 },
    });
    expect(Math.abs(total(result.loadAmps) / (result.feeds[0]?.amps ?? NaN) - 1)).toBeLessThan(1e-11);
  });

  it('resistances that are lost beside the others are taken as none', () => {
    const feeds = [
      { ...start, positiveOhms: 1, negativeOhms: 5e-324 },
      { ...start, positiveOhms: 0, negativeOhms: 0 },
    ];
    expect(solve({ feeds }).result.feeds[0]?.amps).toBeCloseTo(0, 12);
  });

  it('a feed at every boundary', () => {
    const feeds = Array.from({ length: 51 }, (_, at) => ({ ...start, at }));
    const { result } = solve({ feeds, sourceOhms: 0.05 });
    expect(total(result.loadAmps) / total(result.feeds.map(({ amps }) => amps))).toBeCloseTo(1, 12);
  });
});
