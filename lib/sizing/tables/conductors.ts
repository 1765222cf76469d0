/**
 * Conductor resistances. Read in extracts: the licensed standards prevail.
 *
 * US: NFPA 70 (NEC) 2023, Chapter 9, Table 8, direct-current resistance at 75 C, uncoated copper, the ohm/km
 * column. AWG 18 to 8 are listed solid and stranded, AWG 6 and larger stranded only.
 * Metric: IEC 60228:2004, Tables 1 (class 1, solid), 2 (class 2, stranded) and 3 (class 5, flexible), maximum
 * resistance of plain copper at 20 C, ohm/km.
 */
export type Stranding = 'solid' | 'stranded' | 'flexible';

export interface Table8Row {
  squareMillimetres: number;
  /** ohm/km at 75 C; null where the table lists no such conductor. */
  solid: number | null;
  stranded: number;
}

export const NEC_TABLE_8: Readonly<Record<string, Table8Row>> = {
  'AWG 18': { squareMillimetres: 0.823, solid: 25.5, stranded: 26.1 },
  'AWG 16': { squareMillimetres: 1.31, solid: 16.0, stranded: 16.4 },
  'AWG 14': { squareMillimetres: 2.08, solid: 10.1, stranded: 10.3 },
  'AWG 12': { squareMillimetres: 3.31, solid: 6.34, stranded: 6.5 },
  'AWG 10': { squareMillimetres: 5.261, solid: 3.984, stranded: 4.07 },
  'AWG 8': { squareMillimetres: 8.367, solid: 2.506, stranded: 2.551 },
  'AWG 6': { squareMillimetres: 13.3, solid: null, stranded: 1.608 },
  'AWG 4': { squareMillimetres: 21.15, solid: null, stranded: 1.01 },
  'AWG 3': { squareMillimetres: 26.67, solid: null, stranded: 0.802 },
  'AWG 2': { squareMillimetres: 33.62, solid: null, stranded: 0.634 },
  'AWG 1': { squareMillimetres: 42.41, solid: null, stranded: 0.505 },
  'AWG 1/0': { squareMillimetres: 53.49, solid: null, stranded: 0.399 },
  'AWG 2/0': { squareMillimetres: 67.43, solid: null, stranded: 0.317 },
  'AWG 3/0': { squareMillimetres: 85.01, solid: null, stranded: 0.2512 },
  'AWG 4/0': { squareMillimetres: 107.2, solid: null, stranded: 0.1996 },
};

/** AWG numbers below Table 8, computed from the ASTM B258 diameter. */
export const SMALL_AWG: Readonly<Record<string, number>> = { 'AWG 24': 24, 'AWG 22': 22, 'AWG 20': 20 };

export interface Iec60228Row {
  squareMillimetres: number;
  class1: number;
  class2: number;
  class5: number;
}

export const IEC_60228: Readonly<Record<string, Iec60228Row>> = {
  '0.5 mm2': { squareMillimetres: 0.5, class1: 36.0, class2: 36.0, class5: 39.0 },
  '0.75 mm2': { squareMillimetres: 0.75, class1: 24.5, class2: 24.5, class5: 26.0 },
  '1 mm2': { squareMillimetres: 1, class1: 18.1, class2: 18.1, class5: 19.5 },
  '1.5 mm2': { squareMillimetres: 1.5, class1: 12.1, class2: 12.1, class5: 13.3 },
  '2.5 mm2': { squareMillimetres: 2.5, class1: 7.41, class2: 7.41, class5: 7.98 },
  '4 mm2': { squareMillimetres: 4, class1: 4.61, class2: 4.61, class5: 4.95 },
  '6 mm2': { squareMillimetres: 6, class1: 3.08, class2: 3.08, class5: 3.3 },
  '10 mm2': { squareMillimetres: 10, class1: 1.83, class2: 1.83, class5: 1.91 },
  '16 mm2': { squareMillimetres: 16, class1: 1.15, class2: 1.15, class5: 1.21 },
  '25 mm2': { squareMillimetres: 25, class1: 0.727, class2: 0.727, class5: 0.78 },
  '35 mm2': { squareMillimetres: 35, class1: 0.524, class2: 0.524, class5: 0.554 },
};

export const US_SIZES = [...Object.keys(SMALL_AWG), ...Object.keys(NEC_TABLE_8)] as const;
export const METRIC_SIZES = Object.keys(IEC_60228);
export const ALL_SIZES: readonly string[] = [...US_SIZES, ...METRIC_SIZES];

export const TABLE_8_BASIS = 'NEC 2023 Chapter 9 Table 8 (read in an extract)';
export const B258_BASIS =
  'ASTM B258 diameter at 0.017241 ohm mm2/m, 20 C (IEC 60028 standard annealed copper)';
export const IEC_60228_BASIS = 'IEC 60228:2004 Tables 1 to 3 (read in extracts)';
