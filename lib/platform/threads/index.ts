/** One engine thread per web process, started when first needed, replaced when it had to be ended. */
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';

export type ThreadAnswer =
  { ok: unknown } | { error: { code: string; message: string; issues: { path: string; message: string }[] } };

interface Waiting {
  resolve: (answer: ThreadAnswer | 'failed') => void;
}

let worker: Worker | null = null;
let serial = 0;
const waiting = new Map<number, Waiting>();

function script(): string {
  const file = join(/* turbopackIgnore: true */ process.cwd(), 'docker-free-scripts', 'engine-thread.mjs');
  if (!existsSync(file))
    throw new Error('docker-free-scripts/engine-thread.mjs is missing beside the server.');
  return file;
}

function failAll(): void {
  worker = null;
  for (const one of waiting.values()) one.resolve('failed');
  waiting.clear();
}

function thread(): Worker {
  if (worker) return worker;
  const fresh = new Worker(/* turbopackIgnore: true */ script());
  fresh.on('message', ({ id, answer }: { id: number; answer: ThreadAnswer }) => {
    waiting.get(id)?.resolve(answer);
    waiting.delete(id);
  });
  fresh.on('error', failAll);
  fresh.on('exit', () => {
    if (worker === fresh) failAll();
  });
  fresh.unref();
  worker = fresh;
  return fresh;
}

/** Runs one calculation in the thread; `timeout` after `ms`, and then the thread is ended. */
export async function inThread(
  job: { name: string; input: unknown },
  ms: number,
): Promise<ThreadAnswer | 'timeout' | 'failed'> {
  const running = thread();
  const id = (serial += 1);
  let timer: ReturnType<typeof setTimeout> | undefined;
  const answered = new Promise<ThreadAnswer | 'failed'>((resolve) => {
    waiting.set(id, { resolve });
    running.postMessage({ id, ...job });
  });
  const late = new Promise<'timeout'>((resolve) => {
    timer = setTimeout(() => resolve('timeout'), ms);
  });
  const outcome = await Promise.race([answered, late]);
  clearTimeout(timer);
  if (outcome === 'timeout') {
    waiting.delete(id);
    if (worker === running) worker = null;
    void running.terminate();
  }
  return outcome;
}
