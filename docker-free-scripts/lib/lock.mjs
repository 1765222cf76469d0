/** One command of a kind per checkout. A lock is a pid with its command line: a stale one is taken over. */
import { mkdirSync, readFileSync, readlinkSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';

/** The command line of a running process, or null. */
export function commandLine(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').replaceAll('\0', ' ').trim();
  } catch {
    return null;
  }
}

/** A process's environment as one text, '' where it is gone or not ours to read. */
export function environmentOf(pid) {
  try {
    return readFileSync(`/proc/${pid}/environ`, 'utf8');
  } catch {
    return '';
  }
}

function workingFolder(pid) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`);
  } catch {
    return null;
  }
}

function read(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return null;
  }
}

/** Who holds the lock: `{pid, commandLine}`, or null where its process is gone or is another one by now. */
export function holderOf(file) {
  const held = read(file);
  if (!held || typeof held.pid !== 'number') return null;
  const now = commandLine(held.pid);
  return now !== null && now === held.commandLine && workingFolder(held.pid) === held.folder ? held : null;
}

/** Takes the lock. @returns null when taken, otherwise its holder. */
export function takeLock(file) {
  mkdirSync(dirname(file), { recursive: true, mode: 0o700 });
  for (;;) {
    try {
      const self = { pid: process.pid, commandLine: commandLine(process.pid), folder: workingFolder(process.pid) };
      writeFileSync(file, JSON.stringify(self), { flag: 'wx', mode: 0o600 });
      return null;
    } catch (error) {
      if (error.code !== 'EEXIST') throw error;
      const holder = holderOf(file);
      if (holder && holder.pid !== process.pid) return holder;
      rmSync(file, { force: true });
    }
  }
}

export function releaseLock(file) {
  if (read(file)?.pid === process.pid) rmSync(file, { force: true });
}

export const lockFile = (root, name) => join(root, name === 'test' ? '.data-test' : '.data', `${name}.lock`);
