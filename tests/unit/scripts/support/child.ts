/** Real processes for the tests of the set-up scripts. */
import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { afterEach } from 'vitest';
import { Children } from '../../../../docker-free-scripts/lib/processes.mjs';

const started: ChildProcess[] = [];
const folders: string[] = [];
const families: Children[] = [];

export const LIB = pathToFileURL(resolve('docker-free-scripts/lib')).href;

/** A folder of this test's own; with a blank in its name, as people have them. */
export function ownFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), 'lampwright scripts-'));
  folders.push(folder);
  return folder;
}

/** Children in a data folder of this test's own, ended with it. */
export function ownChildren(data = ownFolder()): Children {
  const children = new Children(data);
  families.push(children);
  return children;
}

/** Starts node and resolves with it once it has printed its first line. */
export async function startNode(args: string[]): Promise<{ child: ChildProcess; firstLine: string }> {
  const child = spawn(process.execPath, args, { stdio: ['ignore', 'pipe', 'pipe'] });
  started.push(child);
  let said = '';
  return new Promise((done, failed) => {
    child.stderr?.on('data', (chunk) => (said += String(chunk)));
    child.once('exit', (code) => failed(new Error(`ended with ${code}: ${said}`)));
    child.stdout?.once('data', (chunk) => done({ child, firstLine: String(chunk).trim() }));
  });
}

/** Node running one module text, e.g. `import … from '${LIB}/lock.mjs'`. */
export const startModule = (source: string) => startNode(['--input-type=module', '-e', source]);

export const exitOf = (child: ChildProcess) =>
  new Promise<number | null>((done) => {
    if (child.exitCode !== null || child.signalCode !== null) done(child.exitCode);
    else child.once('exit', (code) => done(code));
  });

/** A node that does nothing until it is ended; it prints one line when it stands. */
export const IDLE = 'console.log("up"); setInterval(() => {}, 1000);';

/** Waits for something to become true. */
export async function until(what: string, probe: () => boolean, ms = 5_000): Promise<void> {
  const deadline = Date.now() + ms;
  while (!probe()) {
    if (Date.now() > deadline) throw new Error(`not in time: ${what}`);
    await new Promise((done) => setTimeout(done, 20));
  }
}

afterEach(async () => {
  // Asked first: a command that is killed would leave its own children behind.
  for (const child of started.splice(0)) {
    child.kill('SIGTERM');
    const insist = setTimeout(() => child.kill('SIGKILL'), 3_000);
    await exitOf(child);
    clearTimeout(insist);
  }
  for (const children of families.splice(0)) await children.endAll();
  for (const folder of folders.splice(0)) rmSync(folder, { recursive: true, force: true });
});
