/**
 * price-lines against published money arithmetic (tests/reference/data/money-arithmetic.json names each source:
 * markup against margin and bid build-up from trade articles, VAT rounding from HMRC VATREC12010 / VAT Notice 700
 * 17.5). MO-06 (US sales tax) is from memory and stands beside the gating ones.
 */
import { describe, expect, it } from 'vitest';
import { priceLines } from '@/lib/pricing';
import entries from './data/money-arithmetic.json';

type Entry = { id: string; inputs: Record<string, unknown>; expected: Record<string, unknown> };
const entry = (id: string): Entry => {
  const found = (entries as Entry[]).find((one) => one.id === id);
  if (!found) throw new Error(id);
  return found;
};
const usd = { currency: 'USD', taxRounding: 'document' as const, taxes: [] };
const line = { id: 'a', quantity: 1, taxIds: [] as string[] };

describe('markup, margin and build-up', () => {
  it('MO-01: a 20 % margin on 1,000 is 1,250', () => {
    const { inputs, expected } = entry('MO-01');
    const result = priceLines({
      ...usd,
      lines: [
        { ...line, unitCost: inputs['cost'] as number, marginPct: (inputs['target_margin'] as number) * 100 },
      ],
    });
    expect(result.netMinor).toBe((expected['price'] as number) * 100);
    expect(result.marginPct).toBeCloseTo(20, 9);
  });

  it('MO-02: a 20 % markup is a 16.667 % margin', () => {
    const { inputs, expected } = entry('MO-02');
    const result = priceLines({
      ...usd,
      lines: [{ ...line, unitCost: inputs['cost'] as number, markupPct: (inputs['markup'] as number) * 100 }],
    });
    expect(result.netMinor).toBe((expected['price'] as number) * 100);
    expect((result.marginPct ?? 0) / 100).toBeCloseTo(expected['margin'] as number, 4);
  });

  it('MO-04: overhead belongs to the cost that profit is put on', () => {
    const { inputs, expected } = entry('MO-04');
    const direct =
      (inputs['material'] as number) + (inputs['labor'] as number) + (inputs['direct_job'] as number);
    const result = priceLines({
      ...usd,
      overheadPct: ((inputs['overhead'] as number) / direct) * 100,
      lines: [{ ...line, unitCost: direct, markupPct: (inputs['profit_markup'] as number) * 100 }],
    });
    expect(result.netMinor / 100).toBeCloseTo(expected['bid'] as number, 2);
    expect((result.marginPct ?? 0) / 100).toBeCloseTo(expected['profit_margin'] as number, 4);
  });

  it('MO-08: 30 % of 18,400 is a deposit of 5,520', () => {
    const { expected } = entry('MO-08');
    const result = priceLines({
      ...usd,
      depositPct: 30,
      lines: [{ ...line, unitCost: 18400, markupPct: 0 }],
    });
    expect(result.depositMinor).toBe((expected['payments'] as number[])[0]! * 100);
  });

  it('MO-09: materials, labour, lift, disposal and permit with 5 % contingency (common practice)', () => {
    const { expected } = entry('MO-09');
    const result = priceLines({
      ...usd,
      contingencyPct: 5,
      lines: [
        { ...line, id: 'materials', unitCost: 6400, markupPct: 25 },
        { ...line, id: 'labour', unitCost: 0, unitLabourHours: '46.5', labourRate: 78, markupPct: 0 },
        { ...line, id: 'lift', quantity: 3, unitCost: 310, markupPct: 0 },
        { ...line, id: 'disposal', quantity: 320, unitCost: '0.9', markupPct: 0 },
        { ...line, id: 'permit', unitCost: 185, markupPct: 0 },
      ],
    });
    expect(result.netMinor / 100).toBeCloseTo(expected['total_before_tax'] as number, 2);
  });
});

describe('tax rounding', () => {
  it.each([
    ['MO-05', 'GBP', 20],
    ['MO-06', 'USD', 8.25],
  ])('%s: per line and per document', (id, currency, ratePct) => {
    const { inputs, expected } = entry(id);
    const price = (taxRounding: 'line' | 'document') =>
      priceLines({
        currency,
        taxRounding,
        taxes: [{ id: 't', ratePct }],
        lines: (inputs['lines'] as string[]).map((unitCost, index) => ({
          ...line,
          id: String(index),
          unitCost,
          markupPct: 0,
          taxIds: ['t'],
        })),
      });
    expect((price('line').netMinor / 100).toFixed(2)).toBe(expected['net']);
    expect((price('line').taxMinor[0]!.minor / 100).toFixed(2)).toBe(expected['vat_per_line_rounded']);
    expect((price('document').taxMinor[0]!.minor / 100).toFixed(2)).toBe(expected['vat_on_total_half_up']);
  });
});
