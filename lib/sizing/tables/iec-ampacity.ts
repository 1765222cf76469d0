/**
 * IEC 60364-5-52:2009, read in extracts and third-party transcriptions; the licensed standard prevails.
 *
 * Tables B.52.2 (PVC, two loaded conductors), B.52.3 (XLPE, two), B.52.4 (PVC, three), B.52.5 (XLPE, three): copper,
 * 30 C in air, by reference method. B.52.14: ambient in air. B.52.17 item 1: circuits bunched, embedded or enclosed.
 */
import { atMost } from '@/lib/engine/contract';

export type Insulation = 'PVC70' | 'XLPE90';
export const REFERENCE_METHODS = ['A1', 'A2', 'B1', 'B2', 'C'] as const;
export type ReferenceMethod = (typeof REFERENCE_METHODS)[number];

export const IEC_SIZES = [
  '1.5 mm2',
  '2.5 mm2',
  '4 mm2',
  '6 mm2',
  '10 mm2',
  '16 mm2',
  '25 mm2',
  '35 mm2',
] as const;

type Columns = Readonly<Record<ReferenceMethod, readonly number[]>>;

const B_52_2: Columns = {
  A1: [14.5, 19.5, 26, 34, 46, 61, 80, 99],
  A2: [14, 18.5, 25, 32, 43, 57, 75, 92],
  B1: [17.5, 24, 32, 41, 57, 76, 101, 125],
  B2: [16.5, 23, 30, 38, 52, 69, 90, 111],
  C: [19.5, 27, 36, 46, 63, 85, 112, 138],
};
const B_52_3: Columns = {
  A1: [19, 26, 35, 45, 61, 81, 106, 131],
  A2: [18.5, 25, 33, 42, 57, 76, 99, 121],
  B1: [23, 31, 42, 54, 75, 100, 133, 164],
  B2: [22, 30, 40, 51, 69, 91, 119, 146],
  C: [24, 33, 45, 58, 80, 107, 138, 171],
};
const B_52_4: Columns = {
  A1: [13.5, 18, 24, 31, 42, 56, 73, 89],
  A2: [13, 17.5, 23, 29, 39, 52, 68, 83],
  B1: [15.5, 21, 28, 36, 50, 68, 89, 110],
  B2: [15, 20, 27, 34, 46, 62, 80, 99],
  C: [17.5, 24, 32, 41, 57, 76, 96, 119],
};
const B_52_5: Columns = {
  A1: [17, 23, 31, 40, 54, 73, 95, 117],
  A2: [16.5, 22, 30, 38, 51, 68, 89, 109],
  B1: [20, 28, 37, 48, 66, 88, 117, 144],
  B2: [19.5, 26, 35, 44, 60, 80, 105, 128],
  C: [22, 30, 40, 52, 71, 96, 119, 147],
};

export const IEC_B_52: Readonly<
  Record<Insulation, Readonly<Record<2 | 3, { table: string; amps: Columns }>>>
> = {
  PVC70: { 2: { table: 'B.52.2', amps: B_52_2 }, 3: { table: 'B.52.4', amps: B_52_4 } },
  XLPE90: { 2: { table: 'B.52.3', amps: B_52_3 }, 3: { table: 'B.52.5', amps: B_52_5 } },
};

/**
 * 1 mm2 is under the least that fixed wiring takes; only used to tell whether the least size governs. BS 7671
 * Appendix 4 (tables 4D1A, 4D2A, 4E1A, 4E2A), from memory.
 */
export const ONE_SQUARE_AMPS: Readonly<
  Record<Insulation, Readonly<Record<2 | 3, Readonly<Record<ReferenceMethod, number>>>>>
> = {
  PVC70: {
    2: { A1: 11, A2: 11, B1: 13.5, B2: 13, C: 15 },
    3: { A1: 10.5, A2: 10, B1: 12, B2: 11.5, C: 13.5 },
  },
  XLPE90: {
    2: { A1: 14, A2: 14.5, B1: 17, B2: 17, C: 19 },
    3: { A1: 13, A2: 13, B1: 15, B2: 15, C: 17 },
  },
};

type Steps = readonly (readonly [to: number, factor: number])[];

export const IEC_AMBIENT: Readonly<Record<Insulation, Steps>> = {
  PVC70: [
    [10, 1.22],
    [15, 1.17],
    [20, 1.12],
    [25, 1.06],
    [30, 1],
    [35, 0.94],
    [40, 0.87],
    [45, 0.79],
    [50, 0.71],
    [55, 0.61],
    [60, 0.5],
  ],
  XLPE90: [
    [10, 1.15],
    [15, 1.12],
    [20, 1.08],
    [25, 1.04],
    [30, 1],
    [35, 0.96],
    [40, 0.91],
    [45, 0.87],
    [50, 0.82],
    [55, 0.76],
    [60, 0.71],
    [65, 0.65],
    [70, 0.58],
    [75, 0.5],
    [80, 0.41],
  ],
};

export const IEC_GROUPED: Steps = [
  [1, 1],
  [2, 0.8],
  [3, 0.7],
  [4, 0.65],
  [5, 0.6],
  [6, 0.57],
  [7, 0.54],
  [8, 0.52],
  [9, 0.5],
  [12, 0.45],
  [16, 0.41],
  [20, 0.38],
];
export const MOST_GROUPED = 20;

/** Between two listed figures the harder one; null above the last. */
const listed = (steps: Steps, at: number) => steps.find(([to]) => atMost(at, to))?.[1] ?? null;

/** Ca: factor for ambient air other than 30 C; null where the insulation has nothing left. */
export const iecAmbientFactor = (insulation: Insulation, ambientCelsius: number) =>
  listed(IEC_AMBIENT[insulation], ambientCelsius);

/** Cg: factor for circuits bunched together; null above twenty. */
export const iecGroupFactor = (circuits: number) => listed(IEC_GROUPED, circuits);

export const CONDUCTOR_CELSIUS: Readonly<Record<Insulation, number>> = { PVC70: 70, XLPE90: 90 };

/** Least copper of fixed power and lighting circuits, IEC 60364-5-52:2009 Table 52.2, from memory. */
export const IEC_LEAST_SIZE = '1.5 mm2';

export const IEC_OVERLOAD_BASIS = 'IEC 60364-4-43:2008 433.1, Ib <= In <= Iz (from memory)';
export const IEC_FAULT_BASIS =
  'IEC 60364-4-41:2005 411.4.4 with Cmin 0.95 (from memory); trip bands of IEC 60898-1 (read in a summary)';
export const iecAmpacityBasis = (insulation: Insulation, loaded: 2 | 3) =>
  `IEC 60364-5-52:2009 Tables ${IEC_B_52[insulation][loaded].table}, B.52.14 and B.52.17 (read in extracts; the licensed standard prevails)`;
