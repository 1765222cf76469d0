/** 18. What a photometric file (LM-63, EULUMDAT) says: lumens, efficacy, beam, and the intensities themselves. */
import * as z from 'zod/mini';
import { defineCalculation, type Finding, type Outcome, refuse } from '@/lib/engine/contract';
import { looksLikeEulumdat, readEulumdat } from './eulumdat';
import { hasTiltLine, readLm63 } from './lm63';
import type { Distribution } from './photometric-file-distribution';
import { findingsOf } from './photometric-file-findings';
import { beamWidth, type Flux, type Peak, peakOf, zonalFlux } from './photometric-file-flux';
import type { PhotometricHeader, ReadFile } from './photometric-file-header';
import { linesOf } from './photometric-file-text';
import { workingOf } from './photometric-file-working';

const schema = z.strictObject({
  /** The whole file. */
  text: z.string().check(z.minLength(1, 'is empty')),
  /** Told from the text unless given. */
  format: z.optional(z.enum(['lm-63', 'eulumdat'])),
  /** EULUMDAT: which of the file's sets of lamps, counted from 1; the first unless given. */
  lampSet: z.optional(
    z
      .number()
      .check(
        z.int('must be a whole number'),
        z.minimum(1, 'must be at least 1'),
        z.maximum(20, 'must be at most 20'),
      ),
  ),
});

export type PhotometricFileInput = z.infer<typeof schema>;

export interface PhotometricFile {
  totalLumens: number;
  /** As the file gives them; 0 where it does not. */
  wattsInput: number;
  /** Lumens per watt. */
  efficacy: number | null;
  /** Between the directions with half of the peak, in the peak's plane (C0 where all planes hold it). */
  beamAngleDegrees: number | null;
  /** Share of the lumens above the horizontal. */
  uplightFraction: number | null;
  header: PhotometricHeader;
  angles: { vertical: number[]; horizontal: number[] };
  /** One row per horizontal angle, one figure per vertical angle. */
  candela: number[][];
  peak: { candela: number; horizontalDegrees: number; verticalDegrees: number };
  /** The beam along and across, where it differs; null where that plane never reaches half of the peak. */
  beamByPlaneDegrees: { c0: number | null; c90: number | null };
}

/** A file with what its findings and working read. */
export interface Photometry {
  read: ReadFile;
  flux: Flux;
  peak: Peak;
  distribution: Distribution;
  result: PhotometricFile;
  findings: Finding[];
}

function readFile({ text, format, lampSet }: PhotometricFileInput, path: string): ReadFile {
  const source = linesOf(text, path === '' ? 'text' : `${path}.text`);
  const told = format ?? (hasTiltLine(source) || /^\s*IES/i.test(source.lines[0] ?? '') ? 'lm-63' : null);
  if (told === 'eulumdat' || (told === null && looksLikeEulumdat(source)))
    return readEulumdat(source, lampSet ?? 1);
  if (told === null)
    refuse(
      source.path,
      'line 1: neither LM-63 (no IESNA line, no TILT= line) nor EULUMDAT (no counts on lines 2 to 6)',
    );
  if (lampSet !== undefined) refuse('lampSet', 'only EULUMDAT files have sets of lamps');
  return readLm63(source);
}

/**
 * Reads a photometric file and integrates it.
 * @param path of the object that holds `text`, for refusals
 * @returns totalLumens lm by zonal constants, efficacy lm/W (null without watts), beamAngleDegrees at 50 % of the
 * peak, uplightFraction 0 to 1 (null without light), angles in degrees with planes from 0 to 360 whatever the file's
 * symmetry, candela with multiplier, ballast factors or lamp flux applied
 * @throws {EngineError} `invalid-input` on `text` with the line, on `lampSet`; `too-large`
 * Source: ANSI/IESNA LM-63-02; EULUMDAT (1990); zonal constants of the IES Lighting Handbook.
 */
export function photometricFile(input: PhotometricFileInput, path = ''): Photometry {
  const read = readFile(input, path);
  const { distribution, watts, header } = read;
  const flux = zonalFlux(distribution);
  const peak = peakOf(distribution);
  const lit = flux.totalLumens > 0;
  const result: PhotometricFile = {
    totalLumens: flux.totalLumens,
    wattsInput: watts,
    efficacy: watts > 0 ? flux.totalLumens / watts : null,
    beamAngleDegrees: beamWidth(distribution, peak, peak.horizontal),
    uplightFraction: lit ? flux.upLumens / flux.totalLumens : null,
    header: {
      ...header,
      lightOutputRatio: header.lampLumens === null ? null : flux.totalLumens / header.lampLumens,
    },
    angles: { vertical: distribution.vertical, horizontal: distribution.horizontal },
    candela: distribution.candela,
    peak: { candela: peak.candela, horizontalDegrees: peak.horizontal, verticalDegrees: peak.vertical },
    beamByPlaneDegrees: { c0: beamWidth(distribution, peak, 0), c90: beamWidth(distribution, peak, 90) },
  };
  const figures = { read, flux, peak, distribution, result };
  return { ...figures, findings: findingsOf(figures) };
}

export const photometricFileCalculation = defineCalculation({
  name: 'photometric-file',
  summary: 'Lumens, efficacy, beam and candela out of a photometric file (LM-63, EULUMDAT)',
  bench: false,
  schema,
  calculate: (input): Outcome<PhotometricFile> => {
    const photometry = photometricFile(input);
    return { result: photometry.result, findings: photometry.findings, working: workingOf(photometry) };
  },
});
