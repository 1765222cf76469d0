/** What `start`, `test` and the service command have in common: one at a time, and nothing stays when they end. */
import { releaseLock, takeLock } from './lock.mjs';
import { complain, Stop } from './paths.mjs';
import { Children } from './processes.mjs';

const SIGNALS = [
  ['SIGINT', 130],
  ['SIGTERM', 143],
  ['SIGHUP', 129],
];

function refuseOldNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  if (major > 20 || (major === 20 && minor >= 19)) return;
  complain(`Lampwright needs Node 20.19 or newer; this is ${process.versions.node}.`);
  process.exit(1);
}

/** Calls `end` once: on a signal, when the parent that started us is gone, and on an error that nobody caught. */
export function onEnd(end) {
  let ended;
  const once = (code) => (ended ??= end(code));
  for (const [signal, code] of SIGNALS) process.on(signal, () => void once(code));
  for (const event of ['uncaughtException', 'unhandledRejection'])
    process.on(event, (error) => {
      complain(error?.stack ?? String(error));
      void once(1);
    });
  // A reader that left (`npm test | head`) is no reason to stop half-way.
  for (const stream of [process.stdout, process.stderr]) stream.on('error', () => {});
  const parent = process.ppid;
  setInterval(() => {
    if (process.ppid !== parent) void once(129);
  }, 500).unref();
  return once;
}

/**
 * Runs `main(children)` as one of this checkout's commands.
 * @param data folder for pid files and logs
 * @param lock file that only one command of a kind holds
 * @param onBusy called when another one holds it; returns the exit code
 * @param onEnded called when all children have ended
 * `main` returns an exit code, or undefined to stay until it is ended.
 */
export async function runCommand({ data, lock, onBusy, onEnded = () => {} }, main) {
  refuseOldNode();
  if (takeLock(lock)) process.exit(onBusy());
  const children = new Children(data);
  const finish = onEnd(async (code) => {
    await children.endAll();
    onEnded();
    releaseLock(lock);
    process.exit(code);
  });
  children.onUnexpectedExit = (name) => {
    complain(`${name} ended unexpectedly; its log is ${children.logOf(name)}.`);
    void finish(1);
  };
  try {
    const code = await main(children);
    if (code !== undefined) await finish(code);
  } catch (error) {
    if (!children.ending) complain(error instanceof Stop ? error.message : (error.stack ?? String(error)));
    await finish(error instanceof Stop ? error.code : 1);
  }
}
