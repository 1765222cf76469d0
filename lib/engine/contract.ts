/**
 * The one contract of every calculation: what goes in is checked by a schema, what comes out is a result,
 * findings and working, and what cannot be answered is refused with the field's path.
 *
 * Pure: no framework, no clock, no randomness. The same code answers in the browser, on the server and on
 * the command line.
 */
import * as z from 'zod/mini';

/** Version stamped on every answer and stored with it. Raise it when any figure or choice can change. */
export const ENGINE_VERSION = '0.2.0';

/** Relative margin within which two figures count as equal wherever something is rounded up or compared. */
export const REL = 1e-9;

export type Severity = 'stop' | 'caution' | 'note';
export type FindingValue = number | string | null;

/** Something the reader must know. A hard stop is never overridden; a soft one may be by a licensed person. */
export interface Finding {
  code: string;
  severity: Severity;
  hard: boolean;
  /** English, for the command line; screens render `code` and `values` through the message catalogue. */
  message: string;
  values: Record<string, FindingValue>;
  /** Standard with edition and clause or table, "datasheet", or "common practice". */
  basis: string;
}

export interface WorkingInput {
  name: string;
  value: number | string | null;
  unit: string;
}

/** One step of "how it was figured". */
export interface WorkingStep {
  key: string;
  /** English, for the command line; screens render `key` through the message catalogue. */
  name: string;
  formula: string;
  inputs: WorkingInput[];
  value: number | string | null;
  unit: string;
  basis: string;
}

export interface Outcome<R> {
  result: R;
  findings: Finding[];
  working: WorkingStep[];
}

export interface Answer<R = unknown> extends Outcome<R> {
  engine: string;
}

/** How big a job may be: the command line allows more than a web request. */
export interface Limits {
  maxCuts: number;
  maxDraws: number;
  maxRuns: number;
}

export const COMMAND_LINE_LIMITS: Limits = { maxCuts: 200_000, maxDraws: 1_000_000, maxRuns: 1_000 };
export const WEB_LIMITS: Limits = { maxCuts: 5_000, maxDraws: 10_000, maxRuns: 60 };

export interface Calculation<S extends z.ZodMiniType = z.ZodMiniType, R = unknown> {
  name: string;
  /** One line for `engine -- list`. */
  summary: string;
  /** Field-built work: offered only where the shop has switched bench work on. */
  bench: boolean;
  schema: S;
  calculate: (input: z.infer<S>, limits: Limits) => Outcome<R>;
}

export type EngineErrorCode = 'invalid-input' | 'no-solution' | 'too-large' | 'unknown-calculation';

export interface EngineIssue {
  /** Dotted path of the field, e.g. `feeds.0.at`; '' for the input as a whole. */
  path: string;
  message: string;
}

/** A refusal. `issues` names the fields. */
export class EngineError extends Error {
  override readonly name = 'EngineError';
  constructor(
    readonly code: EngineErrorCode,
    message: string,
    readonly issues: EngineIssue[] = [],
  ) {
    super(message);
  }
  toJSON(): { error: { code: EngineErrorCode; message: string; issues: EngineIssue[] } } {
    return { error: { code: this.code, message: this.message, issues: this.issues } };
  }
}

/** Refuses one field. */
export function refuse(path: string, message: string): never {
  throw new EngineError('invalid-input', `${path}: ${message}`, [{ path, message }]);
}

/** Keeps a calculation's input type tied to its schema. */
export function defineCalculation<S extends z.ZodMiniType, R>(
  calculation: Calculation<S, R>,
): Calculation<S, R> {
  return calculation;
}

/** `a` is at most `b`, with the contract's relative margin. */
export function atMost(a: number, b: number): boolean {
  return a <= b + REL * Math.max(Math.abs(a), Math.abs(b));
}

/** `a` is at least `b`, with the contract's relative margin. */
export function atLeast(a: number, b: number): boolean {
  return atMost(b, a);
}

/** Smallest whole number not below `x`; equal within 1e-9 relative is equal. */
export function ceilWithin(x: number): number {
  const nearest = Math.round(x);
  return Math.abs(x - nearest) <= REL * Math.max(1, Math.abs(x)) ? nearest : Math.ceil(x);
}

/** Largest whole number not above `x`; equal within 1e-9 relative is equal. */
export function floorWithin(x: number): number {
  const nearest = Math.round(x);
  return Math.abs(x - nearest) <= REL * Math.max(1, Math.abs(x)) ? nearest : Math.floor(x);
}
