/** Ports and secrets that stay the same over restarts: a moved port loses offline data and mailed links. */
import { randomBytes, randomInt } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { dirname, join } from 'node:path';
import { say, Stop } from './paths.mjs';

/** Below Linux's range for outgoing connections (32768 and up), one of which could hold a kept port at a restart. */
const LOWEST = 20_000;
const HIGHEST = 32_000;

/** What the demo made for itself: `serve` refuses secrets that begin so. */
export const GENERATED = 'lampwright-demo-';

function readJson(file) {
  if (!existsSync(file)) return {};
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    throw new Stop(`${file} is not readable as JSON. Mend it, or remove its folder to start afresh.`);
  }
}

/** Writes by rename: a file cut short would lose the database's passwords. */
function writePrivate(file, value) {
  mkdirSync(dirname(file), { recursive: true, mode: 0o700 });
  const fresh = `${file}.${process.pid}`;
  writeFileSync(fresh, `${JSON.stringify(value, null, 2)}\n`, { mode: 0o600 });
  renameSync(fresh, file);
}

/** Whether nothing listens on a loopback port. */
export function isFree(port) {
  return new Promise((resolve) => {
    const server = createServer();
    server.once('error', () => resolve(false));
    server.listen({ port, host: '127.0.0.1', exclusive: true }, () => server.close(() => resolve(true)));
  });
}

async function anyFreePort(taken) {
  for (let tries = 0; tries < 500; tries += 1) {
    const port = randomInt(LOWEST, HIGHEST);
    if (!taken.includes(port) && (await isFree(port))) return port;
  }
  throw new Stop(`No free port between ${LOWEST} and ${HIGHEST}.`);
}

/**
 * A port for each name, as kept in `<data>/ports.json`; a kept one that somebody else took is replaced and told.
 * `preferred` gives a first choice.
 */
export async function keptPorts(data, names, preferred = {}) {
  const file = join(data, 'ports.json');
  const kept = readJson(file);
  /** @type {Record<string, number>} */
  const ports = {};
  for (const name of names) {
    const taken = Object.values(ports);
    const wish = kept[name] ?? preferred[name];
    const usable = Number.isInteger(wish) && !taken.includes(wish) && (await isFree(wish));
    ports[name] = usable ? wish : await anyFreePort([...taken, ...Object.values(kept)]);
    if (kept[name] !== undefined && kept[name] !== ports[name])
      say(`Port ${kept[name]} (${name}) is taken by another program; using ${ports[name]} from now on.`);
  }
  writePrivate(file, { ...kept, ...ports });
  return ports;
}

/** Random secrets by name, made once and kept in `<data>/secrets.json`. */
export function keptSecrets(data, names) {
  const file = join(data, 'secrets.json');
  const secrets = readJson(file);
  for (const name of names) secrets[name] ??= `${GENERATED}${randomBytes(24).toString('hex')}`;
  writePrivate(file, secrets);
  return secrets;
}
