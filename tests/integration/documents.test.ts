import { inflateSync } from 'node:zlib';
import { Client } from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { freezeDocument, recordDocumentEvent, storePdf } from '@/lib/documents/commands';
import { servePdf } from '@/lib/documents/pdf-response';
import { documentsOfJob, eventsOf } from '@/lib/documents/queries';
import { bringUpToDate, resendQuote, saveLine, withdrawQuote } from '@/lib/quotes/commands';
import { contentOf, sentQuotes } from '@/lib/quotes/queries';
import { closeDatabase, withShop } from '@/lib/platform/db';
import { canonical, sha256 } from '@/lib/platform/http/hash';
import { getFile } from '@/lib/platform/storage';
import {
  asMigrator,
  bodyOf,
  draftedJob,
  FakeSources,
  quoteJob,
  type QuoteShop,
  quoteShop,
  sendAsIs,
  typedLine,
} from '../support/quotes';

let shop: QuoteShop;
beforeAll(async () => {
  shop = await quoteShop();
});
afterAll(closeDatabase);

interface Frozen {
  id: string;
  canonical: string;
  sha256: string;
  pdf_sha256: string;
}

const frozen = async (id: string) =>
  (
    await asMigrator<Frozen>('select id, canonical, sha256, pdf_sha256 from documents where id = $1', [id])
  )[0];

async function sent(ports = new FakeSources()) {
  const jobId = await draftedJob(shop, ports);
  return { ports, jobId, ...(await sendAsIs(shop, jobId, ports)) };
}

describe('a frozen document', () => {
  it('is canonical text whose hash anyone can work out again', async () => {
    const { documentId, sha256: told } = await sent();
    const row = await frozen(documentId);
    if (!row) throw new Error('no row');
    expect(sha256(row.canonical)).toBe(row.sha256);
    expect(told).toBe(row.sha256);
    expect(canonical(JSON.parse(row.canonical))).toBe(row.canonical);
  });

  it.each([
    ['update documents set title = $$other$$', 'documents'],
    ['delete from documents', 'documents'],
    ['truncate documents cascade', 'documents'],
    ['update document_events set kind = $$paid$$', 'document_events'],
    ['delete from document_events', 'document_events'],
    ['truncate document_events', 'document_events'],
  ])('refuses %s, of the web server and of the owner of the table', async (statement, table) => {
    await sent();
    await expect(asMigrator(statement)).rejects.toMatchObject({ code: '42501' });
    const web = new Client({ connectionString: process.env.DATABASE_URL_WEB });
    await web.connect();
    await web.query(`select set_config('app.shop_id', $1, false)`, [shop.shopId]);
    await expect(web.query(statement)).rejects.toMatchObject({ code: '42501' });
    const { rows } = await web.query(`select count(*)::int as count from ${table}`);
    await web.end();
    expect(rows[0].count).toBeGreaterThan(0);
  });

  it('takes one number and revision once', async () => {
    const jobId = await quoteJob(shop);
    const freezing = {
      jobId,
      kind: 'invoice' as const,
      number: jobId.slice(0, 8),
      revision: 1,
      title: 'x',
      content: { a: 1 },
      createdBy: null,
    };
    await withShop(shop.shopId, () => freezeDocument(freezing));
    await expect(withShop(shop.shopId, () => freezeDocument(freezing))).rejects.toMatchObject({
      original: { code: '23505' },
    });
  });

  it('leaves nothing behind when its transaction fails', async () => {
    const jobId = await quoteJob(shop);
    const pdf = await storePdf(shop.shopId, Buffer.from('%PDF-1.7 something'));
    const work = withShop(shop.shopId, async () => {
      const { id } = await freezeDocument({
        ...{ jobId, kind: 'quote', number: 'n', revision: 1, title: '', content: {}, pdf, createdBy: null },
      });
      await recordDocumentEvent(id, 'sent');
      throw new Error('later');
    });
    await expect(work).rejects.toThrow('later');
    expect(await withShop(shop.shopId, () => documentsOfJob(jobId, 'quote'))).toEqual([]);
  });
});

/** Words drawn by a PDF whose fonts are subsets can't be read from it; that it draws text on each page can. */
function pagesThatDrawText(pdf: Buffer): number {
  const text = pdf.toString('latin1');
  let pages = 0;
  for (const match of text.matchAll(/stream\r?\n/g)) {
    const start = match.index + match[0].length;
    const end = text.indexOf('endstream', start);
    try {
      if (inflateSync(pdf.subarray(start, end)).includes('BT')) pages += 1;
    } catch {
      // A font or an image: not a page's content.
    }
  }
  return pages;
}

describe('the PDF', () => {
  it('is made before sending, stored by its hash and served ever after', async () => {
    const { documentId } = await sent();
    const row = await frozen(documentId);
    const bytes = Buffer.from(await getFile(shop.shopId, row?.pdf_sha256 ?? ''));
    expect(bytes.subarray(0, 5).toString()).toBe('%PDF-');
    expect(sha256(bytes)).toBe(row?.pdf_sha256);
    expect(pagesThatDrawText(bytes)).toBeGreaterThanOrEqual(1);
    expect(bytes.toString('latin1')).toContain('/MediaBox [0 0 612 792]');
    const response = await servePdf(shop.shopId, documentId, () => true);
    expect(response.headers.get('content-type')).toBe('application/pdf');
    expect(response.headers.get('cache-control')).toBe('no-store');
    expect(sha256(new Uint8Array(await response.arrayBuffer()))).toBe(row?.pdf_sha256);
  });

  it('is not served to another shop, for another kind, or for an address that is no id', async () => {
    const { documentId } = await sent();
    const other = await quoteShop('Marlpit Electric');
    const missing = { code: 'not-found' };
    await expect(servePdf(other.shopId, documentId, () => true)).rejects.toMatchObject(missing);
    await expect(servePdf(shop.shopId, documentId, () => false)).rejects.toMatchObject(missing);
    await expect(servePdf(shop.shopId, '../etc', () => true)).rejects.toMatchObject(missing);
  });
});

describe('sending', () => {
  it('freezes what the sender looked at, with a link and one mail, and no figure of cost', async () => {
    const { documentId, jobId } = await sent();
    const content = await withShop(shop.shopId, () => contentOf(documentId));
    expect(content.lines.map((line) => line.text)).toContain(
      '12 old four-tube fixtures out, 12 flat panels in',
    );
    expect(content.options.map((option) => option.chosen)).toEqual([true, false]);
    expect(JSON.stringify(content)).not.toMatch(/cost|markup|margin|labour|sku|1110/i);
    const mails = await asMigrator(
      `select kind, payload from outbox where shop_id = $1 and payload ->> 'documentId' = $2`,
      [shop.shopId, documentId],
    );
    const links = await asMigrator<{ id: string }>('select id from customer_links where job_id = $1', [
      jobId,
    ]);
    expect(mails).toEqual([{ kind: 'quote.sent', payload: { documentId, linkId: links[0]?.id } }]);
  });

  it('refuses a draft that changed since it was looked at', async () => {
    const ports = new FakeSources();
    const jobId = await draftedJob(shop, ports);
    const seen = await bodyOf(shop, jobId, ports);
    await saveLine(shop.estimator, typedLine(jobId, { description: 'Slipped in' }));
    const { sendQuote } = await import('@/lib/quotes/commands');
    await expect(
      sendQuote(shop.estimator, { jobId, bodySha256: seen, email: 'a@example.com', note: '' }, ports),
    ).rejects.toMatchObject({ code: 'conflict' });
  });

  it('sent twice in the same moment makes one revision', async () => {
    const ports = new FakeSources();
    const jobId = await draftedJob(shop, ports);
    const results = await Promise.allSettled([
      sendAsIs(shop, jobId, ports),
      sendAsIs(shop, jobId, ports),
      sendAsIs(shop, jobId, ports),
    ]);
    expect(results.filter((result) => result.status === 'fulfilled')).toHaveLength(1);
    for (const result of results)
      if (result.status === 'rejected') expect(result.reason).toMatchObject({ code: 'conflict' });
    expect(await withShop(shop.shopId, () => documentsOfJob(jobId, 'quote'))).toHaveLength(1);
  });

  it('an edited draft makes the next revision, which takes the place of the one before', async () => {
    const { jobId, ports, documentId } = await sent();
    const before = await frozen(documentId);
    await saveLine(shop.estimator, typedLine(jobId, { description: 'One more thing' }));
    const next = await sendAsIs(shop, jobId, ports);
    expect(next.revision).toBe(2);
    const quotes = await withShop(shop.shopId, () => sentQuotes(shop.shopId, jobId));
    expect(quotes.map((quote) => [quote.document.revision, quote.state])).toEqual([
      [2, 'sent'],
      [1, 'superseded'],
    ]);
    expect(await frozen(documentId)).toEqual(before);
  });

  it('does not send the same words as a new revision', async () => {
    const { jobId, ports } = await sent();
    await bringUpToDate(shop.estimator, { jobId }, ports);
    await expect(sendAsIs(shop, jobId, ports)).rejects.toMatchObject({ code: 'conflict' });
  });

  it('can be taken back once, and sent again as it was', async () => {
    const { jobId, documentId } = await sent();
    await resendQuote(shop.estimator, { jobId, documentId, email: 'marsh@tarnlane.example.com' });
    const withdraw = { jobId, documentId, reason: 'The customer asked us to wait.' };
    await withdrawQuote(shop.estimator, withdraw);
    await expect(withdrawQuote(shop.estimator, withdraw)).rejects.toMatchObject({ code: 'conflict' });
    await expect(
      resendQuote(shop.estimator, { jobId, documentId, email: 'a@example.com' }),
    ).rejects.toMatchObject({ code: 'conflict' });
    const events = (await withShop(shop.shopId, () => eventsOf([documentId]))).get(documentId);
    expect(events?.map((event) => event.kind)).toEqual(['sent', 'resent', 'withdrawn']);
    expect(events?.[2]?.by).toBe('The estimator');
  });
});
