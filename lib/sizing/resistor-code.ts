/** A resistor's value by its colour bands, and its bands by its value. */
import * as z from 'zod/mini';
import {
  defineCalculation,
  EngineError,
  type Finding,
  type Outcome,
  REL,
  refuse,
  type WorkingStep,
} from '@/lib/engine/contract';
import { caution } from '@/lib/engine/finding';
import { nextPreferred } from './e-series';
import { positive } from './inputs';
import {
  BAND_COLOURS,
  type BandColour,
  COLOUR_CODE,
  COLOUR_CODE_BASIS,
  PLAIN_TOLERANCE_PCT,
} from './tables/colour-code';
import { E_SERIES_BASIS, E_SERIES_NAMES, type ESeries } from './tables/e-series';

const schema = z.strictObject({
  /** In reading order: 3 (20 %), 4, 5, or 6 with the temperature coefficient. Or ohms and tolerancePct. */
  bands: z.optional(
    z
      .array(z.enum(BAND_COLOURS))
      .check(z.minLength(3, 'needs 3 to 6 bands'), z.maxLength(6, 'needs 3 to 6 bands')),
  ),
  ohms: z.optional(positive),
  tolerancePct: z.optional(positive),
});

export type ResistorCodeInput = z.infer<typeof schema>;

export interface ResistorCode {
  ohms: number;
  tolerancePct: number;
  ohmsMin: number;
  ohmsMax: number;
  bands: BandColour[];
  ppmPerKelvin: number | null;
  /** Series of preferred values that hold it. */
  series: ESeries[];
}

/** Fine tolerances carry three digits, coarse ones two where two are enough. Common practice. */
const THREE_DIGITS_TO_PCT = 2;
const MULTIPLIERS = new Map(BAND_COLOURS.map((colour) => [COLOUR_CODE[colour].exponent, colour]));
const DIGITS = BAND_COLOURS.filter((colour) => COLOUR_CODE[colour].digit !== null);

/** digits * 10^exponent with one rounding. */
const scaled = (digits: number, exponent: number) =>
  exponent < 0 ? digits / 10 ** -exponent : digits * 10 ** exponent;

/** `ohms` as a whole number of so many digits and a power of ten; null where it has more of them. */
function mantissa(ohms: number, digits: 2 | 3): { whole: number; exponent: number } | null {
  const exponent = Math.floor(Math.log10(ohms) + REL) - digits + 1;
  const whole = Math.round(scaled(ohms, -exponent));
  return Math.abs(scaled(whole, exponent) - ohms) <= REL * ohms ? { whole, exponent } : null;
}

function valueBands(ohms: number, digits: 2 | 3): BandColour[] | null {
  const parts = mantissa(ohms, digits);
  const multiplier = parts && MULTIPLIERS.get(parts.exponent);
  if (!parts || !multiplier) return null;
  return [...[...String(parts.whole)].map((digit) => DIGITS[Number(digit)] ?? 'black'), multiplier];
}

const toleranceBand = (tolerancePct: number): BandColour | null =>
  BAND_COLOURS.find((colour) => {
    const own = COLOUR_CODE[colour].tolerancePct;
    return own !== null && Math.abs(own - tolerancePct) <= REL * own;
  }) ?? null;

/**
 * Bands of a resistor: two or three digits, multiplier, tolerance (none for 20 %).
 * @param ohms ohm, above zero
 * @param tolerancePct %
 * @returns colours in reading order; null where no bands show this value or tolerance
 * Source: IEC 60062:2016.
 */
export function colourBands(ohms: number, tolerancePct: number): BandColour[] | null {
  const tolerance = toleranceBand(tolerancePct);
  const plain = Math.abs(tolerancePct - PLAIN_TOLERANCE_PCT) <= REL * PLAIN_TOLERANCE_PCT;
  if (!tolerance && !plain) return null;
  const two = plain || tolerancePct > THREE_DIGITS_TO_PCT * (1 + REL) ? valueBands(ohms, 2) : null;
  // Three bands without one for the tolerance would be read as two digits.
  const value = two ?? (plain ? null : valueBands(ohms, 3));
  return value && (tolerance ? [...value, tolerance] : value);
}

function digitsOf(bands: readonly BandColour[]): number {
  return bands.reduce((sum, colour, i) => {
    const { digit } = COLOUR_CODE[colour];
    if (digit === null) return refuse(`bands.${i}`, `must be a digit: ${colour} is none`);
    if (i === 0 && digit === 0) return refuse('bands.0', 'must not be black: a value begins with 1 to 9');
    return sum * 10 + digit;
  }, 0);
}

function read(bands: readonly BandColour[]): Omit<ResistorCode, 'series' | 'ohmsMin' | 'ohmsMax'> {
  const digits = bands.length > 4 ? 3 : 2;
  const whole = digitsOf(bands.slice(0, digits));
  const { exponent } = COLOUR_CODE[bands[digits] as BandColour];
  const last = bands[digits + 1];
  const tolerancePct = last === undefined ? PLAIN_TOLERANCE_PCT : COLOUR_CODE[last].tolerancePct;
  if (tolerancePct === null) return refuse(`bands.${digits + 1}`, `must be a tolerance: ${last} is none`);
  const sixth = bands[digits + 2];
  const ppmPerKelvin = sixth === undefined ? null : COLOUR_CODE[sixth].ppmPerKelvin;
  if (sixth !== undefined && ppmPerKelvin === null)
    return refuse(`bands.${digits + 2}`, `must be a temperature coefficient: ${sixth} is none`);
  return { ohms: scaled(whole, exponent), tolerancePct, bands: [...bands], ppmPerKelvin };
}

function write({ ohms, tolerancePct }: ResistorCodeInput) {
  if (ohms === undefined) return refuse('bands', 'are needed, or ohms with tolerancePct');
  if (tolerancePct === undefined) return refuse('tolerancePct', 'is needed beside ohms');
  if (!toleranceBand(tolerancePct) && tolerancePct !== PLAIN_TOLERANCE_PCT)
    return refuse('tolerancePct', 'has no colour: 20, 10, 5, 2, 1, 0.5, 0.25, 0.1, 0.05, 0.02 or 0.01');
  const bands = colourBands(ohms, tolerancePct);
  if (!bands)
    return refuse(
      'ohms',
      'can not be shown by bands: it has more digits than they have, or lies outside 0.01 ohm to 999 gigaohm',
    );
  return { ohms, tolerancePct, bands, ppmPerKelvin: null };
}

/**
 * Reads bands, or writes them.
 * @returns ohm, %, ppm/K
 * @throws {EngineError} `invalid-input` with the band or the field
 * Source: IEC 60062:2016; IEC 60063:2015 for the series.
 */
export function resistorCode(input: ResistorCodeInput): ResistorCode {
  const { bands, ohms, tolerancePct } = input;
  if (bands && ohms !== undefined) refuse('ohms', 'is not given together with bands');
  if (bands && tolerancePct !== undefined) refuse('tolerancePct', 'is not given together with bands');
  const found = bands ? read(bands) : write(input);
  const span = (found.ohms * found.tolerancePct) / 100;
  return {
    ...found,
    ohmsMin: found.ohms - span,
    ohmsMax: found.ohms + span,
    series: E_SERIES_NAMES.filter(
      (series) => Math.abs(nextPreferred(found.ohms, series) - found.ohms) <= REL * found.ohms,
    ),
  };
}

/** What the same bands say from the other end. */
function turned(bands: readonly BandColour[]): number | null {
  try {
    return read([...bands].reverse()).ohms;
  } catch (error) {
    if (error instanceof EngineError) return null;
    throw error;
  }
}

function findingsOf({ bands: given }: ResistorCodeInput, { ohms, bands, series }: ResistorCode): Finding[] {
  if (series.length > 0) return [];
  const turnedOhms = given ? turned(bands) : null;
  return [
    caution(
      'not-preferred-value',
      `${ohms} ohm is no preferred value: ${given ? `read the bands from the other end${turnedOhms === null ? '' : ` (${turnedOhms} ohm)`}, or measure` : 'not sold as a standard value'}.`,
      { ohms, turnedOhms },
      E_SERIES_BASIS,
    ),
  ];
}

function workingOf({ ohms, tolerancePct, bands }: ResistorCode): WorkingStep[] {
  return [
    {
      key: 'bands-value',
      name: 'Value that the bands show',
      formula: 'digits * 10^multiplier',
      inputs: [{ name: 'bands', value: bands.join(' '), unit: '' }],
      value: ohms,
      unit: 'ohm',
      basis: COLOUR_CODE_BASIS,
    },
    {
      key: 'bands-tolerance',
      name: 'Tolerance that the bands show',
      formula: 'last band; 20 without one',
      inputs: [{ name: 'bands', value: bands.join(' '), unit: '' }],
      value: tolerancePct,
      unit: '%',
      basis: COLOUR_CODE_BASIS,
    },
  ];
}

export const resistorCodeCalculation = defineCalculation({
  name: 'resistor-code',
  summary: 'Value of a resistor by its colour bands, or the bands of a value',
  bench: false,
  schema,
  calculate: (input): Outcome<ResistorCode> => {
    const result = resistorCode(input);
    return { result, findings: findingsOf(input, result), working: workingOf(result) };
  },
});
