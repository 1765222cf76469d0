/** Debian packages, installed when missing: `sudo` when not root. */
import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { say, Stop } from './paths.mjs';

const POSTGRES_HOME = '/usr/lib/postgresql';
export const isRoot = () => process.getuid?.() === 0;

/**
 * The program folder of an installed server, null without one; Debian does not put it on PATH.
 * @param version the major version that made a data folder; without it the newest
 */
export function postgresBin(version) {
  const installed = existsSync(POSTGRES_HOME) ? readdirSync(POSTGRES_HOME) : [];
  const found = installed
    .filter((name) => version === undefined || name === version)
    .sort((a, b) => Number(b) - Number(a))
    .map((name) => join(POSTGRES_HOME, name, 'bin'))
    .find((bin) => existsSync(join(bin, 'postgres')) && existsSync(join(bin, 'initdb')));
  return found ?? null;
}

/** Debian 12 has version 15; later releases bring theirs by the package without a number. */
const WANTED = {
  postgresql: { packages: ['postgresql-15', 'postgresql'], present: () => postgresBin() !== null },
  chromium: { packages: ['chromium'], present: () => existsSync('/usr/bin/chromium') },
  ngspice: { packages: ['ngspice'], present: () => existsSync('/usr/bin/ngspice') },
};

/** Debian's package would start a cluster of its own on the usual port; ours is private. */
const REFUSE_MAIN_CLUSTER = `
file=/etc/postgresql-common/createcluster.conf
mkdir -p /etc/postgresql-common
grep -qs '^create_main_cluster *= *false' "$file" || echo 'create_main_cluster = false' >> "$file"`;

/** sudo may ask for a password at the terminal. */
function asRoot(children, program, args) {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const [command, rest] = isRoot()
    ? [program, args]
    : ['sudo', ['DEBIAN_FRONTEND=noninteractive', program, ...args]];
  return children.run('apt', command, rest, { ask: true, env });
}

async function install(children, name) {
  const said = [];
  for (const wanted of WANTED[name].packages) {
    const { output } = await asRoot(children, 'apt-get', [
      'install',
      '-y',
      '-q',
      '--no-install-recommends',
      wanted,
    ]);
    if (WANTED[name].present()) return;
    said.push(output);
  }
  throw new Stop(`apt-get could not install ${name}.\n${said.join('\n')}`);
}

export async function ensureDebianPackages(children, names) {
  const missing = names.filter((name) => !WANTED[name].present());
  if (missing.length === 0) return;
  const list = missing.join(', ');
  if (!existsSync('/usr/bin/apt-get'))
    throw new Stop(
      `This machine lacks ${list} and has no apt-get: this command sets up Debian 12 and its kin only.`,
    );
  if (!isRoot() && !existsSync('/usr/bin/sudo'))
    throw new Stop(
      `This machine lacks ${list}. As root, run: apt-get install --no-install-recommends ${missing.map((name) => WANTED[name].packages[0]).join(' ')}`,
    );
  say(`Installing Debian packages: ${list} …`);
  if (missing.includes('postgresql')) await asRoot(children, 'sh', ['-c', REFUSE_MAIN_CLUSTER]);
  await asRoot(children, 'apt-get', ['update', '-qq']);
  for (const name of missing) await install(children, name);
}
