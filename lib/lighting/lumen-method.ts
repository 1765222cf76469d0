/** 16. How many luminaires a room needs, or what light a number of them gives: the lumen method. */
import * as z from 'zod/mini';
import { ceilWithin, defineCalculation, type Finding, type Outcome, refuse } from '@/lib/engine/contract';
import { notNegative, positive } from '@/lib/sizing/inputs';
import { findingsOf } from './lumen-method-findings';
import { fromTable, type Utilisation, utilisation } from './lumen-method-utilisation';
import { workingOf } from './lumen-method-working';
import { lightSource, photometry } from './point-illuminance-source';

/** Less than this share of the light is none: what is left of an uplight under a black ceiling. */
const LEAST_UTILISATION = 1e-9;
/** Light from bright surfaces comes back: a little over 1 is possible, twice is not. */
const MOST_UTILISATION = 1.5;

const side = z
  .number()
  .check(z.positive('must be greater than zero'), z.maximum(2000, 'must be at most 2000'));
const height = z
  .number()
  .check(z.minimum(0.05, 'must be at least 0.05'), z.maximum(200, 'must be at most 200'));
const cavity = z.number().check(z.nonnegative('must not be negative'), z.maximum(200, 'must be at most 200'));
const reflectance = z
  .number()
  .check(z.nonnegative('must not be negative'), z.maximum(0.95, 'must be at most 0.95'));
const lossFactor = z
  .number()
  .check(z.positive('must be greater than zero'), z.maximum(1, 'must be at most 1'));
const factor = z
  .number()
  .check(
    z.positive('must be greater than zero'),
    z.maximum(MOST_UTILISATION, `must be at most ${MOST_UTILISATION}`),
  );
const count = z
  .number()
  .check(
    z.int('must be a whole number'),
    z.minimum(1, 'must be at least 1'),
    z.maximum(1_000_000, 'must be at most 1,000,000'),
  );
const row = (of: typeof positive) =>
  z.array(of).check(z.minLength(2, 'needs at least two'), z.maxLength(100, 'takes at most 100'));

const schema = z.strictObject({
  lengthMetres: side,
  widthMetres: side,
  /** Of the luminaires over the working plane. */
  mountingMetres: height,
  /** One of three: the factor, a maker's table by room index, or photometry with reflectances. */
  utilisationFactor: z.optional(factor),
  utilisationTable: z.optional(z.strictObject({ roomIndex: row(positive), factor: row(factor) })),
  photometry: z.optional(photometry),
  reflectances: z.optional(z.strictObject({ ceiling: reflectance, walls: reflectance, floor: reflectance })),
  /** From the luminaires up to the ceiling and from the plane down to the floor; 0 unless given. */
  ceilingCavityMetres: z.optional(cavity),
  floorCavityMetres: z.optional(cavity),
  /** Out of the luminaire when new. */
  lumensPerLuminaire: positive,
  wattsPerLuminaire: z.optional(notNegative),
  lightLossFactor: lossFactor,
  /** Maintained. This, or `quantity`. */
  targetLux: z.optional(positive),
  quantity: z.optional(count),
  /** What a given quantity is to reach. */
  requiredLux: z.optional(positive),
  /** Largest spacing over mounting height, from the sheet. */
  spacingRatioMax: z.optional(positive),
  /** Columns along the length, rows along the width. */
  layout: z.optional(z.strictObject({ rows: count, columns: count })),
  /** Watts a square metre that the code in force allows here, and where that is written. */
  allowance: z.optional(
    z.strictObject({
      wattsPerSquareMetre: positive,
      basis: z
        .string()
        .check(z.minLength(4, 'names the code, its edition and table'), z.maxLength(200, 'is too long')),
    }),
  ),
});

export type LumenMethodInput = z.infer<typeof schema>;

export interface LumenMethod {
  roomIndex: number;
  roomCavityRatio: number;
  /** For the target; null where only a quantity is given, or no light arrives. */
  quantityExact: number | null;
  quantity: number | null;
  /** Maintained, with that quantity. */
  lux: number | null;
  wattsPerSquareMetre: number | null;
  maxSpacingMetres: number | null;
  utilisationFactor: number | null;
  /** The same when new and clean. */
  initialLux: number | null;
  installedWatts: number | null;
  /** Share of the downward light that arrives unreflected; null unless figured from photometry. */
  directRatio: number | null;
}

/** A room with what its findings and working read. */
export interface Room {
  input: LumenMethodInput;
  area: number;
  wantedLux: number | null;
  utilisation: Utilisation | null;
  /** Lumens of the photometry, where it is given. */
  sourceLumens: number | null;
  sourceFindings: Finding[];
  result: LumenMethod;
}

type Factor = Pick<Room, 'utilisation' | 'sourceLumens' | 'sourceFindings'> & { factor: number | null };

function factorOf(input: LumenMethodInput, roomIndex: number, ratio: (metres: number) => number): Factor {
  const { utilisationFactor, utilisationTable, photometry: given, reflectances } = input;
  const ways = [utilisationFactor, utilisationTable, given].filter((one) => one !== undefined).length;
  if (ways === 0) refuse('utilisationFactor', 'is missing; or give a table, or photometry with reflectances');
  if (ways > 1) refuse('utilisationFactor', 'give one of factor, table and photometry');
  const plain = { utilisation: null, sourceLumens: null, sourceFindings: [] };
  if (given === undefined) {
    const beside = (['reflectances', 'ceilingCavityMetres', 'floorCavityMetres'] as const).find(
      (key) => input[key] !== undefined,
    );
    if (beside) refuse(beside, 'counts with photometry alone');
    if (utilisationTable) return { ...plain, factor: fromTable(utilisationTable, roomIndex) };
    return { ...plain, factor: utilisationFactor ?? null };
  }
  if (reflectances === undefined) return refuse('reflectances', 'is missing: photometry needs it');
  const source = lightSource(given);
  const figured = utilisation(source, reflectances, {
    room: ratio(input.mountingMetres),
    ceiling: ratio(input.ceilingCavityMetres ?? 0),
    floor: ratio(input.floorCavityMetres ?? 0),
  });
  return {
    factor: figured?.factor ?? null,
    utilisation: figured,
    sourceLumens: source.lumens,
    sourceFindings: source.findings,
  };
}

function quantityOf(
  { targetLux, quantity }: LumenMethodInput,
  exact: number | null,
): { quantity: number | null } {
  if (targetLux !== undefined && quantity !== undefined)
    refuse('quantity', 'must not stand beside targetLux: give one of the two');
  if (targetLux === undefined && quantity === undefined)
    refuse('targetLux', 'is missing; or give a quantity');
  return { quantity: quantity ?? (exact === null ? null : Math.max(1, ceilWithin(exact))) };
}

/**
 * Average maintained illuminance of a room: E = n * lumens * UF * LLF / (length * width).
 * @param input metres, lumens, watts; light loss factor (maintenance factor) 0 to 1; mounting over the working plane
 * @returns roomIndex L*W/(Hm*(L+W)), roomCavityRatio 5*Hm*(L+W)/(L*W), quantity rounded up (1e-9 relative is equal),
 * lux maintained; nulls where nothing reaches the plane, with a stop
 * @throws {EngineError} `invalid-input`; on `photometry…` with the file's line; `too-large`
 * Source: lumen method (CIBSE guides and IES Lighting Handbook, read in course notes); utilisation from photometry:
 * IES LM-57 and ANSI/IES LS-6-20, read in public programs.
 */
export function lumenMethod(input: LumenMethodInput): Room {
  const { lengthMetres, widthMetres, mountingMetres, lumensPerLuminaire, lightLossFactor } = input;
  const area = lengthMetres * widthMetres;
  const ratio = (metres: number) => (5 * metres * (lengthMetres + widthMetres)) / area;
  const roomIndex = area / (mountingMetres * (lengthMetres + widthMetres));
  if (input.requiredLux !== undefined && input.quantity === undefined)
    refuse('requiredLux', 'stands beside a quantity; give targetLux to have it figured');
  const { factor: utilisationFactor, ...rest } = factorOf(input, roomIndex, ratio);
  const wantedLux = input.targetLux ?? input.requiredLux ?? null;
  const lit = utilisationFactor !== null && utilisationFactor > LEAST_UTILISATION;
  const each = lit ? (lumensPerLuminaire * utilisationFactor * lightLossFactor) / area : 0;
  const exact = wantedLux === null || each === 0 ? null : wantedLux / each;
  const { quantity } = quantityOf(input, exact);
  const lux = quantity === null || utilisationFactor === null ? null : quantity * each;
  const watts = input.wattsPerLuminaire;
  const installedWatts = watts === undefined || quantity === null ? null : quantity * watts;
  const result: LumenMethod = {
    roomIndex,
    roomCavityRatio: ratio(mountingMetres),
    quantityExact: exact,
    quantity,
    lux,
    wattsPerSquareMetre: installedWatts === null ? null : installedWatts / area,
    maxSpacingMetres: input.spacingRatioMax === undefined ? null : input.spacingRatioMax * mountingMetres,
    utilisationFactor,
    initialLux: lux === null ? null : lux / lightLossFactor,
    installedWatts,
    directRatio: rest.utilisation?.directRatio ?? null,
  };
  return { input, area, wantedLux, ...rest, result };
}

export const lumenMethodCalculation = defineCalculation({
  name: 'lumen-method',
  summary: 'Luminaires that a room needs for its light, or the light that a number of them gives',
  bench: false,
  schema,
  calculate: (input): Outcome<LumenMethod> => {
    const room = lumenMethod(input);
    return { result: room.result, findings: findingsOf(room), working: workingOf(room) };
  },
});
