/** A luminous intensity distribution (type C): its angles checked, its symmetry unfolded, and read between angles. */

export type Symmetry = 'rotational' | 'quadrant' | 'bilateral-0-180' | 'bilateral-90-270' | 'none';

/** Intensities all round: planes from 0 to 360 degrees, 360 the same as 0. */
export interface Distribution {
  /** Degrees from straight down, ascending. */
  vertical: number[];
  /** Degrees about the vertical axis, from 0 to 360. */
  horizontal: number[];
  /** Candela: one row per horizontal angle, one figure per vertical angle. */
  candela: number[][];
}

/** What the planes of a file cover, as its first and last angle say; null where they fit no symmetry. */
export function symmetryOf(horizontal: readonly number[]): Symmetry | null {
  const first = horizontal[0];
  const last = horizontal.at(-1);
  if (horizontal.length === 1) return first === 0 ? 'rotational' : null;
  if (first === 90) return last === 270 ? 'bilateral-90-270' : null;
  if (first !== 0) return null;
  return last === 90 ? 'quadrant' : last === 180 ? 'bilateral-0-180' : last === 360 ? 'none' : null;
}

/** How many planes there are once a symmetry is unfolded, 360 among them. */
export const unfoldedPlanes = (planes: number, symmetry: Symmetry): number =>
  ({
    rotational: 5,
    quadrant: 4 * planes - 3,
    'bilateral-0-180': 2 * planes - 1,
    'bilateral-90-270': 2 * planes + 1,
    none: planes + 1,
  })[symmetry];

/** Where a plane shows again: itself, and its mirror images in the planes of symmetry. */
const IMAGES: Readonly<Record<Symmetry, (degrees: number) => number[]>> = {
  rotational: () => [0, 90, 180, 270],
  quadrant: (c) => [c, 180 - c, 180 + c, 360 - c],
  'bilateral-0-180': (c) => [c, 360 - c],
  'bilateral-90-270': (c) => [c, 180 - c],
  none: (c) => [c],
};

const turned = (degrees: number) => ((degrees % 360) + 360) % 360;

/** All planes from 0 to 360 out of those of a file. Angles are told apart to a millionth of a degree. */
export function unfold(
  vertical: number[],
  horizontal: readonly number[],
  planes: readonly number[][],
  symmetry: Symmetry,
): Distribution {
  const all = new Map<number, { degrees: number; plane: number[] }>();
  planes.forEach((plane, k) => {
    for (const image of IMAGES[symmetry](horizontal[k] ?? 0)) {
      const degrees = turned(image);
      const key = Math.round(degrees * 1e6) % 360e6;
      if (!all.has(key)) all.set(key, { degrees, plane });
    }
  });
  const sorted = [...all.values()].sort((a, b) => a.degrees - b.degrees);
  const first = sorted[0];
  if (first) sorted.push({ degrees: 360, plane: first.plane });
  return {
    vertical,
    horizontal: sorted.map(({ degrees }) => degrees),
    candela: sorted.map(({ plane }) => plane),
  };
}

/** The highest index whose value is not over `x`, at most the last but one. */
function below(values: readonly number[], x: number): number {
  let low = 0;
  let high = values.length - 2;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if ((values[middle] ?? 0) <= x) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** Where `x` lies among the values: 2.25 is a quarter of the way from the third to the fourth. */
function positionIn(values: readonly number[], x: number): number {
  const index = below(values, x);
  const from = values[index] ?? 0;
  const to = values[index + 1] ?? from;
  return to > from ? index + Math.min(1, Math.max(0, (x - from) / (to - from))) : index;
}

function valueAt(values: readonly number[] | undefined, position: number): number {
  const index = Math.floor(position);
  const from = values?.[index] ?? 0;
  return from + ((values?.[index + 1] ?? from) - from) * (position - index);
}

/**
 * Intensity towards C `horizontal` and gamma `vertical`, in degrees; straight lines between angles both ways. Nothing
 * is emitted where the file has no angles.
 * Source: linear interpolation in C and gamma as in CIE 140 and EN 13201-3 (from memory).
 */
export function intensityAt(distribution: Distribution, horizontal: number, vertical: number): number {
  const { vertical: angles, candela } = distribution;
  if (vertical < (angles[0] ?? 0) || vertical > (angles.at(-1) ?? 0)) return 0;
  const c = positionIn(distribution.horizontal, turned(horizontal));
  const gamma = positionIn(angles, vertical);
  const plane = Math.floor(c);
  const from = valueAt(candela[plane], gamma);
  return c === plane ? from : from + (valueAt(candela[plane + 1], gamma) - from) * (c - plane);
}

/** What is wrong with vertical angles of type C, and with which; null where they are right. */
export function verticalFault(angles: readonly number[]): { index: number; message: string } | null {
  return (
    notAscending(angles, 'vertical') ??
    (angles[0] !== 0 && angles[0] !== 90
      ? { index: 0, message: `vertical angles must start at 0 or 90 (type C), and start at ${angles[0]}` }
      : null) ??
    (angles.length < 2 || (angles.at(-1) !== 90 && angles.at(-1) !== 180)
      ? {
          index: angles.length - 1,
          message: `vertical angles must end at 90 or 180 (type C), and end at ${angles.at(-1)}`,
        }
      : null)
  );
}

export function notAscending(
  angles: readonly number[],
  which: string,
): { index: number; message: string } | null {
  const index = angles.findIndex((angle, k) => k > 0 && angle <= (angles[k - 1] ?? 0));
  if (index < 0) return null;
  const [before, here] = [angles[index - 1], angles[index]];
  return { index, message: `${which} angles must ascend, and ${here} follows ${before}` };
}

export const HORIZONTAL_RULE =
  'horizontal angles must be 0 alone, or go from 0 to 90, 180 or 360, or from 90 to 270';
