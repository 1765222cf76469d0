import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildContent } from '@/lib/quotes/content';
import { priceDraft } from '@/lib/quotes/pricing';
import { acceptText } from '@/lib/quotes/schema/accept-text';
import { defaultChoices } from '@/lib/quotes/schema/content';
import type { DraftLine, DraftTerms } from '@/lib/quotes/schema/lines';
import { totalRows } from '@/lib/quotes/schema/present';
import { totalsOf } from '@/lib/quotes/schema/totals';
import { DEFAULT_SETTINGS, type ShopSettings } from '@/lib/units/settings';

const TERMS: DraftTerms = {
  ...{
    id: 'd',
    jobId: 'j',
    depositPct: '30.000000',
    discountPct: '0.000000',
    overheadPct: '0',
    contingencyPct: '0',
  },
  ...{
    taxName: 'Sales tax',
    taxRatePct: '6.250000',
    validDays: 30,
    scopeNote: '',
    exclusions: ' Painting \n\nCeilings',
  },
  ...{ pricesAt: new Date(0), version: 1 },
};

const line = (over: Partial<DraftLine>): DraftLine => ({
  ...{ id: 'l', position: 1, source: 'typed', sourceId: null, sourceSha256: null, sourceDescription: '' },
  ...{
    areaName: '',
    description: 'Work',
    quantity: '1.0000',
    unitCost: '100.000000',
    unitLabourHours: '0.0000',
  },
  ...{
    labourRate: '85.000000',
    markupPct: '35.000000',
    taxable: true,
    optional: false,
    chosen: true,
    version: 1,
  },
  ...over,
});

function contentOf(lines: DraftLine[], terms = TERMS, settings: ShopSettings = DEFAULT_SETTINGS) {
  return buildContent({
    ...{ number: '2041', revision: 2, title: 'Bakery', issuedOn: '2026-12-01', validUntil: '2026-12-31' },
    shop: { name: 'Fernhollow Lighting', licenceNumber: 'EC-000417', email: '', phone: '', address: '' },
    customer: { name: 'Tarn Lane Bakery', contactName: '', email: '', address: '' },
    site: { name: 'Bakery', address: '' },
    ...{
      settings,
      terms,
      lines,
      figures: priceDraft(terms, lines, settings),
      assumedCounts: [],
      cautions: [],
    },
  });
}

const decimal = (most: number, places: number) =>
  fc.integer({ min: 0, max: most * 10 ** places }).map((n) => (n / 10 ** places).toFixed(places));

const anyLine = fc.record({
  quantity: decimal(500, 4),
  unitCost: decimal(2000, 6),
  unitLabourHours: decimal(40, 4),
  markupPct: decimal(300, 2),
  taxable: fc.boolean(),
  optional: fc.boolean(),
  chosen: fc.boolean(),
});

const anyQuote = fc.record({
  lines: fc.array(anyLine, { maxLength: 12 }),
  discountPct: decimal(100, 2),
  overheadPct: decimal(50, 2),
  contingencyPct: decimal(50, 2),
  depositPct: decimal(100, 2),
  taxRatePct: decimal(30, 3),
  currency: fc.constantFrom('USD', 'JPY', 'KWD'),
  taxRounding: fc.constantFrom('line' as const, 'document' as const),
});

describe('a sent quote’s totals', () => {
  it('are the draft’s, to the last minor unit, figured from what was frozen alone', () => {
    fc.assert(
      fc.property(anyQuote, ({ lines, currency, taxRounding, ...rates }) => {
        const settings = { ...DEFAULT_SETTINGS, currency, taxRounding };
        const draft = lines.map((over, index) => line({ ...over, id: `l${index}` }));
        const content = contentOf(draft, { ...TERMS, ...rates }, settings);
        expect(totalsOf(content, defaultChoices(content))).toEqual(content.totals);
      }),
      { numRuns: 300 },
    );
  });

  it('follow the customer’s choices by exactly the amounts that are shown', () => {
    const content = contentOf([
      line({ id: 'base' }),
      line({ id: 'a', optional: true, chosen: true, unitCost: '10.000000' }),
      line({ id: 'b', optional: true, chosen: false, unitCost: '20.000000' }),
    ]);
    expect(content.options.map((option) => option.amountMinor)).toEqual([1350, 2700]);
    expect(totalsOf(content, []).netMinor).toBe(13_500);
    expect(totalsOf(content, ['a', 'b']).netMinor).toBe(13_500 + 1350 + 2700);
  });

  it('count an addition that nobody offered in nothing', () => {
    const content = contentOf([line({ id: 'base' })]);
    expect(totalsOf(content, ['other'])).toEqual(totalsOf(content, []));
  });

  it('are as worked by hand: 100.00 at 35 % is 135.00, 6.25 % tax 8.44, deposit 30 % 43.03', () => {
    const { totals } = contentOf([line({})]);
    expect(totals).toEqual({
      ...{ linesMinor: 13_500, discountMinor: 0, netMinor: 13_500, taxMinor: 844 },
      ...{ totalMinor: 14_344, depositMinor: 4303 },
    });
  });
});

describe('what is published', () => {
  it('is an explicit list without a figure of cost', () => {
    const content = contentOf([line({ unitCost: '77.770000', unitLabourHours: '3.3300' })]);
    expect(Object.keys(content).sort()).toEqual(
      [
        ...['assumedCounts', 'cautions', 'customer', 'exclusions', 'issuedOn', 'lines', 'number', 'options'],
        ...[
          'revision',
          'schema',
          'scopeNote',
          'settings',
          'shop',
          'site',
          'terms',
          'title',
          'totals',
          'validUntil',
        ],
      ].sort(),
    );
    expect(Object.keys(content.lines[0] ?? {})).toEqual(['id', 'area', 'text', 'amountMinor', 'taxable']);
    expect(JSON.stringify(content)).not.toMatch(/77\.77|3\.33|unitCost|labour|markup|margin|overhead/);
  });

  it('says percentages and exclusions plainly', () => {
    const content = contentOf([line({})]);
    expect(content.terms).toEqual({
      discountPct: '0',
      depositPct: '30',
      taxName: 'Sales tax',
      taxRatePct: '6.25',
    });
    expect(content.exclusions).toEqual(['Painting', 'Ceilings']);
  });
});

describe('the words that are agreed to', () => {
  const content = contentOf([
    line({ id: 'base' }),
    line({ id: 'a', optional: true, description: 'Presence switch', unitCost: '10.000000' }),
  ]);

  it('name the revision, the shop, the total, the additions and the deposit', () => {
    const text = acceptText(content, ['a'], totalsOf(content, ['a']));
    expect(text).toBe(
      'I accept quote 2041, revision 2, of Fernhollow Lighting, for a total of $157.78. With these additions: ' +
        'Presence switch. A deposit of $47.33 is due now. I have read what is included, what is not, and what was assumed.',
    );
  });

  it('say so when the additions are left out, and nothing of a deposit that is not asked for', () => {
    const text = acceptText(content, [], { totalMinor: 14_344, depositMinor: 0 });
    expect(text).toContain('Without the additions that were offered.');
    expect(text).not.toContain('deposit');
  });
});

describe('the rows under a quote', () => {
  it('leave out what is not there', () => {
    const plain = contentOf([line({})]);
    expect(totalRows(plain, plain.totals).map((row) => row.key)).toEqual(['net', 'tax', 'total', 'deposit']);
    const cut = contentOf([line({})], { ...TERMS, discountPct: '10', depositPct: '0' });
    expect(totalRows(cut, cut.totals).map((row) => [row.key, row.amount])).toEqual([
      ['lines', '135.00'],
      ['discount', '− 13.50'],
      ['net', '121.50'],
      ['tax', '7.59'],
      ['total', '$129.09'],
    ]);
  });
});
