/** Visits: planned on the shop's clock, changed against their version, seen by crew only where they go. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { getJob } from '@/lib/jobs/queries';
import { closeDatabase, withShop } from '@/lib/platform/db';
import { cancelVisit, saveVisit } from '@/lib/visits/commands';
import { loadComingVisits, visitsOfJob } from '@/lib/visits/queries';
import { visitForm } from '@/lib/visits/schema';
import { type QuoteShop, quoteJob, quoteShop } from '../support/quotes';
import { visitOf } from './wiring-case';

let shop: QuoteShop;
let jobId: string;
const NOW = new Date('2026-12-02T12:00:00Z');
beforeAll(async () => {
  shop = await quoteShop();
  jobId = await quoteJob(shop);
});
afterAll(closeDatabase);

describe('a visit', () => {
  it('keeps its wall-clock time and zone, and tells the job', async () => {
    const { id } = await saveVisit(shop.office, visitOf(jobId, [shop.crew]));
    const visits = await withShop(shop.shopId, () => visitsOfJob(jobId));
    expect(visits.find((one) => one.id === id)).toMatchObject({
      startsAt: '2026-12-02T08:30',
      endsAt: '2026-12-02T16:00',
      timeZone: 'America/New_York',
      crew: [{ id: shop.crew.membershipId }],
    });
    expect((await withShop(shop.shopId, () => getJob(jobId))).facts.visitPlanned).toBe(true);
  });

  it('is changed against the version it was opened with', async () => {
    const { id, version } = await saveVisit(shop.office, visitOf(jobId, [shop.crew]));
    const later = { id, baseVersion: version, endsAt: '2026-12-02T17:00' };
    await saveVisit(shop.owner, visitOf(jobId, [shop.office], later));
    await expect(saveVisit(shop.office, visitOf(jobId, [shop.crew], later))).rejects.toMatchObject({
      code: 'conflict',
      current: { version: version + 1, endsAt: '2026-12-02T17:00' },
    });
    await cancelVisit(shop.office, { id, baseVersion: version + 1 });
    const visits = await withShop(shop.shopId, () => visitsOfJob(jobId));
    expect(visits.map((one) => one.id)).not.toContain(id);
  });

  it('takes only people of the shop, and a job of the shop', async () => {
    const stranger = await quoteShop();
    await expect(saveVisit(shop.office, visitOf(jobId, [stranger.crew]))).rejects.toMatchObject({
      issues: [{ path: 'crew' }],
    });
    await expect(saveVisit(stranger.office, visitOf(jobId, [stranger.crew]))).rejects.toMatchObject({
      code: 'not-found',
    });
  });

  it.each([
    ['endsAt', { endsAt: '2026-12-02T08:30' }],
    ['startsAt', { startsAt: '2026-02-30T08:30' }],
    ['startsAt', { startsAt: 'tomorrow' }],
    ['crew', { crew: [] }],
  ])('that can not be names %s', (path, over) => {
    const parsed = visitForm.safeParse(visitOf(jobId, [shop.crew], over));
    expect(parsed.error?.issues.map((issue) => issue.path.join('.'))).toContain(path);
  });
});

describe('the list of visits', () => {
  it('shows crew their own, and the desk all', async () => {
    const job = await quoteJob(shop, 'Another');
    const mine = await saveVisit(shop.office, visitOf(job, [shop.crew]));
    const others = await saveVisit(shop.office, visitOf(job, [shop.estimator]));
    const past = await saveVisit(
      shop.office,
      visitOf(job, [shop.crew], { startsAt: '2026-12-01T08:00', endsAt: '2026-12-01T09:00' }),
    );
    const ids = async (actor = shop.crew) => (await loadComingVisits(actor, NOW)).visits.map((one) => one.id);
    expect(await ids()).toContain(mine.id);
    expect(await ids()).not.toContain(others.id);
    expect(await ids()).not.toContain(past.id);
    expect(await ids(shop.office)).toEqual(expect.arrayContaining([mine.id, others.id]));
  });
});
