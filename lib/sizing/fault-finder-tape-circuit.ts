/** An LED tape as drawn, at the ends of its tolerances, and what a meter reads on it. */
import { EngineError, REL } from '@/lib/engine/contract';
import { thermalVolts } from './diode';
import type { Quantity, Solved, Tolerances } from './fault-finder-model';
import { type Source, sourcesOf, type TapeFeed } from './tape-circuit';
import { operatingPoint, type OperatingPoint, type TapeInput, type TapeLoad } from './tape-operating-point';

const LED_CELSIUS = 25;

export interface Tape {
  input: TapeInput;
  sources: Source[];
  sourceOf: number[];
}

/** Every feed says its source, so that another setting of one driver does not join it to another. */
export function named(input: TapeInput): Tape {
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
export function solvedTape(input: TapeInput, before = 0): Solved {
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

export const withFeeds = (input: TapeInput, change: (feed: TapeFeed, i: number) => TapeFeed): TapeInput => ({
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
export function atEnds(input: TapeInput, t: Tolerances, ends: readonly number[]): TapeInput {
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

export function quantitiesOf({ cuts, feeds }: TapeInput): Quantity[] {
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
