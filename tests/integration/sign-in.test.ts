/** Signing in: argon2id, session rows that act at once, limited attempts, single-use reset. */
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { redeemReset, requestReset, resetToken } from '@/lib/people/resets';
import { hashPassword } from '@/lib/platform/auth/password';
import { endSession, personOfSession, setPassword, signInWithPassword } from '@/lib/platform/auth/sessions';
import { closeDatabase, select, withShop } from '@/lib/platform/db';
import { makeShop, PASSWORD, type TestShop } from '../support/shop';

let shop: TestShop;
const from = () => ({ address: `test-${randomUUID()}`, userAgent: 'test' });

beforeAll(async () => {
  shop = await makeShop();
});
afterAll(closeDatabase);

describe('signing in', () => {
  it('stores argon2id and nothing that could be read back', async () => {
    expect(await hashPassword('x'.repeat(12))).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });

  it('starts a session for the right password, whatever the case of the e-mail', async () => {
    const session = await signInWithPassword(shop.email('owner').toUpperCase(), PASSWORD, from());
    expect(await personOfSession(session ?? undefined)).toBe(shop.actors.owner.personId);
  });

  it('refuses a wrong password and an unknown e-mail alike', async () => {
    expect(await signInWithPassword(shop.email('office'), 'not the password', from())).toBeNull();
    expect(await signInWithPassword('nobody@example.com', PASSWORD, from())).toBeNull();
  });

  it('ends a session at once', async () => {
    const session = (await signInWithPassword(shop.email('owner'), PASSWORD, from())) ?? '';
    await endSession(session);
    expect(await personOfSession(session)).toBeNull();
    expect(await personOfSession('not-an-id')).toBeNull();
  });

  it('limits attempts by e-mail, and says how long to wait', async () => {
    const email = `limited-${randomUUID()}@example.com`;
    for (let i = 0; i < 8; i++) expect(await signInWithPassword(email, 'wrong', from())).toBeNull();
    await expect(signInWithPassword(email, 'wrong', from())).rejects.toThrow(
      /^Too many attempts\. Try again in \d+ minutes?\.$/,
    );
  });

  it('limits attempts by address too', async () => {
    const same = from();
    const tries = Array.from({ length: 60 }, () =>
      signInWithPassword(`${randomUUID()}@example.com`, 'wrong', same),
    );
    await Promise.all(tries);
    await expect(signInWithPassword(`${randomUUID()}@example.com`, 'wrong', same)).rejects.toThrow(
      /Too many/,
    );
  });

  it('ends every session when the password changes', async () => {
    const session = (await signInWithPassword(shop.email('crew'), PASSWORD, from())) ?? '';
    await setPassword(shop.actors.crew.personId, 'another lamp entirely');
    expect(await personOfSession(session)).toBeNull();
    expect(await signInWithPassword(shop.email('crew'), PASSWORD, from())).toBeNull();
    expect(await signInWithPassword(shop.email('crew'), 'another lamp entirely', from())).not.toBeNull();
  });
});

describe('a forgotten password', () => {
  const resetsOf = async () => {
    const rows = await withShop(shop.shopId, () =>
      select<{ payload: { resetId: string } }>(
        `select payload from outbox where kind = 'people.password-reset' order by created_at desc`,
      ),
    );
    return rows.map((row) => row.payload.resetId);
  };

  it('is set anew once, by an address that is stored nowhere', async () => {
    await requestReset(shop.email('estimator'), randomUUID());
    const [resetId = ''] = await resetsOf();
    await redeemReset(resetToken(resetId), 'a lamp of the estimator');
    expect(
      await signInWithPassword(shop.email('estimator'), 'a lamp of the estimator', from()),
    ).not.toBeNull();
    await expect(redeemReset(resetToken(resetId), 'and again by somebody')).rejects.toThrow(/has been used/);
  });

  it('says the same for an unknown e-mail, and mails nothing', async () => {
    const before = (await resetsOf()).length;
    await requestReset(`nobody-${randomUUID()}@example.com`, randomUUID());
    expect((await resetsOf()).length).toBe(before);
  });

  it('refuses a made-up address', async () => {
    await expect(redeemReset('made-up', 'whatever it may be')).rejects.toThrow(/has been used|over an hour/);
  });
});
