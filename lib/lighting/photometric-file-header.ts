/** What a photometric file says of itself, in the same keys whatever its format. */
import type { Distribution, Symmetry } from './photometric-file-distribution';

/** LM-63's tilt block: how lamp output changes as the luminaire is tilted. */
export interface Tilt {
  /** 1 lamp base up or down, 2 lamp horizontal along 0, 3 lamp horizontal across 0 (LM-63). */
  lampGeometry: number;
  angles: number[];
  multipliers: number[];
}

export interface PhotometricHeader {
  format: 'lm-63' | 'eulumdat';
  /** Year of LM-63; what the file writes where that is none that is known; EULUMDAT's own first line. */
  edition: string;
  /** In the file's order; EULUMDAT's lines under LM-63's names. */
  keywords: { key: string; value: string }[];
  photometricType: 'C';
  symmetry: Symmetry;
  /** Intensities as measured, not for lamps of rated lumens. */
  absolute: boolean;
  lamps: number;
  /** Of all lamps together; null where photometry is absolute. */
  lampLumens: number | null;
  /** Total lumens over the lamps'; null where photometry is absolute. */
  lightOutputRatio: number | null;
  /** All three are in the candela already. */
  multiplier: number;
  ballastFactor: number;
  ballastLampFactor: number;
  tilt: Tilt | null;
  /** Luminous opening. */
  opening: { lengthMetres: number; widthMetres: number; heightMetres: number; round: boolean };
  /** As EULUMDAT writes them (DFF, LORL); null in LM-63. */
  statedDownwardFraction: number | null;
  statedOutputRatio: number | null;
}

/** What a reader hands on. `remarks` are the things that only the reader of a format can see. */
export interface ReadFile {
  header: PhotometricHeader;
  watts: number;
  distribution: Distribution;
  remarks: {
    unknownEdition?: boolean;
    missingKeywords?: string[];
    /** Lamp sets in the file, where there are more than one. */
    lampSets?: number;
    lampSet?: number;
  };
}
