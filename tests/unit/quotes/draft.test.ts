import { describe, expect, it } from 'vitest';
import { blockersOf, checkLines } from '@/lib/quotes/blockers';
import { plainDecimal } from '@/lib/quotes/content';
import { validUntilOf } from '@/lib/quotes/dates';
import { lineForm, termsForm } from '@/lib/quotes/schema/forms';
import type { DraftLine, PricedSource } from '@/lib/quotes/schema/lines';
import { moved, readingOrder } from '@/lib/quotes/schema/order';
import { changesOf, fieldsFrom } from '@/lib/quotes/stale';

const source = (over: Partial<PricedSource> = {}): PricedSource => ({
  ...{
    kind: 'circuit',
    id: 's',
    areaName: 'Counter',
    description: '9.8 m of warm light',
    openStops: 0,
    parts: [],
  },
  ...{ labourHours: '3.5', sourceSha256: 'a', unitCost: '110.250000', unpriced: [] },
  ...over,
});

const lineOf = (from: PricedSource): DraftLine => ({
  ...{ id: 'l', position: 1, labourRate: '85', markupPct: '35', taxable: true, optional: false },
  ...{ chosen: true, version: 1 },
  ...fieldsFrom(from),
});

describe('a line beside its source', () => {
  it('is up to date however the column writes the same figure', () => {
    const line = { ...lineOf(source()), unitCost: '110.25', unitLabourHours: '3.5000' };
    expect(changesOf(line, source())).toEqual([]);
  });

  it.each([
    [{ unitCost: '120.000000' }, 'parts-cost'],
    [{ labourHours: '4' }, 'hours'],
    [{ areaName: 'Window' }, 'area'],
    [{ description: '10 m of warm light' }, 'description'],
    [{ sourceSha256: 'b' }, 'figures'],
  ])('tells what changed: %j', (over, what) => {
    expect(changesOf(lineOf(source()), source(over)).map((change) => change.what)).toEqual([what]);
  });

  it('lets an edited description be', () => {
    expect(changesOf({ ...lineOf(source()), description: 'Edited' }, source())).toEqual([]);
  });
});

describe('what keeps a draft from going out', () => {
  const codes = (lines: DraftLine[], sources: PricedSource[], accepted: number | null = null, total = 100) =>
    blockersOf(checkLines(lines, sources, changesOf), accepted, total).map((blocker) => blocker.code);

  it('is nothing for an up-to-date line', () => expect(codes([lineOf(source())], [source()])).toEqual([]));
  it('is an open stop', () =>
    expect(codes([lineOf(source())], [source({ openStops: 2 })])).toEqual(['open-stop']));
  it('is a source that is gone', () => expect(codes([lineOf(source())], [])).toEqual(['source-gone']));
  it('is a part without a price', () =>
    expect(codes([lineOf(source())], [source({ unpriced: ['p'] })])).toEqual(['no-price']));
  it('is an acceptance, an empty draft, a total of nothing', () => {
    expect(codes([lineOf(source())], [source()], 1)).toEqual(['accepted']);
    expect(codes([], [])).toEqual(['no-lines']);
    expect(codes([{ ...lineOf(source()), optional: true }], [source()])).toEqual(['no-lines']);
    expect(codes([lineOf(source())], [source()], null, 0)).toEqual(['nothing-to-charge']);
  });
  it('names the line as the customer reads it', () => {
    const [blocker] = blockersOf(
      checkLines([lineOf(source())], [source({ openStops: 1 })], changesOf),
      null,
      100,
    );
    expect(blocker).toMatchObject({ line: 'Counter: 9.8 m of warm light', lineId: 'l' });
  });
});

describe('the order of lines', () => {
  const lines = [
    { id: 'a1', areaName: 'A' },
    { id: 'b1', areaName: 'B' },
    { id: 'a2', areaName: 'A' },
    { id: 'c1', areaName: '' },
  ];
  it('is by area as it first comes', () =>
    expect(readingOrder(lines).map((line) => line.id)).toEqual(['a1', 'a2', 'b1', 'c1']));
  it.each([
    ['a2', 'up', ['a2', 'a1', 'b1', 'c1']],
    ['a1', 'down', ['a2', 'a1', 'b1', 'c1']],
    ['a2', 'down', ['b1', 'a1', 'a2', 'c1']],
    ['b1', 'up', ['b1', 'a1', 'a2', 'c1']],
    ['a1', 'up', ['a1', 'a2', 'b1', 'c1']],
    ['c1', 'down', ['a1', 'a2', 'b1', 'c1']],
    ['nobody', 'up', ['a1', 'a2', 'b1', 'c1']],
  ] as const)('moves %s %s', (id, direction, order) => expect(moved(lines, id, direction)).toEqual(order));
});

describe('what is typed', () => {
  const line = {
    ...{ jobId: '7c0e2c8e-52c5-4b39-9d9a-0a4f6e7f1d11', areaName: '', description: 'x', quantity: '1' },
    ...{ unitCost: '1', unitLabourHours: '0', labourRate: '0', markupPct: '0' },
    ...{ taxable: true, optional: false, chosen: true },
  };
  it.each([
    ['.5', '0.5'],
    ['1,234.50', '1234.50'],
    ['12,5', '12.5'],
    [' 7 ', '7'],
  ])('takes %j as %s', (typed, stored) =>
    expect(lineForm.parse({ ...line, unitCost: typed }).unitCost).toBe(stored),
  );
  it.each(['', 'abc', '-1', '1e5', '1.2.3', 'NaN', 'Infinity', '1234567890', '1.1234567', '1,23,4'])(
    'refuses %j by its field',
    (typed) => {
      const answer = lineForm.safeParse({ ...line, unitCost: typed });
      expect(answer.error?.issues[0]?.path).toEqual(['unitCost']);
    },
  );
  it('holds percentages and days to their bounds', () => {
    const terms = {
      ...{ jobId: line.jobId, baseVersion: 1, depositPct: '101', discountPct: '100', overheadPct: '0' },
      ...{
        contingencyPct: '0',
        taxName: 'VAT',
        taxRatePct: '20',
        validDays: '0',
        scopeNote: '',
        exclusions: '',
      },
    };
    const paths = termsForm.safeParse(terms).error?.issues.map((issue) => issue.path[0]);
    expect(paths).toEqual(['depositPct', 'validDays']);
  });
  it('is shown again without the column’s zeros', () => {
    expect(['30.000000', '6.250000', '0', '100', '0.500'].map(plainDecimal)).toEqual([
      '30',
      '6.25',
      '0',
      '100',
      '0.5',
    ]);
  });
});

describe('the last day', () => {
  it('is counted on the shop’s own calendar, over a change of the clocks and at the year’s end', () => {
    expect(validUntilOf(new Date('2026-12-02T03:00:00Z'), 30, 'America/New_York')).toBe('2026-12-31');
    expect(validUntilOf(new Date('2026-12-02T03:00:00Z'), 30, 'Europe/London')).toBe('2027-01-01');
    expect(validUntilOf(new Date('2026-03-07T12:00:00Z'), 1, 'America/New_York')).toBe('2026-03-08');
  });
});
