/** An LED tape with a fault put in. */
import { EngineError, REL } from '@/lib/engine/contract';
import { thermalVolts } from './diode';
import {
  type Family,
  FEEDER_FACTOR,
  feederSurprise,
  jointSurprise,
  jointOhms,
  type Model,
  OPEN_OHMS,
  type Quantity,
  type Rail,
  settingOf,
  type Solved,
  type Tolerances,
  wholeFrom1,
} from './fault-finder-model';
import { type Source, sourcesOf, type TapeFeed } from './tape-circuit';
import { operatingPoint, type OperatingPoint, type TapeInput, type TapeLoad } from './tape-operating-point';

const LED_CELSIUS = 25;
const MOST_GRID = 24;
const RAILS = ['positive', 'negative'] as const;

interface Tape {
  input: TapeInput;
  sources: Source[];
  sourceOf: number[];
}

/** Every feed says its source, so that another setting of one driver does not join it to another. */
function named(input: TapeInput): Tape {
  const sources = sourcesOf(input.feeds, input.sourceOhms);
  const sourceOf = new Array<number>(input.feeds.length).fill(0);
  sources.forEach(({ feeds }, s) => feeds.forEach((i) => (sourceOf[i] = s)));
  const feeds = input.feeds.map((feed, i): TapeFeed => {
    const s = sourceOf[i] ?? 0;
    return { ...feed, source: `${s}`, sourceOhms: sources[s]?.ohms ?? 0 };
  });
  return { input: { ...input, feeds, sourceOhms: undefined }, sources, sourceOf };
}

function physical({ load }: TapeInput, point: OperatingPoint): OperatingPoint {
  if (load.model === 'constant-current' && point.loadVolts.some((own) => own < -REL * point.highestVolts)) {
    const message = 'the loads would need negative volts to draw this current';
    throw new EngineError('no-solution', `The tape has no operating point: ${message}.`, [
      { path: 'load.amps', message },
    ]);
  }
  return point;
}

/** @param before cuts that were left out at the start: dark, as all beyond the end */
function solvedTape(input: TapeInput, before = 0): Solved {
  const point = physical(input, operatingPoint(input));
  const amps = (i: number) => point.feedAmps[i] ?? 0;
  const terminalVolts = (i: number) => {
    const source = point.sources[point.sourceOfFeed[i] ?? 0];
    if (!source) return 0;
    return source.volts - source.ohms * source.feeds.reduce((sum, feed) => sum + amps(feed), 0);
  };
  const read = ({ at, index, quantity }: Quantity): number => {
    const i = index - 1;
    if (at === 'cut') return point.loadVolts[i - before] ?? 0;
    if (at === 'feed') return quantity === 'volts' ? terminalVolts(i) : amps(i);
    const feed = input.feeds[i];
    if (at === 'positive-conductor') return amps(i) * (feed?.positiveOhms ?? 0);
    return (point.feedReturnAmps[i] ?? 0) * (feed?.negativeOhms ?? 0);
  };
  const jointAmps = point.jointAmps[0];
  return jointAmps === undefined ? { read } : { read, jointAmps };
}

const withFeeds = (input: TapeInput, change: (feed: TapeFeed, i: number) => TapeFeed): TapeInput => ({
  ...input,
  feeds: input.feeds.map(change),
});

/** Volts move the saturation current the other way; the curve keeps its slope. */
function loadAt(load: TapeLoad, celsius: number, t: Tolerances, spread: number, resistor: number): TapeLoad {
  const resistance = 1 + (resistor * t.resistorPct) / 100;
  if (load.model === 'resistive') return { ...load, ohms: load.ohms * resistance };
  if (load.model === 'constant-current')
    return { ...load, amps: load.amps * (1 + (resistor * t.currentPct) / 100) };
  const slopeVolts = load.emissionCoefficient * thermalVolts(celsius);
  return {
    ...load,
    ballastOhms: load.ballastOhms * resistance,
    saturationAmps: load.saturationAmps * Math.exp((-spread * t.spreadVolts) / slopeVolts),
  };
}

/** Axes: supply, conductors (cold to as given), then what the load can vary in. */
function atEnds(input: TapeInput, t: Tolerances, ends: readonly number[]): TapeInput {
  const [supply = 0, conductors = 0, resistor = 0, spread = 0] = ends;
  const copper = conductors < 0 ? t.coldShare : 1;
  const volts = 1 + (supply * t.supplyPct) / 100;
  const { positive, negative } = input.railOhmsPerMetre;
  return {
    ...withFeeds(input, (feed) => ({
      ...feed,
      volts: feed.volts * volts,
      positiveOhms: feed.positiveOhms * copper,
      negativeOhms: feed.negativeOhms * copper,
    })),
    railOhmsPerMetre: { positive: positive * copper, negative: negative * copper },
    load: loadAt(input.load, input.celsius ?? LED_CELSIUS, t, spread, resistor),
  };
}

function quantitiesOf({ cuts, feeds }: TapeInput): Quantity[] {
  const each = feeds.flatMap((_, i): Quantity[] => [
    { at: 'feed', index: i + 1, quantity: 'volts' },
    { at: 'feed', index: i + 1, quantity: 'amps' },
    { at: 'positive-conductor', index: i + 1, quantity: 'volts' },
    { at: 'negative-conductor', index: i + 1, quantity: 'volts' },
  ]);
  const along = Array.from({ length: cuts }, (_, k): Quantity => ({
    at: 'cut',
    index: k + 1,
    quantity: 'volts',
  }));
  return [...each, ...along];
}

/** Boundaries beside the segments that were read and the feeds, and half-way between them. */
function boundaryGrid({ cuts, feeds }: TapeInput, readCuts: readonly number[]): number[] {
  const marks = [
    1,
    cuts - 1,
    ...readCuts.flatMap((k) => [k - 1, k]),
    ...feeds.flatMap(({ at }) => [at, at - 1]),
  ]
    .filter((b) => b >= 1 && b < cuts)
    .sort((a, b) => a - b);
  const between = marks.map((b, i) => Math.floor((b + (marks[i + 1] ?? b)) / 2));
  const grid = [...new Set([...marks, ...between])].sort((a, b) => a - b);
  const every = Math.ceil(grid.length / MOST_GRID);
  return grid.filter((b, i) => i % every === 0 || b === cuts - 1);
}

/** Nothing flows: what the segments see is what is written, the drivers are without load. */
function dark(tape: Tape, cutVolts: number, live: boolean): Solved {
  const volts = (i: number) => (live ? (tape.sources[tape.sourceOf[i] ?? 0]?.volts ?? 0) : 0);
  return {
    read: ({ at, index, quantity }) => {
      if (at === 'cut') return cutVolts;
      return at === 'feed' && quantity === 'volts' ? volts(index - 1) : 0;
    },
  };
}

/**
 * One feed alone the wrong way round: LEDs and their electronics block, resistances do not care. With several, the
 * reversed one shorts the others through the rails: drivers shut down.
 */
function reversed(tape: Tape): Solved {
  const { input, sources } = tape;
  if (input.feeds.length > 1) return dark(tape, 0, false);
  if (input.load.model !== 'resistive') return dark(tape, -(sources[0]?.volts ?? 0), true);
  const { read } = solvedTape(input);
  return { read: (quantity) => (quantity.at === 'cut' ? -read(quantity) : read(quantity)) };
}

function missing(tape: Tape, i: number): Solved {
  if (tape.input.feeds.length === 1) return dark(tape, 0, true);
  const { read } = solvedTape(
    withFeeds(tape.input, (feed, f) =>
      f === i ? { ...feed, positiveOhms: OPEN_OHMS, negativeOhms: OPEN_OHMS } : feed,
    ),
  );
  // Nothing flows in it; along its conductors stands what the tape has less than the driver.
  return {
    read: (quantity) => (quantity.index === i + 1 && quantity.quantity === 'amps' ? 0 : read(quantity)),
  };
}

/** A rail broken at a boundary: beyond it nothing lights, unless it is fed from there as well. */
function openRail({ input }: Tape, b: number): Solved {
  const { cuts, feeds } = input;
  if (feeds.every(({ at }) => at <= b)) return solvedTape({ ...input, cuts: b });
  if (feeds.every(({ at }) => at > b)) {
    const beyond = withFeeds({ ...input, cuts: cuts - b }, (feed) => ({ ...feed, at: feed.at - b }));
    return solvedTape(beyond, b);
  }
  return solvedTape({ ...input, joints: [{ at: b, rail: 'positive', ohms: OPEN_OHMS }] });
}

/** Open segments, spread evenly: no meter tells which, but the light does. */
function openSegments(input: TapeInput, count: number): Solved {
  const segmentFaults = Array.from({ length: count }, (_, n) => ({
    cut: Math.floor(((n + 0.5) * input.cuts) / count) + 1,
    shortedLeds: 'open' as const,
  }));
  return solvedTape({ ...input, segmentFaults });
}

function feedFamilies(tape: Tape, i: number, volts: number, amps: number): Family[] {
  const { input } = tape;
  const grid = [i + 1];
  const base = { at: 'feed', rail: null, grid } as const;
  const joint = (rail: Rail): Family => ({
    ...base,
    cause: 'joint-in-feed',
    rail,
    parameter: jointOhms(volts, amps),
    surprise: jointSurprise,
    solve: (_, ohms) => {
      const key = rail === 'positive' ? 'positiveOhms' : 'negativeOhms';
      const { read } = solvedTape(
        withFeeds(input, (feed, f) => (f === i ? { ...feed, [key]: feed[key] + ohms } : feed)),
      );
      const conductor = { at: `${rail}-conductor`, index: i + 1, quantity: 'volts' } as const;
      return { read, jointAmps: read(conductor) / ((input.feeds[i]?.[key] ?? 0) + ohms) };
    },
  });
  const feeder: Family = {
    ...base,
    cause: 'feeder-resistance',
    parameter: FEEDER_FACTOR,
    surprise: feederSurprise,
    solve: (_, factor) =>
      solvedTape(
        withFeeds(input, (feed, f) =>
          f === i
            ? { ...feed, positiveOhms: feed.positiveOhms * factor, negativeOhms: feed.negativeOhms * factor }
            : feed,
        ),
      ),
  };
  const gone: Family = { ...base, cause: 'feed-missing', parameter: null, solve: () => missing(tape, i) };
  const { positiveOhms = 0, negativeOhms = 0 } = input.feeds[i] ?? {};
  return [gone, ...RAILS.map(joint), ...(positiveOhms + negativeOhms > 0 ? [feeder] : [])];
}

function settingFamilies({ input, sources, sourceOf }: Tape): Family[] {
  return sources.map((source, s) => ({
    cause: 'supply-setting',
    at: 'feed',
    rail: null,
    grid: [(source.feeds[0] ?? 0) + 1],
    parameter: settingOf(source.volts, 'V'),
    solve: (_, volts) =>
      solvedTape(withFeeds(input, (feed, i) => (sourceOf[i] === s ? { ...feed, volts } : feed))),
  }));
}

function alongTape(tape: Tape, readCuts: readonly number[], volts: number, amps: number): Family[] {
  const { input } = tape;
  if (input.cuts < 2) return [];
  const grid = boundaryGrid(input, readCuts);
  // Fed at one place only, both rails carry the same everywhere: which of them is bad makes no difference.
  const onePlace = input.feeds.every(({ at }) => at === input.feeds[0]?.at);
  const joints = (onePlace ? ([null] as const) : RAILS).map((rail): Family => ({
    cause: 'joint-in-tape',
    at: 'boundary',
    rail,
    grid,
    parameter: jointOhms(volts, amps),
    solve: (at, ohms) => solvedTape({ ...input, joints: [{ at, rail: rail ?? 'positive', ohms }] }),
  }));
  const open: Family = {
    cause: 'open-rail',
    at: 'boundary',
    rail: null,
    grid,
    parameter: null,
    solve: (b) => openRail(tape, b),
  };
  return [...joints, open];
}

function segmentFamilies({ input }: Tape): Family[] {
  const base = { at: 'cut', rail: null, grid: null } as const;
  const open: Family = {
    ...base,
    cause: 'open-segments',
    parameter: wholeFrom1(input.cuts),
    solve: (_, count) => openSegments(input, count),
  };
  const { load } = input;
  if (load.model !== 'led-string' || load.leds < 2) return [open];
  const shorted: Family = {
    ...base,
    cause: 'shorted-leds',
    parameter: wholeFrom1(load.leds - 1),
    solve: (_, shortedLeds) =>
      solvedTape({ ...input, segmentFaults: [{ cut: Math.ceil(input.cuts / 2), shortedLeds }] }),
  };
  return [open, shorted];
}

/** @param readCuts segments that were read, from 1 */
export function tapeModel(drawn: TapeInput, t: Tolerances, readCuts: readonly number[]): Model {
  const tape = named(drawn);
  const { input, sources } = tape;
  const volts = sources.reduce((most, source) => Math.max(most, source.volts), 0);
  const nominal = solvedTape(input);
  const amps = input.feeds.reduce(
    (sum, _, i) => sum + Math.abs(nominal.read({ at: 'feed', index: i + 1, quantity: 'amps' })),
    0,
  );
  const axes = ['supply', 'conductors', 'load'];
  if (input.load.model === 'led-string') axes.push('forward volts');
  return {
    axes,
    solve: (ends) => solvedTape(atEnds(input, t, ends)),
    quantities: quantitiesOf(input),
    families: [
      {
        cause: 'feed-reversed',
        at: 'feed',
        rail: null,
        grid: input.feeds.length === 1 ? [1] : null,
        parameter: null,
        solve: () => reversed(tape),
      },
      ...input.feeds.flatMap((_, i) => feedFamilies(tape, i, volts, amps)),
      ...alongTape(tape, readCuts, volts, amps),
      ...settingFamilies(tape),
      ...segmentFamilies(tape),
    ],
  };
}
