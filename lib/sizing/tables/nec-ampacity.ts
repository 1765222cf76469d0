/**
 * NFPA 70 (NEC) 2023, read in extracts and third-party copies; the licensed standard prevails.
 *
 * Table 310.16: copper, insulated, not more than three current-carrying conductors in a raceway or cable, 30 C
 * ambient. AWG 14 to 1 were read; 1/0 to 4/0 are from memory.
 * Table 310.15(B)(1)(1): ambient other than 30 C. To 60 C read; above from memory.
 * Table 310.15(C)(1): more than three current-carrying conductors.
 * 240.4(D): small conductors.
 */
import { atMost } from '@/lib/engine/contract';

export type Column = 60 | 75 | 90;
export const COLUMNS: readonly Column[] = [60, 75, 90];

export const NEC_310_16: Readonly<Record<string, Readonly<Record<Column, number>>>> = {
  'AWG 14': { 60: 15, 75: 20, 90: 25 },
  'AWG 12': { 60: 20, 75: 25, 90: 30 },
  'AWG 10': { 60: 30, 75: 35, 90: 40 },
  'AWG 8': { 60: 40, 75: 50, 90: 55 },
  'AWG 6': { 60: 55, 75: 65, 90: 75 },
  'AWG 4': { 60: 70, 75: 85, 90: 95 },
  'AWG 3': { 60: 85, 75: 100, 90: 115 },
  'AWG 2': { 60: 95, 75: 115, 90: 130 },
  'AWG 1': { 60: 110, 75: 130, 90: 145 },
  'AWG 1/0': { 60: 125, 75: 150, 90: 170 },
  'AWG 2/0': { 60: 145, 75: 175, 90: 195 },
  'AWG 3/0': { 60: 165, 75: 200, 90: 225 },
  'AWG 4/0': { 60: 195, 75: 230, 90: 260 },
};

/**
 * Below Table 310.16: 18 and 16 AWG as 240.4(D) has them, 24 to 20 as NFPA 79 Table 12.5.1 does. From memory; the
 * cable's own rating prevails. Used behind Class 2 sources, and to tell whether the least size governs.
 */
export const SMALL_COPPER_AMPS: Readonly<Record<string, number>> = {
  'AWG 24': 2,
  'AWG 22': 3,
  'AWG 20': 5,
  'AWG 18': 7,
  'AWG 16': 10,
};

/** Highest overcurrent device, 240.4(D). */
export const NEC_240_4_D: Readonly<Record<string, number>> = {
  'AWG 14': 15,
  'AWG 12': 20,
  'AWG 10': 30,
};

interface AmbientBand {
  /** Highest ambient of the band, C. */
  to: number;
  /** null where the table has no factor: the insulation has nothing left. */
  60: number | null;
  75: number | null;
  90: number | null;
}

export const NEC_AMBIENT: readonly AmbientBand[] = [
  { to: 10, 60: 1.29, 75: 1.2, 90: 1.15 },
  { to: 15, 60: 1.22, 75: 1.15, 90: 1.12 },
  { to: 20, 60: 1.15, 75: 1.11, 90: 1.08 },
  { to: 25, 60: 1.08, 75: 1.05, 90: 1.04 },
  { to: 30, 60: 1, 75: 1, 90: 1 },
  { to: 35, 60: 0.91, 75: 0.94, 90: 0.96 },
  { to: 40, 60: 0.82, 75: 0.88, 90: 0.91 },
  { to: 45, 60: 0.71, 75: 0.82, 90: 0.87 },
  { to: 50, 60: 0.58, 75: 0.75, 90: 0.82 },
  { to: 55, 60: 0.41, 75: 0.67, 90: 0.76 },
  { to: 60, 60: null, 75: 0.58, 90: 0.71 },
  { to: 65, 60: null, 75: 0.47, 90: 0.65 },
  { to: 70, 60: null, 75: 0.33, 90: 0.58 },
  { to: 75, 60: null, 75: null, 90: 0.5 },
  { to: 80, 60: null, 75: null, 90: 0.41 },
  { to: 85, 60: null, 75: null, 90: 0.29 },
];

const NEC_COUNT: readonly { to: number; factor: number }[] = [
  { to: 3, factor: 1 },
  { to: 6, factor: 0.8 },
  { to: 9, factor: 0.7 },
  { to: 20, factor: 0.5 },
  { to: 30, factor: 0.45 },
  { to: 40, factor: 0.4 },
  { to: Infinity, factor: 0.35 },
];

/** Ambient factor of the band that holds the temperature; between two bands the hotter. null: none is listed. */
export function necAmbientFactor(insulation: Column, ambientCelsius: number): number | null {
  return NEC_AMBIENT.find(({ to }) => atMost(ambientCelsius, to))?.[insulation] ?? null;
}

/** Factor for the number of current-carrying conductors in one raceway or cable. */
export function necCountFactor(conductors: number): number {
  return NEC_COUNT.find(({ to }) => conductors <= to)?.factor ?? 0;
}

/** Class 2 DC source, Chapter 9 Table 11(B): to 20 V 5 A, over 20 to 60 V 100/V A; none above. */
export function classTwoLimitAmps(volts: number): number | null {
  if (atMost(volts, 20)) return 5;
  return atMost(volts, 60) ? 100 / volts : null;
}

/** Output circuit of a low-voltage lighting system, 411.6 (2023). */
export const ARTICLE_411_AMPS = 25;

export const NEC_AMPACITY_BASIS =
  'NEC 2023 Table 310.16, 310.15(B)(1) and (C)(1) (read in extracts; the licensed standard prevails)';
export const NEC_LOAD_BASIS =
  'NEC 2023 210.19(A) and 210.20(A), continuous load at 125 % (read in an extract)';
export const NEC_OVERCURRENT_BASIS = 'NEC 2023 240.4(B), 240.4(D) and 240.6(A) (read in extracts)';
export const CLASS_TWO_BASIS = 'NEC 2023 Chapter 9 Table 11(B) (read in an extract)';
