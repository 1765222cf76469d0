/** A photometric file as lines and numbers: every refusal names the line it is about. */
import { EngineError, refuse } from '@/lib/engine/contract';

/** Ten times the largest table of candela that is read, with its blanks; a web request is bounded before. */
const MOST_CHARACTERS = 8_000_000;
/** A tenth of a degree all round. */
const MOST_ANGLES = 3_601;
/** After the symmetry is unfolded: half a degree up and down by one degree all round. */
const MOST_CANDELA = 300_000;
const SHOWN = 24;

/** A number as files write it: no hexadecimal, no "Infinity"; exponents as Fortran and spreadsheets leave them. */
const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,3})?$/;

export interface Source {
  /** Where the text stands in the input, for refusals. */
  path: string;
  lines: string[];
}

export interface Figure {
  value: number;
  /** Counted from 1, as editors show it. */
  line: number;
}

export function refuseLine(source: Source, line: number, message: string): never {
  return refuse(source.path, `line ${line}: ${message}`);
}

export function tooLarge(path: string, message: string): never {
  throw new EngineError('too-large', `${path}: ${message}`, [{ path, message }]);
}

/** What was read, short enough for a message, without control characters. */
export const shown = (token: string): string =>
  JSON.stringify(token.length > SHOWN ? `${token.slice(0, SHOWN)}…` : token).replace(/[\u007f-\u009f]/g, '?');

/** Splits into lines, whatever ends them. A byte-order mark of UTF-8 and an end-of-file mark of DOS are left out. */
export function linesOf(text: string, path: string): Source {
  if (text.length > MOST_CHARACTERS)
    tooLarge(path, `has ${text.length} characters; at most ${MOST_CHARACTERS} are read`);
  const source = {
    path,
    lines: text
      .replace(/^\ufeff/, '')
      .replace(/\u001a\s*$/, '')
      .split(/\r\n|\r|\n/),
  };
  const bad = source.lines.findIndex((line) => line.includes('\u0000') || line.includes('\ufffe'));
  if (bad >= 0)
    refuseLine(source, bad + 1, 'holds zero bytes, as UTF-16 text does: save the file as plain text (ASCII)');
  while (source.lines.length > 1 && source.lines.at(-1)?.trim() === '') source.lines.pop();
  return source;
}

/** A number of the file, or a refusal. `decimalComma` for EULUMDAT, where a comma never parts two numbers. */
export function figureOf(
  source: Source,
  line: number,
  token: string,
  what: string,
  decimalComma = false,
): Figure {
  const written = decimalComma ? token.replace(',', '.') : token;
  if (token.length > 40 || !NUMBER.test(written))
    refuseLine(source, line, `${shown(token)} is not a number (${what})`);
  const value = Number(written);
  if (!Number.isFinite(value)) refuseLine(source, line, `${shown(token)} is too large (${what})`);
  return { value, line };
}

export interface Figures {
  next: (what: string) => Figure;
  list: (count: number, what: string) => Figure[];
  /** Refuses what is left over. */
  end: () => void;
}

/** The numbers from a line on, one after the other, wherever the lines break. */
export function figuresFrom(source: Source, firstLine: number, decimalComma = false): Figures {
  const separator = decimalComma ? /[\s;]+/ : /[\s,]+/;
  let line = firstLine - 1;
  let tokens: string[] = [];
  let at = 0;
  const token = (): string | undefined => {
    while (at >= tokens.length) {
      const text = source.lines[line];
      if (text === undefined) return undefined;
      line += 1;
      at = 0;
      tokens = text.split(separator).filter((one) => one !== '');
    }
    return tokens[at++];
  };
  const cutShort = (what: string): never =>
    refuseLine(source, source.lines.length, `the file ends here, cut short: ${what} missing`);
  const next = (what: string): Figure => {
    const found = token();
    return found === undefined ? cutShort(what) : figureOf(source, line, found, what, decimalComma);
  };
  return {
    next,
    list: (count, what) => Array.from({ length: count }, (_, k) => next(`${what} ${k + 1} of ${count}`)),
    end: () => {
      const extra = token();
      if (extra !== undefined)
        refuseLine(source, line, `${shown(extra)} is more than the counts of the file say`);
    },
  };
}

/** A count of the file: whole, and no larger than it may be. */
export function countOf(source: Source, { value, line }: Figure, what: string, least = 1): number {
  if (!Number.isInteger(value) || value < least)
    refuseLine(source, line, `${what} must be a whole number of at least ${least}, and is ${value}`);
  return value;
}

/** The two counts of angles, held to what is read before any of it is. */
export function boundCounts(path: string, vertical: number, horizontal: number, unfolded: number): void {
  if (vertical > MOST_ANGLES || horizontal > MOST_ANGLES)
    tooLarge(path, `has ${vertical} by ${horizontal} angles; at most ${MOST_ANGLES} each way are read`);
  if (vertical * unfolded > MOST_CANDELA)
    tooLarge(path, `unfolds to ${vertical * unfolded} candela values; at most ${MOST_CANDELA} are read`);
}
