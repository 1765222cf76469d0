/** A tape's operating point: loads of any model on the ladder. */
import { EngineError } from '@/lib/engine/contract';
import { type SeriesString, stringAmps, stringSlopeOhms, stringVolts, thermalVolts } from './diode';
import {
  isFeed,
  type RailJoint,
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

/** A segment that is not as the others: its load gone, or some of its string's LEDs shorted. */
export interface SegmentFault {
  /** From 1. */
  cut: number;
  shortedLeds: number | 'open';
}

export interface TapeInput extends Rails {
  load: TapeLoad;
  /** Bad joints in the rails. */
  joints?: readonly RailJoint[] | undefined;
  /** For whoever looks for a fault; not part of a drawing. */
  segmentFaults?: readonly SegmentFault[] | undefined;
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
  /** Out of the source through the positive conductor, and back through the negative one: they may differ. */
  feedAmps: number[];
  feedReturnAmps: number[];
  loadVolts: Float64Array;
  /** Below the highest source volts: more digits of a small drop than the load volts have. */
  loadDrops: Float64Array;
  loadAmps: Float64Array;
  /** Through each bad joint of the rails, away from the tape's start in the positive, towards it in the negative. */
  jointAmps: number[];
}

const LED_CELSIUS = 25;
/** Seventeen were the most seen on anything that settles at all. */
const MAX_STEPS = 200;
/** Newton's error after a step of s slopes is about s^2 / 2 of the current: this leaves it in the last bits. */
const SETTLED = 1e-8;

function noSolution(path: string, message: string): never {
  throw new EngineError('no-solution', `The tape has no operating point: ${message}.`, [{ path, message }]);
}

interface Loads {
  volts: Float64Array;
  /** Below the highest source volts. */
  drops: Float64Array;
  amps: Float64Array;
}

type Faults = readonly SegmentFault[];

const openIn = (figures: Float64Array, faults: Faults): Float64Array => {
  for (const { cut, shortedLeds } of faults) if (shortedLeds === 'open') figures[cut - 1] = 0;
  return figures;
};

/** A current that does not ask for volts, seen from the highest source volts. */
function constantCurrents(
  ladder: TapeLadder,
  cuts: number,
  amps: number,
  volts: number,
  faults: Faults,
): Loads {
  const drawn = openIn(new Float64Array(cuts).fill(amps), faults);
  ladder.solve(drawn, new Float64Array(cuts), volts);
  return { volts: ladder.drops.map((drop) => volts - drop), drops: ladder.drops, amps: drawn };
}

/** Under this share of the source volts, load volts keep more digits when seen from zero. */
const LOW_SHARE = 0.01;

function resistances(ladder: TapeLadder, cuts: number, ohms: number, volts: number, faults: Faults): Loads {
  const slope = openIn(new Float64Array(cuts).fill(1 / ohms), faults);
  const from = (reference: number) => {
    ladder.solve(openIn(new Float64Array(cuts).fill(reference / ohms), faults), slope, reference);
    return ladder.drops.map((drop) => reference - drop);
  };
  let found = from(volts);
  let drops = ladder.drops.slice();
  if (found.some((own) => own < LOW_SHARE * volts)) {
    found = from(0);
    drops = found.map((own) => volts - own);
  }
  return {
    volts: found,
    drops,
    amps: openIn(
      found.map((own) => own / ohms),
      faults,
    ),
  };
}

/** No load gets more than the source can push through the feeds and half a piece: a start above what flows. */
function startAmps(string: SeriesString, { pieceOhms, joints, highestVolts }: TapeCircuit): number {
  const half = (pieceOhms.positive + pieceOhms.negative) / 2;
  const conductance = joints
    .filter(isFeed)
    .reduce((sum, { positiveOhms, negativeOhms }) => sum + 1 / (positiveOhms + negativeOhms + half), 0);
  const amps = Math.min(stringAmps(string, highestVolts), highestVolts * conductance);
  return Number.isFinite(amps) ? amps : noSolution('load', 'nothing limits the current of its LEDs');
}

/**
 * LED strings by Newton. Each load keeps a point on its own exact curve, and the tangent there is what the ladder
 * sees. A load whose volts fall takes its next point at the solved volts, one whose volts rise at the solved amps:
 * the curve is convex, so both lie between the tangent's answer and the old point, and the exponential never runs
 * away. Started from above, the volts fall monotonically; nothing needs to be damped further.
 */
function ledStrings(
  ladder: TapeLadder,
  strings: readonly (SeriesString | null)[],
  circuit: TapeCircuit,
): Loads {
  const { cuts, highestVolts: volts } = circuit;
  const points = new Float64Array(cuts);
  const amps = new Float64Array(cuts);
  const slope = new Float64Array(cuts);
  let slopeVolts = Infinity;
  for (const string of new Set(strings)) {
    if (!string) continue;
    const start = startAmps(string, circuit);
    const at = stringVolts(string, start);
    const rise = 1 / stringSlopeOhms(string, start);
    slopeVolts = Math.min(slopeVolts, string.junctions[0]?.slopeVolts ?? 1);
    strings.forEach((own, k) => {
      if (own === string) [points[k], amps[k], slope[k]] = [at, start, rise];
    });
  }
  const drawn = new Float64Array(cuts);
  // Volts are known to their last bits only.
  const settled = Math.max(SETTLED, (1e-14 * volts) / slopeVolts) * slopeVolts;
  for (let step = 0; step < MAX_STEPS; step++) {
    for (let k = 0; k < cuts; k++) {
      drawn[k] = (amps[k] ?? 0) + (slope[k] ?? 0) * (volts - (points[k] ?? 0));
    }
    ladder.solve(drawn, slope, volts);
    let furthest = 0;
    for (let k = 0; k < cuts; k++) {
      const string = strings[k];
      if (!string) continue;
      const solved = volts - (ladder.drops[k] ?? 0);
      const change = solved - (points[k] ?? 0);
      furthest = Math.max(furthest, Math.abs(change));
      const along = (amps[k] ?? 0) + (slope[k] ?? 0) * change;
      const own = change > 0 ? along : stringAmps(string, solved, amps[k]);
      amps[k] = own;
      points[k] = change > 0 ? stringVolts(string, own) : solved;
      slope[k] = 1 / stringSlopeOhms(string, own);
    }
    if (furthest <= settled) {
      return { volts: ladder.drops.map((drop) => volts - drop), drops: ladder.drops, amps };
    }
  }
  return noSolution('load', 'the figures do not settle; look for resistances that are far too small');
}

function loadsOf(input: TapeInput, circuit: TapeCircuit, ladder: TapeLadder): Loads {
  const { load, cuts, segmentFaults: faults = [] } = input;
  const volts = circuit.highestVolts;
  if (load.model === 'constant-current') return constantCurrents(ladder, cuts, load.amps, volts, faults);
  if (load.model === 'resistive') return resistances(ladder, cuts, load.ohms, volts, faults);
  const stringOf = (leds: number): SeriesString => ({
    ohms: load.ballastOhms + leds * load.seriesOhms,
    junctions: [
      {
        slopeVolts: leds * load.emissionCoefficient * thermalVolts(input.celsius ?? LED_CELSIUS),
        saturationAmps: load.saturationAmps,
      },
    ],
  });
  const strings = new Array<SeriesString | null>(cuts).fill(stringOf(load.leds));
  for (const { cut, shortedLeds } of faults)
    strings[cut - 1] = shortedLeds === 'open' ? null : stringOf(load.leds - shortedLeds);
  return ledStrings(ladder, strings, circuit);
}

/** Of conductors that zero ohms tie together each carries the same. */
function sharedOut(
  { joints }: TapeCircuit,
  amps: Float64Array,
  tie: 'positiveTie' | 'negativeTie',
): number[] {
  const owners = joints.map((joint, i) => (isFeed(joint) && joint[tie] >= 0 ? joint[tie] : i));
  const members = new Map<number, number>();
  for (const owner of owners) members.set(owner, (members.get(owner) ?? 0) + 1);
  const shares: number[] = [];
  owners.forEach((owner, i) => {
    const joint = joints[i];
    if (joint && isFeed(joint)) shares[joint.index] = (amps[owner] ?? 0) / (members.get(owner) ?? 1);
  });
  return shares;
}

function jointAmps({ joints = [] }: TapeInput, circuit: TapeCircuit, ladder: TapeLadder): number[] {
  const amps: number[] = [];
  circuit.joints.forEach((joint, i) => {
    if (isFeed(joint)) return;
    const through = joints[joint.index]?.rail === 'negative' ? ladder.negativeAmps : ladder.positiveAmps;
    amps[joint.index] = through[i] ?? 0;
  });
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
  const circuit = tapeCircuit(input.feeds, sources, input, input.joints);
  const ladder = new TapeLadder(circuit);
  const loads = loadsOf(input, circuit, ladder);
  const sourceOfFeed = new Array<number>(input.feeds.length).fill(0);
  sources.forEach(({ feeds }, s) => feeds.forEach((index) => (sourceOfFeed[index] = s)));
  return {
    sources,
    highestVolts: circuit.highestVolts,
    sourceOfFeed,
    feedAmps: sharedOut(circuit, ladder.positiveAmps, 'positiveTie'),
    feedReturnAmps: sharedOut(circuit, ladder.negativeAmps, 'negativeTie'),
    loadVolts: loads.volts,
    loadDrops: loads.drops,
    loadAmps: loads.amps,
    jointAmps: jointAmps(input, circuit, ladder),
  };
}
