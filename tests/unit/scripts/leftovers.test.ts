import { type ChildProcess, spawn } from 'node:child_process';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { endLeftovers, endMarked, markOf, notePid } from '../../../docker-free-scripts/lib/leftovers.mjs';
import { isAlive } from '../../../docker-free-scripts/lib/procfs.mjs';
import { exitOf, IDLE, ownFolder, startNode } from './support/child';

const idle = async () => (await startNode(['-e', IDLE])).child;

/** A child with the mark in its environment, as Children starts them. */
async function marked(pids: string, name: string, source = IDLE): Promise<ChildProcess> {
  const env = { ...process.env, LAMPWRIGHT_CHILD: markOf(pids, name) };
  const child = spawn(process.execPath, ['-e', source], { env, stdio: ['ignore', 'pipe', 'ignore'] });
  await new Promise((done) => child.stdout.once('data', done));
  return child;
}

describe('leftovers of a run that was killed', () => {
  it('are ended by pid file and command line, and the file goes', async () => {
    const pids = join(ownFolder(), 'pids');
    const child = await idle();
    notePid(pids, { name: 'web', pid: child.pid, signal: 'SIGTERM' });
    await endLeftovers(pids);
    expect(isAlive(child.pid)).toBe(false);
    expect(existsSync(join(pids, 'web.pid'))).toBe(false);
  });

  it('leave alone a process that has the pid but another command line', async () => {
    const pids = join(ownFolder(), 'pids');
    const child = await idle();
    notePid(pids, { name: 'web', pid: child.pid, signal: 'SIGTERM' });
    const file = join(pids, 'web.pid');
    const note: object = JSON.parse(readFileSync(file, 'utf8'));
    writeFileSync(file, JSON.stringify({ ...note, commandLine: 'next-server (v0)' }));
    await endLeftovers(pids);
    expect(isAlive(child.pid)).toBe(true);
    expect(existsSync(file)).toBe(false);
  });

  it('are ended by their mark when they renamed themselves', async () => {
    const pids = join(ownFolder(), 'pids');
    const child = await marked(pids, 'web', `process.title = 'renamed-server'; ${IDLE}`);
    const file = join(pids, 'web.pid');
    notePid(pids, { name: 'web', pid: child.pid, signal: 'SIGTERM' });
    const note: object = JSON.parse(readFileSync(file, 'utf8'));
    writeFileSync(file, JSON.stringify({ ...note, commandLine: 'node server.js' }));
    await endLeftovers(pids);
    expect(isAlive(child.pid)).toBe(false);
  });

  it('are ended without any pid file, by the mark of this data folder alone', async () => {
    const [pids, others] = [join(ownFolder(), 'pids'), join(ownFolder(), 'pids')];
    const [ours, theirs] = [await marked(pids, 'step'), await marked(others, 'step')];
    await endMarked(pids);
    expect(isAlive(ours.pid)).toBe(false);
    expect(isAlive(theirs.pid)).toBe(true);
    theirs.kill('SIGKILL');
    await exitOf(theirs);
  });

  it('end by the signal that each one likes', async () => {
    const pids = join(ownFolder(), 'pids');
    const source = `process.on('SIGINT', () => process.exit(42)); process.on('SIGTERM', () => process.exit(43)); ${IDLE}`;
    const { child } = await startNode(['-e', source]);
    notePid(pids, { name: 'postgres', pid: child.pid, signal: 'SIGINT' });
    const code = exitOf(child);
    await endLeftovers(pids);
    expect(await code).toBe(42);
  });

  it('survive a damaged pid file', async () => {
    const pids = join(ownFolder(), 'pids');
    notePid(pids, { name: 'web', pid: 0, signal: 'SIGTERM' });
    writeFileSync(join(pids, 'mail.pid'), '{"pid": 12');
    await expect(endLeftovers(pids)).resolves.toBeUndefined();
    expect(existsSync(join(pids, 'mail.pid'))).toBe(false);
  });
});
