/** `npm ci`, only when the lock file changed, and never under the feet of another command of this checkout. */
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { holderOf, PACKAGES_LOCK, releaseLock, runningCommands, takeLock } from './lock.mjs';
import { ROOT, say, Stop } from './paths.mjs';

/** Lies in node_modules, so that it goes with them. */
const stampOf = (root) => join(root, 'node_modules', '.lampwright-lock-sha256');
const COMMANDS = { start: '"npm start"', test: '"npm test"', dev: 'dev-services.mjs' };

const lockFileHash = (root) =>
  createHash('sha256')
    .update(readFileSync(join(root, 'package-lock.json')))
    .digest('hex');

/** Whether node_modules was installed from this package-lock.json. */
export function packagesAreCurrent(root = ROOT) {
  const stamp = stampOf(root);
  return existsSync(stamp) && readFileSync(stamp, 'utf8') === lockFileHash(root);
}

/** @throws {Stop} 3 when somebody of this checkout works with the packages, or installs them. */
function refuseWhileInUse(root, lock) {
  if (holderOf(lock))
    throw new Stop('Another command of this checkout is installing packages. Try again when it is done.', 3);
  const [other] = existsSync(join(root, 'node_modules')) ? runningCommands(root) : [];
  if (other)
    throw new Stop(
      `The packages have to be installed anew (package-lock.json changed), but ${COMMANDS[other] ?? other} of this checkout is running. End it first.`,
      3,
    );
}

export async function ensurePackages(children, root = ROOT) {
  if (packagesAreCurrent(root)) return;
  const lock = join(root, '.data', PACKAGES_LOCK);
  refuseWhileInUse(root, lock);
  if (takeLock(lock)) return ensurePackages(children, root);
  try {
    say('Installing packages (npm ci) …');
    const hash = lockFileHash(root);
    // The demo's stand-ins and the build are development packages: they come whatever NODE_ENV says.
    const args = ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'];
    const { code } = await children.run('npm-ci', 'npm', args, { show: true, cwd: root });
    if (code !== 0) throw new Stop('npm ci failed; what it said stands above.');
    mkdirSync(join(root, 'node_modules'), { recursive: true });
    writeFileSync(stampOf(root), hash);
  } finally {
    releaseLock(lock);
  }
}
