/** Ports and secrets that stay the same over restarts: a moved port loses offline data and mailed links. */
import { randomBytes } from 'node:crypto';
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { dirname, join } from 'node:path';
import { say } from './paths.mjs';

function readJson(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return {};
  }
}

function writePrivate(file, value) {
  mkdirSync(dirname(file), { recursive: true, mode: 0o700 });
  writeFileSync(file, `${JSON.stringify(value, null, 2)}\n`, { mode: 0o600 });
}

/** Whether nothing listens on a loopback port. */
export function isFree(port) {
  return new Promise((resolve) => {
    const server = createServer();
    server.once('error', () => resolve(false));
    server.listen({ port, host: '127.0.0.1', exclusive: true }, () => server.close(() => resolve(true)));
  });
}

export function anyFreePort() {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen({ port: 0, host: '127.0.0.1' }, () => {
      const { port } = server.address();
      server.close(() => resolve(port));
    });
  });
}

/**
 * A port for each name, as kept in `<data>/ports.json`; a kept one that somebody else took is replaced and told.
 * `preferred` gives a first choice.
 */
export async function keptPorts(data, names, preferred = {}) {
  const file = join(data, 'ports.json');
  const kept = readJson(file);
  const ports = {};
  for (const name of names) {
    const wish = kept[name] ?? preferred[name];
    const usable = wish !== undefined && !Object.values(ports).includes(wish) && (await isFree(wish));
    ports[name] = usable ? wish : await anyFreePort();
    if (kept[name] !== undefined && kept[name] !== ports[name])
      say(`Port ${kept[name]} (${name}) is taken by another program; using ${ports[name]} from now on.`);
  }
  writePrivate(file, { ...kept, ...ports });
  return ports;
}

/** Random secrets by name, made once. */
export function keptSecrets(data, names) {
  const file = join(data, 'secrets.json');
  const secrets = readJson(file);
  for (const name of names) secrets[name] ??= randomBytes(24).toString('hex');
  writePrivate(file, secrets);
  return secrets;
}
