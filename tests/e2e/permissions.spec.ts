/** Every page, route and action of the build is in the permission table, and the server answers as the table says. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { ACTIONS, type Access, PLACES } from '@/lib/access/permissions';
import { may, type Role, ROLES } from '@/lib/access/policy';
import { makeShop, type TestShop } from '../support/shop';
import { sessionCookie } from './support/signed-in';

const dist = process.env.NEXT_DIST_DIR ?? '.next-test';
const manifest = (name: string) =>
  JSON.parse(readFileSync(join(dist, 'server', name), 'utf8')) as Record<string, unknown>;

const built = Object.keys(manifest('app-paths-manifest.json'));
const placeOf = (path: string) => path.replace(/\/(page|route)$/, '') || '/';

interface Reference {
  filename: string;
  exportedName: string;
}

test('each page and route of the build is in the table, and the table names nothing else', () => {
  expect(built.map(placeOf).sort()).toEqual(Object.keys(PLACES).sort());
});

test('each action of the build is in the table', () => {
  const references = Object.values(
    manifest('server-reference-manifest.json')['node'] as Record<string, Reference>,
  );
  const names = new Set(references.map((one) => `${one.filename}#${one.exportedName}`));
  for (const name of names) expect(Object.keys(ACTIONS)).toContain(name);
});

/** Ids that exist nowhere: who may enter is told a page is missing, who may not is told the same or to sign in. */
const NOWHERE = '00000000-0000-4000-8000-000000000000';
const fill = (path: string, shopId: string) =>
  path
    .replace('[shop]', shopId)
    .replace('[name]', 'voltage-drop')
    .replace('[token]', 'made-up-token')
    .replace(/\[[^\]]+\]/g, NOWHERE);

const isPermission = (access: Access): boolean => access.includes(':');
const guarded = Object.entries(PLACES).filter(([, access]) => isPermission(access));

test.describe('the server answers as the table says', () => {
  let shop: TestShop;
  let stranger: TestShop;
  const cookies = new Map<string, string>();

  test.beforeAll(async () => {
    shop = await makeShop();
    stranger = await makeShop();
    for (const role of ROLES) cookies.set(role, await sessionCookie(shop.actors[role].personId));
    cookies.set('stranger', await sessionCookie(stranger.actors.owner.personId));
  });

  const as = (who: string): Record<string, string> => {
    const value = cookies.get(who);
    return value ? { cookie: `next-auth.session-token=${value}` } : {};
  };
  const methodOf = (path: string) => (/events$/.test(path) ? 'POST' : 'GET');

  for (const [path, access] of guarded) {
    const api = path.startsWith('/api/');
    /** Without ids of its own a page opens; with made-up ids it is missing for whoever may enter. */
    const made = /\[(?!shop\])/.test(path);

    for (const role of [...ROLES, 'stranger', 'nobody'] as const) {
      test(`${path} as ${role}`, async ({ request }) => {
        const response = await request.fetch(fill(path, shop.shopId), {
          method: methodOf(path),
          headers: { ...as(role), ...(api ? { 'content-type': 'application/json' } : {}) },
          maxRedirects: 0,
          ...(methodOf(path) === 'POST' ? { data: { protocol: 1, events: [] } } : {}),
        });
        const inShop = (ROLES as readonly string[]).includes(role);
        const allowed = inShop && may({ roles: [role as Role] }, access as never);
        const status = response.status();
        expect(status).toBeLessThan(500);
        if (role === 'nobody') expect(status).toBe(api ? 401 : 307);
        else if (!inShop) expect(status).toBe(404);
        else if (!allowed) expect(status).toBe(api ? 403 : 404);
        else if (made) expect([200, 404, 422]).toContain(status);
        else expect(status).toBe(200);
      });
    }
  }

  test('the engine asks for a sign-in and answers a signed-in person', async ({ request }) => {
    const input = {
      system: 'dc',
      volts: 12,
      amps: 20,
      metres: 5,
      size: '4 mm2',
      stranding: 'flexible',
      celsius: 20,
    };
    const ask = (who: string, data: object, headers = {}) =>
      request.post('/api/v1/engine/voltage-drop', { data, headers: { ...as(who), ...headers } });
    expect((await ask('nobody', input)).status()).toBe(401);
    const good = await ask('crew', input);
    expect(good.status()).toBe(200);
    expect((await good.json()).result.dropVolts).toBeCloseTo(0.99, 9);
    const bad = await ask('crew', { ...input, metres: -1 });
    expect(bad.status()).toBe(422);
    expect(bad.headers()['content-type']).toContain('application/problem+json');
    expect(await bad.json()).toMatchObject({ code: 'invalid-input', issues: [{ path: 'metres' }] });
    expect((await ask('crew', input, { origin: 'https://elsewhere.example.com' })).status()).toBe(403);
    const big = await request.post('/api/v1/engine/voltage-drop', {
      headers: { ...as('crew'), 'content-type': 'application/json' },
      data: `"${'x'.repeat(300_000)}"`,
    });
    expect(big.status()).toBe(413);
  });

  test('the engine figures heavy work in a thread of its own, within the web’s limits', async ({
    request,
  }) => {
    const tape = (cuts: number) => ({
      cuts,
      cutMetres: 0.05,
      railOhmsPerMetre: { positive: 0.045, negative: 0.045 },
      load: { model: 'constant-current', amps: 0.001 },
      feeds: [{ at: 0, volts: 24, positiveOhms: 0.01, negativeOhms: 0.01 }],
    });
    const ask = (cuts: number) =>
      request.post('/api/v1/engine/tape-analysis', { data: tape(cuts), headers: as('estimator') });
    const good = await ask(1000);
    expect(good.status()).toBe(200);
    expect((await good.json()).result.loadVolts).toHaveLength(1000);
    const large = await ask(6000);
    expect(large.status()).toBe(422);
    expect(await large.json()).toMatchObject({ code: 'too-large', issues: [{ path: 'cuts' }] });
    const unknown = await request.post('/api/v1/engine/no-such-thing', {
      data: {},
      headers: as('estimator'),
    });
    expect(unknown.status()).toBe(422);
    expect(await unknown.json()).toMatchObject({ code: 'unknown-calculation' });
  });
});
