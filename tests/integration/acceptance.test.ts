import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { acceptedHooks } from '@/lib/quotes/accepted';
import type { Accepted } from '@/lib/quotes/schema/accepted';
import {
  acceptQuote,
  declineQuote,
  markOpened,
  recordAcceptance,
  resendQuote,
  saveLine,
  withdrawQuote,
} from '@/lib/quotes/commands';
import { contentOf, customerView, quoteForCustomer } from '@/lib/quotes/queries';
import { acceptText } from '@/lib/quotes/schema/accept-text';
import { defaultChoices } from '@/lib/quotes/schema/content';
import { totalsOf } from '@/lib/quotes/schema/totals';
import { linksOfJob } from '@/lib/links/queries';
import { closeDatabase, withShop } from '@/lib/platform/db';
import { sha256 } from '@/lib/platform/http/hash';
import {
  asMigrator,
  draftedJob,
  FakeSources,
  type QuoteShop,
  quoteShop,
  sendAsIs,
  typedLine,
} from '../support/quotes';

let shop: QuoteShop;
beforeAll(async () => {
  shop = await quoteShop();
});
afterEach(() => {
  acceptedHooks.length = 0;
});
afterAll(closeDatabase);

async function sent() {
  const ports = new FakeSources();
  const jobId = await draftedJob(shop, ports);
  const { documentId } = await sendAsIs(shop, jobId, ports);
  const [link] = await withShop(shop.shopId, () => linksOfJob(jobId));
  const visit = {
    shopId: shop.shopId,
    linkId: link?.id ?? '',
    jobId,
    address: '203.0.113.9',
    userAgent: 'test',
  };
  return { ports, jobId, documentId, visit };
}

/** What the customer's page would send. */
async function shown(documentId: string, choose?: (options: string[]) => string[]) {
  const content = await withShop(shop.shopId, () => contentOf(documentId));
  const choices = choose ? choose(content.options.map((option) => option.id)) : defaultChoices(content);
  const totals = totalsOf(content, choices);
  const [row] = await asMigrator<{ sha256: string }>('select sha256 from documents where id = $1', [
    documentId,
  ]);
  return {
    ...{ documentId, sha256: row?.sha256 ?? '', choices, totalMinor: totals.totalMinor },
    ...{ shownText: acceptText(content, choices, totals), name: 'Ada Marsh', agreed: true as const },
  };
}

const acceptances = (documentId: string) =>
  asMigrator<{ canonical: string; sha256: string; name: string; choices: string[]; total_minor: string }>(
    'select canonical, sha256, name, choices, total_minor from acceptances where document_id = $1',
    [documentId],
  );

describe('accepting', () => {
  it('keeps revision, choices, total, name and the exact words under one hash, and mails both', async () => {
    const { documentId, visit, jobId } = await sent();
    const input = await shown(documentId, (options) => options);
    const answer = await acceptQuote(visit, input);
    const [row] = await acceptances(documentId);
    expect(row).toMatchObject({ name: 'Ada Marsh', total_minor: String(input.totalMinor) });
    expect(sha256(row?.canonical ?? '')).toBe(row?.sha256);
    expect(JSON.parse(row?.canonical ?? '{}')).toMatchObject({
      documentSha256: input.sha256,
      choices: input.choices,
      totalMinor: input.totalMinor,
      name: 'Ada Marsh',
      shownText: input.shownText,
    });
    const mails = await asMigrator<{ kind: string }>(
      `select kind from outbox where payload ->> 'acceptanceId' = $1 order by kind`,
      [answer.acceptanceId],
    );
    expect(mails.map((mail) => mail.kind)).toEqual(['quote.accepted.customer', 'quote.accepted.shop']);
    const view = await customerView(shop.shopId, jobId);
    expect(view).toMatchObject({ state: 'accepted', acceptance: { name: 'Ada Marsh' } });
  });

  it('adds up to what the engine says for every choice', async () => {
    const { documentId } = await sent();
    const content = await withShop(shop.shopId, () => contentOf(documentId));
    expect(totalsOf(content, defaultChoices(content))).toEqual(content.totals);
    const [first, second] = content.options;
    const none = totalsOf(content, []);
    const both = totalsOf(content, [first?.id ?? '', second?.id ?? '']);
    expect(both.netMinor - none.netMinor).toBe((first?.amountMinor ?? 0) + (second?.amountMinor ?? 0));
  });

  it.each([
    ['a smaller total', { totalMinor: 1 }, 'conflict'],
    ['other words', { shownText: 'I accept for nothing.' }, 'conflict'],
    ['another revision’s hash', { sha256: 'f'.repeat(64) }, 'conflict'],
    [
      'an addition that was not offered',
      { choices: ['00000000-0000-4000-8000-000000000000'] },
      'invalid-input',
    ],
    ['choices that do not go with the total', { choices: [] as string[] }, 'conflict'],
  ])('refuses %s', async (_what, tampered, code) => {
    const { documentId, visit } = await sent();
    const input = { ...(await shown(documentId)), ...tampered };
    await expect(acceptQuote(visit, input)).rejects.toMatchObject({ code });
    expect(await acceptances(documentId)).toEqual([]);
  });

  it('from two tabs in the same moment is one acceptance; the other is told', async () => {
    const { documentId, visit } = await sent();
    const input = await shown(documentId);
    const results = await Promise.allSettled([
      acceptQuote(visit, input),
      acceptQuote(visit, { ...input, name: 'Somebody Else' }),
      acceptQuote(visit, input),
    ]);
    expect(results.filter((result) => result.status === 'fulfilled')).toHaveLength(1);
    const refused = results.flatMap((result) => (result.status === 'rejected' ? [result.reason] : []));
    for (const reason of refused)
      expect(reason).toMatchObject({
        code: 'conflict',
        message: expect.stringContaining('accepted revision 1'),
      });
    expect(await acceptances(documentId)).toHaveLength(1);
  });

  it('is not possible by a link of another job or of another shop', async () => {
    const { documentId } = await sent();
    const input = await shown(documentId);
    const { visit: otherJob } = await sent();
    await expect(acceptQuote(otherJob, input)).rejects.toMatchObject({ code: 'not-found' });
    const other = await quoteShop('Marlpit Electric');
    await expect(acceptQuote({ ...otherJob, shopId: other.shopId }, input)).rejects.toMatchObject({
      code: 'not-found',
    });
    expect(await acceptances(documentId)).toEqual([]);
  });

  it('is refused for a revision that was replaced, taken back, declined or is past its date', async () => {
    const replaced = await sent();
    const old = await shown(replaced.documentId);
    await saveLine(shop.estimator, typedLine(replaced.jobId, { description: 'One more thing' }));
    await sendAsIs(shop, replaced.jobId, replaced.ports);
    await expect(acceptQuote(replaced.visit, old)).rejects.toMatchObject({ code: 'gone' });

    const taken = await sent();
    await withdrawQuote(shop.owner, {
      jobId: taken.jobId,
      documentId: taken.documentId,
      reason: 'A mistake',
    });
    await expect(acceptQuote(taken.visit, await shown(taken.documentId))).rejects.toMatchObject({
      code: 'gone',
    });

    const declined = await sent();
    await declineQuote(declined.visit, { documentId: declined.documentId, reason: 'Too dear.' });
    const input = await shown(declined.documentId);
    await expect(acceptQuote(declined.visit, input)).rejects.toMatchObject({ code: 'gone' });
    const again = {
      jobId: declined.jobId,
      documentId: declined.documentId,
      email: 'marsh@tarnlane.example.com',
    };
    await resendQuote(shop.estimator, again);
    expect(await acceptQuote(declined.visit, input)).toMatchObject({ totalMinor: input.totalMinor });
  });

  it('is refused on the day after the last one, and the page can still be read', async () => {
    const { documentId, jobId, visit } = await sent();
    // Frozen rows can't be moved back in time: the same row is read as if today were later.
    const { stateOf } = await import('@/lib/documents/schema');
    const quote = await withShop(shop.shopId, () => quoteForCustomer(shop.shopId, jobId));
    const until = quote?.document.validUntil ?? '';
    expect(stateOf(quote?.events ?? [], until, until)).toBe('sent');
    expect(stateOf(quote?.events ?? [], until, `${until}z`)).toBe('expired');
    expect(await acceptQuote(visit, await shown(documentId))).toBeTruthy();
  });

  it('leaves nothing when what follows from it fails, and can be tried again', async () => {
    const { documentId, visit, jobId } = await sent();
    const input = await shown(documentId);
    acceptedHooks.push(async () => {
      throw new Error('no invoice');
    });
    await expect(acceptQuote(visit, input)).rejects.toThrow('no invoice');
    expect(await acceptances(documentId)).toEqual([]);
    acceptedHooks.length = 0;
    const heard: Accepted[] = [];
    acceptedHooks.push(async (accepted) => void heard.push(accepted));
    const answer = await acceptQuote(visit, input);
    expect(heard).toEqual([
      {
        ...{ jobId, documentId, acceptanceId: answer.acceptanceId },
        ...{ depositMinor: answer.depositMinor, currency: 'USD' },
      },
    ]);
    expect(answer.depositMinor).toBeGreaterThan(0);
  });

  it('leaves rows that nobody changes, and a draft that can not replace it', async () => {
    const { documentId, visit, jobId, ports } = await sent();
    await acceptQuote(visit, await shown(documentId));
    for (const statement of [
      'update acceptances set name = $$x$$',
      'delete from acceptances',
      'truncate acceptances',
    ])
      await expect(asMigrator(statement)).rejects.toMatchObject({ code: '42501' });
    await saveLine(shop.estimator, typedLine(jobId, { description: 'More' }));
    await expect(sendAsIs(shop, jobId, ports)).rejects.toMatchObject({ code: 'conflict' });
  });
});

describe('the office', () => {
  it('records an answer with its purchase order number, and says who recorded it', async () => {
    const { documentId, jobId } = await sent();
    const input = { jobId, documentId, name: 'Ada Marsh', reference: 'PO 7741', choices: [] };
    await recordAcceptance(shop.office, input);
    const [row] = await acceptances(documentId);
    expect(JSON.parse(row?.canonical ?? '{}')).toMatchObject({
      method: 'office',
      reference: 'PO 7741',
      shownText: expect.stringContaining('Recorded by The office for Ada Marsh (PO 7741)'),
    });
    await expect(recordAcceptance(shop.owner, input)).rejects.toMatchObject({ code: 'conflict' });
  });
});

describe('opened', () => {
  it('counts once for a link and sending', async () => {
    const { documentId, jobId, visit } = await sent();
    expect(await markOpened(visit, documentId)).toEqual({ first: true });
    expect(await markOpened(visit, documentId)).toEqual({ first: false });
    expect((await customerView(shop.shopId, jobId))?.state).toBe('opened');
    const both = await Promise.all([markOpened(visit, documentId), markOpened(visit, documentId)]);
    expect(both).toEqual([{ first: false }, { first: false }]);
  });

  it('is not told of a document of another job', async () => {
    const { visit } = await sent();
    const { documentId } = await sent();
    await expect(markOpened(visit, documentId)).rejects.toMatchObject({ code: 'not-found' });
  });
});
