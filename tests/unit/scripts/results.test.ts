import { spawnSync } from 'node:child_process';
import { mkdirSync, symlinkSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { addPlaywright, addVitest, Tally } from '../../../docker-free-scripts/lib/results.mjs';
import { ownFolder } from './support/child';

/** Runs the real vitest over test files made for this test. */
function realVitest(files: Record<string, string>) {
  const folder = ownFolder();
  mkdirSync(join(folder, 'tests'));
  symlinkSync(resolve('node_modules'), join(folder, 'node_modules'));
  for (const [name, text] of Object.entries(files)) writeFileSync(join(folder, 'tests', name), text);
  const file = join(folder, 'report.json');
  const cli = resolve('node_modules/vitest/vitest.mjs');
  const args = [cli, 'run', '--root', folder, '--passWithNoTests', '--reporter=json', `--outputFile=${file}`];
  const done = spawnSync(process.execPath, args, { encoding: 'utf8', cwd: folder });
  return { file, code: done.status ?? 1, output: done.stdout + done.stderr };
}

const HEAD = `import { expect, it } from 'vitest';\n`;

describe('vitest’s report', () => {
  it('is counted test by test, and a file that does not load is a failure', () => {
    const run = realVitest({
      'good.test.js': `${HEAD}it('a', () => {}); it('b', () => {});`,
      'bad.test.js': `${HEAD}it('adds', () => expect(1 + 1).toBe(3));`,
      'broken.test.js': `import './missing.js';`,
    });
    const tally = new Tally();
    addVitest(tally, 'pure', run);
    expect(tally.line()).toBe('2 passed, 2 failed');
    expect(tally.story()).toMatch(/FAILED pure: .*bad\.test\.js › adds\n.*expected 2 to be 3/);
    expect(tally.story()).toMatch(/FAILED pure: .*broken\.test\.js\n.*missing\.js/s);
  }, 30_000);

  it('does not hide an error outside of any test', () => {
    const run = realVitest({
      'late.test.js': `${HEAD}it('a', () => { setTimeout(() => { throw new Error('too late'); }); });\nit('waits', () => new Promise((done) => setTimeout(done, 50)));`,
    });
    const tally = new Tally();
    addVitest(tally, 'pure', run);
    expect(tally.line()).toBe('2 passed, 1 failed');
    expect(tally.story()).toContain('The runner ended with 1.');
  }, 30_000);

  it('may be empty', () => {
    const tally = new Tally();
    addVitest(tally, 'pure', realVitest({}));
    expect(tally.line()).toBe('0 passed, 0 failed');
  }, 30_000);

  it('that was never written is a failure, even after earlier ones', () => {
    const tally = new Tally();
    tally.fail('prettier', 'x');
    addVitest(tally, 'pure', { file: '/no/such/report.json', code: 1, output: 'out of memory' });
    expect(tally.line()).toBe('0 passed, 2 failed');
    expect(tally.story()).toContain('out of memory');
  });
});

function playwrightReport(
  tests: { status: string; projectName: string }[],
  errors: { message: string }[] = [],
) {
  const attachments = [{ name: 'trace', path: '/kept/trace.zip' }, { name: 'inline' }];
  const results = [{ errors: [{ message: '\u001b[31mExpected 1\u001b[39m' }], attachments }];
  const specs = [{ title: 'pays', tests: tests.map((test) => ({ ...test, results })) }];
  const file = join(ownFolder(), 'e2e.json');
  writeFileSync(
    file,
    JSON.stringify({
      suites: [{ title: 'money.spec.ts', specs: [], suites: [{ title: 'deposit', specs }] }],
      errors,
    }),
  );
  return file;
}

describe('playwright’s report', () => {
  it('counts a spec once for each project; what passed at the second try failed', () => {
    const file = playwrightReport([
      { status: 'expected', projectName: 'desktop' },
      { status: 'unexpected', projectName: 'phone' },
      { status: 'flaky', projectName: 'tablet' },
      { status: 'skipped', projectName: 'other' },
    ]);
    const tally = new Tally();
    addPlaywright(tally, 'e2e', { file, code: 1, output: '' });
    expect(tally.line()).toBe('1 passed, 2 failed');
    expect(tally.skipped).toBe(1);
    expect(tally.story()).toContain(
      'FAILED e2e: money.spec.ts › deposit › pays (phone, unexpected)\nExpected 1\ntrace: /kept/trace.zip\n',
    );
  });

  it('counts an error outside of any test', () => {
    const tally = new Tally();
    addPlaywright(tally, 'e2e', {
      file: playwrightReport([], [{ message: 'no browser' }]),
      code: 1,
      output: '',
    });
    expect(tally.line()).toBe('0 passed, 1 failed');
    expect(tally.story()).toContain('no browser');
  });
});

describe('the story of the failures', () => {
  it('keeps the beginning and the end of a long message', () => {
    const tally = new Tally();
    tally.fail('tsc', `first${' '.repeat(50)}${'x'.repeat(20_000)}last`);
    expect(tally.story().length).toBeLessThan(5_000);
    expect(tally.story()).toMatch(/FAILED tsc\nfirst .*last$/s);
  });
});
