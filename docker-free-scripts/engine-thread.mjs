/** The engine in a worker thread of the web server: one message in, one answer out. */
import { parentPort } from 'node:worker_threads';
import { register } from 'tsx/esm/api';

register();
const { calculations } = await import('../lib/engine/registry.ts');
const { runCalculation } = await import('../lib/engine/run.ts');
const { EngineError, WEB_LIMITS } = await import('../lib/engine/contract.ts');

parentPort.on('message', ({ id, name, input }) => {
  try {
    parentPort.postMessage({ id, answer: { ok: runCalculation(calculations.get(name), input, WEB_LIMITS) } });
  } catch (error) {
    const known = error instanceof EngineError;
    const { code, message, issues } = known
      ? error
      : { code: 'no-solution', message: 'The calculation failed.', issues: [] };
    parentPort.postMessage({ id, answer: { error: { code, message, issues } } });
  }
});
