/**
 * Colours of resistor bands, IEC 60062:2016, read in a third-party copy. Grey's 0.01 % is the 2016 edition's, from
 * memory: pages that were read print 0.05 % (an older edition) and 0.1 % (an error).
 */
export const COLOUR_CODE_BASIS = 'IEC 60062:2016, colour code (read in a third-party copy)';

interface Meaning {
  digit: number | null;
  /** Multiplier as a power of ten. */
  exponent: number;
  tolerancePct: number | null;
  ppmPerKelvin: number | null;
}

const of = (
  digit: number | null,
  exponent: number,
  tolerancePct: number | null,
  ppmPerKelvin: number | null,
): Meaning => ({ digit, exponent, tolerancePct, ppmPerKelvin });

export const COLOUR_CODE = {
  black: of(0, 0, null, 250),
  brown: of(1, 1, 1, 100),
  red: of(2, 2, 2, 50),
  orange: of(3, 3, 0.05, 15),
  yellow: of(4, 4, 0.02, 25),
  green: of(5, 5, 0.5, 20),
  blue: of(6, 6, 0.25, 10),
  violet: of(7, 7, 0.1, 5),
  grey: of(8, 8, 0.01, 1),
  white: of(9, 9, null, null),
  gold: of(null, -1, 5, null),
  silver: of(null, -2, 10, null),
  pink: of(null, -3, null, null),
} as const satisfies Record<string, Meaning>;

export type BandColour = keyof typeof COLOUR_CODE;
export const BAND_COLOURS = Object.keys(COLOUR_CODE) as [BandColour, ...BandColour[]];
/** Without a tolerance band. */
export const PLAIN_TOLERANCE_PCT = 20;
