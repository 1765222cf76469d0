/** One command of a kind per checkout. A lock is a pid with its command line: a stale one is taken over. */
import { linkSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { commandLine, workingFolder } from './procfs.mjs';

/** Makes a name beside `file` that no other process uses. */
const beside = (file) => `${file}.${process.pid}.${process.hrtime.bigint()}`;

function read(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return null;
  }
}

const isLive = (held) =>
  held !== null &&
  Number.isInteger(held.pid) &&
  held.commandLine !== '' &&
  commandLine(held.pid) === held.commandLine &&
  workingFolder(held.pid) === held.folder;

/** Who holds the lock: `{pid, commandLine, folder}`, or null where that process is gone or is another by now. */
export function holderOf(file) {
  const held = read(file);
  return isLive(held) ? held : null;
}

/** Writes the lock under another name and links it into place: it is never seen empty, and only one link succeeds. */
function claim(file) {
  const mine = beside(file);
  const self = {
    pid: process.pid,
    commandLine: commandLine(process.pid),
    folder: workingFolder(process.pid),
  };
  writeFileSync(mine, JSON.stringify(self), { mode: 0o600 });
  try {
    linkSync(mine, file);
    return true;
  } catch (error) {
    if (error.code !== 'EEXIST') throw error;
    return false;
  } finally {
    rmSync(mine, { force: true });
  }
}

/** Moves a stale lock away. Whoever moved a fresh one, since two came at once, puts it back. */
function clearStale(file) {
  const aside = beside(file);
  try {
    renameSync(file, aside);
  } catch (error) {
    if (error.code === 'ENOENT') return;
    throw error;
  }
  try {
    if (holderOf(aside)) linkSync(aside, file);
  } catch (error) {
    if (error.code !== 'EEXIST') throw error;
  } finally {
    rmSync(aside, { force: true });
  }
}

/** Takes the lock. @returns null when taken, otherwise its holder. */
export function takeLock(file) {
  mkdirSync(dirname(file), { recursive: true, mode: 0o700 });
  for (;;) {
    if (claim(file)) return null;
    const holder = holderOf(file);
    if (holder) return holder.pid === process.pid ? null : holder;
    clearStale(file);
  }
}

export function releaseLock(file) {
  if (read(file)?.pid === process.pid) rmSync(file, { force: true });
}

export const PACKAGES_LOCK = 'packages.lock';

/** Names of the other commands that run in this checkout: each keeps `<name>.lock` in its data folder. */
export function runningCommands(root) {
  const folders = readdirSync(root).filter((name) => name.startsWith('.data'));
  return folders.flatMap((folder) =>
    readdirSync(join(root, folder))
      .filter((name) => name.endsWith('.lock') && name !== PACKAGES_LOCK)
      .filter((name) => {
        const holder = holderOf(join(root, folder, name));
        return holder !== null && holder.pid !== process.pid;
      })
      .map((name) => name.replace(/\.lock$/, '')),
  );
}
