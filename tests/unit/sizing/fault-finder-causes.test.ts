/**
 * Circuits with one fault of each kind, read with a meter that is off by up to its error: the true cause must come
 * first, with its figure and its place. The circuits are made faulty by hand and solved by the analyses themselves.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { WEB_LIMITS } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import type { ArrayInput } from '@/lib/sizing/array-analysis';
import { type FaultFinder, faultFinder, faultFinderCalculation } from '@/lib/sizing/fault-finder';
import type { Quantity } from '@/lib/sizing/fault-finder-model';
import type { TapeFeed } from '@/lib/sizing/tape-circuit';
import type { TapeInput } from '@/lib/sizing/tape-operating-point';
import {
  arrayMeter,
  type Meter,
  quantityOf,
  readingOf,
  tapeMeter,
  withError,
} from '../../support/faulty-circuits';
import { seeded } from '../../support/random';

type Circuit = Parameters<typeof faultFinder>[0]['circuit'];

function ask(circuit: object, meter: Meter, written: readonly string[], tolerances = {}): FaultFinder {
  const readings = written.map((one) => readingOf(meter, quantityOf(one)));
  return runCalculation(faultFinderCalculation, { circuit, tolerances, readings }, WEB_LIMITS).result;
}
/** A regulated driver and LEDs of one bin: then the current says something. */
const CLOSE = { supplyPct: 1, spreadVolts: 0.02, resistorPct: 1 };

/** The first cause, as one would say it. */
const first = ({ causes }: FaultFinder) => {
  const [best] = causes;
  return (
    best && `${best.cause}${best.rail ? ` ${best.rail}` : ''}${best.index === null ? '' : ` ${best.index}`}`
  );
};

const load = {
  model: 'led-string',
  leds: 7,
  ballastOhms: 60,
  saturationAmps: 1e-18,
  emissionCoefficient: 2.6,
  seriesOhms: 5,
} as const;
const feed: TapeFeed = { at: 0, volts: 24, positiveOhms: 0.1, negativeOhms: 0.1 };
const tape: TapeInput = {
  cuts: 100,
  cutMetres: 0.05,
  railOhmsPerMetre: { positive: 0.05, negative: 0.05 },
  load,
  feeds: [feed],
};
const ends = { ...tape, feeds: [feed, { ...feed, at: 100 }] };
const ALONG = ['cut 1 V', 'cut 25 V', 'cut 50 V', 'cut 75 V', 'cut 100 V'];
const AT_FEED = ['feed 1 V', 'feed 1 A', 'positive-conductor 1 V', 'negative-conductor 1 V'];
const ALL = [...AT_FEED, ...ALONG];
const BOTH_ENDS = [...ALL, 'feed 2 V', 'feed 2 A', 'positive-conductor 2 V', 'negative-conductor 2 V'];

const tapeInput = (input: TapeInput) => ({ kind: 'tape', input }) as unknown as Circuit;
const SEEDS = [1, 2, 3, 4];

describe.each(SEEDS)('a tape read with a meter in error, seed %i', (seed) => {
  const read = (drawn: TapeInput, faulty: TapeInput, written: readonly string[], tolerances = {}) =>
    ask(tapeInput(drawn), withError(tapeMeter(faulty), seeded(seed)), written, tolerances);

  it.each([
    ['positive', 'positiveOhms'],
    ['negative', 'negativeOhms'],
  ] as const)('bad joint in the %s conductor of its feed', (rail, key) => {
    const found = read(tape, { ...tape, feeds: [{ ...feed, [key]: 0.1 + 1 }] }, ALL);
    expect(first(found)).toBe(`joint-in-feed ${rail} 1`);
    // 1 % of the volts along the conductor over 3 % of the current, and what other readings say of both.
    expect(found.causes[0]?.value).toBeGreaterThan(0.94);
    expect(found.causes[0]?.value).toBeLessThan(1.06);
  });

  it('bad joint in the tape, at its place', () => {
    const found = read(tape, { ...tape, joints: [{ at: 37, rail: 'negative', ohms: 1.5 }] }, ALL);
    const [best] = found.causes;
    expect(first(found)).toMatch(/^joint-in-tape \d+$/);
    // Between segments 25 and 50, which are on either side of it; which of the 25 only their currents could tell.
    expect(best?.index).toBeGreaterThanOrEqual(25);
    expect(best?.index).toBeLessThanOrEqual(49);
    expect(best?.from).toBeLessThanOrEqual(37);
    expect(best?.to).toBeGreaterThanOrEqual(37);
    // What flows through it over the range of places: the figure goes with the place.
    expect(best?.value).toBeGreaterThan(1);
    expect(best?.value).toBeLessThan(2);
  });

  it('bad joint in a tape that is fed at both ends', () => {
    const drawn = { ...ends, railOhmsPerMetre: { positive: 0.15, negative: 0.15 } };
    const faulty: TapeInput = { ...drawn, joints: [{ at: 20, rail: 'positive', ohms: 1.5 }] };
    const found = read(drawn, faulty, BOTH_ENDS, CLOSE);
    expect(first(found)).toMatch(/^joint-in-tape (positive|negative) \d+$/);
    expect(found.causes[0]?.from).toBeLessThanOrEqual(20);
    expect(found.causes[0]?.to).toBeGreaterThanOrEqual(20);
  });

  it('feeder thinner than drawn', () => {
    const thin = { ...feed, positiveOhms: 0.5, negativeOhms: 0.5 };
    const found = read(tape, { ...tape, feeds: [thin] }, ALL);
    expect(first(found)).toBe('feeder-resistance 1');
    expect(found.causes[0]?.value).toBeGreaterThan(4.8);
    expect(found.causes[0]?.value).toBeLessThan(5.2);
  });

  it.each([18, 27])('driver set to %i V', (volts) => {
    const found = read(tape, { ...tape, feeds: [{ ...feed, volts }] }, ALL);
    expect(first(found)).toBe('supply-setting 1');
    expect(found.causes[0]?.value).toBeGreaterThan(volts * 0.98);
    expect(found.causes[0]?.value).toBeLessThan(volts * 1.02);
    expect(found.causes[0]?.unit).toBe('V');
  });

  it('second feed not connected', () => {
    const gone = read(ends, tape, ALL);
    expect(first(gone)).toBe('feed-missing 2');
    expect(gone.causes[0]).toMatchObject({ value: null, watts: null });
  });

  it('only feed not connected: dark, the driver without load', () => {
    const dark: Meter = ({ at, quantity }) => (at === 'feed' && quantity === 'volts' ? 24 : 0);
    expect(first(ask(tapeInput(tape), withError(dark, seeded(seed)), ALL))).toBe('feed-missing 1');
  });

  it('only feed the wrong way round', () => {
    const wrong: Meter = ({ at, quantity }) =>
      at === 'cut' ? -24 : at === 'feed' && quantity === 'volts' ? 24 : 0;
    expect(first(ask(tapeInput(tape), withError(wrong, seeded(seed)), ALL))).toBe('feed-reversed 1');
  });

  it('rail broken: dark beyond, as if the tape ended there', () => {
    const short = tapeMeter({ ...tape, cuts: 60 });
    const found = ask(tapeInput(tape), withError(short, seeded(seed)), ALL);
    expect(first(found)).toMatch(/^open-rail \d+$/);
    expect(found.causes[0]?.from).toBeLessThanOrEqual(60);
    expect(found.causes[0]?.to).toBeGreaterThanOrEqual(60);
    // 3 % of the current are two of sixty segments; the drops along them say the same again.
    expect(Math.abs((found.causes[0]?.index ?? 0) - 60)).toBeLessThanOrEqual(4);
  });

  it('segments dark: the current says how many', () => {
    const segmentFaults = Array.from({ length: 40 }, (_, k) => ({
      cut: 30 + k,
      shortedLeds: 'open' as const,
    }));
    const found = read(tape, { ...tape, segmentFaults }, ALL, CLOSE);
    expect(first(found)).toBe('open-segments');
    expect(Math.abs((found.causes[0]?.value ?? 0) - 40)).toBeLessThanOrEqual(6);
  });

  it('an LED shorted in a tape of few segments', () => {
    const few = { ...tape, cuts: 3 };
    const shorted = { ...few, segmentFaults: [{ cut: 2, shortedLeds: 2 }] };
    const found = read(few, shorted, ['feed 1 V', 'feed 1 A', 'cut 1 V', 'cut 2 V', 'cut 3 V'], CLOSE);
    expect(first(found)).toBe('shorted-leds');
    expect(found.causes[0]?.value).toBe(2);
  });
});

const diode = { saturationAmps: 1e-18, emissionCoefficient: 3.2, seriesOhms: 5 };
const array: ArrayInput = {
  supply: { volts: 12, sourceOhms: 0.2 },
  sharedOhms: 2,
  strings: Array.from({ length: 4 }, () => ({ ballastOhms: 120, leds: [diode, diode, diode] })),
};
const ARRAY_READINGS = [
  'feed 1 V',
  'feed 1 A',
  ...[1, 2, 3, 4].flatMap((i) => [`string ${i} A`, `string ${i} V`]),
];

describe.each(SEEDS)('an array read with a meter in error, seed %i', (seed) => {
  const read = (faulty: ArrayInput) =>
    ask({ kind: 'array', input: array }, withError(arrayMeter(faulty), seeded(seed)), ARRAY_READINGS);
  const string = (i: number, change: Partial<ArrayInput['strings'][number]>): ArrayInput => ({
    ...array,
    strings: array.strings.map((own, s) => (s === i ? { ...own, ...change } : own)),
  });

  it('bad joint in one string', () => {
    const found = read(string(2, { ballastOhms: 120 + 150 }));
    expect(first(found)).toBe('joint-in-string 3');
    // 3 % of the current through 270 ohm are 8 of them, 1 % of the LEDs' volts as much again.
    expect(found.causes[0]?.value).toBeGreaterThan(125);
    expect(found.causes[0]?.value).toBeLessThan(175);
  });

  it('an LED shorted in one string', () => {
    const found = read(string(1, { leds: [diode, diode] }));
    expect(first(found)).toBe('shorted-leds 2');
    expect(found.causes[0]?.value).toBe(1);
  });

  it('a string open', () => {
    const open = arrayMeter({ ...array, strings: array.strings.slice(0, 3) });
    const dark: Meter = (quantity) => {
      if (quantity.at !== 'string' || quantity.index < 4) return open(quantity);
      // The open LED has all the volts that the others leave over.
      return quantity.quantity === 'amps' ? 0 : 12 - open(quantityOf('feed 1 A')) * 2.2;
    };
    const found = ask({ kind: 'array', input: array }, withError(dark, seeded(seed)), ARRAY_READINGS);
    expect(first(found)).toBe('open-string 4');
  });

  it('supply set too high', () => {
    const found = read({ ...array, supply: { ...array.supply, volts: 14.4 } });
    expect(first(found)).toBe('supply-setting 1');
    expect(found.causes[0]?.value).toBeGreaterThan(14.1);
    expect(found.causes[0]?.value).toBeLessThan(14.7);
  });

  it('bad joint before all strings', () => {
    const found = read({ ...array, sharedOhms: 2 + 25 });
    expect(first(found)).toBe('joint-in-feed 1');
    expect(found.causes[0]?.value).toBeGreaterThan(20);
    expect(found.causes[0]?.value).toBeLessThan(30);
  });

  it('supply the wrong way round, or not connected', () => {
    const dark =
      (share: number): Meter =>
      ({ at, quantity }) =>
        quantity === 'amps' ? 0 : at === 'feed' ? 12 : share * 12;
    const kind = (share: number) =>
      first(ask({ kind: 'array', input: array }, withError(dark(share), seeded(seed)), ARRAY_READINGS));
    expect(kind(-1)).toBe('feed-reversed 1');
    expect(kind(0)).toBe('feed-missing 1');
  });
});

const series = {
  amps: 0.7,
  count: 10,
  module: { forwardVolts: 3.2, forwardVoltsMin: 3.05, forwardVoltsMax: 3.35 },
  positiveOhms: 0.3,
  negativeOhms: 0.3,
  openCircuitVolts: 55,
};
const SERIES_READINGS = [
  'feed 1 V',
  'feed 1 A',
  'string 1 V',
  'positive-conductor 1 V',
  'negative-conductor 1 V',
];

/** By hand: V = modules * 3.2 V + I * R. */
function seriesMeter({ amps = 0.7, modules = 10, plus = 0.3, minus = 0.3, within = 0 }): Meter {
  const stringVolts = modules * 3.2 + amps * within;
  return ({ at, quantity }) => {
    if (quantity === 'amps') return amps;
    if (at === 'cut') return 3.2;
    if (at === 'string') return stringVolts;
    if (at === 'positive-conductor') return amps * plus;
    if (at === 'negative-conductor') return amps * minus;
    return stringVolts + amps * (plus + minus);
  };
}

describe.each(SEEDS)('a constant-current string read with a meter in error, seed %i', (seed) => {
  const read = (meter: Meter, written: readonly string[] = SERIES_READINGS) =>
    ask({ kind: 'string', input: series }, withError(meter, seeded(seed)), written);
  const openAt = (module: number): Meter => {
    return ({ at, index, quantity }) => {
      if (quantity === 'amps') return 0;
      if (at === 'feed' || at === 'string') return 55;
      return at === 'cut' && index === module ? 55 : 0;
    };
  };

  it('modules shorted: how many, or which', () => {
    const found = read(seriesMeter({ modules: 8 }));
    expect(first(found)).toBe('shorted-modules');
    expect(found.causes[0]?.value).toBe(2);
    const one: Meter = (quantity) =>
      quantity.at === 'cut' && quantity.index === 4 ? 0 : seriesMeter({ modules: 9 })(quantity);
    expect(first(read(one, [...SERIES_READINGS, 'cut 3 V', 'cut 4 V']))).toBe('shorted-modules 4');
  });

  it('a module open or the wrong way round: dark', () => {
    expect(first(read(openAt(6), [...SERIES_READINGS, 'cut 5 V', 'cut 6 V']))).toBe('open-module 6');
    expect(first(read(openAt(6)))).toBe('open-module');
  });

  it('driver set to another current', () => {
    const found = read(seriesMeter({ amps: 1.05 }));
    expect(first(found)).toBe('supply-setting 1');
    expect(found.causes[0]?.value).toBeGreaterThan(1.02);
    expect(found.causes[0]?.value).toBeLessThan(1.08);
    expect(found.causes[0]?.unit).toBe('A');
  });

  it('bad joint in the feeder, a feeder too thin, a bad joint in the string', () => {
    const joint = read(seriesMeter({ minus: 5 }));
    expect(first(joint)).toBe('joint-in-feed negative 1');
    expect(joint.causes[0]?.value).toBeGreaterThan(4.4);
    expect(joint.causes[0]?.value).toBeLessThan(5);
    // I * R = 0.7 A through 4.7 ohm: 3.29 V, and 2.3 W of heat.
    expect(joint.causes[0]?.watts).toBeGreaterThan(2);
    expect(joint.causes[0]?.watts).toBeLessThan(2.6);
    const thin = read(seriesMeter({ plus: 0.9, minus: 0.9 }));
    expect(first(thin)).toBe('feeder-resistance 1');
    expect(thin.causes[0]?.value).toBeGreaterThan(2.8);
    expect(thin.causes[0]?.value).toBeLessThan(3.2);
    const within = read(seriesMeter({ within: 9 }));
    expect(first(within)).toBe('joint-in-string 1');
    expect(within.causes[0]?.value).toBeGreaterThan(6);
    expect(within.causes[0]?.value).toBeLessThan(12);
  });

  it('feeder not connected, or the wrong way round', () => {
    const dark =
      (share: number): Meter =>
      ({ at, quantity }) => {
        if (quantity === 'amps') return 0;
        return at === 'feed' ? 55 : at === 'string' ? share * 55 : 0;
      };
    expect(first(read(dark(0)))).toBe('feed-missing 1');
    expect(first(read(dark(-1)))).toBe('feed-reversed 1');
  });
});

interface Case {
  drawn: TapeInput;
  faulty: TapeInput;
  cause: string;
  value: number;
  place: number | null;
  seed: number;
}

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const KINDS = ['feeder-resistance', 'joint-in-tape', 'joint-in-feed', 'supply-setting'] as const;

/** Ohms that take a sixth to half of the volts from the tape: a fault that anyone sees. */
const anyCase: fc.Arbitrary<Case> = fc
  .record({
    cuts: fc.integer({ min: 10, max: 120 }),
    cutMetres: between(0.03, 0.1),
    rail: between(0.02, 0.15),
    ballastOhms: between(50, 150),
    feederOhms: between(0.05, 0.3),
    share: between(0.2, 1),
    where: between(0.05, 0.7),
    kind: fc.constantFrom(...KINDS),
    volts: fc.constantFrom(18, 20, 28),
    seed: fc.integer({ min: 0, max: 2 ** 31 }),
  })
  .map((c) => {
    const own: TapeFeed = { at: 0, volts: 24, positiveOhms: c.feederOhms, negativeOhms: c.feederOhms };
    const drawn: TapeInput = {
      cuts: c.cuts,
      cutMetres: c.cutMetres,
      railOhmsPerMetre: { positive: c.rail, negative: c.rail },
      load: { ...load, ballastOhms: c.ballastOhms },
      feeds: [own],
    };
    const ohms = (c.share * 24) / tapeMeter(drawn)(quantityOf('feed 1 A'));
    const at = Math.max(1, Math.floor(c.cuts * c.where));
    const factor = 1 + ohms / (2 * c.feederOhms);
    const fed = (change: Partial<TapeFeed>): TapeInput => ({ ...drawn, feeds: [{ ...own, ...change }] });
    const faults: Record<(typeof KINDS)[number], [TapeInput, number]> = {
      'feeder-resistance': [
        fed({ positiveOhms: c.feederOhms * factor, negativeOhms: c.feederOhms * factor }),
        factor,
      ],
      'joint-in-tape': [{ ...drawn, joints: [{ at, rail: 'positive', ohms }] }, ohms],
      'joint-in-feed': [fed({ positiveOhms: c.feederOhms + ohms }), ohms],
      'supply-setting': [fed({ volts: c.volts }), c.volts],
    };
    const [faulty, value] = faults[c.kind];
    return {
      drawn,
      faulty,
      value,
      cause: c.kind,
      place: c.kind === 'joint-in-tape' ? at : null,
      seed: c.seed,
    };
  });

/** Takes the reading at the far end, then each that is named, until none is. */
function follow({ drawn, faulty, seed }: Case): { found: FaultFinder; taken: Quantity[] } {
  const meter = withError(tapeMeter(faulty), seeded(seed));
  const taken = [quantityOf(`cut ${drawn.cuts} V`)];
  const readings = taken.map((quantity) => readingOf(meter, quantity));
  for (;;) {
    const found = faultFinder({ circuit: tapeInput(drawn), readings }, WEB_LIMITS);
    if (!found.nextReading || taken.length > 20) return { found, taken };
    taken.push(found.nextReading);
    readings.push(readingOf(meter, found.nextReading));
  }
}

describe('the reading that is named', () => {
  it('tells a thin feeder from a bad joint in the tape, which the far end alone does not', () => {
    const thin = { ...tape, feeds: [{ ...feed, positiveOhms: 0.7, negativeOhms: 0.7 }] };
    const bad = { ...tape, joints: [{ at: 30, rail: 'positive' as const, ohms: 3 }] };
    for (const [faulty, wanted] of [
      [thin, /^feeder-resistance 1$/],
      [bad, /^joint-in-tape \d+$/],
    ] as const) {
      const start = ask(tapeInput(tape), tapeMeter(faulty), ['feed 1 V', 'cut 100 V']);
      expect(start.readings[1]?.verdict).not.toBe('in');
      const codes = start.causes.map(({ cause }) => cause);
      expect(codes).toEqual(expect.arrayContaining(['feeder-resistance', 'joint-in-tape']));
      expect(start.nextReading).not.toBeNull();
      const { found, taken } = follow({ drawn: tape, faulty, seed: 1, cause: '', value: 0, place: null });
      expect(first(found)).toMatch(wanted);
      expect(taken.length).toBeGreaterThan(1);
    }
  });

  it('followed from the far end, leads to the true cause, its figure and its place', () => {
    let followed = 0;
    fc.assert(
      fc.property(anyCase, (c) => {
        const { found, taken } = follow(c);
        // Some settings lie within the band of the far end: nothing is asked, nothing is found.
        if (taken.length === 1 && found.causes.length === 0) return;
        followed++;
        const [best] = found.causes;
        expect(best?.cause).toBe(c.cause);
        expect(Math.abs((best?.value ?? 0) / c.value - 1)).toBeLessThan(0.5);
        if (c.place === null) return;
        expect(best?.from).toBeLessThanOrEqual(c.place);
        expect(best?.to).toBeGreaterThanOrEqual(c.place);
      }),
      { numRuns: 25 },
    );
    expect(followed).toBeGreaterThan(12);
  });

  it('is none where all is as it should be, whatever the tolerances did', () => {
    fc.assert(
      fc.property(anyCase, between(-1, 1), between(-1, 1), fc.boolean(), (c, supply, resistor, cold) => {
        const { drawn } = c;
        const copper = cold ? 1 / (1 + 0.00393 * 55) : 1;
        const today: TapeInput = {
          ...drawn,
          feeds: drawn.feeds.map((own) => ({
            ...own,
            volts: own.volts * (1 + 0.05 * supply),
            positiveOhms: own.positiveOhms * copper,
            negativeOhms: own.negativeOhms * copper,
          })),
          railOhmsPerMetre: {
            positive: drawn.railOhmsPerMetre.positive * copper,
            negative: drawn.railOhmsPerMetre.negative * copper,
          },
          load:
            drawn.load.model === 'led-string'
              ? { ...drawn.load, ballastOhms: drawn.load.ballastOhms * (1 + 0.05 * resistor) }
              : drawn.load,
        };
        const meter = withError(tapeMeter(today), seeded(c.seed));
        const written = [...AT_FEED, 'cut 1 V', `cut ${drawn.cuts} V`];
        const found = ask(tapeInput(drawn), meter, written);
        expect(found.readings.map(({ verdict }) => verdict)).toEqual(written.map(() => 'in'));
        expect(found).toMatchObject({ causes: [], nextReading: null });
      }),
      { numRuns: 60 },
    );
  });
});
