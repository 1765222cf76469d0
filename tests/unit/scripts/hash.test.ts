import { mkdirSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { sourceHash, withoutServices } from '../../../docker-free-scripts/lib/build.mjs';
import { ensurePackages, packagesAreCurrent } from '../../../docker-free-scripts/lib/packages.mjs';
import { LIB, ownChildren, ownFolder, startModule } from './support/child';

function project(): string {
  const root = ownFolder();
  mkdirSync(join(root, 'app', 'jobs'), { recursive: true });
  writeFileSync(join(root, 'app', 'page.tsx'), 'one');
  writeFileSync(join(root, 'app', 'jobs', 'page.tsx'), 'two');
  writeFileSync(join(root, 'package.json'), '{"name":"x","version":"1.0.0"}');
  writeFileSync(
    join(root, 'package-lock.json'),
    '{"name":"x","version":"1.0.0","lockfileVersion":3,"packages":{"":{"name":"x","version":"1.0.0"}}}',
  );
  return root;
}

describe('the hash of what a build reads', () => {
  it('is the same for the same sources elsewhere', () => {
    expect(sourceHash(project())).toBe(sourceHash(project()));
  });

  it.each([
    ['a change', (root: string) => writeFileSync(join(root, 'app', 'jobs', 'page.tsx'), 'TWO')],
    ['a new file', (root: string) => writeFileSync(join(root, 'app', 'new.tsx'), '')],
    ['a move', (root: string) => renameSync(join(root, 'app', 'page.tsx'), join(root, 'app', 'home.tsx'))],
    ['another package', (root: string) => writeFileSync(join(root, 'package-lock.json'), '{}')],
  ])('changes with %s', (_name, change) => {
    const root = project();
    const before = sourceHash(root);
    change(root);
    expect(sourceHash(root)).not.toBe(before);
  });

  it('does not change with the data of a running command', () => {
    const root = project();
    const before = sourceHash(root);
    mkdirSync(join(root, '.data'));
    writeFileSync(join(root, '.data', 'ports.json'), '{}');
    expect(sourceHash(root)).toBe(before);
  });
});

describe('the environment of a build', () => {
  it('reaches no service', () => {
    const env = {
      PATH: '/bin',
      DATABASE_URL_WEB: 'x',
      SMTP_URL: 'x',
      S3_ENDPOINT: 'x',
      STRIPE_SECRET_KEY: 'x',
    };
    expect(withoutServices(env)).toEqual({ PATH: '/bin' });
  });
});

describe('packages', () => {
  it('are installed by the real npm when the lock file changed, and only then', async () => {
    const root = project();
    const children = ownChildren(join(root, '.data'));
    expect(packagesAreCurrent(root)).toBe(false);
    await ensurePackages(children, root);
    expect(packagesAreCurrent(root)).toBe(true);
    writeFileSync(
      join(root, 'package-lock.json'),
      '{"name":"x","version":"1.0.1","lockfileVersion":3,"packages":{"":{"name":"x","version":"1.0.0"}}}',
    );
    expect(packagesAreCurrent(root)).toBe(false);
  }, 30_000);

  it.each([
    ['.data-test/test.lock', /"npm test" of this checkout is running/],
    ['.data/packages.lock', /is installing packages/],
  ])('are not touched while %s is held', async (file, message) => {
    const root = project();
    mkdirSync(join(root, 'node_modules'));
    await startModule(`
      import { takeLock } from '${LIB}/lock.mjs';
      takeLock(${JSON.stringify(join(root, file))});
      console.log('held');
      setInterval(() => {}, 1000);`);
    const children = ownChildren(join(root, '.data'));
    await expect(ensurePackages(children, root)).rejects.toMatchObject({
      code: 3,
      message: expect.stringMatching(message),
    });
  });
});
