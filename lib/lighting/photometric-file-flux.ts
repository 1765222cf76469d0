/** Flux and beam out of a distribution. */
import type { Distribution } from './photometric-file-distribution';
import { intensityAt } from './photometric-file-distribution';

const RADIANS = Math.PI / 180;

/** Mean intensity over all planes at each vertical angle; each plane weighs by the angle it stands for. */
export function meanIntensity({ vertical, horizontal, candela }: Distribution): number[] {
  return vertical.map((_, v) => {
    let sum = 0;
    for (let h = 1; h < horizontal.length; h++) {
      const step = (horizontal[h] ?? 0) - (horizontal[h - 1] ?? 0);
      sum += (((candela[h - 1]?.[v] ?? 0) + (candela[h]?.[v] ?? 0)) / 2) * step;
    }
    return sum / 360;
  });
}

/** One zone between two vertical angles, split where it crosses the horizontal. */
function zonesOf(vertical: readonly number[], mean: readonly number[]) {
  return vertical.slice(1).flatMap((to, k) => {
    const from = vertical[k] ?? 0;
    const [low, high] = [mean[k] ?? 0, mean[k + 1] ?? 0];
    if (from >= 90 || to <= 90) return [{ from, to, low, high }];
    const [a, b] = [Math.cos(from * RADIANS), Math.cos(to * RADIANS)];
    const level = low + (high - low) * (a / (a - b));
    return [
      { from, to: 90, low, high: level },
      { from: 90, to, low: level, high },
    ];
  });
}

export interface Flux {
  totalLumens: number;
  upLumens: number;
  /** The same distribution with straight lines over the angle instead of its cosine: tells how coarse the angles are. */
  linearLumens: number;
}

/**
 * Zonal integration: the mean of the intensities at a zone's two ends times its solid angle 2*pi*(cos t1 - cos t2).
 * Exact for what is linear in the cosine of the angle between listed angles: an isotropic or a Lambertian source at
 * any step.
 * @returns lumens, all round and above the horizontal
 * Source: zonal constants of the IES Lighting Handbook (from memory; solid angles by geometry).
 */
export function zonalFlux(distribution: Distribution): Flux {
  const zones = zonesOf(distribution.vertical, meanIntensity(distribution));
  let [totalLumens, upLumens, linearLumens] = [0, 0, 0];
  for (const { from, to, low, high } of zones) {
    const middle = ((from + to) / 2) * RADIANS;
    const half = ((to - from) / 2) * RADIANS;
    const lumens = ((low + high) / 2) * 4 * Math.PI * Math.sin(middle) * Math.sin(half);
    const bend = Math.cos(middle) * (Math.sin(half) - half * Math.cos(half));
    totalLumens += lumens;
    if (from >= 90) upLumens += lumens;
    linearLumens += lumens + ((high - low) / half) * 2 * Math.PI * bend;
  }
  return { totalLumens, upLumens, linearLumens };
}

/** Where intensity falls under `half`, going outwards from the axis to the horizontal; on past it if it has not by then. */
function outerEdge(angles: readonly number[], candela: readonly number[], half: number): number | null {
  let last = angles.length - 1;
  while (last > 0 && (angles[last] ?? 0) > 90) last -= 1;
  let k = last;
  while (k >= 0 && (candela[k] ?? 0) < half) k -= 1;
  if (k < 0) return null;
  if (k === last) while (k + 1 < angles.length && (candela[k + 1] ?? 0) >= half) k += 1;
  return crossing(angles, candela, k, k + 1, half);
}

function innerEdge(angles: readonly number[], candela: readonly number[], half: number): number {
  const k = candela.findIndex((one) => one >= half);
  return k <= 0 ? 0 : crossing(angles, candela, k, k - 1, half);
}

/** From an angle at or over `half` towards its neighbour under it. */
function crossing(
  angles: readonly number[],
  candela: readonly number[],
  over: number,
  under: number,
  half: number,
): number {
  const [from, to] = [angles[over] ?? 0, angles[under]];
  const [high, low] = [candela[over] ?? 0, candela[under] ?? 0];
  return to === undefined || high <= low ? from : from + ((high - half) / (high - low)) * (to - from);
}

export interface Peak {
  candela: number;
  horizontal: number;
  vertical: number;
}

/** The highest intensity; of equal ones (to 1e-9) the one in the lowest plane, nearest to straight down. */
export function peakOf({ vertical, horizontal, candela }: Distribution): Peak {
  const highest = candela.reduce((most, plane) => plane.reduce((a, b) => Math.max(a, b), most), 0);
  for (let h = 0; h < horizontal.length; h++) {
    const v = candela[h]?.findIndex((one) => one >= highest * (1 - 1e-9)) ?? -1;
    if (v >= 0) return { candela: highest, horizontal: horizontal[h] ?? 0, vertical: vertical[v] ?? 0 };
  }
  return { candela: 0, horizontal: 0, vertical: 0 };
}

/**
 * Width in degrees between the two outermost directions with half of the peak's intensity, in the vertical plane C and
 * C+180, on the peak's side of the horizontal (past it where the intensity stays over a half: 360 for a bare point
 * source). Straight lines between listed angles.
 * @returns null where the plane never reaches a half of the peak
 * Source: 50 % beam angle as in IEC TR 61341 (from memory), of the highest intensity.
 */
export function beamWidth(distribution: Distribution, peak: Peak, plane: number): number | null {
  if (peak.candela === 0) return null;
  const half = peak.candela / 2;
  const down = distribution.vertical[0] === 0 && peak.vertical <= 90;
  const listed = down ? distribution.vertical : [...distribution.vertical].reverse();
  const angles = down ? listed : listed.map((angle) => 180 - angle);
  const side = (c: number) => listed.map((angle) => intensityAt(distribution, c, angle));
  const sides = [side(plane), side(plane + 180)];
  const [one, other] = sides.map((candela) => outerEdge(angles, candela, half));
  if (typeof one === 'number' && typeof other === 'number') return one + other;
  const lit = typeof one === 'number' ? 0 : 1;
  const outer = [one, other][lit];
  return typeof outer === 'number' ? outer - innerEdge(angles, sides[lit] ?? [], half) : null;
}
