/** The parts of `npm test`: static checks, vitest, build and browser. Each adds to a tally. */
import { existsSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { startApp } from './app.mjs';
import { build, withoutServices } from './build.mjs';
import { nextBin, ROOT, say } from './paths.mjs';
import { addPlaywright, addVitest } from './results.mjs';

export const DIST = '.next-test';
const bin = (path) => join(ROOT, 'node_modules', path);
/** Plain texts, whatever the terminal can do: they are kept and shown later. */
const PLAIN = { NO_COLOR: '1', FORCE_COLOR: '0', NEXT_TELEMETRY_DISABLED: '1' };

/** Runs a node program to its end and tells how long it took. */
async function step(children, name, args, env) {
  const started = Date.now();
  const result = await children.run(name, process.execPath, args, { env: { ...env, ...PLAIN } });
  say(
    `${result.code === 0 ? 'done  ' : 'FAILED'} ${name} (${((Date.now() - started) / 1_000).toFixed(1)} s)`,
  );
  return result;
}

async function check(children, tally, name, args) {
  const env = { ...withoutServices(process.env), NEXT_DIST_DIR: DIST };
  const { code, output } = await step(children, name, args, env);
  if (code === 0) tally.pass();
  else tally.fail(name, output);
}

/**
 * The type check without `.next`: what a demo build once wrote there may speak of pages that are gone.
 * @returns the configuration's file
 */
function typeCheckConfig(data) {
  const file = join(data, 'tsconfig.json');
  const exclude = ['node_modules', '.next', '.data', '.data-test'].map((name) => `../${name}`);
  writeFileSync(
    file,
    JSON.stringify({ extends: '../tsconfig.json', compilerOptions: { incremental: false }, exclude }),
  );
  return file;
}

/** Prettier, ESLint and the type check: one test each. Two at a time, as two cores can bear. */
export async function staticChecks(children, tally, data) {
  const style = async () => {
    await check(children, tally, 'prettier', [
      bin('prettier/bin/prettier.cjs'),
      '--check',
      '--log-level',
      'warn',
      '.',
    ]);
    await check(children, tally, 'eslint', [bin('eslint/bin/eslint.js'), '.', '--max-warnings', '0']);
  };
  const types = async () => {
    // Next writes types for the routes that tsconfig includes; without them the check would differ by machine.
    await check(children, tally, 'next-typegen', [nextBin, 'typegen']);
    await check(children, tally, 'tsc', [bin('typescript/bin/tsc'), '--noEmit', '-p', typeCheckConfig(data)]);
  };
  await Promise.all([style(), types()]);
}

export async function runVitest(children, tally, { project, env, files, reports }) {
  const file = join(reports, `${project}.json`);
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${file}`];
  const args = [
    bin('vitest/vitest.mjs'),
    'run',
    '--project',
    project,
    '--passWithNoTests',
    ...reporters,
    ...files,
  ];
  const result = await step(children, `vitest-${project}`, args, env);
  addVitest(tally, project, { file, ...result });
}

const hasSpecs = () => {
  const folder = join(ROOT, 'tests', 'e2e');
  return (
    existsSync(folder) &&
    readdirSync(folder, { recursive: true }).some((name) => /\.spec\.tsx?$/.test(String(name)))
  );
};

/** The browser tests run against the built application with its worker. */
export async function runBrowser(children, tally, { services, files, reports }) {
  say('building …');
  const failed = await build(children, DIST);
  if (failed !== null) return tally.fail('next build', failed);
  tally.pass();
  await startApp(children, { env: services.env, port: services.ports.app, distDir: DIST });
  if (!hasSpecs()) return;
  const file = join(reports, 'e2e.json');
  const env = { ...services.env, PLAYWRIGHT_JSON_OUTPUT_FILE: file, NEXT_DIST_DIR: DIST };
  const args = [bin('@playwright/test/cli.js'), 'test', '--pass-with-no-tests', ...files];
  const result = await step(children, 'playwright', args, env);
  addPlaywright(tally, 'e2e', { file, ...result });
}
