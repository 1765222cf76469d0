/** Runs one calculation under the contract: strict parsing, named refusals, finite figures only. */
import * as z from 'zod/mini';
import {
  type Answer,
  type Calculation,
  COMMAND_LINE_LIMITS,
  ENGINE_VERSION,
  EngineError,
  type Limits,
} from './contract';
import { PLAIN_WORDS, toIssues } from './plain-words';

export { toIssues };

// zod/mini ships without texts; the messages name what is wrong in plain English.
z.config(z.locales.en());

function firstNonFinite(value: unknown, path: string): string | null {
  if (typeof value === 'number') return Number.isFinite(value) ? null : path;
  if (Array.isArray(value)) {
    for (let i = 0; i < value.length; i++) {
      const bad = firstNonFinite(value[i], `${path}.${i}`);
      if (bad !== null) return bad;
    }
    return null;
  }
  if (value !== null && typeof value === 'object') {
    for (const [key, member] of Object.entries(value)) {
      const bad = firstNonFinite(member, path === '' ? key : `${path}.${key}`);
      if (bad !== null) return bad;
    }
  }
  return null;
}

/**
 * Checks `input` against the calculation's schema and answers it.
 * @throws {EngineError} `invalid-input` with the paths, `no-solution`, or `too-large`.
 */
export function runCalculation<S extends z.ZodMiniType, R>(
  calculation: Calculation<S, R>,
  input: unknown,
  limits: Limits = COMMAND_LINE_LIMITS,
): Answer<R> {
  const parsed = z.safeParse(calculation.schema, input, PLAIN_WORDS);
  if (!parsed.success) {
    const issues = toIssues(parsed.error);
    const first = issues[0];
    throw new EngineError(
      'invalid-input',
      first ? `${first.path || 'input'}: ${first.message}` : 'The input is not as the schema says.',
      issues,
    );
  }
  const outcome = calculation.calculate(parsed.data, limits);
  // Inputs within their own bounds can still multiply past what a double holds; that is a refusal, not a figure.
  const bad = firstNonFinite(outcome, '');
  if (bad !== null) {
    throw new EngineError('no-solution', `The figures leave the range that can be computed (${bad}).`, [
      { path: '', message: 'has no finite answer: check the sizes of the numbers' },
    ]);
  }
  return { engine: ENGINE_VERSION, ...outcome };
}
