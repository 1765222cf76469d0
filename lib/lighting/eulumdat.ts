/** Reads EULUMDAT files (.ldt): one field a line, intensities in candela per 1000 lm of lamp flux. */
import { refuse } from '@/lib/engine/contract';
import {
  notAscending,
  type Symmetry,
  unfold,
  unfoldedPlanes,
  verticalFault,
} from './photometric-file-distribution';
import type { ReadFile } from './photometric-file-header';
import {
  boundCounts,
  countOf,
  type Figure,
  figureOf,
  figuresFrom,
  refuseLine,
  shown,
  type Source,
} from './photometric-file-text';

const MM_PER_METRE = 1000;
const FIRST_LAMP_LINE = 27;
const LINES_PER_SET = 6;
const MOST_LAMP_SETS = 20;
/** Direct ratios for ten room indices stand before the angles; nothing here uses them. */
const DIRECT_RATIOS = 10;

/** Planes that each symmetry indicator stores, out of Mc planes all round: where they start, and how many. */
const STORED: readonly { symmetry: Symmetry; parts: number; of: (planes: number) => [number, number] }[] = [
  { symmetry: 'none', parts: 1, of: (mc) => [0, mc] },
  { symmetry: 'rotational', parts: 1, of: () => [0, 1] },
  { symmetry: 'bilateral-0-180', parts: 2, of: (mc) => [0, mc / 2 + 1] },
  { symmetry: 'bilateral-90-270', parts: 4, of: (mc) => [(3 * mc) / 4, mc / 2 + 1] },
  { symmetry: 'quadrant', parts: 4, of: (mc) => [0, mc / 4 + 1] },
];

/** The figure on a line of its own. An empty line is `whenEmpty`, where the format is often left blank. */
function lineFigure(source: Source, line: number, what: string, whenEmpty?: number): Figure {
  const text = source.lines[line - 1];
  if (text === undefined)
    return refuseLine(
      source,
      source.lines.length,
      `the file ends here, cut short: ${what} (line ${line}) missing`,
    );
  const token = text.trim();
  if (token !== '') return figureOf(source, line, token, what, true);
  if (whenEmpty === undefined) refuseLine(source, line, `is empty, and should hold ${what}`);
  return { value: whenEmpty, line };
}

/** Whether figures stand on the lines of type, symmetry and counts. */
export function looksLikeEulumdat({ lines }: Source): boolean {
  return [2, 3, 4, 6].every((line) => /^\s*-?\d+(?:[.,]\d*)?\s*$/.test(lines[line - 1] ?? ''));
}

interface LampSet {
  lamps: number;
  absolute: boolean;
  lampLumens: number;
  watts: number;
  names: { key: string; value: string }[];
}

/** One of the file's sets of lamps: they are alternatives. A negative number of lamps is absolute photometry. */
function lampSetOf(source: Source, index: number): LampSet {
  const first = FIRST_LAMP_LINE + LINES_PER_SET * index;
  const number = lineFigure(source, first, 'number of lamps');
  if (!Number.isInteger(number.value) || number.value === 0)
    refuseLine(
      source,
      first,
      `number of lamps must be a whole number other than zero, and is ${number.value}`,
    );
  const flux = lineFigure(source, first + 2, 'luminous flux of the lamps');
  if (flux.value <= 0)
    refuseLine(
      source,
      first + 2,
      `luminous flux of the lamps must be greater than zero, and is ${flux.value}`,
    );
  const watts = lineFigure(source, first + 5, 'watts of the lamps', 0);
  if (watts.value < 0) refuseLine(source, first + 5, `watts must not be negative, and are ${watts.value}`);
  const text = (offset: number) => source.lines[first + offset - 1]?.trim() ?? '';
  return {
    lamps: Math.abs(number.value),
    absolute: number.value < 0,
    lampLumens: flux.value,
    watts: watts.value,
    names: [
      { key: 'LAMP', value: text(1) },
      { key: 'COLORTEMPERATURE', value: text(3) },
      { key: 'COLORRENDERING', value: text(4) },
    ],
  };
}

/** The set asked for, counted from 1. */
function chosenLamps(source: Source, wanted: number): { sets: number; chosen: LampSet } {
  const sets = countOf(source, lineFigure(source, 26, 'number of lamp sets'), 'number of lamp sets');
  if (sets > MOST_LAMP_SETS) refuseLine(source, 26, `${sets} lamp sets; at most ${MOST_LAMP_SETS} are read`);
  if (wanted > sets) refuse('lampSet', `must be at most ${sets}, the number of lamp sets in the file`);
  const all = Array.from({ length: sets }, (_, k) => lampSetOf(source, k));
  return { sets, chosen: all[wanted - 1] ?? lampSetOf(source, 0) };
}

/** Angles of all planes from 0 to under 360, which the symmetry's own planes must be part of. */
function planesOf(
  source: Source,
  angles: readonly Figure[],
  indicator: number,
): { symmetry: Symmetry; stored: number[] } {
  const values = angles.map(({ value }) => value);
  const fault =
    notAscending(values, 'C') ??
    (values[0] !== 0 ? { index: 0, message: `C angles must start at 0, and start at ${values[0]}` } : null) ??
    ((values.at(-1) ?? 0) >= 360
      ? { index: values.length - 1, message: 'C angles must stay under 360: plane 360 is plane 0' }
      : null);
  if (fault) refuseLine(source, angles[fault.index]?.line ?? 1, fault.message);
  const row = STORED[indicator];
  const [start, count] = row?.of(values.length) ?? [0, 0];
  const stored = Array.from({ length: count }, (_, k) => values[(start + k) % values.length] ?? 0);
  const ends = {
    none: null,
    rotational: null,
    quadrant: [0, 90],
    'bilateral-0-180': [0, 180],
    'bilateral-90-270': [270, 90],
  };
  const symmetry = row?.symmetry ?? 'none';
  const wanted = ends[symmetry];
  if (wanted && (stored[0] !== wanted[0] || stored.at(-1) !== wanted[1]))
    refuseLine(
      source,
      angles[0]?.line ?? 1,
      `planes of symmetry ${indicator} must go from C${wanted[0]} to C${wanted[1]}, and go from C${stored[0]} to C${stored.at(-1)}`,
    );
  return { symmetry, stored };
}

function percentOf(source: Source, line: number, what: string): number | null {
  if (source.lines[line - 1]?.trim() === '') return null;
  const { value } = lineFigure(source, line, what);
  if (value < 0) refuseLine(source, line, `${what} must not be negative, and is ${value}`);
  return value / 100;
}

/** Symmetry indicator, number of planes and of angles. */
function shapeOf(source: Source) {
  const isym = lineFigure(source, 3, 'symmetry indicator');
  const row = STORED[isym.value];
  if (!row) return refuseLine(source, 3, `symmetry indicator must be 0 to 4, and is ${isym.value}`);
  const mc = countOf(source, lineFigure(source, 4, 'number of C planes'), 'number of C planes');
  if (mc % row.parts !== 0)
    refuseLine(
      source,
      4,
      `number of C planes must be a multiple of ${row.parts} for symmetry ${isym.value}, and is ${mc}`,
    );
  const ng = countOf(
    source,
    lineFigure(source, 6, 'number of angles in a plane'),
    'number of angles in a plane',
    2,
  );
  const count = row.of(mc)[1];
  boundCounts(source.path, ng, mc, unfoldedPlanes(count, row.symmetry));
  return { indicator: isym.value, mc, ng, count };
}

const NAMES: readonly [string, number][] = [
  ['MANUFAC', 1],
  ['TEST', 8],
  ['LUMINAIRE', 9],
  ['LUMCAT', 10],
  ['FILENAME', 11],
  ['ISSUEDATE', 12],
];

/**
 * Reads an EULUMDAT file.
 * @param lampSet which of the file's sets of lamps, counted from 1
 * @returns candela = intensity per 1000 lm * conversion factor * lamp flux / 1000
 * @throws {EngineError} `invalid-input` with the line, `too-large`
 * Source: line list of the format as published for EULUMDAT (1990), read in copies; absolute photometry by a negative
 * number of lamps, and lamp sets one after the other, from memory.
 */
export function readEulumdat(source: Source, lampSet: number): ReadFile {
  const { indicator, mc, ng, count } = shapeOf(source);
  const millimetres = (line: number, what: string) =>
    Math.abs(lineFigure(source, line, what, 0).value) / MM_PER_METRE;
  const conversion = lineFigure(source, 24, 'conversion factor for intensities', 1);
  if (conversion.value <= 0)
    refuseLine(source, 24, `conversion factor must be greater than zero, and is ${conversion.value}`);
  const { sets, chosen } = chosenLamps(source, lampSet);
  const afterLamps = FIRST_LAMP_LINE + LINES_PER_SET * sets;
  const figures = figuresFrom(source, afterLamps, true);
  figures.list(DIRECT_RATIOS, 'direct ratio');
  const cAngles = figures.list(mc, 'C angle');
  const { symmetry, stored } = planesOf(source, cAngles, indicator);
  const gammas = figures.list(ng, 'gamma angle');
  const vertical = gammas.map(({ value }) => value);
  const fault = verticalFault(vertical);
  if (fault) refuseLine(source, gammas[fault.index]?.line ?? 1, fault.message);
  const scale = (conversion.value * chosen.lampLumens) / 1000;
  const candela = Array.from({ length: count }, (_, k) =>
    figures.list(ng, `intensity of plane C${stored[k]}, value`).map(({ value, line }) => {
      if (value < 0)
        refuseLine(source, line, `intensity must not be negative, and one is ${shown(String(value))}`);
      return value * scale;
    }),
  );
  figures.end();
  const length = millimetres(16, 'length of the luminous area');
  const width = millimetres(17, 'width of the luminous area');
  const heights = [18, 19, 20, 21].map((line) => millimetres(line, 'height of the luminous area'));
  return {
    header: {
      format: 'eulumdat',
      edition: source.lines[0]?.trim().slice(0, 80) ?? '',
      keywords: [
        ...NAMES.map(([key, line]) => ({ key, value: source.lines[line - 1]?.trim() ?? '' })),
        ...chosen.names,
      ].filter(({ value }) => value !== ''),
      photometricType: 'C',
      symmetry,
      absolute: chosen.absolute,
      lamps: chosen.lamps,
      lampLumens: chosen.absolute ? null : chosen.lampLumens,
      lightOutputRatio: null,
      multiplier: scale,
      ballastFactor: 1,
      ballastLampFactor: 1,
      tilt: null,
      opening: {
        lengthMetres: length,
        widthMetres: width === 0 ? length : width,
        heightMetres: Math.max(...heights),
        round: width === 0,
      },
      statedDownwardFraction: percentOf(source, 22, 'downward flux fraction'),
      statedOutputRatio: percentOf(source, 23, 'light output ratio'),
    },
    watts: chosen.watts,
    distribution: unfold(vertical, stored, candela, symmetry),
    remarks: sets > 1 ? { lampSets: sets, lampSet } : {},
  };
}
