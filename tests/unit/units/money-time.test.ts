/** Money in minor units and the shop's settings; days and times by zone, over changes of the clocks too. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import * as z from 'zod/mini';
import {
  CURRENCY_CODES,
  dayIn,
  DEFAULT_SETTINGS,
  formatDate,
  formatDateTime,
  formatLocalTime,
  formatMoney,
  minorDigits,
  minorToDecimal,
  parseDay,
  parseLocalTime,
  parseMoney,
} from '@/lib/units';
import { shopSettings } from '@/lib/units/settings-schema';

const usd = { currency: 'USD', locale: 'en-US' } as const;
const jpy = { currency: 'JPY', locale: 'en-US' } as const;
const kwd = { currency: 'KWD', locale: 'en-US' } as const;

describe('money', () => {
  it('has as many digits as ISO 4217 gives, by the platform’s own table', () => {
    for (const currency of CURRENCY_CODES) {
      const { maximumFractionDigits } = new Intl.NumberFormat('en', {
        style: 'currency',
        currency,
      }).resolvedOptions();
      expect([currency, minorDigits(currency)]).toEqual([currency, maximumFractionDigits]);
    }
    expect(minorDigits('XXX')).toBeNull();
    expect(minorDigits('constructor')).toBeNull();
  });

  it('is shown with symbol, groups and digits of its currency', () => {
    expect(formatMoney(123450, usd)).toBe('$1,234.50');
    expect(formatMoney(-5, usd)).toBe('−$0.05');
    expect(formatMoney(1234, jpy)).toBe('¥1,234');
    expect(formatMoney(1234, kwd)).toBe('KWD\u00a01.234');
    expect(formatMoney('9223372036854775807', usd, { symbol: false })).toBe('92,233,720,368,547,758.07');
    expect(formatMoney(100, { currency: 'GBP', locale: 'en-GB' })).toBe('£1.00');
  });

  it.each([
    ['1,234.50', 123450n],
    ['$1234.5', 123450n],
    ['-$5', -500n],
    ['USD 12', 1200n],
    ['12,50', 1250n],
    ['0.', 0n],
    ['12.345', null],
    ['1,2,3', null],
    ['1,5000', null],
    ['', null],
    ['five', null],
  ])('reads %j', (text, minor) => {
    const parsed = parseMoney(text, usd);
    expect(parsed.ok ? parsed.value : null).toBe(minor);
  });

  it('refuses digits that the currency does not have', () => {
    expect(parseMoney('12.5', jpy)).toEqual({ ok: false, message: 'Whole amounts only in JPY.' });
    expect(parseMoney('1.234', kwd)).toEqual({ ok: true, value: 1234n });
  });

  it('is read back as it is shown, in every currency', () => {
    fc.assert(
      fc.property(
        fc.bigInt(-(10n ** 13n - 1n), 10n ** 13n - 1n),
        fc.constantFrom(...CURRENCY_CODES),
        (minor, currency) => {
          const settings = { currency, locale: 'en-GB' } as const;
          expect(parseMoney(formatMoney(minor, settings, { symbol: false }), settings)).toEqual({
            ok: true,
            value: minor,
          });
          expect(parseMoney(minorToDecimal(minor, currency), settings)).toEqual({ ok: true, value: minor });
        },
      ),
    );
  });
});

describe('settings', () => {
  it('take the defaults, and refuse what is not on offer by field', () => {
    expect(z.parse(shopSettings, DEFAULT_SETTINGS)).toEqual(DEFAULT_SETTINGS);
    const bad = z.safeParse(shopSettings, {
      ...DEFAULT_SETTINGS,
      currency: 'toString',
      timeZone: 'Mars/Olympus',
    });
    expect(bad.error?.issues.map((issue) => issue.path)).toEqual([['currency'], ['timeZone']]);
  });
});

describe('days and times', () => {
  const newYork = { locale: 'en-US', timeZone: 'America/New_York' } as const;
  const london = { locale: 'en-GB', timeZone: 'Europe/London' } as const;

  it('shows a moment in the shop’s zone and manner', () => {
    expect(formatDateTime('2026-12-01T03:30:00Z', newYork)).toBe('Nov 30, 2026, 10:30 PM');
    expect(formatDateTime('2026-07-01T23:30:00Z', london)).toBe('2 Jul 2026, 00:30');
    expect(dayIn('America/New_York', new Date('2026-12-01T03:30:00Z'))).toBe('2026-11-30');
  });

  it('never moves a plain day', () => {
    for (const zone of ['Pacific/Kiritimati', 'Pacific/Pago_Pago', 'UTC'])
      expect(formatDate('2026-12-01', { locale: 'en-GB', timeZone: zone })).toBe('1 Dec 2026');
    expect(formatLocalTime('2026-12-01 08:30:00', newYork)).toBe('8:30 AM');
  });

  it('refuses days that no calendar has', () => {
    expect(parseDay(' 2028-02-29 ')).toEqual({ ok: true, value: '2028-02-29' });
    for (const text of ['2026-02-29', '2026-13-01', '26-1-1', 'tomorrow', ''])
      expect(parseDay(text).ok).toBe(false);
  });

  it('finds the moment of a wall-clock time, over changes of the clocks', () => {
    const at = (text: string, zone: string) => {
      const parsed = parseLocalTime(text, zone);
      return parsed.ok ? parsed.value.toISOString() : null;
    };
    expect(at('2026-12-01T08:30', 'America/New_York')).toBe('2026-12-01T13:30:00.000Z');
    expect(at('2026-07-01 08:30', 'Europe/London')).toBe('2026-07-01T07:30:00.000Z');
    expect(at('2026-03-29 01:30', 'Europe/London')).toBe('2026-03-29T01:30:00.000Z');
    expect(at('2026-10-25 01:30', 'Europe/London')).toBe('2026-10-25T00:30:00.000Z');
    expect(at('2026-11-01 01:30', 'America/New_York')).toBe('2026-11-01T05:30:00.000Z');
    expect(at('2026-03-08 02:30', 'America/New_York')).toBe('2026-03-08T07:30:00.000Z');
    expect(at('2026-12-01 24:00', 'UTC')).toBeNull();
    expect(at('2026-02-30 08:00', 'UTC')).toBeNull();
  });
});
