/** Where illuminance is calculated: the room less the band along its walls, in cells that are nearly square. */
import { atLeast, ceilWithin, floorWithin } from '@/lib/engine/contract';

/** EN 12464-1 leaves out a band of 0.5 m (read in copies). */
export const WALL_BAND_METRES = 0.5;
const MOST_STEP_METRES = 10;
/** A side shorter than this many bands keeps its band: 2 m, as in a lighting maker's guidance to EN 12464-1. */
const NARROW_BANDS = 4;

export interface Side {
  /** Where the calculated part starts, and how long it is. */
  fromMetres: number;
  metres: number;
  bandDropped: boolean;
}

export interface Grid {
  x: Side;
  y: Side;
  /** Largest step that the area allows (EN 12464-1), or the one that was asked for. */
  mostStepMetres: number;
  columns: number;
  rows: number;
}

function sideOf(metres: number, band: number): Side {
  const bandDropped = band > 0 && !atLeast(metres, NARROW_BANDS * band);
  return bandDropped
    ? { fromMetres: 0, metres, bandDropped }
    : { fromMetres: band, metres: metres - 2 * band, bandDropped };
}

/**
 * p = 0.2 * 5^log10(d) m, 10 m at most.
 * @param metres d: the longer side of the area, the shorter one where the longer is twice as long or more
 * Source: EN 12464-1:2011, read in copies.
 */
export const gridStep = (metres: number): number => Math.min(MOST_STEP_METRES, 0.2 * 5 ** Math.log10(metres));

const nearest = (cells: number) => Math.max(1, floorWithin(cells + 0.5));

/**
 * Cells of the area.
 * @param stepMetres asked for, in place of the standard's
 * @returns d/p cells along d, to the nearest whole number; across, as many as that spacing makes
 * Source: EN 12464-1:2011, read in copies.
 */
export function gridOf(lengthMetres: number, widthMetres: number, band: number, stepMetres?: number): Grid {
  const [x, y] = [sideOf(lengthMetres, band), sideOf(widthMetres, band)];
  if (stepMetres !== undefined) {
    const [columns, rows] = [x, y].map(({ metres }) => Math.max(1, ceilWithin(metres / stepMetres)));
    return { x, y, mostStepMetres: stepMetres, columns: columns ?? 1, rows: rows ?? 1 };
  }
  const [longer, shorter] = [Math.max(x.metres, y.metres), Math.min(x.metres, y.metres)];
  const d = atLeast(longer, 2 * shorter) ? shorter : longer;
  const mostStepMetres = gridStep(d);
  const alongD = nearest(d / mostStepMetres);
  const across = nearest((d === longer ? shorter : longer) / (d / alongD));
  const dIsX = d === x.metres;
  return { x, y, mostStepMetres, columns: dIsX ? alongD : across, rows: dIsX ? across : alongD };
}

/** Middles of the cells along a side. */
export const middles = ({ fromMetres, metres }: Side, cells: number): number[] =>
  Array.from({ length: cells }, (_, k) => fromMetres + ((k + 0.5) * metres) / cells);
