/** The wiring sheet: frozen without money, for those who go, each event once, signed off when it is done. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Actor } from '@/lib/access/policy';
import { eventsOf } from '@/lib/documents/queries';
import { getJob } from '@/lib/jobs/queries';
import { saveCustomer } from '@/lib/customers/commands';
import { createJob } from '@/lib/jobs/commands';
import { closeDatabase, withShop } from '@/lib/platform/db';
import { sha256 } from '@/lib/platform/http/hash';
import { applySheetEvents, releaseSheet } from '@/lib/wiring/commands';
import { loadInstall, loadSheet } from '@/lib/wiring/queries';
import { readingsOfSheet, stepsOfSheet } from '@/lib/wiring/schema/sheet';
import { asMigrator, draftedJob, FakeSources, quoteShop } from '../support/quotes';
import { overrideFinding } from '@/lib/surveys/commands';
import { SurveyPen } from '@/seeders/demo';
import { acceptedJob, acceptQuoteOf, goTo, sheetEvent, surveyedJob, wiringShop } from './wiring-case';

let shop: Awaited<ReturnType<typeof wiringShop>>;
let jobId: string;
let sheetId: string;
beforeAll(async () => {
  shop = await wiringShop();
  jobId = await acceptedJob(shop);
  await goTo(shop, jobId, [shop.crew]);
  sheetId = (await releaseSheet(shop.estimator, jobId)).id;
});
afterAll(closeDatabase);

const send = async (kind: string, body: object, actor: Actor = shop.crew, id = sheetId) =>
  (await applySheetEvents(actor, id, [sheetEvent(kind, body)]))[0];
const stageOf = async (id: string) => (await withShop(shop.shopId, () => getJob(id))).stage;

describe('a release', () => {
  it('waits for an accepted quote', async () => {
    const waiting = await surveyedJob(shop, new FakeSources());
    await expect(releaseSheet(shop.owner, waiting)).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining('accepted'),
    });
  });

  it('waits for open stops', async () => {
    const stopped = await acceptedJob(shop);
    await asMigrator('update circuits set open_stops = 1 where job_id = $1', [stopped]);
    await expect(releaseSheet(shop.owner, stopped)).rejects.toThrow(/open stop/);
  });

  it('is canonical text under the job’s number, with its hash, and with no money in it', async () => {
    const [row] = await asMigrator<{ canonical: string; sha256: string; number: string }>(
      'select canonical, sha256, number from documents where id = $1',
      [sheetId],
    );
    expect(row?.sha256).toBe(sha256(row?.canonical ?? ''));
    expect(row?.number).toBe((await withShop(shop.shopId, () => getJob(jobId))).number);
    expect(row?.canonical).toContain('Counter cove');
    expect(row?.canonical).not.toMatch(/cost|price|minor|markup|margin|labour|currency/i);
    expect(JSON.stringify(await loadSheet(shop.crew, sheetId))).not.toMatch(
      /cost|price|minor|markup|currency/i,
    );
  });

  it('is never changed, not even by who may do anything', async () => {
    await expect(
      asMigrator('update documents set canonical = $$x$$ where id = $1', [sheetId]),
    ).rejects.toThrow();
    const { sheet } = await loadSheet(shop.crew, sheetId);
    await asMigrator('update circuits set name = $$Other$$ where job_id = $1 and name = $$Sign$$', [jobId]);
    expect((await loadSheet(shop.crew, sheetId)).sheet).toEqual(sheet);
  });

  it('carries cautions, steps, readings with bands, and who let a stop stand', async () => {
    const { sheet } = await loadSheet(shop.crew, sheetId);
    expect(sheet.cautions).toContain('crew.caution.ceiling');
    expect(stepsOfSheet(sheet).map((step) => step.key)).toContain('wiring.step.set-switch');
    for (const { low, nominal, high } of readingsOfSheet(sheet)) {
      expect(low).toBeLessThan(nominal);
      expect(high).toBeGreaterThan(nominal);
    }
    expect(sheet.circuits.map((circuit) => circuit.kind).sort()).toEqual([
      'branch-circuit',
      'resistor-array',
      'tape-run',
    ]);
  });

  it('says which stop stands on whose word, and why', async () => {
    const ports = new FakeSources();
    const dim = await draftedJob(shop, ports);
    const pen = new SurveyPen(shop.estimator, dim);
    const area = await pen.area(0, 'Long cove', [12, 4, 3], 60);
    const long = { ...shop.run, runMetres: 6, feed: 'start', maxDropPct: 1 };
    const subjectId = await pen.circuit(area, 'tape-run', 'Long run', long, {});
    const licensed = { ...shop.owner, licenceNumber: 'EC-1' };
    const reason = 'Dim by wish of the customer.';
    for (const code of ['far-end-too-low', 'dimmest-too-dim', 'driver-overloaded'])
      await overrideFinding(licensed, { jobId: dim, subjectType: 'circuit', subjectId, code, reason }).catch(
        () => null,
      );
    await acceptQuoteOf(shop, dim, ports);
    const { id } = await releaseSheet(shop.owner, dim);
    const [first] = (await loadSheet(shop.owner, id)).sheet.overridden;
    expect(first).toMatchObject({
      code: 'far-end-too-low',
      subject: 'Long run',
      reason,
      licenceNumber: 'EC-1',
    });
  });

  it('supersedes the copy before, on which nobody signs off any more', async () => {
    const again = await acceptedJob(shop);
    await goTo(shop, again, [shop.crew]);
    const first = await releaseSheet(shop.estimator, again);
    const second = await releaseSheet(shop.estimator, again);
    expect(second.revision).toBe(first.revision + 1);
    const events = await withShop(shop.shopId, () => eventsOf([first.id, second.id]));
    expect(events.get(first.id)?.map((one) => one.kind)).toEqual(['released', 'superseded']);
    expect((await loadSheet(shop.crew, first.id)).newer).toMatchObject({ id: second.id });
    expect(await send('sign-off', { name: 'C' }, shop.crew, first.id)).toMatchObject({
      status: 409,
      message: expect.stringContaining('newer copy'),
    });
  });
});

describe('who opens a sheet', () => {
  it('crew on the visit and the desk do; crew of another visit neither reads nor writes', async () => {
    const other = await acceptedJob(shop);
    await goTo(shop, other, [shop.office]);
    const { id } = await releaseSheet(shop.estimator, other);
    await expect(loadSheet(shop.crew, id)).rejects.toMatchObject({ code: 'not-found' });
    await expect(send('acknowledge', { name: 'C' }, shop.crew, id)).rejects.toMatchObject({
      code: 'not-found',
    });
    expect((await loadSheet(shop.office, id)).sheet.number).toBeTruthy();
  });

  it('another shop does not', async () => {
    const stranger = await quoteShop();
    await expect(loadSheet(stranger.owner, sheetId)).rejects.toMatchObject({ code: 'not-found' });
    await expect(send('acknowledge', { name: 'S' }, stranger.owner)).rejects.toMatchObject({
      code: 'not-found',
    });
  });

  it('what is not a sheet is not found', async () => {
    await expect(loadSheet(shop.owner, 'nonsense')).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('the crew’s events', () => {
  it('come in their order: cautions, proof, steps, sign-off', async () => {
    const { sheet } = await loadSheet(shop.crew, sheetId);
    const [step] = stepsOfSheet(sheet);
    const target = step?.id ?? '';
    expect(await send('tick', { target })).toMatchObject({
      status: 409,
      message: expect.stringContaining('cautions'),
    });
    expect(await send('sign-off', { name: 'C' })).toMatchObject({ status: 409 });
    expect(await send('acknowledge', { name: 'C. Rew' })).toMatchObject({ status: 200 });
    expect(await send('tick', { target })).toMatchObject({
      status: 409,
      message: expect.stringContaining('dead'),
    });
    expect(await send('dead-proved', { name: 'C. Rew', note: 'Breaker 14 locked' })).toMatchObject({
      status: 200,
    });
    expect(await send('tick', { target })).toMatchObject({ status: 200 });
    expect(await send('untick', { target })).toMatchObject({ status: 200 });
    expect(await send('tick', { target: 'somewhere' })).toMatchObject({
      status: 422,
      issues: [{ path: 'target' }],
    });
    expect(await send('sign-off', { name: 'C' })).toMatchObject({
      status: 409,
      message: expect.stringContaining('not ticked'),
    });
  });

  it('count once: the same again answers the same, another body under the same id is refused', async () => {
    const event = sheetEvent('note', { target: '', text: 'Lid was missing' });
    const once = await applySheetEvents(shop.crew, sheetId, [event]);
    expect(await applySheetEvents(shop.crew, sheetId, [event])).toEqual(once);
    const twins = await Promise.all(
      [1, 2].map(() =>
        applySheetEvents(shop.crew, sheetId, [
          sheetEvent('note', { target: '', text: 'x' }, { id: event.id }),
        ]),
      ),
    );
    expect(twins.flat().map((answer) => answer.status)).toEqual([409, 409]);
    const { entities } = await loadSheet(shop.crew, sheetId);
    expect(entities.filter((one) => one.id === event.id)).toHaveLength(1);
  });

  it('that are no events name the field', async () => {
    expect(await send('reading', { target: 'x', value: 'much', note: '' })).toMatchObject({
      status: 422,
      issues: [{ path: 'value' }],
    });
    expect(await send('dance', {})).toMatchObject({ status: 422, issues: [{ path: 'kind' }] });
    expect(await send('different', { target: '', text: ' ' })).toMatchObject({
      status: 422,
      issues: [{ path: 'text' }],
    });
  });

  it('on the mains side are measured by people marked qualified; others say “not measured”', async () => {
    const { sheet } = await loadSheet(shop.crew, sheetId);
    const mains = readingsOfSheet(sheet).find((reading) => reading.mains);
    const body = { target: mains?.id, value: mains?.nominal, note: '' };
    expect(await send('reading', body)).toMatchObject({ status: 403 });
    expect(await send('reading', { ...body, value: null })).toMatchObject({ status: 200 });
    expect(await send('reading', body, { ...shop.crew, mainsQualified: true })).toMatchObject({
      status: 200,
    });
  });

  it('are never changed in the database', async () => {
    await expect(
      asMigrator('update sheet_events set target = $$y$$ where sheet_id = $1', [sheetId]),
    ).rejects.toThrow();
  });

  it('lead to the sign-off when all is ticked and measured, and the job goes on', async () => {
    const { sheet } = await loadSheet(shop.crew, sheetId);
    const ticks = stepsOfSheet(sheet).map((step) => sheetEvent('tick', { target: step.id }));
    await applySheetEvents(shop.crew, sheetId, ticks);
    expect(await send('sign-off', { name: 'C. Rew' })).toMatchObject({
      status: 409,
      message: expect.stringContaining('reading'),
    });
    const readings = readingsOfSheet(sheet).map((reading, index) =>
      sheetEvent('reading', {
        target: reading.id,
        value: reading.mains || index === 1 ? null : reading.nominal,
        note: '',
      }),
    );
    const answers = await applySheetEvents(shop.crew, sheetId, readings);
    expect(answers.every((answer) => answer.status === 200)).toBe(true);
    expect(await send('sign-off', { name: 'C. Rew' })).toMatchObject({ status: 200 });
    expect(await send('sign-off', { name: 'C. Rew' })).toMatchObject({ status: 409 });
    const { facts } = await withShop(shop.shopId, () => getJob(jobId));
    expect(facts.sheetsSignedOff).toBe(true);
    expect(await stageOf(jobId)).not.toBe('survey');
    const { latest } = await loadInstall(shop.office, jobId);
    expect(latest?.progress.signedOff?.name).toBe('C. Rew');
  });
});

describe('a job with nothing to wire', () => {
  it('says so', async () => {
    const { id } = await saveCustomer(shop.owner, {
      ...{ name: 'Empty', contactName: '', email: '', phone: '', address: '', consumer: false, notes: '' },
    });
    const job = await createJob(shop.owner, { customerId: id, siteName: 'S', siteAddress: '', title: 'T' });
    await expect(releaseSheet(shop.owner, job.id)).rejects.toMatchObject({ code: 'conflict' });
  });
});
