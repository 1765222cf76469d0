/** Reads LM-63 files (IES): header, tilt, angles and candela, of type C photometry. */
import {
  symmetryOf,
  HORIZONTAL_RULE,
  notAscending,
  unfold,
  unfoldedPlanes,
  verticalFault,
} from './photometric-file-distribution';
import type { ReadFile, Tilt } from './photometric-file-header';
import {
  boundCounts,
  countOf,
  type Figure,
  type Figures,
  figuresFrom,
  refuseLine,
  shown,
  type Source,
} from './photometric-file-text';

const METRES_PER_FOOT = 0.3048;
const MOST_TILT_PAIRS = 1_000;
/** LM-63-2002's required keywords (read in a copy). */
const REQUIRED = ['TEST', 'TESTLAB', 'ISSUEDATE', 'MANUFAC'];

const EDITIONS: readonly [RegExp, string][] = [
  [/^IESNA:? ?LM-63-1986$/i, '1986'],
  [/^IESNA ?91$|^IESNA:? ?LM-63-1991$/i, '1991'],
  [/^IESNA:? ?LM-63-1995$/i, '1995'],
  [/^(?:IESNA|IES):? ?LM-63-(?:20)?02$/i, '2002'],
  [/^(?:IESNA|IES):? ?LM-63-(?:20)?19$/i, '2019'],
];
const TILT_LINE = /^\s*TILT\s*=(.*)$/i;
const KEYWORD = /^\s*\[([^\]]{1,80})\](.*)$/;

export const hasTiltLine = (source: Source): boolean => source.lines.some((line) => TILT_LINE.test(line));

/** The edition that the first line names; the first edition had no such line. */
function editionOf(firstLine: string): string {
  const written = firstLine.trim();
  if (!/^IES/i.test(written)) return '1986';
  return EDITIONS.find(([pattern]) => pattern.test(written))?.[1] ?? written.slice(0, 80);
}

const isYear = (edition: string) => EDITIONS.some(([, year]) => year === edition);

/** `[KEY] value` lines; `[MORE]` goes on with the one before; the lines of 1986 have no keys. */
function keywordsOf(lines: readonly string[]): { key: string; value: string }[] {
  const keywords: { key: string; parts: string[] }[] = [];
  for (const line of lines) {
    const [, written, rest = ''] = KEYWORD.exec(line) ?? [];
    const key = written?.trim().toUpperCase() ?? '';
    const value = (written === undefined ? line : rest).trim();
    const last = keywords.at(-1);
    if (key === 'MORE' && last) last.parts.push(value);
    else if (key !== '' || value !== '') keywords.push({ key, parts: [value] });
  }
  return keywords.map(({ key, parts }) => ({ key, value: parts.join(' ').trim() }));
}

function tiltOf(source: Source, line: number, figures: Figures): Tilt | null {
  const written = TILT_LINE.exec(source.lines[line - 1] ?? '')?.[1]?.trim() ?? '';
  if (/^NONE$/i.test(written)) return null;
  if (written === '') refuseLine(source, line, 'TILT= must be NONE or INCLUDE');
  if (!/^INCLUDE$/i.test(written))
    refuseLine(
      source,
      line,
      `TILT=${shown(written)} refers to another file, which can not be read here: ask for the file with TILT=INCLUDE`,
    );
  const geometry = figures.next('tilt: lamp-to-luminaire geometry');
  if (![1, 2, 3].includes(geometry.value))
    refuseLine(
      source,
      geometry.line,
      `lamp-to-luminaire geometry must be 1, 2 or 3, and is ${geometry.value}`,
    );
  const count = figures.next('tilt: number of angles');
  const pairs = countOf(source, count, 'number of tilt angles');
  if (pairs > MOST_TILT_PAIRS)
    refuseLine(source, count.line, `${pairs} tilt angles; at most ${MOST_TILT_PAIRS} are read`);
  const angles = figures.list(pairs, 'tilt angle');
  refuseFault(source, angles, notAscending(valuesOf(angles), 'tilt'));
  for (const { value, line: at } of angles)
    if (value < 0 || value > 180)
      refuseLine(source, at, `tilt angles lie from 0 to 180, and one is ${value}`);
  const multipliers = figures.list(pairs, 'tilt multiplier');
  for (const { value, line: at } of multipliers)
    if (value < 0) refuseLine(source, at, `a tilt multiplier must not be negative, and one is ${value}`);
  return { lampGeometry: geometry.value, angles: valuesOf(angles), multipliers: valuesOf(multipliers) };
}

const valuesOf = (figures: readonly Figure[]) => figures.map(({ value }) => value);

function refuseFault(
  source: Source,
  angles: readonly Figure[],
  fault: { index: number; message: string } | null,
): void {
  if (fault) refuseLine(source, angles[fault.index]?.line ?? 1, fault.message);
}

function above0(source: Source, { value, line }: Figure, what: string): number {
  if (value <= 0) refuseLine(source, line, `${what} must be greater than zero, and is ${value}`);
  return value;
}

function typeC(source: Source, { value, line }: Figure): void {
  if (value === 1) return;
  const name = value === 2 ? 'B' : value === 3 ? 'A' : null;
  refuseLine(
    source,
    line,
    name === null
      ? `photometric type must be 1 (type C), and is ${value}`
      : `this is type ${name} photometry (floodlights and headlamps); only type C is read: ask for a type C file`,
  );
}

/** The opening in metres. Negative figures are codes of a round or curved one. */
function openingOf(source: Source, units: Figure, [width, length, height]: readonly Figure[]) {
  if (units.value !== 1 && units.value !== 2)
    refuseLine(source, units.line, `units must be 1 (feet) or 2 (metres), and are ${units.value}`);
  const metres = (figure: Figure | undefined) =>
    Math.abs(figure?.value ?? 0) * (units.value === 1 ? METRES_PER_FOOT : 1);
  return {
    lengthMetres: metres(length),
    widthMetres: metres(width),
    heightMetres: metres(height),
    round: (width?.value ?? 0) < 0 || (length?.value ?? 0) < 0,
  };
}

/** Lamps and lumens per lamp; -1 for absolute photometry. */
function lampsOf(source: Source, figures: Figures) {
  const lamps = countOf(source, figures.next('number of lamps'), 'number of lamps');
  const lumens = figures.next('lumens per lamp');
  const absolute = lumens.value === -1;
  if (!absolute && lumens.value <= 0)
    refuseLine(
      source,
      lumens.line,
      `lumens per lamp must be greater than zero, or -1 for absolute photometry, and are ${lumens.value}`,
    );
  return { lamps, absolute, lampLumens: absolute ? null : lamps * lumens.value };
}

function candelaOf(source: Source, figures: Figures, planes: number, vertical: number, scale: number) {
  return Array.from({ length: planes }, (_, h) =>
    figures
      .list(vertical, `candela of horizontal angle ${h + 1} of ${planes}, value`)
      .map(({ value, line }) => {
        if (value < 0) refuseLine(source, line, `candela must not be negative, and one is ${value}`);
        return value * scale;
      }),
  );
}

/**
 * Reads an LM-63 file of type C.
 * @returns candela scaled by multiplier, ballast factor and (to 2002) ballast-lamp photometric factor
 * @throws {EngineError} `invalid-input` with the line, `too-large`
 * Source: ANSI/IESNA LM-63-02 (header, keywords, delimiters and tilt read in a copy; numeric block and the 2019
 * edition, where the ballast-lamp factor has become the file generation type, from memory).
 */
export function readLm63(source: Source): ReadFile {
  const tiltLine = source.lines.findIndex((line) => TILT_LINE.test(line)) + 1;
  if (tiltLine === 0)
    refuseLine(
      source,
      source.lines.length,
      'there is no TILT= line: this is no LM-63 file, or it is cut short',
    );
  const edition = editionOf(source.lines[0] ?? '');
  const keywords = keywordsOf(
    source.lines.slice(/^\s*IES/i.test(source.lines[0] ?? '') ? 1 : 0, tiltLine - 1),
  );
  const figures = figuresFrom(source, tiltLine + 1);
  const tilt = tiltOf(source, tiltLine, figures);

  const { lamps, absolute, lampLumens } = lampsOf(source, figures);
  const multiplier = above0(source, figures.next('candela multiplier'), 'candela multiplier');
  const verticals = countOf(
    source,
    figures.next('number of vertical angles'),
    'number of vertical angles',
    2,
  );
  const horizontals = countOf(
    source,
    figures.next('number of horizontal angles'),
    'number of horizontal angles',
  );
  boundCounts(source.path, verticals, horizontals, horizontals);
  typeC(source, figures.next('photometric type'));
  const units = figures.next('units type');
  const opening = openingOf(source, units, figures.list(3, 'size of the luminous opening'));
  const ballastFactor = above0(source, figures.next('ballast factor'), 'ballast factor');
  const third = figures.next('ballast-lamp photometric factor');
  const ballastLampFactor = edition === '2019' ? 1 : above0(source, third, 'ballast-lamp photometric factor');
  const watts = figures.next('input watts');
  if (watts.value < 0)
    refuseLine(source, watts.line, `input watts must not be negative, and are ${watts.value}`);

  const vertical = figures.list(verticals, 'vertical angle');
  refuseFault(source, vertical, verticalFault(valuesOf(vertical)));
  const horizontal = figures.list(horizontals, 'horizontal angle');
  refuseFault(source, horizontal, notAscending(valuesOf(horizontal), 'horizontal'));
  const symmetry = symmetryOf(valuesOf(horizontal));
  if (symmetry === null) return refuseLine(source, horizontal.at(-1)?.line ?? 1, HORIZONTAL_RULE);
  boundCounts(source.path, verticals, horizontals, unfoldedPlanes(horizontals, symmetry));
  const scale = multiplier * ballastFactor * ballastLampFactor;
  const candela = candelaOf(source, figures, horizontals, verticals, scale);
  figures.end();

  const missing = REQUIRED.filter((name) => !keywords.some(({ key }) => key === name));
  return {
    header: {
      format: 'lm-63',
      edition,
      keywords,
      photometricType: 'C',
      symmetry,
      absolute,
      lamps,
      lampLumens,
      lightOutputRatio: null,
      multiplier,
      ballastFactor,
      ballastLampFactor,
      tilt,
      opening,
      statedDownwardFraction: null,
      statedOutputRatio: null,
    },
    watts: watts.value,
    distribution: unfold(valuesOf(vertical), valuesOf(horizontal), candela, symmetry),
    remarks: {
      ...(isYear(edition) ? {} : { unknownEdition: true }),
      ...(Number(edition) >= 2002 && missing.length > 0 ? { missingKeywords: missing } : {}),
    },
  };
}
