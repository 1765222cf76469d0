/**
 * Preferred values of resistors, IEC 60063:2015, one decade. Listed, not computed: E6, E12 and E24 do not
 * follow 10^(i/n) everywhere (27, 30, 33, 36, 39, 43, 47 and 82 differ). Read in a third-party copy.
 */
export const E_SERIES_BASIS = 'IEC 60063:2015, preferred number series for resistors';

const E6 = [10, 15, 22, 33, 47, 68];
const E12 = [10, 12, 15, 18, 22, 27, 33, 39, 47, 56, 68, 82];
const E24 = [10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91];
const E96 = [
  100, 102, 105, 107, 110, 113, 115, 118, 121, 124, 127, 130, 133, 137, 140, 143, 147, 150, 154, 158, 162,
  165, 169, 174, 178, 182, 187, 191, 196, 200, 205, 210, 215, 221, 226, 232, 237, 243, 249, 255, 261, 267,
  274, 280, 287, 294, 301, 309, 316, 324, 332, 340, 348, 357, 365, 374, 383, 392, 402, 412, 422, 432, 442,
  453, 464, 475, 487, 499, 511, 523, 536, 549, 562, 576, 590, 604, 619, 634, 649, 665, 681, 698, 715, 732,
  750, 768, 787, 806, 825, 845, 866, 887, 909, 931, 953, 976,
];

export const E_SERIES = { E6, E12, E24, E96 } as const satisfies Record<string, readonly number[]>;
export type ESeries = keyof typeof E_SERIES;
export const E_SERIES_NAMES = ['E6', 'E12', 'E24', 'E96'] as const satisfies readonly ESeries[];
