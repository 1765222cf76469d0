import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { IDLE, ownChildren, ownFolder } from './support/child';

const node = process.execPath;

describe('a step', () => {
  it('gives back code and both outputs', async () => {
    const children = ownChildren();
    const source = 'console.log("out"); console.error("err"); process.exitCode = 4;';
    const { code, output } = await children.run('step', node, ['-e', source]);
    expect(code).toBe(4);
    expect(output).toContain('out\n');
    expect(output).toContain('err\n');
  });

  it('fails readably when the program is missing', async () => {
    const children = ownChildren();
    const { code, output } = await children.run('step', '/no/such/program', []);
    expect(code).toBe(127);
    expect(output).toContain('ENOENT');
  });

  it('does not wait for a program that it left behind with its output open', async () => {
    const children = ownChildren();
    const source = `require('node:child_process').spawn(process.execPath, ['-e', '${IDLE.replaceAll('"', '\\"')}'], { stdio: 'inherit' }).unref(); process.exit(0);`;
    const started = Date.now();
    expect((await children.run('step', node, ['-e', source])).code).toBe(0);
    expect(Date.now() - started).toBeLessThan(8_000);
  }, 15_000);
});

describe('a service', () => {
  it('is waited for until it answers', async () => {
    const children = ownChildren();
    const entry = children.start('web', node, ['-e', IDLE]);
    let asked = 0;
    await children.ready(entry, 'The web server', () => Promise.resolve((asked += 1) === 3));
    expect(asked).toBe(3);
  });

  it('that ends while it is waited for gives the end of its log at once', async () => {
    const children = ownChildren();
    const entry = children.start('web', node, ['-e', 'console.error("port is taken"); process.exit(1)']);
    const refused = () => Promise.reject(new Error('refused'));
    await expect(children.ready(entry, 'The web server', refused)).rejects.toThrow(
      /The web server did not get ready: it ended\.\nport is taken/,
    );
  });

  it('that never answers is given up with the last reason', async () => {
    const children = ownChildren();
    const entry = children.start('web', node, ['-e', IDLE]);
    const wrong = () => Promise.reject(new Error('password authentication failed'));
    await expect(children.ready(entry, 'PostgreSQL', wrong, 300)).rejects.toThrow(
      /password authentication failed/,
    );
  });

  it('keeps the log of the run before', async () => {
    const data = ownFolder();
    for (const text of ['first', 'second']) {
      const children = ownChildren(data);
      await children.start('web', node, ['-e', `console.log('${text}')`]).exit;
    }
    expect(readFileSync(`${data}/logs/web.log`, 'utf8')).toBe('second\n');
    expect(readFileSync(`${data}/logs/web.log.old`, 'utf8')).toBe('first\n');
  });
});
