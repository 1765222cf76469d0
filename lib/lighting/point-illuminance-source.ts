/** The light of one luminaire: out of a photometric file, a list of intensities, or a cosine source. */
import * as z from 'zod/mini';
import { type Finding, refuse } from '@/lib/engine/contract';
import { notNegative } from '@/lib/sizing/inputs';
import { photometricFile } from './photometric-file';
import {
  type Distribution,
  HORIZONTAL_RULE,
  intensityAt,
  notAscending,
  symmetryOf,
  unfold,
  unfoldedPlanes,
  verticalFault,
} from './photometric-file-distribution';
import { beamWidth, peakOf, zonalFlux } from './photometric-file-flux';
import { boundCounts } from './photometric-file-text';

const MOST_ANGLES = 3_601;
const angles = (least: number) =>
  z
    .array(z.number())
    .check(
      z.minLength(least, `needs at least ${least}`),
      z.maxLength(MOST_ANGLES, `takes at most ${MOST_ANGLES} angles`),
    );

export const photometry = z.union([
  /** A file, as photometric-file takes it. */
  z.strictObject({
    text: z.string().check(z.minLength(1, 'is empty')),
    format: z.optional(z.enum(['lm-63', 'eulumdat'])),
    lampSet: z.optional(
      z.number().check(z.int('must be a whole number'), z.minimum(1, 'must be at least 1')),
    ),
  }),
  /** I = I0 * cos(gamma) below the horizontal, by its lumens (pi * I0) or by I0. */
  z.strictObject({
    source: z.literal('cosine'),
    lumens: z.optional(notNegative),
    candela: z.optional(notNegative),
  }),
  /** As photometric-file answers them; planes of a symmetry are unfolded. */
  z.strictObject({
    angles: z.strictObject({ vertical: angles(2), horizontal: angles(1) }),
    candela: z.array(z.array(notNegative)).check(z.maxLength(MOST_ANGLES, 'has too many rows')),
  }),
]);
export type Photometry = z.infer<typeof photometry>;

export interface LightSource {
  /** Candela towards C and gamma, in degrees. */
  intensity: (horizontal: number, vertical: number) => number;
  lumens: number;
  uplightFraction: number | null;
  beamDegrees: number | null;
  /** Longest side of the luminous opening; null where it is not known. */
  openingMetres: number | null;
  /** What the file's reader has to say that bears on the light. */
  findings: Finding[];
}

function cosineSource(given: { lumens?: number | undefined; candela?: number | undefined }): LightSource {
  if ((given.lumens === undefined) === (given.candela === undefined))
    refuse('photometry', 'a cosine source needs its lumens or its candela, one of the two');
  const candela = given.candela ?? (given.lumens ?? 0) / Math.PI;
  return {
    intensity: (_, vertical) => candela * Math.max(0, Math.cos((vertical * Math.PI) / 180)),
    lumens: Math.PI * candela,
    uplightFraction: candela === 0 ? null : 0,
    beamDegrees: candela === 0 ? null : 120,
    openingMetres: null,
    findings: [],
  };
}

function ofDistribution(distribution: Distribution): LightSource {
  const { totalLumens, upLumens } = zonalFlux(distribution);
  const peak = peakOf(distribution);
  return {
    intensity: (horizontal, vertical) => intensityAt(distribution, horizontal, vertical),
    lumens: totalLumens,
    uplightFraction: totalLumens > 0 ? upLumens / totalLumens : null,
    beamDegrees: beamWidth(distribution, peak, peak.horizontal),
    openingMetres: null,
    findings: [],
  };
}

/** Of the reader's findings: those about watts and papers say nothing of the light, and uplight has its own here. */
const ABOUT_LIGHT = new Set([
  'photometry-coarse-angles',
  'photometry-poles-disagree',
  'photometry-edition-unknown',
  'photometry-reserved-factor',
  'photometry-tilt-block',
  'photometry-lamp-sets',
  'photometry-more-than-lamps',
  'photometry-stated-differs',
]);

function fileSource(given: Extract<Photometry, { text: string }>): LightSource {
  const file = photometricFile(given, 'photometry');
  const { lengthMetres, widthMetres, heightMetres } = file.result.header.opening;
  return {
    ...ofDistribution(file.distribution),
    openingMetres: Math.max(lengthMetres, widthMetres, heightMetres),
    findings: file.findings.filter(({ code }) => ABOUT_LIGHT.has(code)),
  };
}

function listedSource({
  angles: { vertical, horizontal },
  candela,
}: Extract<Photometry, { angles: object }>): LightSource {
  const steep = verticalFault(vertical);
  if (steep) refuse('photometry.angles.vertical', steep.message);
  const round = notAscending(horizontal, 'horizontal');
  if (round) refuse('photometry.angles.horizontal', round.message);
  const symmetry = symmetryOf(horizontal);
  if (symmetry === null) return refuse('photometry.angles.horizontal', HORIZONTAL_RULE);
  boundCounts('photometry', vertical.length, horizontal.length, unfoldedPlanes(horizontal.length, symmetry));
  if (candela.length !== horizontal.length)
    refuse('photometry.candela', `needs a row for each of ${horizontal.length} horizontal angles`);
  const short = candela.findIndex((row) => row.length !== vertical.length);
  if (short >= 0)
    refuse(`photometry.candela.${short}`, `needs a figure for each of ${vertical.length} vertical angles`);
  return ofDistribution(unfold(vertical, horizontal, candela, symmetry));
}

/** @throws {EngineError} `invalid-input` on `photometry…`, `too-large` */
export function lightSource(given: Photometry): LightSource {
  if ('source' in given) return cosineSource(given);
  return 'text' in given ? fileSource(given) : listedSource(given);
}
