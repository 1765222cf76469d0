/**
 * Constants of the zonal-cavity method: IES LM-57 and ANSI/IES LS-6-20 (Calculation of Light and Its Effects), read in
 * two public programs that agree.
 */
export const ZONAL_CAVITY_SOURCE = 'IES LM-57 and ANSI/IES LS-6-20, read in public programs';

/** Degrees of a zone, nine to the hemisphere. */
export const ZONE_DEGREES = 10;

/** Share of a zone's light that reaches the plane directly: exp(-a * RCR^b), zones 0-10, 10-20, ... 80-90 degrees. */
export const ZONAL_MULTIPLIER: readonly { a: number; b: number }[] = [
  { a: 0, b: 0 },
  { a: 0.041, b: 0.98 },
  { a: 0.07, b: 1.05 },
  { a: 0.1, b: 1.12 },
  { a: 0.136, b: 1.16 },
  { a: 0.19, b: 1.25 },
  { a: 0.315, b: 1.25 },
  { a: 0.64, b: 1.25 },
  { a: 2.1, b: 0.8 },
];

/** Share of the light of one end of a cavity that reaches the other end directly. */
export const formFactor = (cavityRatio: number): number =>
  0.026 + 0.503 * Math.exp(-0.27 * cavityRatio) + 0.47 * Math.exp(-0.119 * cavityRatio);
/** Under this cavity ratio both ends are one plane. */
export const FLAT = 0.001;

/** Tables of the method end here. */
export const LARGEST_CAVITY_RATIO = 10;
