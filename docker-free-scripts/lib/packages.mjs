/** `npm ci`, only when the lock file changed, and never under the feet of another command of this checkout. */
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { holderOf, lockFile, releaseLock, takeLock } from './lock.mjs';
import { ROOT, say, Stop } from './paths.mjs';

const STAMP = join(ROOT, 'node_modules', '.lampwright-lock-sha256');

export function fileHash(file) {
  return createHash('sha256').update(readFileSync(file)).digest('hex');
}

function installed(hash) {
  return existsSync(STAMP) && readFileSync(STAMP, 'utf8') === hash;
}

/** @param self name of the running command ('start' | 'test'): its own lock does not count. */
export function ensurePackages(self) {
  const hash = fileHash(join(ROOT, 'package-lock.json'));
  if (installed(hash)) return;
  const others = ['start', 'test'].filter((name) => name !== self && holderOf(lockFile(ROOT, name)));
  if (others.length > 0 && existsSync(join(ROOT, 'node_modules')))
    throw new Stop(
      `The packages changed (package-lock.json), but "npm ${others[0]}" of this checkout is running. End it first.`,
      3,
    );
  const lock = join(ROOT, '.data', 'packages.lock');
  if (takeLock(lock)) throw new Stop('Another command of this checkout is installing packages. Try again when it is done.', 3);
  try {
    say('Installing packages (npm ci) …');
    const done = spawnSync('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], { cwd: ROOT, stdio: 'inherit' });
    if (done.status !== 0) throw new Stop('npm ci failed; what it said stands above.');
    mkdirSync(join(ROOT, 'node_modules'), { recursive: true });
    writeFileSync(STAMP, hash);
  } finally {
    releaseLock(lock);
  }
}
