import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { linkUrl, linksOfJob, visitorByToken } from '@/lib/links/queries';
import { acceptQuote, declineQuote } from '@/lib/quotes/commands';
import { quoteHandlers } from '@/lib/quotes/jobs';
import { contentOf } from '@/lib/quotes/queries';
import { acceptText } from '@/lib/quotes/schema/accept-text';
import { defaultChoices } from '@/lib/quotes/schema/content';
import { totalsOf } from '@/lib/quotes/schema/totals';
import { closeDatabase, withShop } from '@/lib/platform/db';
import { sha256 } from '@/lib/platform/http/hash';
import type { OutboxItem } from '@/lib/platform/queue/worker';
import { arrived, catcher, type Mail } from '../support/caught-mail';
import { asMigrator, draftedJob, FakeSources, type QuoteShop, quoteShop, sendAsIs } from '../support/quotes';

let shop: QuoteShop;
beforeAll(async () => {
  shop = await quoteShop();
});
afterAll(closeDatabase);

/** Runs what the outbox holds of this document, and reads what the catcher got for each. */
async function deliver(documentId: string): Promise<Mail[]> {
  const items = await asMigrator<Omit<OutboxItem, 'shopId'>>(
    `select id, kind, payload from outbox where shop_id = $1 and payload ->> 'documentId' = $2 order by created_at, kind`,
    [shop.shopId, documentId],
  );
  const handlers = new Map(quoteHandlers);
  const mails: Mail[] = [];
  for (const item of items) {
    await handlers.get(item.kind)?.({ ...item, shopId: shop.shopId });
    mails.push(await arrived(item.id));
  }
  return mails;
}

async function sent() {
  const ports = new FakeSources();
  const jobId = await draftedJob(shop, ports);
  const { documentId } = await sendAsIs(shop, jobId, ports);
  const [link] = await withShop(shop.shopId, () => linksOfJob(jobId));
  if (!link) throw new Error('no link');
  return { jobId, documentId, link };
}

describe('the mail that brings a quote', () => {
  it('carries the link, the PDF as it was stored and the shop’s own words, under the shop’s name', async () => {
    const { documentId, link } = await sent();
    const [mail] = await deliver(documentId);
    expect(mail).toMatchObject({
      to: [{ address: 'marsh@tarnlane.example.com' }],
      from: [{ name: 'Fernhollow Lighting' }],
    });
    expect(mail?.subject).toMatch(/^Your quote \d+ from Fernhollow Lighting: New lighting for the bakery$/);
    const source = await (await fetch(`${catcher()}/api/email/${mail?.id}/source`)).text();
    expect(source).toContain('Reply-To: desk@fernhollow.example.com');
    const url = linkUrl(link);
    expect(mail?.html).toContain(url);
    expect(mail?.text).toContain(url);
    expect(mail?.text).toContain('As we said on site.');
    expect(await visitorByToken(url.split('/').at(-1) ?? '')).toMatchObject({ link: { id: link.id } });
    const [attachment] = mail?.attachments ?? [];
    expect(attachment).toMatchObject({
      contentType: 'application/pdf',
      filename: expect.stringMatching(/^quote-\d+\.pdf$/),
    });
    const name = attachment?.generatedFileName ?? '';
    const pdf = await fetch(`${catcher()}/api/email/${mail?.id}/attachment/${name}`);
    const [row] = await asMigrator<{ pdf_sha256: string }>('select pdf_sha256 from documents where id = $1', [
      documentId,
    ]);
    expect(sha256(new Uint8Array(await pdf.arrayBuffer()))).toBe(row?.pdf_sha256);
  });

  it('bears the same Message-ID when it is sent again after a crash', async () => {
    const { documentId } = await sent();
    const [first] = await deliver(documentId);
    const [second] = await deliver(documentId);
    expect(second?.headers['message-id']).toBe(first?.headers['message-id']);
  });
});

describe('the mails after an answer', () => {
  it('give both sides the words that were agreed to and the record’s hash', async () => {
    const { documentId, jobId, link } = await sent();
    const content = await withShop(shop.shopId, () => contentOf(documentId));
    const choices = defaultChoices(content);
    const totals = totalsOf(content, choices);
    const [row] = await asMigrator<{ sha256: string }>('select sha256 from documents where id = $1', [
      documentId,
    ]);
    const shownText = acceptText(content, choices, totals);
    await acceptQuote(
      { shopId: shop.shopId, jobId, linkId: link.id, address: '', userAgent: '' },
      {
        ...{ documentId, sha256: row?.sha256 ?? '', choices, totalMinor: totals.totalMinor },
        ...{ shownText, name: 'Ada Marsh', agreed: true },
      },
    );
    const [, customer, office] = await deliver(documentId);
    const [acceptance] = await asMigrator<{ sha256: string }>(
      'select sha256 from acceptances where document_id = $1',
      [documentId],
    );
    expect(customer?.to).toMatchObject([{ address: 'marsh@tarnlane.example.com' }]);
    expect(office?.to).toMatchObject([{ address: 'desk@fernhollow.example.com' }]);
    for (const mail of [customer, office]) {
      expect(mail?.html).toContain(acceptance?.sha256);
      expect(mail?.text.replace(/\s+/g, ' ')).toContain('Signed: Ada Marsh');
    }
    expect(customer?.html).toContain(linkUrl(link));
    expect(office?.html).not.toContain('/l/open/');
    expect(office?.html).toContain(`/s/${shop.shopId}/jobs/${jobId}`);
  });

  it('tell the shop why a quote was declined', async () => {
    const { documentId, jobId, link } = await sent();
    await declineQuote(
      { shopId: shop.shopId, jobId, linkId: link.id, address: '', userAgent: '' },
      { documentId, reason: 'Too dear <b>for us</b>.' },
    );
    const [, mail] = await deliver(documentId);
    expect(mail?.to).toMatchObject([{ address: 'desk@fernhollow.example.com' }]);
    expect(mail?.text).toContain('Too dear <b>for us</b>.');
    expect(mail?.html).not.toContain('<b>for us</b>');
  });
});
