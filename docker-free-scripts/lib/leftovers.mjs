/**
 * Processes that outlived the command that started them (kill -9). One is ours when its pid still shows the command
 * line that was noted down, or when it carries the mark that we put into its environment: a server may rename itself,
 * and what it started itself was never noted.
 */
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { commandLine, endProcess, environmentOf, pidsByEnvironment } from './procfs.mjs';

const VARIABLE = 'LAMPWRIGHT_CHILD';

/** The value of the mark; the folder in it makes it this data folder's own. */
export const markOf = (pids, name) => `${pids}/${name}`;

export function notePid(pids, { name, pid, signal }) {
  mkdirSync(pids, { recursive: true, mode: 0o700 });
  const note = { pid, signal, commandLine: commandLine(pid), at: Date.now() };
  writeFileSync(join(pids, `${name}.pid`), JSON.stringify(note), { mode: 0o600 });
}

function readNote(pids, name) {
  try {
    return { name, ...JSON.parse(readFileSync(join(pids, `${name}.pid`), 'utf8')) };
  } catch {
    return null;
  }
}

function isOurs(pids, { name, pid, commandLine: noted }) {
  if (!Number.isInteger(pid) || pid <= 1 || pid === process.pid) return false;
  const now = commandLine(pid);
  return Boolean(now) && (now === noted || environmentOf(pid).includes(`${VARIABLE}=${markOf(pids, name)}`));
}

/** Ends everything that carries a mark of this folder, whoever started it. */
export async function endMarked(pids) {
  const marked = () => pidsByEnvironment((entry) => entry.startsWith(`${VARIABLE}=${pids}/`));
  await Promise.all(marked().map((pid) => endProcess(pid, 'SIGTERM', 3_000)));
}

/** Ends what the pid files of `pids` name, last started first, each by the signal it likes, and then the unnoted. */
export async function endLeftovers(pids) {
  const names = existsSync(pids) ? readdirSync(pids).filter((file) => file.endsWith('.pid')) : [];
  const notes = names.map((file) => readNote(pids, file.replace(/\.pid$/, ''))).filter(Boolean);
  for (const note of notes.sort((a, b) => b.at - a.at))
    if (isOurs(pids, note)) await endProcess(note.pid, note.signal);
  for (const file of names) rmSync(join(pids, file), { force: true });
  await endMarked(pids);
}
