/**
 * The one contract, held over every calculation that is registered: strict input, named refusals, finite figures,
 * the same keys in every answer, and texts whose placeholders are all filled.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import * as z from 'zod/mini';
import { type Answer, type Calculation, EngineError, WEB_LIMITS } from '@/lib/engine/contract';
import { calculations } from '@/lib/engine/registry';
import { runCalculation } from '@/lib/engine/run';
import { messageText } from '@/lib/messages';
import { EXAMPLES } from '../../support/engine-examples';
import { arbitraryOf, changedAt, type JsonSchema, objectPaths } from '../../support/schema-arbitrary';

const RUNS = 400;
const CODES = ['invalid-input', 'no-solution', 'too-large'];

const schemaOf = (calculation: Calculation) =>
  z.toJSONSchema(calculation.schema, { io: 'input' }) as unknown as JsonSchema;

type Ended = { answer: Answer } | { refusal: EngineError };

/** Anything but an answer or a named refusal goes through and fails the test. */
function ask(calculation: Calculation, input: unknown): Ended {
  try {
    return { answer: runCalculation(calculation, input, WEB_LIMITS) };
  } catch (error) {
    if (error instanceof EngineError) return { refusal: error };
    throw error;
  }
}

function answered(calculation: Calculation): { input: unknown; answer: Answer } {
  const example = EXAMPLES[calculation.name];
  const inputs = example
    ? [example]
    : fc.sample(arbitraryOf(schemaOf(calculation)), { numRuns: 5000, seed: 1 });
  for (const input of inputs) {
    const ended = ask(calculation, input);
    if ('answer' in ended) return { input, answer: ended.answer };
    if (example) throw new Error(`The example is refused: ${ended.refusal.message}`);
  }
  throw new Error(
    `No input of ${calculation.name} is answered: add one to tests/support/engine-examples.ts.`,
  );
}

function everyNumber(value: unknown, seen: (number: number) => void): void {
  if (typeof value === 'number') seen(value);
  else if (value !== null && typeof value === 'object')
    for (const member of Object.values(value)) everyNumber(member, seen);
}

function checkTexts({ findings }: Answer): void {
  for (const { code, values } of findings)
    for (const part of ['title', 'body']) {
      const text = messageText(`finding.${code}.${part}`) ?? '';
      const wanted = [...text.matchAll(/\{([\w-]+)[:,}]/g)].map((match) => match[1] ?? '');
      for (const name of wanted)
        expect([code, part, Object.keys(values)]).toEqual([code, part, expect.arrayContaining([name])]);
    }
}

function checkAnswer(answer: Answer): void {
  expect(Object.keys(answer)).toEqual(['engine', 'result', 'findings', 'working']);
  everyNumber(answer, (number) => expect(Number.isFinite(number)).toBe(true));
  // What goes over the wire comes back as it was: no undefined, no -0 that turns into 0 and back.
  expect(JSON.stringify(JSON.parse(JSON.stringify(answer)))).toBe(JSON.stringify(answer));
  for (const finding of answer.findings) {
    expect(Object.keys(finding).sort()).toEqual(['basis', 'code', 'hard', 'message', 'severity', 'values']);
    expect(['stop', 'caution', 'note']).toContain(finding.severity);
    expect(finding.hard && finding.severity !== 'stop').toBe(false);
    expect(finding.basis.length).toBeGreaterThan(3);
    expect(finding.message).not.toMatch(/NaN|Infinity|undefined|\[object/);
  }
  for (const step of answer.working) {
    expect(Object.keys(step).sort()).toEqual(['basis', 'formula', 'inputs', 'key', 'name', 'unit', 'value']);
    expect(step.formula).not.toBe('');
    for (const input of step.inputs) expect(Object.keys(input).sort()).toEqual(['name', 'unit', 'value']);
  }
  checkTexts(answer);
}

function checkRefusal({ code, message, issues }: EngineError): void {
  expect(CODES).toContain(code);
  expect(message).not.toBe('');
  expect(issues.length).toBeGreaterThan(0);
  for (const issue of issues) {
    expect(issue.message).not.toMatch(/undefined|NaN|\[object|Invalid input/);
    expect(issue.message).not.toBe('');
  }
}

describe.each([...calculations.values()])('$name', (calculation) => {
  it('publishes a schema that refuses unknown keys', () => {
    const schema = schemaOf(calculation);
    expect(schema.type).toBe('object');
    expect(schema.additionalProperties).toBe(false);
    expect(JSON.stringify(schema)).not.toContain('"properties":{}');
  });

  it('answers by the contract', () => checkAnswer(answered(calculation).answer));

  it('refuses unknown keys by their path, wherever they stand', () => {
    const { input } = answered(calculation);
    for (const path of objectPaths(input)) {
      const ended = ask(
        calculation,
        changedAt(input, path, (object) => Object.assign(object, { zz: 1 })),
      );
      const at = path === '' ? 'zz' : `${path}.zz`;
      expect('refusal' in ended && ended.refusal.issues.map((issue) => issue.path)).toContain(at);
    }
  });

  it('refuses a field of the wrong kind by its path, and a missing one', () => {
    const { input } = answered(calculation);
    for (const path of objectPaths(input)) {
      const object =
        path === '' ? input : path.split('.').reduce((o, k) => (o as Record<string, never>)[k], input);
      for (const key of Object.keys(object as object)) {
        const at = path === '' ? key : `${path}.${key}`;
        // An object of a kind that nothing takes; union branches may tell it at the union itself.
        const ended = ask(
          calculation,
          changedAt(input, path, (o) => (o[key] = { zz: [] })),
        );
        const issues = 'refusal' in ended ? ended.refusal.issues : [];
        expect([at, issues.some((one) => at.startsWith(one.path) || one.path.startsWith(at))]).toEqual([
          at,
          true,
        ]);
        const without = ask(
          calculation,
          changedAt(input, path, (o) => delete o[key]),
        );
        if ('refusal' in without) checkRefusal(without.refusal);
        else checkAnswer(without.answer);
      }
    }
  });

  it.each([null, 5, 'text', [], true, {}])('refuses %j as a whole', (input) => {
    const ended = ask(calculation, input);
    expect('refusal' in ended && ended.refusal.code).toBe('invalid-input');
    if ('refusal' in ended) checkRefusal(ended.refusal);
  });

  it('answers or refuses whatever its schema lets through, with the same keys every time', () => {
    const keys = new Set<string>();
    fc.assert(
      fc.property(arbitraryOf(schemaOf(calculation)), (input) => {
        const ended = ask(calculation, input);
        if ('refusal' in ended) return checkRefusal(ended.refusal);
        checkAnswer(ended.answer);
        keys.add(
          Object.keys(ended.answer.result as object)
            .sort()
            .join(),
        );
        return undefined;
      }),
      { numRuns: RUNS },
    );
    expect(keys.size).toBeLessThanOrEqual(1);
  });

  it('answers the same to the same, and leaves its input alone', () => {
    const { input, answer } = answered(calculation);
    const before = JSON.stringify(input);
    const again = ask(calculation, input);
    expect('answer' in again && JSON.stringify(again.answer)).toBe(JSON.stringify(answer));
    expect(JSON.stringify(input)).toBe(before);
  });

  it('answers all that is near its example', () => {
    const { input } = answered(calculation);
    const near = arbitraryOf(schemaOf(calculation)).chain((other) =>
      fc.subarray(Object.keys(other as object)).map((taken) => ({
        ...(input as object),
        ...Object.fromEntries(taken.slice(0, 2).map((key) => [key, (other as Record<string, unknown>)[key]])),
      })),
    );
    fc.assert(
      fc.property(near, (mixed) => {
        const ended = ask(calculation, mixed);
        if ('refusal' in ended) checkRefusal(ended.refusal);
        else checkAnswer(ended.answer);
      }),
      { numRuns: RUNS },
    );
  });
});
