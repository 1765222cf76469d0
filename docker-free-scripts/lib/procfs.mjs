/** What /proc tells about a process, and how one of ours is ended. */
import { readdirSync, readFileSync, readlinkSync } from 'node:fs';
import { wait } from './paths.mjs';

const wordsOf = (file) => {
  try {
    return readFileSync(file, 'utf8').split('\0');
  } catch {
    return null;
  }
};

/** The words of a running process's command line, null where there is no such process. */
export const argumentsOf = (pid) => wordsOf(`/proc/${pid}/cmdline`);

/** The command line as one text; '' once the process has ended but is not reaped; null where there is none. */
export const commandLine = (pid) => argumentsOf(pid)?.join(' ').trim() ?? null;

/** A process's environment as `NAME=value` entries, empty where it is gone or not ours to read. */
export const environmentOf = (pid) => wordsOf(`/proc/${pid}/environ`) ?? [];

export function workingFolder(pid) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`);
  } catch {
    return null;
  }
}

export const isAlive = (pid) => Boolean(commandLine(pid));

/** Pids of all running processes, without our own, whose environment has an entry that `test` accepts. */
export function pidsByEnvironment(test) {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name) && Number(name) !== process.pid)
    .map(Number)
    .filter((pid) => isAlive(pid) && environmentOf(pid).some(test));
}

/** Signals the group that the process leads, or the process where it leads none; once, since a second may mean haste. */
function send(pid, signal) {
  for (const target of [-pid, pid]) {
    try {
      process.kill(target, signal);
      return;
    } catch {
      // No such group, or it ended meanwhile, which is what is wanted.
    }
  }
}

async function gone(pid, ms) {
  for (let waited = 0; waited < ms && isAlive(pid); waited += 25) await wait(25);
  return !isAlive(pid);
}

/**
 * Ends a process that is known to be ours, with the group it leads where it has one: asks, then insists.
 * @param graceMs how long it may take to end by itself
 */
export async function endProcess(pid, signal = 'SIGTERM', graceMs = 8_000) {
  send(pid, signal);
  if (await gone(pid, graceMs)) return;
  send(pid, 'SIGKILL');
  await gone(pid, 2_000);
}
