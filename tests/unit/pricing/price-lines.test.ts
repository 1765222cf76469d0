/** price-lines: the parts add up, always; what is not chosen counts in nothing; refusals name the field. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { priceLines } from '@/lib/pricing';
import { priceLinesCalculation } from '@/lib/pricing/price-lines';
import type { PriceLinesInput } from '@/lib/pricing/schema';

const cents = fc.integer({ min: 0, max: 10_000_000 }).map((n) => (n / 1e4).toFixed(4));
const lineArb = fc.record({
  quantity: fc.integer({ min: 0, max: 500 }),
  unitCost: cents,
  unitLabourHours: fc.integer({ min: 0, max: 400 }).map((n) => (n / 100).toFixed(2)),
  labourRate: cents,
  markup: fc.integer({ min: 0, max: 95 }),
  asMargin: fc.boolean(),
  taxed: fc.boolean(),
  optional: fc.boolean(),
  chosen: fc.boolean(),
});
const quoteArb = fc.record({
  currency: fc.constantFrom('USD', 'JPY', 'KWD'),
  taxRounding: fc.constantFrom('line' as const, 'document' as const),
  lines: fc.array(lineArb, { maxLength: 12 }),
  ratePct: fc.constantFrom(0, 5, 6.25, 8.875, 20, 33.3333),
  discountPct: fc.constantFrom(0, 1, 7.5, 33.333, 100),
  depositPct: fc.constantFrom(0, 30, 33.333, 100),
  overheadPct: fc.constantFrom(0, 12.5),
  contingencyPct: fc.constantFrom(0, 5),
  minimumCharge: fc.constantFrom('0', '250', '99999.99'),
});
type Quote = typeof quoteArb extends fc.Arbitrary<infer T> ? T : never;

function inputOf({ lines, ratePct, ...rest }: Quote): PriceLinesInput {
  return {
    ...rest,
    taxes: [
      { id: 'a', ratePct },
      { id: 'b', ratePct: 1.5 },
    ],
    lines: lines.map(({ markup, asMargin, taxed, ...line }, index) => ({
      ...line,
      id: String(index),
      taxIds: taxed ? ['a', 'b'] : [],
      ...(asMargin ? { marginPct: markup } : { markupPct: markup }),
    })),
  };
}

describe('price-lines', () => {
  it('adds up to the last unit for any quote', () => {
    fc.assert(
      fc.property(quoteArb, (quote) => {
        const input = inputOf(quote);
        const result = priceLines(input);
        const tax = result.taxMinor.reduce((sum, one) => sum + one.minor, 0);
        expect(result.lines.reduce((sum, line) => sum + line.netMinor, 0)).toBe(result.netMinor);
        expect(result.netMinor + tax).toBe(result.grossMinor);
        expect(result.lines.every((line) => Number.isSafeInteger(line.netMinor) && line.netMinor >= 0)).toBe(
          true,
        );
        expect(result.depositMinor).toBeLessThanOrEqual(result.grossMinor);
        input.lines.forEach((line, index) => {
          if (!line.chosen) expect(result.lines[index]).toEqual({ id: line.id, costMinor: 0, netMinor: 0 });
        });
      }),
      { numRuns: 3000 },
    );
  });

  it('is the same whether money comes as strings or as numbers', () => {
    const of = (unitCost: string | number) =>
      priceLines({
        currency: 'USD',
        taxRounding: 'line',
        taxes: [],
        lines: [{ id: 'a', quantity: 3, unitCost, markupPct: 35, taxIds: [] }],
      });
    expect(of('0.1')).toEqual(of(0.1));
    expect(of('1.005').netMinor).toBe(407); // 4.07025
  });

  it('spreads a discount by largest remainder, the earlier line first on a tie', () => {
    const line = { quantity: 1, unitCost: '0.33', markupPct: 0, taxIds: [] };
    const result = priceLines({
      currency: 'USD',
      taxRounding: 'document',
      taxes: [],
      discountPct: 5,
      lines: [
        { ...line, id: 'a' },
        { ...line, id: 'b' },
        { ...line, id: 'c' },
      ],
    });
    // 0.99 less 5 % (0.0495, half-up 0.05): shares 1.67 each, so 2 + 2 + 1.
    expect(result.lines.map((one) => one.netMinor)).toEqual([31, 31, 32]);
  });

  it('lifts a small job to the minimum charge', () => {
    const result = priceLines({
      currency: 'USD',
      taxRounding: 'document',
      taxes: [],
      minimumCharge: 150,
      lines: [{ id: 'a', quantity: 1, unitCost: 40, markupPct: 25, taxIds: [] }],
    });
    expect(result.netMinor).toBe(15_000);
  });

  it('keeps every key, with null where there is no figure', () => {
    expect(priceLines({ currency: 'USD', taxRounding: 'line', lines: [], taxes: [] })).toEqual({
      lines: [],
      netMinor: 0,
      discountMinor: 0,
      taxMinor: [],
      grossMinor: 0,
      depositMinor: 0,
      marginPct: null,
    });
  });

  it('says when the price is below cost', () => {
    const base = {
      currency: 'USD',
      taxRounding: 'line',
      taxes: [],
      lines: [{ id: 'a', quantity: 1, unitCost: 10, markupPct: 10, taxIds: [] }],
    };
    const codes = (extra: object) =>
      runCalculation(priceLinesCalculation, { ...base, ...extra }).findings.map((f) => f.code);
    expect(codes({ discountPct: 20 })).toEqual(['priced-below-cost']);
    expect(codes({ discountPct: 5 })).toEqual([]);
  });

  const good = { id: 'a', quantity: 1, unitCost: 1, markupPct: 0, taxIds: [] as string[] };
  it.each([
    [{ lines: [{ ...good, quantity: -1 }] }, 'lines.0.quantity'],
    [{ lines: [{ ...good, unitCost: '1e5' }] }, 'lines.0.unitCost'],
    [{ lines: [{ ...good, marginPct: 20 }] }, 'lines.0.markupPct'],
    [{ lines: [{ ...good, markupPct: undefined }] }, 'lines.0.markupPct'],
    [{ lines: [{ ...good, taxIds: ['x'] }] }, 'lines.0.taxIds.0'],
    [{ lines: [good, good] }, 'lines.1.id'],
    [{ currency: 'XXX' }, 'currency'],
    [{ discountPct: 101 }, 'discountPct'],
    [{ lines: [{ ...good, markupPct: undefined, marginPct: 100 }] }, 'lines.0.marginPct'],
    [{ surprise: 1 }, 'surprise'],
  ])('refuses %j by naming %s', (change, path) => {
    const input = { currency: 'USD', taxRounding: 'line', taxes: [], lines: [good], ...change };
    try {
      runCalculation(priceLinesCalculation, JSON.parse(JSON.stringify(input)));
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(EngineError);
      expect((error as EngineError).issues[0]?.path).toBe(path);
    }
  });
});
