/** `npm start`: the loopback demo. Sets up all it needs, prints the address and the demo sign-ins. */
import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { startApp } from './lib/app.mjs';
import { buildOrStop } from './lib/build.mjs';
import { ensureDebianPackages } from './lib/debian.mjs';
import { lockFile, releaseLock, takeLock } from './lib/lock.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { complain, dataFolder, ROOT, say, script, Stop } from './lib/paths.mjs';
import { Children, onEnd } from './lib/processes.mjs';
import { startServices, usesRealServices } from './lib/services.mjs';

const DATA = dataFolder('.data');
const LOCK = lockFile(ROOT, 'start');
const RUNNING = join(DATA, 'running.json');

function runScript(name, env) {
  const done = spawnSync(process.execPath, ['--import', 'tsx', script(name)], { cwd: ROOT, env, stdio: 'inherit' });
  if (done.status !== 0) throw new Stop(`${name} failed; what it said stands above.`);
}

function readJson(file) {
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null;
}

function tell({ appUrl, mailUrl }) {
  say('');
  say(`Lampwright runs at ${appUrl}`);
  if (mailUrl) say(`Mail that it sends is caught at ${mailUrl}`);
  const people = readJson(join(DATA, 'demo.json')) ?? [];
  if (people.length > 0) say('Demo sign-ins:');
  for (const person of people) say(`  ${person.role.padEnd(10)} ${person.email.padEnd(36)} ${person.password}`);
  say('End it with Ctrl-C.');
}

function tellRunning() {
  const running = readJson(RUNNING);
  if (running) tell(running);
  else say('"npm start" is at work in this checkout already and will print its address when it is ready.');
}

async function start(children) {
  const services = await startServices(children, { data: DATA, preferred: { app: 3000 } });
  const { env } = services;
  runScript('migrate.ts', env);
  if (usesRealServices().length === 0 && existsSync(script('seed.ts'))) {
    say('Filling the demo …');
    runScript('seed.ts', { ...env, LAMPWRIGHT_PROCESS: 'migrator', DEMO_FILE: join(DATA, 'demo.json') });
  }
  buildOrStop('.next');
  const appUrl = env.APP_URL;
  await startApp(children, {
    env,
    port: services.ports.app,
    distDir: '.next',
    onExit: (name) => {
      complain(`The ${name} ended unexpectedly; its log is ${children.logOf(name)}.`);
      process.kill(process.pid, 'SIGTERM');
    },
  });
  const running = { appUrl, mailUrl: env.MAIL_CATCHER_URL };
  writeFileSync(RUNNING, JSON.stringify(running), { mode: 0o600 });
  tell(running);
}

if (takeLock(LOCK)) {
  tellRunning();
  process.exit(0);
}
const children = new Children(DATA);
const end = async (code) => {
  await children.endAll();
  writeFileSync(RUNNING, 'null', { mode: 0o600 });
  releaseLock(LOCK);
  process.exit(code);
};
onEnd(end);
try {
  ensurePackages('start');
  ensureDebianPackages(['postgresql']);
  await start(children);
} catch (error) {
  complain(error instanceof Stop ? error.message : (error.stack ?? String(error)));
  await end(error.code === 3 ? 3 : 1);
}
