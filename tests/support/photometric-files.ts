/** Writes photometric files of a known distribution, in both formats and any symmetry. */

/** Candela towards C and gamma, in degrees. */
export type Law = (c: number, gamma: number) => number;

export const RADIANS = Math.PI / 180;
export const cosine = (degrees: number) => Math.cos(degrees * RADIANS);

export const steps = (from: number, to: number, step: number): number[] =>
  Array.from({ length: Math.round((to - from) / step) + 1 }, (_, k) => from + k * step);

export interface FileOptions {
  law: Law;
  vertical?: number[];
  horizontal?: number[];
}

export interface Lm63Options extends FileOptions {
  first?: string;
  keywords?: string[];
  tilt?: string[];
  lamps?: number;
  lumens?: number;
  multiplier?: number;
  type?: number;
  units?: number;
  size?: [number, number, number];
  ballast?: number;
  ballastLamp?: number;
  watts?: number;
  lineEnd?: string;
}

/** `law` is what the file's reader should find: it is divided by the factors before it is written. */
export function lm63(options: Lm63Options): string {
  const {
    law,
    vertical = steps(0, 90, 5),
    horizontal = [0],
    multiplier = 1,
    ballast = 1,
    ballastLamp = 1,
  } = options;
  const factor = multiplier * ballast * (options.first?.includes('2019') ? 1 : ballastLamp);
  return [
    ...(options.first === '' ? [] : [options.first ?? 'IESNA:LM-63-2002']),
    ...(options.keywords ?? ['[TEST] T1', '[TESTLAB] none', '[ISSUEDATE] 2026-12-01', '[MANUFAC] none']),
    ...(options.tilt ?? ['TILT=NONE']),
    `${options.lamps ?? 1} ${options.lumens ?? -1} ${multiplier} ${vertical.length} ${horizontal.length} ${options.type ?? 1} ${options.units ?? 2} ${(options.size ?? [0.6, 0.6, 0]).join(' ')}`,
    `${ballast} ${ballastLamp} ${options.watts ?? 40}`,
    vertical.join(' '),
    horizontal.join(' '),
    ...horizontal.map((c) => vertical.map((gamma) => law(c, gamma) / factor).join(' ')),
    '',
  ].join(options.lineEnd ?? '\r\n');
}

export interface EulumdatOptions {
  law: Law;
  isym: number;
  vertical?: number[];
  /** All planes from 0 to under 360. */
  planes?: number[];
  lampSets?: { lamps?: number; lumens: number; watts?: number }[];
  conversion?: number;
  dff?: number | string;
  lorl?: number | string;
  decimalComma?: boolean;
  area?: [number, number];
}

/** Planes that a symmetry indicator stores. */
function stored(isym: number, planes: number[]): number[] {
  const mc = planes.length;
  if (isym === 1) return planes.slice(0, 1);
  if (isym === 2) return planes.slice(0, mc / 2 + 1);
  if (isym === 3) return [...planes.slice((3 * mc) / 4), ...planes.slice(0, mc / 4 + 1)];
  return isym === 4 ? planes.slice(0, mc / 4 + 1) : planes;
}

export function eulumdat(options: EulumdatOptions): string {
  const { law, isym, vertical = steps(0, 90, 5), planes = steps(0, 345, 15), conversion = 1 } = options;
  const sets = options.lampSets ?? [{ lumens: 4000 }];
  const per = ((sets[0]?.lumens ?? 1000) / 1000) * conversion;
  const number = (value: number | string) =>
    options.decimalComma ? String(value).replace('.', ',') : String(value);
  return [
    'none',
    isym === 1 ? 1 : 3,
    isym,
    planes.length,
    number((planes[1] ?? 0) - (planes[0] ?? 0)),
    vertical.length,
    number((vertical[1] ?? 0) - (vertical[0] ?? 0)),
    'report 1',
    'luminaire',
    'L-1',
    'file',
    '2026-12-01',
    600,
    600,
    80,
    ...(options.area ?? [600, 600]),
    0,
    0,
    0,
    0,
    options.dff ?? 100,
    options.lorl ?? '',
    number(conversion),
    0,
    sets.length,
    ...sets.flatMap(({ lamps = 1, lumens, watts = 40 }) => [
      lamps,
      'LED',
      number(lumens),
      '4000',
      '80',
      number(watts),
    ]),
    ...Array.from({ length: 10 }, () => number(0.5)),
    ...planes.map(number),
    ...vertical.map(number),
    ...stored(isym, planes).flatMap((c) => vertical.map((gamma) => number(law(c, gamma) / per))),
    '',
  ].join('\r\n');
}

/** 1000 cd straight down: 1000*pi lumens. */
const lambert: Law = (_, gamma) => 1000 * Math.max(0, cosine(gamma));
export const lambertLm63 = (change: Partial<Lm63Options> = {}) => lm63({ law: lambert, ...change });
export const lambertEulumdat = (change: Partial<EulumdatOptions> = {}) =>
  eulumdat({ law: lambert, isym: 1, lampSets: [{ lumens: 1000 * Math.PI }], ...change });

/** Replaces a whole line, counted from 1. */
export const withLine = (text: string, line: number, change: (old: string) => string) =>
  text
    .split('\r\n')
    .map((old, k) => (k === line - 1 ? change(old) : old))
    .join('\r\n');
