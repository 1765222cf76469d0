/** price-lines against its twin in whole-number fractions, over thousands of random quotes, and where halves meet. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { priceLines } from '@/lib/pricing';
import { MINOR_DIGITS } from '@/lib/pricing/currencies';
import type { PriceLinesInput } from '@/lib/pricing/schema';
import { exactQuote } from '../../support/exact-quote';

/** Few digits make halves and ties frequent, many make long decimals. */
const decimal = (most: number) =>
  fc.oneof(
    fc.integer({ min: 0, max: most * 20 }).map((n) => (n / 20).toFixed(2)),
    fc.integer({ min: 0, max: most }).map((n) => n),
    fc
      .bigInt(0n, BigInt(most) * 1_000_000n)
      .map((n) => `${n / 1_000_000n}.${String(n % 1_000_000n).padStart(6, '0')}`),
  );
const percent = fc.constantFrom(0, 5, 7.5, 8.25, 12.5, 33.333333, 100);
const line = fc
  .record({
    quantity: decimal(200),
    unitCost: decimal(2000),
    labour: fc.option(fc.record({ unitLabourHours: decimal(8), labourRate: decimal(150) })),
    price: fc.oneof(
      fc.constantFrom(0, 15, 33.33, 250).map((markupPct) => ({ markupPct })),
      fc.constantFrom(0, 20, 37.5, 99.999).map((marginPct) => ({ marginPct })),
    ),
    taxIds: fc.subarray(['a', 'b']),
    optional: fc.option(fc.boolean(), { nil: undefined }),
    chosen: fc.option(fc.boolean(), { nil: undefined }),
  })
  .map(({ labour, price, ...rest }) => ({ ...rest, ...(labour ?? {}), ...price }));

const quote: fc.Arbitrary<PriceLinesInput> = fc
  .record({
    currency: fc.constantFrom(...Object.keys(MINOR_DIGITS)),
    taxRounding: fc.constantFrom('line' as const, 'document' as const),
    lines: fc.array(line, { maxLength: 15 }),
    rates: fc.tuple(percent, percent),
    discountPct: percent,
    depositPct: percent,
    overheadPct: percent,
    contingencyPct: percent,
    minimumCharge: fc.option(decimal(5000), { nil: undefined }),
  })
  .map(({ lines, rates, ...rest }) => ({
    ...rest,
    taxes: [
      { id: 'a', ratePct: rates[0] },
      { id: 'b', ratePct: rates[1] },
    ],
    lines: lines.map((one, index) => ({ ...one, id: String(index) })),
  }));

describe('price-lines and its twin in fractions', () => {
  it('agree to the last minor unit', () => {
    fc.assert(
      fc.property(quote, (input) => {
        const { marginPct, ...result } = priceLines(input);
        expect(result).toEqual(exactQuote(input, MINOR_DIGITS[input.currency] ?? 2));
        const cost = result.lines.reduce((all, one) => all + one.costMinor, 0);
        if (result.netMinor === 0) expect(marginPct).toBeNull();
        else expect(marginPct).toBeCloseTo(((result.netMinor - cost) / result.netMinor) * 100, 6);
      }),
      { numRuns: 4000 },
    );
  });

  it('keep the discount of each line within one minor unit of its exact share', () => {
    fc.assert(
      fc.property(quote, (input) => {
        const full = priceLines({ ...input, discountPct: 0 });
        const off = priceLines(input);
        full.lines.forEach((one, index) => {
          const share = full.netMinor === 0 ? 0 : (off.discountMinor * one.netMinor) / full.netMinor;
          expect(Math.abs(one.netMinor - (off.lines[index]?.netMinor ?? 0) - share)).toBeLessThan(1 + 1e-6);
        });
      }),
      { numRuns: 1000 },
    );
  });

  it('round halves up, at each place where something is rounded', () => {
    const one = (extra: Partial<PriceLinesInput>, unitCost = '0.10') =>
      priceLines({
        currency: 'USD',
        taxRounding: 'document',
        taxes: [{ id: 't', ratePct: 5 }],
        lines: [{ id: 'a', quantity: 1, unitCost, markupPct: 0, taxIds: ['t'] }],
        ...extra,
      });
    expect(one({}, '0.105').netMinor).toBe(11);
    expect(one({}).taxMinor).toEqual([{ id: 't', minor: 1 }]); // 0.5
    expect(one({ discountPct: 5 })).toMatchObject({ discountMinor: 1, netMinor: 9 }); // 0.5
    expect(
      one({
        taxes: [],
        lines: [{ id: 'a', quantity: 1, unitCost: 1.01, markupPct: 0, taxIds: [] }],
        depositPct: 50,
      }).depositMinor,
    ).toBe(51);
  });
});
