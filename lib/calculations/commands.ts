/**
 * The engine behind HTTP. Small jobs are answered in place; those that can take long run in a worker thread that
 * is ended after two seconds, so that one request can't hold up the others.
 */
import { EngineError, WEB_LIMITS } from '@/lib/engine/contract';
import { calculations } from '@/lib/engine/registry';
import { runCalculation } from '@/lib/engine/run';
import { AppError } from '@/lib/platform/http/errors';
import { inThread } from '@/lib/platform/threads';

const HEAVY = new Set([
  'tape-analysis',
  'array-analysis',
  'array-spread',
  'tape-plan',
  'fault-finder',
  'series-string',
  'point-illuminance',
  'photometric-file',
  'lumen-method',
  'branch-circuit',
]);
const SECONDS = 2;

/** @throws {AppError} `invalid-input` and its kin with the engine's own code and issues. */
export async function calculate(name: string, input: unknown): Promise<unknown> {
  const calculation = calculations.get(name);
  if (!calculation) throw new EngineError('unknown-calculation', `There is no calculation "${name}".`);
  if (!HEAVY.has(name)) return runCalculation(calculation, input, WEB_LIMITS);
  const answer = await inThread({ name, input }, SECONDS * 1000);
  if (answer === 'timeout')
    throw new EngineError(
      'too-large',
      `This takes longer than ${SECONDS} seconds here: use fewer cuts, draws or runs.`,
    );
  if (answer === 'failed') throw new AppError('unexpected', 'The calculation failed here.');
  if ('error' in answer)
    throw new EngineError(answer.error.code as 'invalid-input', answer.error.message, answer.error.issues);
  return answer.ok;
}

/** RFC 9457 problem+json, 422, with the engine's code and issues. */
export function engineProblem(error: EngineError): Response {
  const status = 422;
  const body = { type: 'about:blank', title: error.message, status, code: error.code, issues: error.issues };
  return new Response(JSON.stringify(body), {
    status,
    headers: { 'content-type': 'application/problem+json', 'cache-control': 'no-store' },
  });
}
