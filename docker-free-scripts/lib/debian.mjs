/** Debian packages, installed when missing: `sudo` when not root. */
import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { say, Stop } from './paths.mjs';

const POSTGRES_HOME = '/usr/lib/postgresql';

/** The newest installed server's program folder; Debian does not put it on PATH. */
export function postgresBin() {
  const versions = existsSync(POSTGRES_HOME) ? readdirSync(POSTGRES_HOME) : [];
  const found = versions
    .sort((a, b) => Number(b) - Number(a))
    .map((version) => join(POSTGRES_HOME, version, 'bin'))
    .find((bin) => existsSync(join(bin, 'postgres')) && existsSync(join(bin, 'initdb')));
  return found ?? null;
}

const WANTED = {
  postgresql: { packages: ['postgresql-15', 'postgresql'], present: () => postgresBin() !== null },
  chromium: { packages: ['chromium'], present: () => existsSync('/usr/bin/chromium') },
  ngspice: { packages: ['ngspice'], present: () => existsSync('/usr/bin/ngspice') },
};

function asRoot(command, args) {
  const root = process.getuid?.() === 0;
  const [program, rest] = root ? [command, args] : ['sudo', [command, ...args]];
  return spawnSync(program, rest, {
    stdio: ['inherit', 'ignore', 'inherit'],
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  });
}

/** Debian's package would start a cluster of its own on the usual port; ours is private. */
function refuseMainCluster() {
  const file = '/etc/postgresql-common/createcluster.conf';
  if (process.getuid?.() === 0) {
    mkdirSync('/etc/postgresql-common', { recursive: true });
    const text = existsSync(file) ? readFileSync(file, 'utf8') : '';
    if (!/^create_main_cluster\s*=\s*false/m.test(text)) writeFileSync(file, `${text}\ncreate_main_cluster = false\n`);
    return;
  }
  asRoot('sh', ['-c', `mkdir -p /etc/postgresql-common && echo 'create_main_cluster = false' >> ${file}`]);
}

export function ensureDebianPackages(names) {
  const missing = names.filter((name) => !WANTED[name].present());
  if (missing.length === 0) return;
  if (!existsSync('/usr/bin/apt-get'))
    throw new Stop(`This machine lacks ${missing.join(', ')} and is not Debian: install them and run this again.`);
  say(`Installing Debian packages: ${missing.join(', ')} …`);
  if (missing.includes('postgresql')) refuseMainCluster();
  asRoot('apt-get', ['update', '-qq']);
  for (const name of missing) {
    const done = WANTED[name].packages.some(
      (wanted) => asRoot('apt-get', ['install', '-y', '-qq', '--no-install-recommends', wanted]).status === 0,
    );
    if (!done || !WANTED[name].present()) throw new Stop(`apt-get could not install ${name}; what it said stands above.`);
  }
}
