/** Child processes with pid files: all end with us, and what a kill -9 left behind is found by the next run. */
import { spawn } from 'node:child_process';
import { createWriteStream, existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { commandLine, environmentOf } from './lock.mjs';
import { complain, ROOT, wait } from './paths.mjs';

const alive = (pid) => {
  const line = commandLine(pid);
  return line !== null && line !== '';
};

/** Ends a process that we know is ours: asks, then insists. */
export async function endProcess(pid, signal = 'SIGTERM', graceMs = 8_000) {
  const send = (name) => {
    try {
      process.kill(pid, name);
    } catch {
      // It ended meanwhile, which is what is wanted.
    }
  };
  send(signal);
  for (let waited = 0; waited < graceMs && alive(pid); waited += 50) await wait(50);
  if (alive(pid)) send('SIGKILL');
  for (let waited = 0; waited < 2_000 && alive(pid); waited += 50) await wait(50);
}

export class Children {
  constructor(data) {
    this.pids = join(data, 'pids');
    this.logs = join(data, 'logs');
    this.running = [];
    this.ending = false;
    mkdirSync(this.pids, { recursive: true, mode: 0o700 });
    mkdirSync(this.logs, { recursive: true, mode: 0o700 });
  }

  /**
   * Ends children of an earlier run: the pid must still show the command line that was noted down, or the mark
   * that we put into its environment (a server may rename itself).
   */
  async endLeftovers() {
    for (const name of existsSync(this.pids) ? readdirSync(this.pids) : []) {
      const file = join(this.pids, name);
      const [pid = '', line = ''] = readFileSync(file, 'utf8').split('\n');
      const same = line !== '' && commandLine(Number(pid)) === line;
      const marked = environmentOf(Number(pid)).includes(this.mark(name.replace(/\.pid$/, '')));
      if (same || marked) await endProcess(Number(pid));
      rmSync(file, { force: true });
    }
  }

  mark(name) {
    return `LAMPWRIGHT_CHILD=${this.pids}/${name}`;
  }

  /** Starts a child whose output goes to a log file. `signal` is how it likes to be ended. */
  start(name, command, args, { env = process.env, cwd = ROOT, signal = 'SIGTERM', onExit } = {}) {
    const log = createWriteStream(join(this.logs, `${name}.log`), { flags: 'a', mode: 0o600 });
    const marked = { ...env, LAMPWRIGHT_CHILD: `${this.pids}/${name}` };
    const child = spawn(command, args, { env: marked, cwd, stdio: ['ignore', 'pipe', 'pipe'] });
    child.stdout.pipe(log, { end: false });
    child.stderr.pipe(log, { end: false });
    const file = join(this.pids, `${name}.pid`);
    const entry = { name, child, signal, file, gone: false };
    // The command line settles once the program has been exec'd.
    const note = () => {
      if (child.pid && !entry.gone) writeFileSync(file, `${child.pid}\n${commandLine(child.pid) ?? ''}`, { mode: 0o600 });
    };
    note();
    setTimeout(note, 300).unref();
    child.on('error', (error) => complain(`${name}: ${error.message}`));
    child.on('exit', (code, by) => {
      entry.gone = true;
      rmSync(file, { force: true });
      if (!this.ending) onExit?.(code, by);
    });
    this.running.push(entry);
    return child;
  }

  logOf(name) {
    return join(this.logs, `${name}.log`);
  }

  async end(name) {
    const entry = this.running.find((one) => one.name === name && !one.gone);
    if (!entry) return;
    entry.gone = true;
    await endProcess(entry.child.pid, entry.signal);
    rmSync(entry.file, { force: true });
  }

  /** Ends all, last started first, so that nothing loses its database under it. */
  async endAll() {
    this.ending = true;
    for (const entry of [...this.running].reverse()) {
      if (!entry.gone && entry.child.pid) await endProcess(entry.child.pid, entry.signal);
      rmSync(entry.file, { force: true });
    }
  }
}

/** Calls `end` once on SIGINT, SIGTERM, SIGHUP, and when the parent that started us is gone. */
export function onEnd(end) {
  let ended = false;
  const once = (code) => {
    if (ended) return;
    ended = true;
    void end(code);
  };
  for (const [signal, code] of [['SIGINT', 130], ['SIGTERM', 143], ['SIGHUP', 129]]) process.on(signal, () => once(code));
  const parent = process.ppid;
  const watch = setInterval(() => {
    if (process.ppid !== parent) once(129);
  }, 1_000);
  watch.unref();
}

/** Waits until `probe` answers true. @throws with the log's end when it does not. */
export async function untilReady(name, probe, { log, timeoutMs = 60_000, alive: stillAlive = () => true } = {}) {
  const deadline = Date.now() + timeoutMs;
  while (Date.now() < deadline) {
    if (await probe().catch(() => false)) return;
    if (!stillAlive()) break;
    await wait(150);
  }
  const tail = log && existsSync(log) ? readFileSync(log, 'utf8').split('\n').slice(-15).join('\n') : '';
  throw new Error(`${name} did not get ready.\n${tail}`);
}

export const httpProbe = (url) => async () => (await fetch(url, { signal: AbortSignal.timeout(2_000) })).ok;
