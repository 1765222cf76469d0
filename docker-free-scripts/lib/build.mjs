/** `next build`, skipped when no source changed, and always without a database in reach. */
import { createHash } from 'node:crypto';
import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT, say, Stop } from './paths.mjs';

const SOURCES = ['app', 'components', 'lib', 'models', 'emails', 'fonts', 'public'];
const FILES = ['next.config.mjs', 'tailwind.config.ts', 'postcss.config.mjs', 'tsconfig.json', 'package-lock.json', 'proxy.ts'];

function* walk(folder) {
  for (const entry of readdirSync(folder, { withFileTypes: true }).sort((a, b) => (a.name < b.name ? -1 : 1))) {
    const path = join(folder, entry.name);
    if (entry.isDirectory()) yield* walk(path);
    else yield path;
  }
}

/** A hash over the path and content of everything that a build reads. */
export function sourceHash(root = ROOT) {
  const hash = createHash('sha256');
  const folders = SOURCES.map((name) => join(root, name)).filter(existsSync);
  const files = FILES.map((name) => join(root, name)).filter(existsSync);
  for (const path of [...folders.flatMap((folder) => [...walk(folder)]), ...files])
    hash.update(path.slice(root.length)).update('\0').update(readFileSync(path)).update('\0');
  return hash.digest('hex');
}

/** The build's environment: nothing that could reach a service. */
function buildEnvironment(distDir) {
  const env = { ...process.env, NEXT_DIST_DIR: distDir, NEXT_TELEMETRY_DISABLED: '1', NODE_ENV: 'production' };
  for (const name of Object.keys(env)) if (/^(DATABASE_URL|SMTP_|S3_|STRIPE_)/.test(name)) delete env[name];
  return env;
}

/** @returns the build's output when it failed, otherwise null. */
export function build(distDir) {
  const stamp = join(ROOT, distDir, 'lampwright-source-sha256');
  const hash = sourceHash();
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return null;
  say('Building …');
  const next = join(ROOT, 'node_modules', 'next', 'dist', 'bin', 'next');
  const done = spawnSync(process.execPath, [next, 'build'], {
    cwd: ROOT,
    env: buildEnvironment(distDir),
    encoding: 'utf8',
    maxBuffer: 64 * 1024 * 1024,
  });
  if (done.status !== 0) return `${done.stdout}\n${done.stderr}`;
  writeFileSync(stamp, hash);
  return null;
}

export function buildOrStop(distDir) {
  const failed = build(distDir);
  if (failed !== null) throw new Stop(`The build failed.\n${failed}`);
}
