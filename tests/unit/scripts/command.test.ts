import { spawn } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { isAlive, pidsByEnvironment } from '../../../docker-free-scripts/lib/procfs.mjs';
import { exitOf, ownFolder, startNode, until } from './support/child';

const COMMAND = resolve('tests/unit/scripts/support/command.mjs');

async function start(data: string, mode = 'plain') {
  const { child, firstLine } = await startNode([COMMAND, data, mode]);
  return { child, services: JSON.parse(firstLine) as number[] };
}

/** Everything that the command of this data folder started, however far down. */
const family = (data: string): number[] =>
  pidsByEnvironment((entry: string) => entry.startsWith(`LAMPWRIGHT_CHILD=${data}/`));

describe('a command', () => {
  it.each([
    ['SIGINT', 130],
    ['SIGTERM', 143],
    ['SIGHUP', 129],
  ] as const)(
    'ends all its children on %s, what they started too, and frees its lock',
    async (signal, code) => {
      const data = ownFolder();
      const { child, services } = await start(data);
      await until('the grandchild stands', () => family(data).length === 3);
      child.kill(signal);
      expect(await exitOf(child)).toBe(code);
      expect(services.filter(isAlive)).toEqual([]);
      expect(family(data)).toEqual([]);
      expect(existsSync(join(data, 'start.lock'))).toBe(false);
    },
  );

  it('ends its children when the parent that started it is gone', async () => {
    const data = ownFolder();
    const source = `
      const { spawn } = require('node:child_process');
      const command = spawn(process.execPath, [${JSON.stringify(COMMAND)}, ${JSON.stringify(data)}], { stdio: ['ignore', 'pipe', 'ignore'], detached: true });
      command.stdout.once('data', (line) => console.log(JSON.stringify([command.pid, ...JSON.parse(line)])));`;
    const { child, firstLine } = await startNode(['-e', source]);
    const pids = JSON.parse(firstLine) as number[];
    child.kill('SIGKILL');
    await until('all are gone', () => !pids.some(isAlive) && family(data).length === 0);
  });

  it('finds and ends what a kill -9 left behind when it is started again', async () => {
    const data = ownFolder();
    const first = await start(data);
    await until('the grandchild stands', () => family(data).length === 3);
    first.child.kill('SIGKILL');
    await exitOf(first.child);
    const left = family(data);
    expect(left).toHaveLength(3);
    const second = await start(data);
    expect(left.filter(isAlive)).toEqual([]);
    second.child.kill('SIGTERM');
    await exitOf(second.child);
    expect(family(data)).toEqual([]);
  });

  it('does not start twice: the second says so and touches nothing', async () => {
    const data = ownFolder();
    const { services } = await start(data);
    const second = spawn(process.execPath, [COMMAND, data], { stdio: 'ignore' });
    expect(await exitOf(second)).toBe(7);
    expect(services.every(isAlive)).toBe(true);
  });

  it('ends with 1 and all else when a service crashes', async () => {
    const data = ownFolder();
    const { child, services } = await start(data, 'crash');
    expect(await exitOf(child)).toBe(1);
    expect(services.filter(isAlive)).toEqual([]);
  });

  it('ends with the code of the error that stopped it, and says why', async () => {
    const data = ownFolder();
    const child = spawn(process.execPath, [COMMAND, data, 'throw'], { stdio: ['ignore', 'ignore', 'pipe'] });
    let said = '';
    child.stderr.on('data', (chunk) => (said += String(chunk)));
    expect(await exitOf(child)).toBe(3);
    expect(said).toBe('No such luck.\n');
    expect(family(data)).toEqual([]);
  });

  it('ends a running step, and does nothing after it', async () => {
    const data = ownFolder();
    const { child } = await start(data, 'step');
    await until('the step runs', () => existsSync(join(data, 'pids', 'step.pid')));
    let said = '';
    child.stdout?.on('data', (chunk) => (said += String(chunk)));
    child.kill('SIGTERM');
    expect(await exitOf(child)).toBe(143);
    expect(said).toBe('ended\n');
    expect(family(data)).toEqual([]);
  });

  it('insists when a service does not listen', async () => {
    const data = ownFolder();
    const { child, services } = await start(data, 'stubborn');
    const log = () => readFileSync(join(data, 'logs', 'web.log'), 'utf8');
    await until('the service stands', () => log() === 'up\n');
    child.kill('SIGTERM');
    expect(await exitOf(child)).toBe(143);
    expect(log()).toBe('up\nno\n');
    expect(services.filter(isAlive)).toEqual([]);
  });
});
