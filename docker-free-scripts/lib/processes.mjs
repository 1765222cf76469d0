/** Child processes that all end with us; what a kill -9 left behind is found by the next run. */
import { spawn } from 'node:child_process';
import { existsSync, mkdirSync, openSync, closeSync, readFileSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { endLeftovers, endMarked, markOf, notePid } from './leftovers.mjs';
import { complain, ROOT, Stop, wait } from './paths.mjs';
import { endProcess } from './procfs.mjs';

const never = () => new Promise(() => {});
const OUTPUT_KEPT = 400_000;

/** The last lines of a log, for a message. */
function tail(file, lines = 20) {
  return existsSync(file) ? readFileSync(file, 'utf8').trimEnd().split('\n').slice(-lines).join('\n') : '';
}

export class Children {
  /** Called with the name of a service that ended though nobody asked it to. */
  onUnexpectedExit = () => {};
  running = [];
  ending = false;
  /** How long each may take to end by itself. */
  graceMs = 8_000;

  constructor(data) {
    this.pids = join(data, 'pids');
    this.logs = join(data, 'logs');
    for (const folder of [this.pids, this.logs]) mkdirSync(folder, { recursive: true, mode: 0o700 });
  }

  /** Ends what an earlier run of this data folder left behind. */
  endLeftovers() {
    return endLeftovers(this.pids);
  }

  logOf(name) {
    return join(this.logs, `${name}.log`);
  }

  /**
   * Each child leads a process group, so that a Ctrl-C at the terminal reaches us alone and we end them in order.
   * One that asks at the terminal (sudo) has to stay in ours: `attached`.
   */
  #spawn(
    name,
    program,
    args,
    { env = process.env, cwd = ROOT, signal = 'SIGTERM', stdio, attached = false },
  ) {
    if (this.ending) throw new Stop('Ending.');
    const marked = { ...env, LAMPWRIGHT_CHILD: markOf(this.pids, name) };
    const child = spawn(program, args, { env: marked, cwd, stdio, detached: !attached });
    const exit = new Promise((resolve) => {
      child.once('error', (error) => resolve({ code: 127, error }));
      child.once('close', (code) => resolve({ code: code ?? 1 }));
      // Something that it left behind may hold its output open; that is not worth waiting for.
      child.once('exit', (code) => setTimeout(resolve, 2_000, { code: code ?? 1 }).unref());
    });
    const entry = { name, child, signal, exit, ended: false };
    void exit.then(() => {
      entry.ended = true;
      this.#forget(entry);
    });
    if (child.pid) notePid(this.pids, { name, pid: child.pid, signal });
    // setpriv becomes the server after our note: note what it is called then.
    setTimeout(() => {
      if (child.pid && !entry.ended) notePid(this.pids, { name, pid: child.pid, signal });
    }, 300).unref();
    this.running.push(entry);
    return entry;
  }

  #forget(entry) {
    rmSync(join(this.pids, `${entry.name}.pid`), { force: true });
    this.running = this.running.filter((one) => one !== entry);
  }

  /** Starts a service. Its output goes straight to its log, which outlives us; the previous log is kept as `.old`. */
  start(name, program, args, options = {}) {
    const log = this.logOf(name);
    if (existsSync(log)) renameSync(log, `${log}.old`);
    const file = openSync(log, 'a', 0o600);
    const entry = this.#spawn(name, program, args, { ...options, stdio: ['ignore', file, file] });
    closeSync(file);
    void entry.exit.then(({ error }) => {
      if (error) complain(`${name}: ${error.message}`);
      if (!this.ending) this.onUnexpectedExit(name);
    });
    return entry;
  }

  /**
   * Runs a program to its end. What it says is returned, or, with `show`, goes to the terminal; `ask` leaves it the
   * terminal for questions and complaints only.
   * Settles no more once everything is being ended: the caller has nothing left to do then.
   * @returns `{code, output}`
   */
  async run(name, program, args, { show = false, ask = false, ...options } = {}) {
    const [input, errors] = ask ? ['inherit', 'inherit'] : ['ignore', 'pipe'];
    const stdio = show ? 'inherit' : [input, 'pipe', errors];
    const { child, exit } = this.#spawn(name, program, args, { ...options, attached: ask, stdio });
    let output = '';
    for (const stream of [child.stdout, child.stderr])
      stream?.setEncoding('utf8').on('data', (text) => (output = (output + text).slice(-OUTPUT_KEPT)));
    const { code, error } = await exit;
    if (this.ending) return never();
    return { code, output: error ? `${output}${error.message}` : output };
  }

  /**
   * Waits until `probe` answers true for a started service.
   * @throws {Stop} with the reason and the end of its log when it does not, at once when the service has ended.
   */
  async ready(entry, label, probe, timeoutMs = 60_000) {
    const deadline = Date.now() + timeoutMs;
    let reason = 'it did not answer in time';
    while (Date.now() < deadline) {
      const answer = await probe().catch((error) => error);
      if (this.ending) return never();
      if (answer === true) return;
      if (answer instanceof Error) reason = answer.message;
      if (entry.ended) {
        reason = 'it ended';
        break;
      }
      await wait(100);
    }
    throw new Stop(`${label} did not get ready: ${reason}.\n${tail(this.logOf(entry.name))}`);
  }

  /** Ends all, last started first, so that nothing loses its database under it, and then what they started. */
  async endAll() {
    this.ending = true;
    for (const { child, signal } of [...this.running].reverse())
      if (child.pid) await endProcess(child.pid, signal, this.graceMs);
    await endMarked(this.pids);
  }
}

export const httpProbe = (url) => async () => {
  const response = await fetch(url, { signal: AbortSignal.timeout(2_000) });
  if (!response.ok) throw new Error(`it answers ${response.status}`);
  return true;
};
