/** Schema issues in plain words and by path. Given per parse, so that no other form's texts change. */
import * as z from 'zod/mini';
import type { EngineIssue } from './contract';

const KIND: Readonly<Record<string, string>> = {
  number: 'a number',
  int: 'a whole number',
  string: 'text',
  boolean: 'true or false',
  array: 'a list',
  object: 'an object',
  record: 'an object',
  null: 'null',
};

function wrongType(expected: string, input: unknown): string {
  if (input === undefined) return 'is missing';
  if (expected === 'number' && typeof input === 'number') return 'must be a finite number';
  return `must be ${KIND[expected] ?? expected}`;
}

function wrongValue(values: readonly unknown[], input: unknown): string {
  if (input === undefined) return 'is missing';
  const written = values.map((value) => (typeof value === 'string' ? `"${value}"` : String(value)));
  return written.length === 1 ? `must be ${written[0]}` : `must be one of ${written.join(', ')}`;
}

/** What a schema says in its own words stands; this fills in for the rest. */
export const PLAIN_WORDS = {
  error: (issue: z.core.$ZodRawIssue): string | undefined => {
    if (issue.code === 'invalid_type') return wrongType(issue.expected, issue.input);
    if (issue.code === 'invalid_value') return wrongValue(issue.values, issue.input);
    if (issue.code === 'invalid_union')
      return issue.input === undefined ? 'is missing' : 'has none of the shapes allowed here';
    return undefined;
  },
};

type Issue = z.core.$ZodIssue;

/** The branch of a union that came nearest says most of what is wrong. */
function nearestBranch(branches: readonly (readonly Issue[])[]): readonly Issue[] {
  return [...branches].sort((a, b) => a.length - b.length)[0] ?? [];
}

function flatten(issue: Issue, above: readonly PropertyKey[]): EngineIssue[] {
  const path = [...above, ...issue.path];
  if (issue.code === 'unrecognized_keys')
    return issue.keys.map((key) => ({
      path: [...path, key].map(String).join('.'),
      message: 'is not a known key',
    }));
  const whole = { path: path.map(String).join('.'), message: issue.message };
  if (issue.code !== 'invalid_union' || issue.message === 'is missing') return [whole];
  const nearest = nearestBranch(issue.errors);
  // A branch that fails as a whole (text where an object is wanted) tells less than the union itself.
  if (nearest.length === 0 || nearest.every((one) => one.path.length === 0 && one.code === 'invalid_type'))
    return [whole];
  return nearest.flatMap((one) => flatten(one, path));
}

/** Schema issues as `{path, message}`, unknown keys by their own path. */
export const toIssues = (error: z.core.$ZodError): EngineIssue[] =>
  error.issues.flatMap((issue) => flatten(issue, []));
