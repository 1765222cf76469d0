/**
 * `npm test`: sets up all it needs, runs everything, and ends with one line `N passed, N failed`.
 * `npm test -- --only static|pure|integration|e2e [files…]` runs a part of it.
 */
import { spawn, spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { startApp } from './lib/app.mjs';
import { build } from './lib/build.mjs';
import { ensureDebianPackages } from './lib/debian.mjs';
import { lockFile, releaseLock, takeLock } from './lib/lock.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { complain, dataFolder, ROOT, say, script, Stop } from './lib/paths.mjs';
import { Children, onEnd } from './lib/processes.mjs';
import { addPlaywright, addVitest, Tally } from './lib/results.mjs';
import { startServices } from './lib/services.mjs';

const DATA = dataFolder('.data-test');
const REPORTS = join(DATA, 'reports');
const LOCK = lockFile(ROOT, 'test');
const DIST = '.next-test';
const bin = (path) => join(ROOT, 'node_modules', path);

const args = process.argv.slice(2);
const onlyAt = args.indexOf('--only');
const only = onlyAt >= 0 ? args[onlyAt + 1] : null;
const filter = args.filter((arg, at) => onlyAt < 0 || (at !== onlyAt && at !== onlyAt + 1));
const wants = (part) => only === null || only === part;

/** Steps run one after another in child processes, so that a signal to us can end them. */
let current = null;
function step(name, program, rest, env = process.env) {
  say(`— ${name}`);
  return new Promise((resolve) => {
    current = spawn(program, rest, { cwd: ROOT, env, stdio: ['ignore', 'pipe', 'pipe'] });
    let output = '';
    const keep = (chunk) => (output = (output + chunk).slice(-200_000));
    current.stdout.on('data', keep);
    current.stderr.on('data', keep);
    current.on('close', (code) => {
      current = null;
      resolve({ code: code ?? 1, output });
    });
  });
}

async function staticChecks(tally) {
  const checks = [
    ['prettier', [bin('prettier/bin/prettier.cjs'), '--check', '--log-level', 'warn', '.']],
    ['eslint', [bin('eslint/bin/eslint.js'), '.', '--max-warnings', '0']],
    // Next writes types for routes that tsconfig includes; without them the check would differ by machine.
    ['next typegen', [bin('next/dist/bin/next'), 'typegen']],
    ['tsc', [bin('typescript/bin/tsc'), '--noEmit', '--incremental', 'false']],
  ];
  for (const [name, rest] of checks) {
    const env = { ...process.env, NEXT_DIST_DIR: DIST, NEXT_TELEMETRY_DISABLED: '1' };
    const { code, output } = await step(name, process.execPath, rest, env);
    if (code === 0) tally.pass();
    else tally.fail(name, output);
  }
}

async function vitest(tally, project, env) {
  const report = join(REPORTS, `${project}.json`);
  const rest = [bin('vitest/vitest.mjs'), 'run', '--project', project, '--passWithNoTests'];
  const { code, output } = await step(
    `vitest ${project}`, process.execPath, [...rest, '--reporter=json', `--outputFile=${report}`, ...filter], env,
  );
  const before = tally.failed;
  addVitest(tally, report, project, code);
  if (code !== 0 && tally.failed === before) tally.fail(project, output);
}

async function playwright(tally, children, services) {
  const failed = build(DIST);
  if (failed !== null) return tally.fail('next build', failed);
  tally.pass();
  await startApp(children, { env: services.env, port: services.ports.app, distDir: DIST });
  if (!existsSync(join(ROOT, 'tests', 'e2e'))) return;
  const report = join(REPORTS, 'e2e.json');
  const env = { ...services.env, PLAYWRIGHT_JSON_OUTPUT_FILE: report, NEXT_DIST_DIR: DIST };
  const { code } = await step('playwright', process.execPath, [bin('@playwright/test/cli.js'), 'test', ...filter], env);
  addPlaywright(tally, report, 'e2e', code);
}

function migrateOrStop(env) {
  const done = spawnSync(process.execPath, ['--import', 'tsx', script('migrate.ts')], { cwd: ROOT, env, encoding: 'utf8' });
  if (done.status !== 0) throw new Stop(`The migrations failed.\n${done.stdout}${done.stderr}`);
}

async function runAll(tally, children) {
  mkdirSync(REPORTS, { recursive: true });
  if (wants('static')) await staticChecks(tally);
  if (wants('pure')) await vitest(tally, 'pure', process.env);
  if (!wants('integration') && !wants('e2e')) return;
  // Each run has a database, a catcher and an object store of its own, empty.
  await children.endLeftovers();
  for (const name of ['postgres', 'objects', 'stripe']) rmSync(join(DATA, name), { recursive: true, force: true });
  const services = await startServices(children, { data: DATA, durable: false });
  migrateOrStop(services.env);
  if (wants('integration')) await vitest(tally, 'integration', services.env);
  if (wants('e2e')) await playwright(tally, children, services);
}

if (takeLock(LOCK)) {
  complain('"npm test" is running in this checkout already. Wait for it, or use another clone.');
  process.exit(3);
}
const children = new Children(DATA);
const end = async (code) => {
  current?.kill('SIGTERM');
  await children.endAll();
  releaseLock(LOCK);
  process.exit(code);
};
onEnd(end);

const tally = new Tally();
try {
  ensurePackages('test');
  ensureDebianPackages(['postgresql', 'chromium', 'ngspice']);
  await runAll(tally, children);
} catch (error) {
  if (error.code === 3) {
    complain(error.message);
    await end(3);
  }
  tally.fail('test run', error instanceof Stop ? error.message : (error.stack ?? String(error)));
}
for (const { name, detail } of tally.failures) say(`\nFAILED ${name}\n${detail.slice(0, 4_000)}`);
await children.endAll();
say('');
say(tally.line());
releaseLock(LOCK);
process.exit(tally.failed > 0 ? 1 : 0);
