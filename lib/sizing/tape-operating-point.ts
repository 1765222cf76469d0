/** A tape's operating point: loads of any model on the ladder. */
import { EngineError } from '@/lib/engine/contract';
import { type SeriesString, stringAmps, stringSlopeOhms, stringVolts, thermalVolts } from './diode';
import {
  type Rails,
  type Source,
  sourcesOf,
  type TapeCircuit,
  tapeCircuit,
  type TapeFeed,
} from './tape-circuit';
import { TapeLadder } from './tape-ladder';

export type TapeLoad =
  | { model: 'constant-current'; amps: number; dropoutVolts?: number | undefined }
  | { model: 'resistive'; ohms: number }
  | {
      model: 'led-string';
      leds: number;
      ballastOhms: number;
      saturationAmps: number;
      emissionCoefficient: number;
      seriesOhms: number;
    };

export interface TapeInput extends Rails {
  load: TapeLoad;
  feeds: readonly TapeFeed[];
  /** Of the source that the first feed stands behind, V and ohm; 0 unless given. */
  sourceOhms?: number | undefined;
  /** The LEDs' temperature, at which their saturation current is given; 25 unless given. */
  celsius?: number | undefined;
}

export interface OperatingPoint {
  sources: Source[];
  highestVolts: number;
  /** Source of each feed as given. */
  sourceOfFeed: number[];
  feedAmps: number[];
  /** Below the highest source volts: more digits than the load volts themselves. */
  loadDrops: Float64Array;
  loadAmps: Float64Array;
}

const LED_CELSIUS = 25;
const MAX_STEPS = 2000;
/** Newton's error after a step of s slopes is about s^2 / 2 of the current: this leaves it in the last bits. */
const SETTLED = 1e-8;

function noSolution(path: string, message: string): never {
  throw new EngineError('no-solution', `The tape has no operating point: ${message}.`, [{ path, message }]);
}

/** Amps at each load after the ladder was solved with `drawn - slope * drop`. */
function drawnAmps(ladder: TapeLadder, drawn: Float64Array, slope: Float64Array): Float64Array {
  return drawn.map((own, k) => own - (slope[k] ?? 0) * (ladder.drops[k] ?? 0));
}

function linearLoads(ladder: TapeLadder, cuts: number, drawn: number, slope: number): Float64Array {
  const all = new Float64Array(cuts).fill(drawn);
  const slopes = new Float64Array(cuts).fill(slope);
  ladder.solve(all, slopes);
  return drawnAmps(ladder, all, slopes);
}

/** No load gets more than the source can push through the feeds and half a piece: a start above what flows. */
function startAmps(string: SeriesString, circuit: TapeCircuit, rails: Rails): number {
  const { positive, negative } = rails.railOhmsPerMetre;
  const conductance = circuit.joints.reduce(
    (sum, joint) =>
      sum + 1 / (joint.positiveOhms + joint.negativeOhms + ((positive + negative) * rails.cutMetres) / 2),
    0,
  );
  const amps = Math.min(stringAmps(string, circuit.highestVolts), circuit.highestVolts * conductance);
  return Number.isFinite(amps) ? amps : noSolution('load', 'nothing limits the current of its LEDs');
}

/**
 * LED strings by Newton. Each load keeps a point on its own exact curve, and the tangent there is what the ladder
 * sees. A load whose volts fall takes its next point at the solved volts, one whose volts rise at the solved amps:
 * the curve is convex, so both lie between the tangent's answer and the old point, and the exponential never runs
 * away. Started from above, the volts fall monotonically; nothing needs to be damped further.
 */
function ledStrings(ladder: TapeLadder, string: SeriesString, start: number, rails: Rails, volts: number) {
  const { cuts } = rails;
  const slopeVolts = string.junctions[0]?.slopeVolts ?? 1;
  const points = new Float64Array(cuts).fill(stringVolts(string, start));
  const amps = new Float64Array(cuts).fill(start);
  const slope = new Float64Array(cuts).fill(1 / stringSlopeOhms(string, start));
  const drawn = new Float64Array(cuts);
  // Volts are known to their last bits only.
  const settled = Math.max(SETTLED, (1e-14 * volts) / slopeVolts) * slopeVolts;
  for (let step = 0; step < MAX_STEPS; step++) {
    for (let k = 0; k < cuts; k++) {
      drawn[k] = (amps[k] ?? 0) + (slope[k] ?? 0) * (volts - (points[k] ?? 0));
    }
    ladder.solve(drawn, slope);
    let furthest = 0;
    for (let k = 0; k < cuts; k++) {
      const solved = volts - (ladder.drops[k] ?? 0);
      const change = solved - (points[k] ?? 0);
      furthest = Math.max(furthest, Math.abs(change));
      const along = (amps[k] ?? 0) + (slope[k] ?? 0) * change;
      const own = change > 0 ? along : stringAmps(string, solved);
      amps[k] = own;
      points[k] = change > 0 ? stringVolts(string, own) : solved;
      slope[k] = 1 / stringSlopeOhms(string, own);
    }
    if (furthest <= settled) return amps;
  }
  return noSolution('load', 'the figures do not settle');
}

function loadAmpsOf(input: TapeInput, circuit: TapeCircuit, ladder: TapeLadder): Float64Array {
  const { load, cuts } = input;
  const volts = circuit.highestVolts;
  if (load.model === 'constant-current') return linearLoads(ladder, cuts, load.amps, 0);
  if (load.model === 'resistive') return linearLoads(ladder, cuts, volts / load.ohms, 1 / load.ohms);
  const string: SeriesString = {
    ohms: load.ballastOhms + load.leds * load.seriesOhms,
    junctions: [
      {
        slopeVolts: load.leds * load.emissionCoefficient * thermalVolts(input.celsius ?? LED_CELSIUS),
        saturationAmps: load.saturationAmps,
      },
    ],
  };
  return ledStrings(ladder, string, startAmps(string, circuit, input), input, volts);
}

/** Of conductors that zero ohms tie together each carries the same. */
function feedAmpsOf({ joints }: TapeCircuit, jointAmps: Float64Array): number[] {
  const members = new Map<number, number>();
  const ownerOf = (i: number) => ((joints[i]?.positiveTie ?? -1) < 0 ? i : (joints[i]?.positiveTie ?? i));
  joints.forEach((_, i) => members.set(ownerOf(i), (members.get(ownerOf(i)) ?? 0) + 1));
  const amps = new Array<number>(joints.length).fill(0);
  joints.forEach(
    ({ index }, i) => (amps[index] = (jointAmps[ownerOf(i)] ?? 0) / (members.get(ownerOf(i)) ?? 1)),
  );
  return amps;
}

/**
 * Volts and amps of every load and the current of every feed.
 * @returns amps A, volts V
 * @throws {EngineError} `no-solution` where there is no operating point, `invalid-input` where one source has two
 * resistances.
 * Source: Kirchhoff's laws; Shockley equation with series resistance.
 */
export function operatingPoint(input: TapeInput): OperatingPoint {
  const sources = sourcesOf(input.feeds, input.sourceOhms);
  const circuit = tapeCircuit(input.feeds, sources, input);
  const ladder = new TapeLadder(circuit, input);
  const loadAmps = loadAmpsOf(input, circuit, ladder);
  const sourceOfFeed = new Array<number>(input.feeds.length).fill(0);
  sources.forEach(({ feeds }, s) => feeds.forEach((index) => (sourceOfFeed[index] = s)));
  return {
    sources,
    highestVolts: circuit.highestVolts,
    sourceOfFeed,
    feedAmps: feedAmpsOf(circuit, ladder.jointAmps),
    loadDrops: ladder.drops,
    loadAmps,
  };
}
