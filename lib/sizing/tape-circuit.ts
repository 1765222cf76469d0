/** A tape's sources and feeds as a circuit: who shares a source, in what order they join, what zero ohms tie. */
import { atLeast, atMost, EngineError, refuse } from '@/lib/engine/contract';

export interface TapeFeed {
  /** Boundary, 0 (start) to cuts (end). */
  at: number;
  volts: number;
  positiveOhms: number;
  negativeOhms: number;
  source?: string | undefined;
  sourceOhms?: number | undefined;
}

/** A bad joint in one rail, between two cuts. */
export interface RailJoint {
  /** Boundary, 1 to cuts - 1; a feed at the same boundary joins on the side of the start. */
  at: number;
  rail: 'positive' | 'negative';
  ohms: number;
}

export interface Rails {
  cuts: number;
  cutMetres: number;
  railOhmsPerMetre: { positive: number; negative: number };
}

/** Feeds behind one source. */
export interface Source {
  volts: number;
  ohms: number;
  /** Indices of its feeds as given. */
  feeds: number[];
}

/**
 * Less than any joint made: taken as none. Resistances that are lost beside the others' rounding would leave the
 * split between parallel conductors undetermined.
 */
const NEGLIGIBLE_OHMS = 1e-12;
const ohmsOrNone = (ohms: number) => (ohms < NEGLIGIBLE_OHMS ? 0 : ohms);

const same = (a: number, b: number) => atMost(a, b) && atLeast(a, b);

function ownOhms(feeds: readonly TapeFeed[], members: readonly number[], common: number | undefined): number {
  let ohms = common;
  for (const index of members) {
    const own = feeds[index]?.sourceOhms;
    if (own === undefined) continue;
    if (ohms !== undefined && !same(ohms, own)) {
      refuse(`feeds.${index}.sourceOhms`, 'differs from the sourceOhms of the same source: it has one');
    }
    ohms = own;
  }
  return ohms ?? 0;
}

/**
 * Feeds with the same source name (and volts) stand behind one source; a feed without a name joins the first source
 * of its volts. The source of the first feed has the tape's common sourceOhms, any other its feeds' own; 0 unless given.
 */
export function sourcesOf(feeds: readonly TapeFeed[], sourceOhms: number | undefined): Source[] {
  const groups: { name: string | undefined; volts: number; feeds: number[] }[] = [];
  const join = (index: number, { source, volts }: TapeFeed) => {
    const group = groups.find((g) => same(g.volts, volts) && (source === undefined || g.name === source));
    if (group) group.feeds.push(index);
    else groups.push({ name: source, volts, feeds: [index] });
  };
  feeds.forEach((feed, index) => feed.source !== undefined && join(index, feed));
  feeds.forEach((feed, index) => feed.source === undefined && join(index, feed));
  return groups.map(({ volts, feeds: members }) => ({
    volts,
    ohms: ohmsOrNone(ownOhms(feeds, members, members.includes(0) ? sourceOhms : undefined)),
    feeds: members.sort((a, b) => a - b),
  }));
}

/** A feed, or a bad joint of the rails, in the order of the tape, as the solver wants it. */
export interface Joint {
  /** As given; of a bad joint its place among the tape's joints. */
  index: number;
  /** -1 for a bad joint of the rails: no conductors join there. */
  source: number;
  /** In the rails just after this place, ohm; null where a feed joins. */
  inRails: { positive: number; negative: number } | null;
  at: number;
  /** Of its source. */
  volts: number;
  positiveOhms: number;
  negativeOhms: number;
  /**
   * Joint with which zero ohms tie its positive (negative) conductor: their split can't be told, the first of a tie
   * carries all in the equations. -1 where there is none.
   */
  positiveTie: number;
  negativeTie: number;
}

/** A voltage ohms * (sum of the positive feed currents of `of`) that lowers what the feeds of `rows` see. */
export interface SharedDrop {
  ohms: number;
  of: number[];
  rows: number[];
}

export interface TapeCircuit {
  cuts: number;
  /** Of one cut. */
  pieceOhms: { positive: number; negative: number };
  joints: Joint[];
  drops: SharedDrop[];
  highestVolts: number;
}

export const isFeed = (joint: Joint) => joint.inRails === null;

/** No conductors: both currents are nought, which is what a tie says of all but its first. */
const railJoint = ({ at, rail, ohms }: RailJoint, index: number): Joint => ({
  index,
  source: -1,
  inRails: {
    positive: rail === 'positive' ? ohmsOrNone(ohms) : 0,
    negative: rail === 'negative' ? ohmsOrNone(ohms) : 0,
  },
  at,
  volts: 0,
  positiveOhms: 0,
  negativeOhms: 0,
  positiveTie: 0,
  negativeTie: 0,
});

function jointsOf(
  feeds: readonly TapeFeed[],
  sources: readonly Source[],
  railJoints: readonly RailJoint[],
): Joint[] {
  const joints = sources.flatMap((source, s) =>
    source.feeds.map((index): Joint => {
      const feed = feeds[index] as TapeFeed;
      // A source with one feed is simply in series with it.
      const inSeries = source.feeds.length === 1 ? source.ohms : 0;
      return {
        index,
        source: s,
        inRails: null,
        at: feed.at,
        volts: source.volts,
        positiveOhms: ohmsOrNone(feed.positiveOhms + inSeries),
        negativeOhms: ohmsOrNone(feed.negativeOhms),
        positiveTie: -1,
        negativeTie: -1,
      };
    }),
  );
  return [...joints, ...railJoints.map(railJoint)].sort(
    (a, b) => a.at - b.at || Number(isFeed(b)) - Number(isFeed(a)) || a.index - b.index,
  );
}

/** Every feed's negative conductor ends at the one negative terminal: zero ohms at one place are one conductor. */
function tieNegatives(joints: Joint[], placeOf: (joint: Joint) => number): void {
  const owners = new Map<number, number>();
  joints.forEach((joint, i) => {
    if (!isFeed(joint) || joint.negativeOhms > 0) return;
    const owner = owners.get(placeOf(joint));
    if (owner === undefined) owners.set(placeOf(joint), i);
    else joint.negativeTie = owner;
  });
}

function clash(index: number): never {
  const message = 'joins another source of other volts with no resistance between them';
  throw new EngineError('no-solution', `feeds.${index}: ${message}.`, [{ path: `feeds.${index}`, message }]);
}

/**
 * Positive conductors without resistance at one place: of one source they are one conductor; of two sources without
 * resistance they must have the same volts; a source with resistance gets it written into its feed's own equation.
 */
function tiePositives(
  joints: Joint[],
  sources: readonly Source[],
  placeOf: (joint: Joint) => number,
): SharedDrop[] {
  const drops: SharedDrop[] = [];
  const owners = new Map<number, Map<number, number>>();
  const ideal = (source: number) => (sources[source]?.ohms ?? 0) === 0;
  const zero = joints
    .map((_, i) => i)
    .filter((i) => {
      const joint = joints[i] as Joint;
      return isFeed(joint) && joint.positiveOhms === 0;
    });
  for (const i of [...zero].sort(
    (a, b) => Number(ideal(joints[b]?.source ?? 0)) - Number(ideal(joints[a]?.source ?? 0)),
  )) {
    const joint = joints[i] as Joint;
    const here = owners.get(placeOf(joint)) ?? new Map<number, number>();
    owners.set(placeOf(joint), here);
    // Sources without resistance are one owner, -1, whatever their name.
    const key = ideal(joint.source) ? -1 : joint.source;
    const owner = here.get(key);
    if (owner !== undefined) {
      if (!same(joints[owner]?.volts ?? 0, joint.volts)) clash(joint.index);
      joint.positiveTie = owner;
      continue;
    }
    if (here.size > 0) {
      const ohms = sources[joint.source]?.ohms ?? 0;
      joint.positiveOhms = ohms;
      drops.push({ ohms: -ohms, of: [i], rows: [i] });
    }
    here.set(key, i);
  }
  return drops;
}

/** Orders, groups and ties the feeds of a tape. */
export function tapeCircuit(
  feeds: readonly TapeFeed[],
  sources: readonly Source[],
  rails: Rails,
  railJoints: readonly RailJoint[] = [],
): TapeCircuit {
  const highestVolts = sources.reduce((highest, { volts }) => Math.max(highest, volts), 0);
  const joints = jointsOf(feeds, sources, railJoints);
  const { cuts, cutMetres, railOhmsPerMetre } = rails;
  const pieceOf = (ohmsPerMetre: number) => ohmsOrNone(ohmsPerMetre * cutMetres * cuts) / cuts;
  const pieceOhms = {
    positive: pieceOf(railOhmsPerMetre.positive),
    negative: pieceOf(railOhmsPerMetre.negative),
  };
  // A rail without resistance is one place, or as many as its bad joints make of it.
  const place = (rail: 'positive' | 'negative') => {
    if (pieceOhms[rail] > 0) return ({ at }: Joint) => at;
    const places = new Map<Joint, number>();
    let before = 0;
    for (const joint of joints) {
      places.set(joint, before);
      if ((joint.inRails?.[rail] ?? 0) > 0) before++;
    }
    return (joint: Joint) => places.get(joint) ?? 0;
  };
  tieNegatives(joints, place('negative'));
  const drops = tiePositives(joints, sources, place('positive'));
  sources.forEach(({ ohms, feeds: members }, s) => {
    if (ohms === 0 || members.length < 2) return;
    const own = joints.map((_, i) => i).filter((i) => joints[i]?.source === s);
    drops.push({ ohms, of: own, rows: own });
  });
  return { cuts, pieceOhms, joints, drops, highestVolts };
}
