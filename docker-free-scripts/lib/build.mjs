/** `next build`, skipped when no source changed, and always without a database in reach. */
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { nextBin, ROOT, say, Stop } from './paths.mjs';

const FOLDERS = ['app', 'components', 'lib', 'models', 'emails', 'fonts', 'public'];
const FILES = [
  'next.config.mjs',
  'tailwind.config.ts',
  'postcss.config.mjs',
  'tsconfig.json',
  'package.json',
  'package-lock.json',
  'proxy.ts',
  'instrumentation.ts',
];

function* walk(folder) {
  const entries = readdirSync(folder, { withFileTypes: true });
  for (const entry of entries.sort((a, b) => (a.name < b.name ? -1 : 1))) {
    const path = join(folder, entry.name);
    if (entry.isDirectory()) yield* walk(path);
    else yield path;
  }
}

/** A hash over the path and content of everything that a build reads. */
export function sourceHash(root = ROOT) {
  const hash = createHash('sha256');
  const folders = FOLDERS.map((name) => join(root, name)).filter(existsSync);
  const files = FILES.map((name) => join(root, name)).filter(existsSync);
  for (const path of [...folders.flatMap((folder) => [...walk(folder)]), ...files]) {
    const content = readFileSync(path);
    hash.update(`${path.slice(root.length)}\0${content.length}\0`).update(content);
  }
  return hash.digest('hex');
}

const SERVICES = /^(DATABASE_URL|SMTP_|MAIL_|S3_|STRIPE_)/;

/** `env` without anything by which a service could be reached. */
export const withoutServices = (env) =>
  Object.fromEntries(Object.entries(env).filter(([name]) => !SERVICES.test(name)));

const stampOf = (distDir) => join(ROOT, distDir, 'lampwright-source-sha256');

export function buildIsCurrent(distDir) {
  const stamp = stampOf(distDir);
  return existsSync(stamp) && readFileSync(stamp, 'utf8') === sourceHash();
}

/** @returns the build's output when it failed, otherwise null. */
export async function build(children, distDir) {
  if (buildIsCurrent(distDir)) return null;
  const hash = sourceHash();
  // A build that fails half-way must not pass for the one before it.
  rmSync(stampOf(distDir), { force: true });
  const env = {
    ...withoutServices(process.env),
    NEXT_DIST_DIR: distDir,
    NEXT_TELEMETRY_DISABLED: '1',
    NODE_ENV: 'production',
  };
  const { code, output } = await children.run('build', process.execPath, [nextBin, 'build'], { env });
  if (code !== 0) return output;
  writeFileSync(stampOf(distDir), hash);
  return null;
}

export async function buildOrStop(children, distDir) {
  if (!buildIsCurrent(distDir)) say('Building …');
  const failed = await build(children, distDir);
  if (failed !== null) throw new Stop(`The build failed.\n${failed}`);
}
