/** Least squares on volts of the LED's law, V = a * ln(1 + I/Is) + I*Rs with a = n*kT/q. */

import { stringVolts } from './diode';
import { conditionNumber, normalEquations, solve } from './led-fit-equations';

export interface Reading {
  volts: number;
  amps: number;
}

export interface FittedCurve {
  /** a = n*kT/q, V. */
  slopeVolts: number;
  saturationAmps: number;
  seriesOhms: number;
  /** Root of the mean square of what is left, V. */
  residualVolts: number;
  /** Largest that is left of any reading, V. */
  residualMaxVolts: number;
  /** Of the three columns scaled to unit length: how far the readings tell the three figures apart. */
  conditionNumber: number;
}

/** Forward volts of a fitted curve. */
export function voltsAt(curve: FittedCurve, amps: number): number {
  return stringVolts({ ohms: curve.seriesOhms, junctions: [curve] }, amps);
}

/**
 * a; v0, the junction's volts at the middle current I0; r, the volts over Rs at the highest current. With Is written
 * as I0 * exp(-v0/a) all three are volts of one size, and the law is all but straight in them where I >> Is.
 */
type Parameters = readonly [a: number, v0: number, r: number];

interface Scaled {
  /** ln(I/I0) */
  x: number;
  /** I/Imax */
  share: number;
  volts: number;
}

const MOST_STEPS = 300;
const MOST_TRIES = 40;
/** A step that changes no parameter by more than this, of its size, changes nothing. */
const LAST_STEP = 1e-15;
/** Saturation currents that the search begins from, beside the straight start: of the lowest current, by decades. */
const STARTS = Array.from({ length: 20 }, (_, k) => 10 ** (k / 2 - 6));

/** ln(1 + e^u), at any u. */
const softplus = (u: number): number => Math.max(u, 0) + Math.log1p(Math.exp(-Math.abs(u)));
const sigmoid = (u: number): number => 1 / (1 + Math.exp(-u));

const modelVolts = ([a, v0, r]: Parameters, { x, share }: Scaled): number =>
  a * softplus(x + v0 / a) + r * share;

function slopes([a, v0]: Parameters, { x, share }: Scaled): Parameters {
  const u = x + v0 / a;
  const s = sigmoid(u);
  return [softplus(u) - (s * v0) / a, s, share];
}

function squares(p: Parameters, points: readonly Scaled[]): number {
  let sum = 0;
  for (const point of points) sum += (point.volts - modelVolts(p, point)) ** 2;
  return Number.isFinite(sum) ? sum : Infinity;
}

/** Where I >> Is, V = a*ln(I/I0) + v0 + r*share is linear in all three; r at 0 where it would fall below. */
function straightStart(points: readonly Scaled[]): Parameters | null {
  const equations = normalEquations(
    points,
    ({ x, share }) => [x, 1, share],
    ({ volts }) => volts,
  );
  const free = solve(equations, 3, 0);
  const [a, v0, r] = free !== null && (free[2] ?? -1) >= 0 ? free : (solve(equations, 2, 0) ?? []);
  return a === undefined || v0 === undefined || !(a > 0) ? null : [a, v0, r ?? 0];
}

/** At a given Is the law is linear in a and r: the best of the pair, or of one alone where the other falls below 0. */
function startAt(points: readonly Scaled[], offset: number): Parameters | null {
  const column = ({ x }: Scaled) => softplus(x + offset);
  const equations = normalEquations(
    points,
    (point) => [column(point), point.share, 0],
    ({ volts }) => volts,
  );
  const both = solve(equations, 2, 0);
  if (both !== null && (both[0] ?? -1) > 0 && (both[1] ?? -1) >= 0)
    return [both[0] ?? 0, (both[0] ?? 0) * offset, both[1] ?? 0];
  const [alone = -1] = solve(equations, 1, 0) ?? [];
  return alone > 0 ? [alone, alone * offset, 0] : null;
}

/** Levenberg and Marquardt's steps from a start, with r held at 0 while the squares would push it below. */
function refine(start: Parameters, points: readonly Scaled[]): { p: Parameters; sum: number } {
  let p = start;
  let sum = squares(p, points);
  let damping = 1e-4;
  for (let step = 0; step < MOST_STEPS; step++) {
    const equations = normalEquations(
      points,
      (point) => slopes(p, point),
      (point) => point.volts - modelVolts(p, point),
    );
    const held = p[2] === 0 && (equations.right[2] ?? 0) <= 0;
    let moved = 0;
    for (let tries = 0; tries < MOST_TRIES && moved === 0; tries++) {
      const [da = 0, dv = 0, dr = 0] = solve(equations, held ? 2 : 3, damping) ?? [];
      const next: Parameters = [p[0] + da, p[1] + dv, Math.max(0, p[2] + dr)];
      const after = next[0] > 0 ? squares(next, points) : Infinity;
      if (after < sum) {
        moved = Math.max(Math.abs(da / next[0]), Math.abs(dv) / (Math.abs(next[1]) + next[0]));
        [p, sum, damping] = [next, after, damping * 0.1];
      } else damping = Math.max(damping * 10, 1e-12);
    }
    if (moved <= LAST_STEP) break;
  }
  return { p, sum };
}

/**
 * Fits the LED's law to readings: least squares on volts with Rs >= 0 and n > 0.
 * Linear least squares where I >> Is gives the start; others with Is among the currents are tried beside it; Levenberg
 * and Marquardt's steps on the exact law do the rest. The order of the readings makes no difference.
 * @param readings at least four currents, all volts and amps above zero
 * @returns V, A, ohm; null where no such curve fits (volts that do not rise with the current, or a straight line).
 * Source: Shockley equation with series resistance; D. W. Marquardt, J. SIAM 11 (1963) 431 to 441.
 */
export function fitCurve(readings: readonly Reading[]): FittedCurve | null {
  const sorted = [...readings].sort((one, other) => one.amps - other.amps || one.volts - other.volts);
  const lowest = sorted[0]?.amps ?? 1;
  const highest = sorted.at(-1)?.amps ?? 1;
  const middle = Math.sqrt(lowest) * Math.sqrt(highest);
  const points = sorted.map(({ amps, volts }) => ({
    x: Math.log(amps / middle),
    share: amps / highest,
    volts,
  }));
  const near = STARTS.flatMap((share) => {
    const start = startAt(points, Math.log(middle / (share * lowest)));
    return start === null ? [] : [{ start, sum: squares(start, points) }];
  }).sort((one, other) => one.sum - other.sum)[0];
  const starts = [straightStart(points), near?.start].filter((start) => !!start);
  const [best] = starts.map((start) => refine(start, points)).sort((one, other) => one.sum - other.sum);
  if (!best || !Number.isFinite(best.sum)) return null;
  const [slopeVolts, v0, r] = best.p;
  const saturationAmps = middle * Math.exp(-v0 / slopeVolts);
  const errors = points.map((point) => Math.abs(point.volts - modelVolts(best.p, point)));
  return {
    slopeVolts,
    saturationAmps,
    seriesOhms: r / highest,
    residualVolts: Math.sqrt(best.sum / points.length),
    residualMaxVolts: Math.max(...errors),
    conditionNumber: conditionNumber(points, (point) => slopes(best.p, point)),
  };
}
