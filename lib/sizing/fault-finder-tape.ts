/** An LED tape with a fault put in. */
import {
  type Family,
  FEEDER_FACTOR,
  feederSurprise,
  jointOhms,
  jointSurprise,
  type Model,
  OPEN_OHMS,
  type Rail,
  settingOf,
  type Solved,
  type Tolerances,
  wholeFrom1,
} from './fault-finder-model';
import { atEnds, named, quantitiesOf, solvedTape, type Tape, withFeeds } from './fault-finder-tape-circuit';
import type { TapeInput } from './tape-operating-point';

const MOST_GRID = 24;
const RAILS = ['positive', 'negative'] as const;

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
