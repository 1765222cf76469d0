/**
 * One linear solution of a fed tape: every load drawn as b - g * x, x being its drop below a reference voltage.
 *
 * Rails of even resistance split exactly in two ladders without coupling but at the feeds. With R = R+ + R- and
 * k = R-/R per piece: the drop x between the rails is carried by K = (1-k)*I+ + k*I-, dx = R*K, and only the loads
 * draw on it; y = n - k*x (n the negative rail's volts) is carried by D = I+ - I-, dy = -(R+ * R- / R)*D, and no load
 * draws on it. So the cuts between two feeds are eliminated one by one, in sums of positive terms only, which keeps
 * every digit, allows zero ohms and costs the same for each cut; what is left is a band of six unknowns a feed.
 * A bad joint of r ohms in one rail is a place of its own, where no current enters: with I+ = K + k*D and
 * I- = K - (1-k)*D the volts beyond it are x + r*I and, in the positive rail, y - k*r*I, in the negative y + (1-k)*r*I.
 */
import { EngineError } from '@/lib/engine/contract';
import { banded, factor, type Factored, setEntry, solveFactored } from './banded';
import { isFeed, type Joint, type SharedDrop, type TapeCircuit } from './tape-circuit';

/** Between two joints, or beyond the first or last (no current enters there). */
interface Stretch {
  /** Loads first..end-1, counted from 0; load k sits at k + 1/2. */
  first: number;
  end: number;
  from: number;
  to: number;
}

/** What a stretch looks like from its far end: current out = G*x - B + A*K, drop at its near end = A*x - rho*K + e. */
interface Seen {
  G: number;
  B: number;
  A: number;
  rho: number;
  e: number;
}

const UNKNOWNS = 6;
const X = 0;
const Y = 1;
const POSITIVE = 2;
const NEGATIVE = 3;
const K = 4;
const D = 5;

export class TapeLadder {
  /** Drop of each load below the reference. */
  readonly drops: Float64Array;
  /**
   * Currents in and back of the feeds in the order of the joints, ties not yet shared out; of a bad joint what the
   * rails carry through it.
   */
  readonly positiveAmps: Float64Array;
  readonly negativeAmps: Float64Array;
  private readonly pieceOhms: number;
  private readonly negativeShare: number;
  private readonly commonOhms: number;
  private readonly stretches: Stretch[];
  private readonly keptG: Float64Array;
  private readonly keptB: Float64Array;
  private readonly keptA: Float64Array;

  constructor(private readonly circuit: TapeCircuit) {
    const { positive, negative } = circuit.pieceOhms;
    this.pieceOhms = positive + negative;
    this.negativeShare = this.pieceOhms > 0 ? negative / this.pieceOhms : 0.5;
    this.commonOhms = positive * this.negativeShare;
    this.drops = new Float64Array(circuit.cuts);
    this.keptG = new Float64Array(circuit.cuts);
    this.keptB = new Float64Array(circuit.cuts);
    this.keptA = new Float64Array(circuit.cuts);
    this.positiveAmps = new Float64Array(circuit.joints.length);
    this.negativeAmps = new Float64Array(circuit.joints.length);
    this.stretches = stretchesOf(circuit.joints, circuit.cuts);
  }

  /** Solves for loads that draw drawn[k] - slope[k] * drop[k]; fills the drops and the feeds' amps. */
  solve(drawn: Float64Array, slope: Float64Array, referenceVolts: number): void {
    const seen = this.stretches.map((stretch, i) => this.eliminate(stretch, i, drawn, slope));
    const state = this.solveJoints(seen, referenceVolts);
    this.circuit.joints.forEach((joint, i) => {
      const of = (unknown: number) => state[i * UNKNOWNS + unknown] ?? 0;
      const k = this.negativeShare;
      this.positiveAmps[i] = isFeed(joint) ? of(POSITIVE) : of(K) + k * of(D);
      this.negativeAmps[i] = isFeed(joint) ? of(NEGATIVE) : of(K) - (1 - k) * of(D);
    });
    this.stretches.forEach((stretch, i) => this.restore(stretch, i, state));
  }

  /** Walks the stretch's loads away from its near end; beyond the last joint the walk is from the tape's end. */
  private eliminate(stretch: Stretch, i: number, drawn: Float64Array, slope: Float64Array): Seen {
    const { first, end, from, to } = stretch;
    const step = to >= from ? 1 : -1;
    const dead = i === 0 || i === this.stretches.length - 1;
    const seen: Seen = { G: 0, B: 0, A: dead ? 0 : 1, rho: 0, e: 0 };
    let position = from;
    for (let n = 0; n < end - first; n++) {
      const k = step > 0 ? first + n : end - 1 - n;
      inSeries(seen, Math.abs(k + 0.5 - position) * this.pieceOhms);
      position = k + 0.5;
      seen.G += slope[k] ?? 0;
      seen.B += drawn[k] ?? 0;
      this.keptG[k] = seen.G;
      this.keptB[k] = seen.B;
      this.keptA[k] = seen.A;
    }
    inSeries(seen, Math.abs(to - position) * this.pieceOhms + this.beyondLast(i));
    return seen;
  }

  /** Bad joint just before the last stretch: both rails carry the same there, so its place in either is one. */
  private beyondLast(i: number): number {
    const { joints } = this.circuit;
    const rails = i === joints.length ? joints[i - 1]?.inRails : undefined;
    return rails ? rails.positive + rails.negative : 0;
  }

  /** The way back: from the joint at the far end to every load of the stretch. */
  private restore(stretch: Stretch, i: number, state: Float64Array): void {
    const { first, end, from, to } = stretch;
    const step = to >= from ? 1 : -1;
    const joint = Math.min(i, this.circuit.joints.length - 1);
    const entering = i === 0 || i === this.stretches.length - 1 ? 0 : (state[(i - 1) * UNKNOWNS + K] ?? 0);
    let drop = state[joint * UNKNOWNS + X] ?? 0;
    let position = to;
    for (let n = 0; n < end - first; n++) {
      const k = step > 0 ? end - 1 - n : first + n;
      const lumped = n === 0 ? this.beyondLast(i) : 0;
      const ohms = Math.abs(position - (k + 0.5)) * this.pieceOhms + lumped;
      const drawn = (this.keptB[k] ?? 0) - (this.keptA[k] ?? 0) * entering;
      drop = (drop + ohms * drawn) / (1 + (this.keptG[k] ?? 0) * ohms);
      position = k + 0.5;
      this.drops[k] = drop;
    }
  }

  private solveJoints(seen: readonly Seen[], referenceVolts: number): Float64Array {
    const { joints, drops } = this.circuit;
    const { matrix, rhs } = this.equations(seen, referenceVolts);
    const factored = factor(matrix);
    if (!factored) {
      throw new EngineError('no-solution', 'The feeds leave the currents undetermined.', [
        { path: 'feeds', message: 'leave the currents undetermined' },
      ]);
    }
    const state = solveFactored(factored, rhs.slice());
    return drops.length === 0 ? state : withShared(factored, rhs, state, joints, drops);
  }

  private equations(seen: readonly Seen[], referenceVolts: number) {
    const { joints } = this.circuit;
    const matrix = banded(joints.length * UNKNOWNS, 4, 5);
    const rhs = new Float64Array(joints.length * UNKNOWNS);
    const k = this.negativeShare;
    joints.forEach((joint, i) => {
      const at = i * UNKNOWNS;
      const set = (row: number, column: number, value: number) =>
        setEntry(matrix, at + row, at + column, value);
      const left = seen[i] as Seen;
      const last = i === joints.length - 1;
      // Current K: out of the stretch before, in from both conductors, into the stretch after.
      set(0, X, left.G);
      if (i > 0) set(0, K - UNKNOWNS, left.A);
      set(0, POSITIVE, 1 - k);
      set(0, NEGATIVE, k);
      set(0, K, -1);
      rhs[at] = left.B;
      // Current D.
      if (i > 0) set(1, D - UNKNOWNS, 1);
      set(1, POSITIVE, 1);
      set(1, NEGATIVE, -1);
      set(1, D, -1);
      conductors(set, joint, k);
      if (joint.positiveTie < 0) rhs[at + 2] = joint.volts - referenceVolts;
      const right = seen[i + 1] as Seen;
      if (last) {
        set(4, X, right.G);
        set(4, K, 1);
        rhs[at + 4] = right.B;
        set(5, D, 1);
        return;
      }
      // Along the stretch after: x, and y.
      const { positive, negative } = joint.inRails ?? { positive: 0, negative: 0 };
      set(4, X, 1);
      set(4, K, right.rho + positive + negative);
      set(4, D, k * positive - (1 - k) * negative);
      set(4, X + UNKNOWNS, -right.A);
      rhs[at + 4] = right.e;
      set(5, Y + UNKNOWNS, 1);
      set(5, Y, -1);
      set(5, K, k * positive - (1 - k) * negative);
      const apart = ((joints[i + 1] as Joint).at - joint.at) * this.commonOhms;
      set(5, D, apart + k * k * positive + (1 - k) * (1 - k) * negative);
    });
    return { matrix, rhs };
  }
}

/** Volts along the positive and the negative conductor of a feed; of a tie only the first has an equation. */
function conductors(
  set: (row: number, column: number, value: number) => void,
  joint: Joint,
  k: number,
): void {
  if (joint.positiveTie < 0) {
    set(2, X, k - 1);
    set(2, Y, 1);
    set(2, POSITIVE, joint.positiveOhms);
  } else set(2, POSITIVE, 1);
  if (joint.negativeTie < 0) {
    set(3, X, k);
    set(3, Y, 1);
    set(3, NEGATIVE, -joint.negativeOhms);
  } else set(3, NEGATIVE, 1);
}

function stretchesOf(joints: readonly Joint[], cuts: number): Stretch[] {
  // A joint half-way along a cut sits on its load.
  const loadsBefore = (at: number) => Math.ceil(at - 0.5);
  const stretches: Stretch[] = [];
  let previous: Joint | undefined;
  for (const joint of joints) {
    const first = previous ? loadsBefore(previous.at) : 0;
    stretches.push({ first, end: loadsBefore(joint.at), from: previous ? previous.at : 0, to: joint.at });
    previous = joint;
  }
  const last = previous as Joint;
  stretches.push({ first: loadsBefore(last.at), end: cuts, from: cuts, to: last.at });
  return stretches;
}

/** Adds resistance at the end where the stretch is seen from. */
function inSeries(seen: Seen, ohms: number): void {
  const share = 1 / (1 + seen.G * ohms);
  seen.rho += seen.A * seen.A * ohms * share;
  seen.e += seen.A * ohms * seen.B * share;
  seen.G *= share;
  seen.B *= share;
  seen.A *= share;
}

const sumOf = (state: Float64Array, of: readonly number[]) =>
  of.reduce((sum, joint) => sum + (state[joint * UNKNOWNS + POSITIVE] ?? 0), 0);

/** Source resistances that several feeds share couple distant feeds: a small dense system beside the band. */
function withShared(
  factored: Factored,
  rhs: Float64Array,
  alone: Float64Array,
  joints: readonly Joint[],
  drops: readonly SharedDrop[],
): Float64Array {
  const apply = (into: Float64Array, { rows }: SharedDrop, volts: number) => {
    for (const joint of rows) {
      if ((joints[joint] as Joint).positiveTie < 0) {
        const row = joint * UNKNOWNS + 2;
        into[row] = (into[row] ?? 0) - volts;
      }
    }
  };
  // The drops' volts t: t_a = ohms_a * (current alone + sum over b of response to t_b).
  const n = drops.length;
  const matrix = banded(n, n - 1, n - 1);
  const own = new Float64Array(n);
  drops.forEach((column, b) => {
    const response = new Float64Array(rhs.length);
    apply(response, column, 1);
    solveFactored(factored, response);
    drops.forEach(({ ohms, of }, a) =>
      setEntry(matrix, a, b, (a === b ? 1 : 0) - ohms * sumOf(response, of)),
    );
  });
  drops.forEach(({ ohms, of }, a) => (own[a] = ohms * sumOf(alone, of)));
  const dense = factor(matrix);
  if (!dense) {
    throw new EngineError('no-solution', 'The sources leave the currents undetermined.', [
      { path: 'feeds', message: 'leave the currents undetermined' },
    ]);
  }
  const volts = solveFactored(dense, own);
  const coupled = rhs.slice();
  drops.forEach((drop, b) => apply(coupled, drop, volts[b] ?? 0));
  return solveFactored(factored, coupled);
}
