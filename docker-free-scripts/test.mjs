/**
 * `npm test`: sets up all it needs, runs everything, and ends with one line `N passed, N failed`.
 * `npm test -- [--only static|pure|integration|e2e] [files…]` runs a part of it.
 */
import { mkdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { runCommand } from './lib/command.mjs';
import { ensureDebianPackages } from './lib/debian.mjs';
import { parseTestOptions } from './lib/options.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { complain, ROOT, say, script, Stop } from './lib/paths.mjs';
import { endServerOf } from './lib/postgres.mjs';
import { Tally } from './lib/results.mjs';
import { runBrowser, runVitest, staticChecks } from './lib/runners.mjs';
import { startServices } from './lib/services.mjs';

const DATA = join(ROOT, '.data-test');
const REPORTS = join(DATA, 'reports');
const OF_THE_APPLICATION =
  /^(DATABASE_URL|SMTP_|MAIL_|S3_|STRIPE_|NEXTAUTH_|LAMPWRIGHT_|APP_URL$|LINK_SECRET$|AUDIT_SECRET$|NODE_ENV$)/;

/** Tests write and delete: they never see the services that the surrounding environment names. */
function forgetRealServices() {
  for (const name of Object.keys(process.env)) if (OF_THE_APPLICATION.test(name)) delete process.env[name];
}

/** Each run has a database, a catcher and an object store of its own, empty. */
async function freshServices(children) {
  await endServerOf(join(DATA, 'postgres'));
  for (const name of ['postgres', 'objects', 'stripe'])
    rmSync(join(DATA, name), { recursive: true, force: true });
  const services = await startServices(children, { data: DATA, durable: false });
  const args = ['--import', 'tsx', script('migrate.ts')];
  const { code, output } = await children.run('migrate', process.execPath, args, { env: services.env });
  if (code !== 0) throw new Stop(`The migrations failed.\n${output}`);
  return services;
}

async function runParts(children, tally, { parts, files }) {
  rmSync(REPORTS, { recursive: true, force: true });
  mkdirSync(REPORTS, { recursive: true });
  const wants = (part) => parts.includes(part);
  const vitest = (project, env) => runVitest(children, tally, { project, env, files, reports: REPORTS });
  if (wants('static')) await staticChecks(children, tally, DATA);
  if (wants('pure')) await vitest('pure', process.env);
  if (!wants('integration') && !wants('e2e')) return;
  const services = await freshServices(children);
  if (wants('integration')) await vitest('integration', services.env);
  if (wants('e2e')) await runBrowser(children, tally, { services, files, reports: REPORTS });
}

async function test(children) {
  const options = parseTestOptions(process.argv.slice(2));
  const tally = new Tally();
  forgetRealServices();
  await children.endLeftovers();
  try {
    await ensurePackages(children);
    await ensureDebianPackages(children, ['postgresql', 'chromium', 'ngspice']);
    await runParts(children, tally, options);
  } catch (error) {
    if (error instanceof Stop && error.code === 3) throw error;
    tally.fail('test run', error instanceof Stop ? error.message : (error.stack ?? String(error)));
  }
  if (tally.passed + tally.failed === 0) tally.fail('test run', 'No test was found.');
  if (tally.failed > 0) say(tally.story());
  if (tally.skipped > 0) say(`(${tally.skipped} skipped)`);
  say(`\n${tally.line()}`);
  return tally.failed > 0 ? 1 : 0;
}

await runCommand(
  {
    data: DATA,
    lock: join(DATA, 'test.lock'),
    onBusy: () => {
      complain('"npm test" is running in this checkout already. Wait for it, or use another clone.');
      return 3;
    },
  },
  test,
);
