import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { holderOf, releaseLock, runningCommands, takeLock } from '../../../docker-free-scripts/lib/lock.mjs';
import { exitOf, LIB, ownFolder, startModule } from './support/child';

const takeAndStay = (file: string) => `
  import { takeLock } from '${LIB}/lock.mjs';
  console.log(takeLock(${JSON.stringify(file)}) === null ? 'taken' : 'refused');
  setInterval(() => {}, 1000);`;

describe('a lock', () => {
  it('is refused while its holder lives, and names the holder', async () => {
    const file = join(ownFolder(), 'start.lock');
    const { child, firstLine } = await startModule(takeAndStay(file));
    expect(firstLine).toBe('taken');
    expect(takeLock(file)).toMatchObject({ pid: child.pid });
  });

  it('is taken over after a kill -9', async () => {
    const file = join(ownFolder(), 'start.lock');
    const { child } = await startModule(takeAndStay(file));
    child.kill('SIGKILL');
    await exitOf(child);
    expect(existsSync(file)).toBe(true);
    expect(takeLock(file)).toBeNull();
    expect(holderOf(file)).toMatchObject({ pid: process.pid });
  });

  it('is not held by another program that got the same pid', async () => {
    const file = join(ownFolder(), 'start.lock');
    const { child } = await startModule(takeAndStay(file));
    const held: object = JSON.parse(readFileSync(file, 'utf8'));
    writeFileSync(file, JSON.stringify({ ...held, commandLine: 'node something-else.mjs' }));
    expect(holderOf(file)).toBeNull();
    writeFileSync(file, JSON.stringify({ ...held, folder: '/another/checkout' }));
    expect(holderOf(file)).toBeNull();
    expect(child.exitCode).toBeNull();
  });

  it('survives an unreadable file', () => {
    const file = join(ownFolder(), 'start.lock');
    writeFileSync(file, '{"pid":');
    expect(takeLock(file)).toBeNull();
  });

  it('goes to exactly one of many that come at once upon a stale one', async () => {
    const file = join(ownFolder(), 'start.lock');
    writeFileSync(file, JSON.stringify({ pid: 1, commandLine: 'long gone', folder: '/' }));
    const all = await Promise.all(Array.from({ length: 6 }, () => startModule(takeAndStay(file))));
    expect(all.map(({ firstLine }) => firstLine).filter((line) => line === 'taken')).toHaveLength(1);
    expect(readdirSync(join(file, '..'))).toEqual(['start.lock']);
  });

  it('is released by its holder only', async () => {
    const file = join(ownFolder(), 'start.lock');
    await startModule(takeAndStay(file));
    releaseLock(file);
    expect(holderOf(file)).not.toBeNull();
  });
});

describe('the commands of a checkout', () => {
  it('are those with a live lock in a data folder, installing packages not counted', async () => {
    const root = ownFolder();
    await startModule(takeAndStay(join(root, '.data-test', 'test.lock')));
    await startModule(takeAndStay(join(root, '.data', 'packages.lock')));
    writeFileSync(
      join(root, '.data', 'start.lock'),
      JSON.stringify({ pid: 1, commandLine: 'gone', folder: '/' }),
    );
    takeLock(join(root, '.data-dev', 'dev.lock'));
    expect(runningCommands(root)).toEqual(['test']);
  });
});
