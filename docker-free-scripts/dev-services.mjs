/**
 * Starts the services alone, migrates, and writes their environment to `<data>/env`: for working on one thing
 * against a real database. `node docker-free-scripts/dev-services.mjs --data .data-dev`
 */
import { spawnSync } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { ensureDebianPackages } from './lib/debian.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { complain, ROOT, say, script } from './lib/paths.mjs';
import { Children, onEnd } from './lib/processes.mjs';
import { startServices } from './lib/services.mjs';

const at = process.argv.indexOf('--data');
const data = resolve(ROOT, at > 0 ? process.argv[at + 1] : '.data-dev');

ensurePackages('dev');
ensureDebianPackages(['postgresql']);
const children = new Children(data);
onEnd(async (code) => {
  await children.endAll();
  process.exit(code);
});
try {
  const { env, own } = await startServices(children, { data });
  spawnSync(process.execPath, ['--import', 'tsx', script('migrate.ts')], { cwd: ROOT, env, stdio: 'inherit' });
  writeFileSync(join(data, 'env'), Object.entries(own).map(([key, value]) => `${key}=${value}\n`).join(''), { mode: 0o600 });
  say(`Services run; their environment is in ${join(data, 'env')}.`);
} catch (error) {
  complain(error.message);
  await children.endAll();
  process.exit(1);
}
