import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { addSource, bringUpToDate, moveLine, openDraft, removeLine, saveLine } from '@/lib/quotes/commands';
import { composeQuote } from '@/lib/quotes/compose';
import { deskQuote, draftState } from '@/lib/quotes/queries';
import { closeDatabase, withShop } from '@/lib/platform/db';
import { priceLines } from '@/lib/pricing/price-lines';
import {
  asMigrator,
  changeTerms,
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

const stateOf = async (jobId: string, ports: FakeSources) => {
  const state = await withShop(shop.shopId, () => draftState(shop.shopId, jobId, ports));
  if (!state) throw new Error('no draft');
  return state;
};

describe('a draft', () => {
  it('starts with a line for each change line and circuit, at today’s prices', async () => {
    const ports = new FakeSources();
    const jobId = await quoteJob(shop);
    await openDraft(shop.estimator, { jobId }, ports);
    const { lines } = await stateOf(jobId, ports);
    expect(lines.map((line) => [line.source, line.areaName, line.unitCost, line.unitLabourHours])).toEqual([
      ['change-line', 'Back room', '1110.000000', '6.0000'],
      ['circuit', 'Counter', '110.250000', '3.5000'],
    ]);
  });

  it('is one per job: opening it again adds nothing', async () => {
    const ports = new FakeSources();
    const jobId = await quoteJob(shop);
    const first = await openDraft(shop.estimator, { jobId }, ports);
    const second = await openDraft(shop.estimator, { jobId }, ports);
    expect(second).toEqual(first);
    expect((await stateOf(jobId, ports)).lines).toHaveLength(2);
  });

  it('totals as the engine does, chosen additions counted and others not', async () => {
    const ports = new FakeSources();
    const jobId = await draftedJob(shop, ports);
    await changeTerms(shop, jobId, ports, { discountPct: '5', contingencyPct: '4', overheadPct: '10' });
    const { lines, figures } = await stateOf(jobId, ports);
    const engine = priceLines({
      currency: 'USD',
      taxRounding: 'document',
      lines: lines.map((line) => ({
        id: line.id,
        quantity: line.quantity,
        unitCost: line.unitCost,
        unitLabourHours: line.unitLabourHours,
        labourRate: line.labourRate,
        markupPct: 35,
        taxIds: ['t'],
        chosen: line.chosen,
      })),
      taxes: [{ id: 't', ratePct: 6.25 }],
      discountPct: 5,
      depositPct: 30,
      overheadPct: 10,
      contingencyPct: 4,
    });
    expect(figures.totals).toMatchObject({
      netMinor: engine.netMinor,
      discountMinor: engine.discountMinor,
      taxMinor: engine.taxMinor[0]?.minor,
      totalMinor: engine.grossMinor,
      depositMinor: engine.depositMinor,
    });
    expect(figures.marginPct).toBe(engine.marginPct);
  });

  it('asks for no deposit where the job runs on terms', async () => {
    const ports = new FakeSources();
    const jobId = await draftedJob(shop, ports);
    await asMigrator(`update jobs set deposit_rule = 'terms' where id = $1`, [jobId]);
    expect((await stateOf(jobId, ports)).figures.totals.depositMinor).toBe(0);
  });

  it('moves, removes and takes lines back', async () => {
    const ports = new FakeSources();
    const jobId = await draftedJob(shop, ports);
    const [first, second] = (await stateOf(jobId, ports)).lines;
    if (!first || !second) throw new Error('lines are missing');
    await moveLine(shop.estimator, { jobId, id: second.id, direction: 'up' });
    expect((await stateOf(jobId, ports)).lines[0]?.id).toBe(second.id);
    await removeLine(shop.estimator, { jobId, id: first.id, baseVersion: first.version });
    const without = await stateOf(jobId, ports);
    expect(without.unused.map((source) => source.id)).toEqual([first.sourceId]);
    await addSource(shop.estimator, { jobId, sourceId: first.sourceId ?? '' }, ports);
    expect((await stateOf(jobId, ports)).unused).toEqual([]);
  });

  it('shows both when two people change the same line', async () => {
    const ports = new FakeSources();
    const jobId = await quoteJob(shop);
    await openDraft(shop.estimator, { jobId }, ports);
    const { id } = await saveLine(shop.estimator, typedLine(jobId));
    await saveLine(shop.owner, { ...typedLine(jobId, { description: 'Theirs' }), id, baseVersion: 1 });
    await expect(
      saveLine(shop.estimator, { ...typedLine(jobId, { description: 'Mine' }), id, baseVersion: 1 }),
    ).rejects.toMatchObject({ code: 'conflict', current: { description: 'Theirs', version: 2 } });
  });

  it('keeps parts and hours of a line from the survey out of the form’s reach', async () => {
    const ports = new FakeSources();
    const jobId = await quoteJob(shop);
    await openDraft(shop.estimator, { jobId }, ports);
    const line = (await stateOf(jobId, ports)).lines[0];
    if (!line) throw new Error('no line');
    const edit = { ...typedLine(jobId), areaName: line.areaName, id: line.id, baseVersion: 1 };
    const asIs = { quantity: line.quantity, unitCost: line.unitCost, unitLabourHours: line.unitLabourHours };
    await expect(saveLine(shop.estimator, { ...edit, ...asIs, unitCost: '1' })).rejects.toMatchObject({
      code: 'invalid-input',
      issues: [{ path: 'unitCost' }],
    });
    await saveLine(shop.estimator, { ...edit, ...asIs, markupPct: '50' });
    expect((await stateOf(jobId, ports)).lines[0]?.markupPct).toBe('50.000000');
  });

  it('refuses what can not be written exactly, naming the field', async () => {
    const ports = new FakeSources();
    const jobId = await quoteJob(shop);
    await openDraft(shop.estimator, { jobId }, ports);
    await expect(
      saveLine(shop.estimator, typedLine(jobId, { quantity: '99999999', unitCost: '999999999' })),
    ).rejects.toMatchObject({ code: 'invalid-input', issues: [{ path: 'unitCost' }] });
    expect((await stateOf(jobId, ports)).lines).toHaveLength(2);
  });
});

describe('a line that is out of date', () => {
  it('is marked when its source or a part’s price changed, and brought up to date by one command', async () => {
    const ports = new FakeSources();
    const jobId = await draftedJob(shop, ports);
    const [line] = ports.lines;
    if (!line) throw new Error('no line');
    line.description = '14 old four-tube fixtures out, 14 flat panels in';
    line.parts = [{ partId: ports.panel, quantity: '14' }];
    ports.priceOf.set(ports.tape, { unitCost: '12', sku: 'TAPE-24', name: 'Tape, a metre' });
    const before = await stateOf(jobId, ports);
    expect(before.checks.map((check) => check.changes.map((change) => change.what))).toEqual([
      ['description', 'parts-cost'],
      ['parts-cost'],
      [],
      [],
      [],
    ]);
    expect(before.blockers.map((blocker) => blocker.code)).toEqual(['out-of-date', 'out-of-date']);
    const updated = await bringUpToDate(shop.estimator, { jobId }, ports);
    expect(updated.lines.map((one) => one.changes)).toEqual([
      [
        {
          what: 'description',
          before: '12 old four-tube fixtures out, 12 flat panels in',
          after: '14 old four-tube fixtures out, 14 flat panels in',
        },
        { what: 'parts-cost', before: '1110.000000', after: '1295.000000' },
      ],
      [{ what: 'parts-cost', before: '110.250000', after: '117.600000' }],
    ]);
    expect((await stateOf(jobId, ports)).blockers).toEqual([]);
  });

  it('keeps words that were edited as long as the source’s own words stay', async () => {
    const ports = new FakeSources();
    const jobId = await quoteJob(shop);
    await openDraft(shop.estimator, { jobId }, ports);
    const [line] = (await stateOf(jobId, ports)).lines;
    if (!line) throw new Error('no line');
    const { quantity, unitCost, unitLabourHours, labourRate, markupPct, areaName } = line;
    await saveLine(shop.estimator, {
      ...typedLine(jobId, { description: 'Bright new panels in the back room' }),
      ...{
        quantity,
        unitCost,
        unitLabourHours,
        labourRate,
        markupPct,
        areaName,
        id: line.id,
        baseVersion: 1,
      },
    });
    ports.priceOf.set(ports.panel, { unitCost: '95', sku: 'PANEL-22', name: 'Flat panel' });
    await bringUpToDate(shop.estimator, { jobId }, ports);
    const fresh = (await stateOf(jobId, ports)).lines[0];
    expect(fresh).toMatchObject({
      description: 'Bright new panels in the back room',
      unitCost: '1140.000000',
    });
  });

  it('is taken out when its source is gone', async () => {
    const ports = new FakeSources();
    const jobId = await draftedJob(shop, ports);
    ports.runs = [];
    expect((await stateOf(jobId, ports)).blockers.map((blocker) => blocker.code)).toEqual(['source-gone']);
    const { removed } = await bringUpToDate(shop.estimator, { jobId }, ports);
    expect(removed).toEqual(['9.8 m of warm light, one driver in the store cupboard']);
    expect((await stateOf(jobId, ports)).blockers).toEqual([]);
  });
});

describe('what can not be sent', () => {
  it('a line with an open stop, named in the refusal', async () => {
    const ports = new FakeSources();
    const jobId = await draftedJob(shop, ports);
    const [run] = ports.runs;
    if (!run) throw new Error('no run');
    run.openStops = 1;
    await bringUpToDate(shop.estimator, { jobId }, ports);
    const refusal = await sendAsIs(shop, jobId, ports).catch((error: unknown) => error);
    expect(refusal).toMatchObject({ code: 'conflict' });
    expect(String((refusal as Error).message)).toContain('Counter: 9.8 m of warm light');
    const documents = await asMigrator(`select id from documents where job_id = $1`, [jobId]);
    expect(documents).toEqual([]);
  });

  it('a part without a price, and a draft without lines', async () => {
    const ports = new FakeSources();
    const jobId = await draftedJob(shop, ports);
    ports.priceOf.delete(ports.tape);
    expect((await stateOf(jobId, ports)).blockers.map((blocker) => blocker.code)).toContain('no-price');
    const empty = new FakeSources();
    empty.lines = [];
    empty.runs = [];
    const other = await quoteJob(shop);
    await openDraft(shop.estimator, { jobId: other }, empty);
    expect((await stateOf(other, empty)).blockers.map((blocker) => blocker.code)).toEqual(['no-lines']);
  });
});

describe('who sees what', () => {
  it('gives cost and margin to estimators and none of it to the office', async () => {
    const ports = new FakeSources();
    const jobId = await draftedJob(shop, ports);
    const estimator = await deskQuote(shop.estimator, jobId, ports);
    expect(estimator.draft?.cost?.costMinor).toBeGreaterThan(0);
    const office = await deskQuote(shop.office, jobId, ports);
    expect(office.draft?.cost).toBeNull();
    expect(office.draft?.lines.every((line) => line.figures === null)).toBe(true);
    expect(JSON.stringify(office.draft)).not.toMatch(/1110|unitCost|"markupPct":"35/);
    expect(office.draft?.totals.totalMinor).toBe(estimator.draft?.totals.totalMinor);
  });

  it('shows nothing of it to another shop', async () => {
    const ports = new FakeSources();
    const jobId = await draftedJob(shop, ports);
    const other = await quoteShop('Marlpit Electric');
    await expect(deskQuote(other.owner, jobId, ports)).rejects.toMatchObject({ code: 'not-found' });
    await expect(saveLine(other.owner, typedLine(jobId))).rejects.toMatchObject({ code: 'not-found' });
    expect((await deskQuote(shop.owner, jobId, ports)).draft?.lines).toHaveLength(5);
  });
});

describe('with the survey’s own queries', () => {
  it('takes over change lines and circuits with the parts’ prices of today, and says which counts it assumes', async () => {
    const jobId = await quoteJob(shop);
    const id = () => randomUUID();
    const [areaId, partId, oldId] = [id(), id(), id()];
    const of = [shop.shopId, jobId, areaId];
    await asMigrator(`insert into areas (shop_id, job_id, id, name) values ($1, $2, $3, 'Nave')`, of);
    await asMigrator(
      `insert into parts (shop_id, id, sku, kind, name, labour_hours) values ($1, $2, $3, 'luminaire', 'Flat panel', 0.5)`,
      [shop.shopId, partId, partId],
    );
    for (const [cost, ago] of [
      ['80', '2 days'],
      ['92.5', '1 day'],
      ['999', '-1 day'],
    ])
      await asMigrator(
        `insert into part_prices (shop_id, part_id, unit_cost, currency, valid_from) values ($1, $2, $3, 'USD', now() - $4::interval)`,
        [shop.shopId, partId, cost, ago],
      );
    await asMigrator(
      `insert into existing_luminaires (shop_id, job_id, area_id, id, luminaire_type, quantity, count_confidence, watts)
       values ($1, $2, $3, $4, 'four-tube fixture', 12, 'estimated', 112)`,
      [...of, oldId],
    );
    await asMigrator(
      `insert into change_lines (shop_id, job_id, area_id, existing_luminaire_id, action, old_quantity, new_part_id, new_quantity)
       values ($1, $2, $3, $4, 'new-luminaire', 12, $5, 12)`,
      [...of, oldId, partId],
    );
    await openDraft(shop.estimator, { jobId });
    const state = await withShop(shop.shopId, () => draftState(shop.shopId, jobId));
    expect(state?.lines).toMatchObject([
      { source: 'change-line', areaName: 'Nave', unitCost: '1110.000000', unitLabourHours: '6.0000' },
    ]);
    expect(state?.blockers).toEqual([]);
    const composed = await withShop(shop.shopId, () => composeQuote(shop.shopId, jobId, new Date()));
    expect(composed?.content.assumedCounts).toEqual([
      'Nave: 12 × four-tube fixture (not counted on site; a different count changes the price)',
    ]);
  });
});
