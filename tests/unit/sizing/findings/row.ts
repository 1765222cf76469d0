/** The shape of a row of the table of findings, and the words its files are written in. */
import type { Finding } from '@/lib/engine/contract';

export type Input = Record<string, unknown>;
/** Dotted path to the figure that stands there instead; undefined takes it away. */
export type Change = Readonly<Record<string, unknown>>;

export interface FindingRow {
  calculation: string;
  code: string;
  severity: Finding['severity'];
  hard: boolean;
  basis: RegExp;
  base: Input;
  raises: Change;
  /** The nearest sensible change that does not raise it; null: said with every answer of the calculation. */
  clear: Change | null;
}

type Make = (code: string, basis: RegExp, raises: Change, clear: Change | null, base?: Input) => FindingRow;

/** Makers of one calculation's rows on one base. */
export function rowsOf(calculation: string, usual: Input) {
  const of =
    (severity: Finding['severity'], hard: boolean): Make =>
    (code, basis, raises, clear, base = usual) => ({
      ...{ calculation, code, severity, hard, basis, base, raises, clear },
    });
  return {
    hardStop: of('stop', true),
    softStop: of('stop', false),
    caution: of('caution', false),
    note: of('note', false),
  };
}

/** Over a threshold by so little that nothing but the threshold itself tells; and within its margin of 1e-9. */
export const OVER = 1 + 1e-6;
export const AT_MOST = 1 + 5e-10;
export const UNDER = 1 - 1e-6;
export const AT_LEAST = 1 - 5e-10;

export function changed(base: Input, change: Change): Input {
  const copy = structuredClone(base);
  for (const [path, value] of Object.entries(change)) {
    const keys = path.split('.');
    const last = keys.pop() ?? '';
    let at = copy;
    for (const key of keys) at = (at[key] ??= {}) as Input;
    if (value === undefined) delete at[last];
    else at[last] = structuredClone(value);
  }
  return copy;
}
