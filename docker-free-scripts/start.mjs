/** `npm start`: the loopback demo. Sets up all it needs, prints the address and the demo sign-ins. */
import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { startApp } from './lib/app.mjs';
import { buildOrStop } from './lib/build.mjs';
import { runCommand } from './lib/command.mjs';
import { ensureDebianPackages } from './lib/debian.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { ROOT, say, script, Stop } from './lib/paths.mjs';
import { startServices } from './lib/services.mjs';

const DATA = join(ROOT, '.data');
const RUNNING = join(DATA, 'running.json');
const DEMO = join(DATA, 'demo.json');
const DIST = '.next';

async function runScript(children, name, env) {
  const args = ['--import', 'tsx', script(name)];
  const { code } = await children.run(name, process.execPath, args, { env, show: true });
  if (code !== 0) throw new Stop(`${name} failed; what it said stands above.`);
}

const readJson = (file) => (existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null);

function tell({ appUrl, mailUrl, demo }) {
  say(`\nLampwright runs at ${appUrl}`);
  if (mailUrl) say(`Mail that it sends is caught at ${mailUrl}`);
  const people = demo ? (readJson(DEMO) ?? []) : [];
  if (people.length > 0) say('Demo sign-ins:');
  for (const { role, email, password } of people) say(`  ${role.padEnd(10)} ${email.padEnd(36)} ${password}`);
}

function tellRunning() {
  const running = readJson(RUNNING);
  if (running) tell(running);
  else say('"npm start" is at work in this checkout already and will print its address when it is ready.');
  return 0;
}

async function start(children) {
  rmSync(RUNNING, { force: true });
  await children.endLeftovers();
  await ensurePackages(children);
  await ensureDebianPackages(children, process.env.DATABASE_URL ? [] : ['postgresql']);
  const { env, ports } = await startServices(children, { data: DATA, preferred: { app: 3000 } });
  await runScript(children, 'migrate.ts', env);
  const demo = env.LAMPWRIGHT_DEMO === '1';
  if (demo && existsSync(script('seed.ts'))) {
    say('Filling the demo …');
    await runScript(children, 'seed.ts', { ...env, DEMO_FILE: DEMO });
  }
  await buildOrStop(children, DIST);
  await startApp(children, { env, port: ports.app, distDir: DIST });
  const running = { appUrl: env.APP_URL, mailUrl: env.MAIL_CATCHER_URL, demo };
  writeFileSync(RUNNING, JSON.stringify(running), { mode: 0o600 });
  tell(running);
  say('End it with Ctrl-C.');
}

await runCommand(
  {
    data: DATA,
    lock: join(DATA, 'start.lock'),
    onBusy: tellRunning,
    onEnded: () => rmSync(RUNNING, { force: true }),
  },
  start,
);
