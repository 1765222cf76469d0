/**
 * Utilisation factors of one generic luminaire by room index, for a first guess: a maker's own table always wins.
 * Source: utilisation factor table, spacing ratio 1.5, a course handout, read in a copy.
 */
export const GENERIC_ROOM_INDEX = [0.75, 1, 1.25, 1.5, 2, 2.5, 3, 4, 5] as const;
export const GENERIC_SOURCE =
  'utilisation factor table of a course handout (spacing ratio 1.5), read in a copy';

export interface GenericUtilisation {
  /** Reflectances. */
  ceiling: number;
  walls: number;
  floor: number;
  /** One for each room index. */
  factor: readonly number[];
}

export const GENERIC_UTILISATION: readonly GenericUtilisation[] = [
  { ceiling: 0.7, walls: 0.5, floor: 0.2, factor: [0.43, 0.49, 0.55, 0.6, 0.66, 0.71, 0.75, 0.8, 0.83] },
  { ceiling: 0.7, walls: 0.3, floor: 0.2, factor: [0.35, 0.41, 0.47, 0.52, 0.59, 0.65, 0.69, 0.75, 0.78] },
  { ceiling: 0.7, walls: 0.1, floor: 0.2, factor: [0.29, 0.35, 0.41, 0.46, 0.53, 0.59, 0.63, 0.7, 0.74] },
  { ceiling: 0.5, walls: 0.5, floor: 0.2, factor: [0.38, 0.44, 0.49, 0.53, 0.59, 0.63, 0.66, 0.7, 0.73] },
  { ceiling: 0.5, walls: 0.3, floor: 0.2, factor: [0.31, 0.37, 0.42, 0.46, 0.53, 0.58, 0.61, 0.66, 0.7] },
  { ceiling: 0.5, walls: 0.1, floor: 0.2, factor: [0.27, 0.32, 0.37, 0.41, 0.48, 0.53, 0.57, 0.62, 0.66] },
  { ceiling: 0.3, walls: 0.5, floor: 0.2, factor: [0.3, 0.37, 0.41, 0.45, 0.52, 0.57, 0.6, 0.65, 0.69] },
  { ceiling: 0.3, walls: 0.3, floor: 0.2, factor: [0.28, 0.33, 0.38, 0.41, 0.47, 0.51, 0.54, 0.59, 0.62] },
  { ceiling: 0.3, walls: 0.1, floor: 0.2, factor: [0.24, 0.29, 0.34, 0.37, 0.43, 0.48, 0.51, 0.56, 0.59] },
  { ceiling: 0.0, walls: 0.0, floor: 0.0, factor: [0.19, 0.23, 0.27, 0.3, 0.35, 0.39, 0.42, 0.46, 0.48] },
];
