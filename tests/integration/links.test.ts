import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closeLink, expireLinksOfJob, linkForContact } from '@/lib/links/commands';
import { type LinkRow, linksOfJob, linkUrl, visitorByToken } from '@/lib/links/queries';
import { hashOfToken, tokenOf } from '@/lib/links/token';
import { closeDatabase, run, select, withShop } from '@/lib/platform/db';
import { asMigrator, quoteJob, type QuoteShop, quoteShop } from '../support/quotes';

let shop: QuoteShop;
let jobId: string;
beforeAll(async () => {
  shop = await quoteShop();
  jobId = await quoteJob(shop);
});
afterAll(closeDatabase);

const link = (email: string): Promise<LinkRow> => withShop(shop.shopId, () => linkForContact(jobId, email));
const tokenIn = (row: LinkRow) => linkUrl(row).split('/').at(-1) ?? '';

describe('a customer link', () => {
  it('is one for a job and a contact, however the address is written', async () => {
    const first = await link('Marsh@TarnLane.example.com');
    const second = await link(' marsh@tarnlane.example.com ');
    expect(second.id).toBe(first.id);
    expect((await link('other@example.com')).id).not.toBe(first.id);
  });

  it('opens its job by its token, of which the table holds the hash alone', async () => {
    const row = await link('hash@example.com');
    const token = tokenIn(row);
    expect(await visitorByToken(token)).toMatchObject({ shopId: shop.shopId, link: { id: row.id, jobId } });
    const [stored] = await asMigrator<{ token_sha256: string }>(
      'select token_sha256 from customer_links where id = $1',
      [row.id],
    );
    expect(stored?.token_sha256).toBe(hashOfToken(token));
    expect(JSON.stringify(row)).not.toContain(token);
  });

  it('keeps the hash of its token from the web server’s eyes', async () => {
    await link('eyes@example.com');
    await expect(
      withShop(shop.shopId, () => select('select token_sha256 from customer_links')),
    ).rejects.toMatchObject({ original: { code: '42501' } });
  });

  it.each(['', 'short', 'x'.repeat(43), '../../etc/passwd', "' or 1=1 --", 'é'.repeat(43)])(
    'opens nothing for %j',
    async (token) => expect(await visitorByToken(token)).toBeNull(),
  );

  it('opens nothing for the token of another link or version', async () => {
    const row = await link('forged@example.com');
    expect(await visitorByToken(tokenOf(row.id, 2))).toBeNull();
    expect(await visitorByToken(tokenOf(shop.shopId, 1))).toBeNull();
  });

  it('opens nothing once closed; asked for again it gets a new key and the old one stays dead', async () => {
    const row = await link('closed@example.com');
    const old = tokenIn(row);
    await closeLink(shop.office, { jobId, id: row.id });
    expect(await visitorByToken(old)).toBeNull();
    const again = await link('closed@example.com');
    expect(again.id).toBe(row.id);
    expect(await visitorByToken(old)).toBeNull();
    expect(await visitorByToken(tokenIn(again))).toMatchObject({ link: { id: row.id } });
  });

  it('opens nothing once it has expired', async () => {
    const row = await link('expired@example.com');
    await withShop(shop.shopId, () =>
      run(`update customer_links set expires_at = now() - interval '1 minute' where id = $1`, [row.id]),
    );
    expect(await visitorByToken(tokenIn(row))).toBeNull();
  });

  it('outlives its job’s closing by two years', async () => {
    const row = await link('years@example.com');
    await withShop(shop.shopId, () => expireLinksOfJob(jobId));
    expect(await visitorByToken(tokenIn(row))).not.toBeNull();
    const [again] = await withShop(shop.shopId, () => linksOfJob(jobId));
    const months = ((again?.expiresAt?.getTime() ?? 0) - Date.now()) / (30.44 * 24 * 3600 * 1000);
    expect(months).toBeCloseTo(24, 0);
  });

  it('is not seen, found or closed by another shop', async () => {
    const row = await link('mine@example.com');
    const other = await quoteShop('Marlpit Electric');
    expect(await withShop(other.shopId, () => linksOfJob(jobId))).toEqual([]);
    await expect(closeLink(other.owner, { jobId, id: row.id })).rejects.toMatchObject({
      code: 'not-found',
    });
    await expect(withShop(other.shopId, () => linkForContact(jobId, 'x@example.com'))).rejects.toMatchObject({
      original: { code: '23503' },
    });
    expect(await visitorByToken(tokenIn(row))).not.toBeNull();
  });
});
