/** What holds for every tape: Kirchhoff's laws, the balance of power, and that more copper never dims a load. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { stringVolts, thermalVolts } from '@/lib/sizing/diode';
import { tapeAnalysis } from '@/lib/sizing/tape-analysis';
import type { TapeFeed } from '@/lib/sizing/tape-circuit';
import {
  operatingPoint,
  type OperatingPoint,
  type TapeInput,
  type TapeLoad,
} from '@/lib/sizing/tape-operating-point';

const log = (low: number, high: number) =>
  fc.double({ min: Math.log(low), max: Math.log(high), noNaN: true }).map(Math.exp);
const ohms = fc.oneof(fc.constant(0), log(1e-4, 5));
const VOLTS = 24;

const ledLoad = fc.record({
  model: fc.constant('led-string' as const),
  leds: fc.integer({ min: 1, max: 8 }),
  ballastOhms: fc.oneof({ weight: 1, arbitrary: fc.constant(0) }, { weight: 4, arbitrary: log(1, 1000) }),
  saturationAmps: log(1e-22, 1e-14),
  emissionCoefficient: fc.double({ min: 1.5, max: 4, noNaN: true }),
  seriesOhms: log(0.1, 10),
});
const anyLoad: fc.Arbitrary<TapeLoad> = fc.oneof(
  ledLoad,
  fc.record({ model: fc.constant('resistive' as const), ohms: log(1, 1e5) }),
  fc.record({ model: fc.constant('constant-current' as const), amps: log(1e-6, 1e-3) }),
);

const anyTape = fc
  .record({ cuts: fc.integer({ min: 1, max: 80 }), feedCount: fc.integer({ min: 1, max: 6 }) })
  .chain(({ cuts, feedCount }) =>
    fc.record({
      cuts: fc.constant(cuts),
      cutMetres: log(0.005, 1),
      railOhmsPerMetre: fc.record({ positive: ohms, negative: ohms }),
      load: anyLoad,
      sourceOhms: fc.oneof(fc.constant(0), log(1e-4, 2)),
      feeds: fc.array(
        fc.record({
          at: fc.integer({ min: 0, max: cuts }),
          volts: fc.constant(VOLTS),
          positiveOhms: ohms,
          negativeOhms: ohms,
        }),
        { minLength: feedCount, maxLength: feedCount },
      ),
    }),
  );

/** Volts of one rail at every load and feed, walked from the first feed by Ohm's law and Kirchhoff's first law. */
function walkRail(input: TapeInput, point: OperatingPoint, rail: 'positive' | 'negative') {
  const sign = rail === 'positive' ? 1 : -1;
  const pieceOhms = input.railOhmsPerMetre[rail] * input.cutMetres;
  const into = rail === 'positive' ? point.feedAmps : point.feedReturnAmps;
  const total = into.reduce((sum, amps) => sum + amps, 0);
  const sourceVolts = VOLTS - total * (input.sourceOhms ?? 0);
  const stops = [
    ...input.feeds.map(({ at }, index) => ({ at, index, kind: 'feed' as const })),
    ...Array.from(point.loadAmps, (_, index) => ({ at: index + 0.5, index, kind: 'load' as const })),
  ].sort((a, b) => a.at - b.at);
  let amps = 0;
  let volts = 0;
  let position = 0;
  const walked = stops.map((stop) => {
    volts -= sign * amps * (stop.at - position) * pieceOhms;
    position = stop.at;
    amps += stop.kind === 'feed' ? (into[stop.index] ?? 0) : -(point.loadAmps[stop.index] ?? 0);
    return { ...stop, volts };
  });
  const expected = input.feeds.map((feed, i) =>
    rail === 'positive'
      ? sourceVolts - feed.positiveOhms * (into[i] ?? 0)
      : feed.negativeOhms * (into[i] ?? 0),
  );
  const anchor = walked.find(({ kind }) => kind === 'feed');
  const shift = (expected[anchor?.index ?? 0] ?? 0) - (anchor?.volts ?? 0);
  const loads: number[] = [];
  const feeds: number[] = [];
  for (const stop of walked) (stop.kind === 'feed' ? feeds : loads)[stop.index] = stop.volts + shift;
  return { left: amps, total, loads, feeds, expected };
}

function lawVolts(load: TapeLoad, amps: number): number | null {
  if (load.model === 'constant-current') return null;
  if (load.model === 'resistive') return load.ohms * amps;
  const slopeVolts = load.leds * load.emissionCoefficient * thermalVolts(25);
  return stringVolts(
    {
      ohms: load.ballastOhms + load.leds * load.seriesOhms,
      junctions: [{ slopeVolts, saturationAmps: load.saturationAmps }],
    },
    amps,
  );
}

describe("Kirchhoff's laws and the balance of power", () => {
  it('close at every node, around every loop and over the whole', () => {
    fc.assert(
      fc.property(anyTape, (input) => {
        const point = operatingPoint(input);
        const positive = walkRail(input, point, 'positive');
        const negative = walkRail(input, point, 'negative');
        for (const rail of [positive, negative]) {
          expect(Math.abs(rail.left)).toBeLessThanOrEqual(1e-9 * rail.total);
          rail.feeds.forEach((volts, i) =>
            expect(Math.abs(volts - (rail.expected[i] ?? NaN))).toBeLessThanOrEqual(1e-9 * VOLTS),
          );
        }
        point.loadDrops.forEach((drop, k) => {
          const across = (positive.loads[k] ?? NaN) - (negative.loads[k] ?? NaN);
          expect(Math.abs(VOLTS - drop - across)).toBeLessThanOrEqual(1e-9 * VOLTS);
          const own = lawVolts(input.load, point.loadAmps[k] ?? NaN);
          if (own !== null) expect(Math.abs(own - across)).toBeLessThanOrEqual(1e-9 * VOLTS);
        });
      }),
      { numRuns: 300 },
    );
  });

  it('power in = power at the loads and in the conductors', () => {
    fc.assert(
      fc.property(anyTape, (input) => {
        const point = operatingPoint(input);
        const total = point.feedAmps.reduce((sum, amps) => sum + amps, 0);
        let watts = total * total * input.sourceOhms;
        input.feeds.forEach((feed, i) => {
          const [out = 0, back = 0] = [point.feedAmps[i], point.feedReturnAmps[i]];
          watts += out * out * feed.positiveOhms + back * back * feed.negativeOhms;
        });
        point.loadAmps.forEach((amps, k) => (watts += amps * (VOLTS - (point.loadDrops[k] ?? 0))));
        for (const rail of ['positive', 'negative'] as const) {
          const into = rail === 'positive' ? point.feedAmps : point.feedReturnAmps;
          const half = (input.railOhmsPerMetre[rail] * input.cutMetres) / 2;
          let amps = 0;
          for (let at = 0; at <= input.cuts; at++) {
            input.feeds.forEach((feed, i) => (amps += feed.at === at ? (into[i] ?? 0) : 0));
            const after = amps - (point.loadAmps[at] ?? 0);
            if (at < input.cuts) watts += (amps * amps + after * after) * half;
            amps = after;
          }
        }
        expect(Math.abs(watts / (VOLTS * total) - 1)).toBeLessThan(1e-9);
      }),
      { numRuns: 300 },
    );
  });
});

describe('with sourceOhms 0 and equal volts', () => {
  const neverLower = (input: TapeInput, better: TapeInput) => {
    const before = tapeAnalysis(input).loadVolts;
    const after = tapeAnalysis(better).loadVolts;
    before.forEach((volts, k) => expect(after[k]).toBeGreaterThanOrEqual(volts - 1e-9 * VOLTS));
  };
  // Conductors in the rails' own proportion, as cables are. Where positive and negative differ from place to place,
  // it does not hold: more current for one load then lifts the negative rail under another.
  const split = (ohms: number, negative: number) => ({
    positiveOhms: ohms * (1 - negative),
    negativeOhms: ohms * negative,
  });
  const ideal = fc.tuple(anyTape, fc.double({ min: 0, max: 1, noNaN: true })).map(([input, negative]) => {
    const rail = input.railOhmsPerMetre.positive;
    return {
      negative,
      input: {
        ...input,
        sourceOhms: 0,
        railOhmsPerMetre: { positive: rail * (1 - negative), negative: rail * negative },
        feeds: input.feeds.map((feed) => ({ ...feed, ...split(feed.positiveOhms, negative) })),
      },
    };
  });
  const cable = (feed: TapeFeed, share: number): TapeFeed => ({
    ...feed,
    positiveOhms: feed.positiveOhms * share,
    negativeOhms: feed.negativeOhms * share,
  });

  it("another feed never lowers any load's volts", () => {
    fc.assert(
      fc.property(ideal, fc.nat(), ohms, ({ input, negative }, place, own) => {
        const more = { at: place % (input.cuts + 1), volts: VOLTS, ...split(own, negative) };
        neverLower(input, { ...input, feeds: [...input.feeds, more] });
      }),
      { numRuns: 300 },
    );
  });

  it("a bigger conductor never lowers any load's volts", () => {
    fc.assert(
      fc.property(ideal, fc.nat(), fc.double({ min: 0, max: 1, noNaN: true }), ({ input }, which, share) => {
        const bigger = which % input.feeds.length;
        const feeds = input.feeds.map((feed, i) => (i === bigger ? cable(feed, share) : feed));
        neverLower(input, { ...input, feeds });
      }),
      { numRuns: 300 },
    );
  });
});
