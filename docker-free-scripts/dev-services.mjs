/**
 * Starts the services alone, migrates, and writes their environment to `<data>/env`: for working on one thing
 * against a real database. `node docker-free-scripts/dev-services.mjs --data .data-dev`
 */
import { writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { runCommand } from './lib/command.mjs';
import { ensureDebianPackages } from './lib/debian.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { complain, ROOT, say, script } from './lib/paths.mjs';
import { startServices } from './lib/services.mjs';

const at = process.argv.indexOf('--data');
const data = resolve(ROOT, (at > 0 && process.argv[at + 1]) || '.data-dev');

async function serveServices(children) {
  await children.endLeftovers();
  await ensurePackages(children);
  await ensureDebianPackages(children, ['postgresql']);
  const { env, own } = await startServices(children, { data });
  const file = join(data, 'env');
  writeFileSync(
    file,
    Object.entries(own)
      .map(([name, value]) => `${name}=${value}\n`)
      .join(''),
    { mode: 0o600 },
  );
  const args = ['--import', 'tsx', script('migrate.ts')];
  const { code } = await children.run('migrate', process.execPath, args, { env, show: true });
  say(`Services run; their environment is in ${file}.`);
  // Somebody who mends a migration needs the services all the same.
  if (code !== 0) complain('The migrations failed; what they said stands above.');
}

await runCommand(
  {
    data,
    lock: join(data, 'dev.lock'),
    onBusy: () => {
      complain(`The services of ${data} run already; their environment is in ${join(data, 'env')}.`);
      return 3;
    },
  },
  serveServices,
);
