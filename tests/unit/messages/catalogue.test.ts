/** The catalogue: a text for all that the engine can say, filled in the shop's units, in the trade's words. */
import { describe, expect, it } from 'vitest';
import { catalogueKeys, hasMessage, message, type MessageKey, messageOr, term } from '@/lib/messages';
import { customerMessage } from '@/lib/messages/quotes';
import { fillTerms } from '@/lib/messages/terms';
import { DEFAULT_SETTINGS } from '@/lib/units';
import { engineCodes } from '../../support/engine-codes';

const ENGINE = ['lib/sizing', 'lib/lighting', 'lib/pricing', 'lib/circuits/schema'];
const METRIC = { ...DEFAULT_SETTINGS, units: 'metric', currency: 'GBP', locale: 'en-GB' } as const;

describe('what the engine can say', () => {
  const findings = engineCodes(ENGINE, {
    key: 'code',
    marker: 'severity',
    makers: ['hardStop', 'softStop', 'caution', 'note'],
  });
  const working = engineCodes(ENGINE, { key: 'key', marker: 'formula' });
  const labels = engineCodes(['lib/sizing'], { key: 'key', marker: 'text' });

  it('is read out of its sources', () => {
    expect(findings.codes.length).toBeGreaterThan(50);
    expect(findings.codes).toEqual(
      expect.arrayContaining(['two-sources', 'field-built', 'disconnect-unknown', 'priced-below-cost']),
    );
    expect(working.codes).toEqual(expect.arrayContaining(['voltage-drop', 'price-net', 'units-by-inrush']));
    expect(labels.codes).toEqual(expect.arrayContaining(['label.no-fluorescent']));
    expect([...findings.unread, ...working.unread, ...labels.unread]).toEqual([]);
  });

  it.each(findings.codes)('finding %s has a title and a body', (code) => {
    const [title, body] = [`finding.${code}.title`, `finding.${code}.body`];
    expect({ title: hasMessage(title), body: hasMessage(body) }).toEqual({ title: true, body: true });
    expect(message(title as MessageKey).length).toBeLessThanOrEqual(60);
    // A sentence: it begins like one and ends like one.
    expect(message(body as MessageKey)).toMatch(/^[\p{Lu}–\d].*\.$/su);
  });

  it.each(working.codes)('working step %s has a name', (key) =>
    expect(hasMessage(`working.${key}`)).toBe(true),
  );
  it.each(labels.codes)('label line %s has a text', (key) => expect(hasMessage(key)).toBe(true));

  it('and nothing stands in the catalogue that no engine says', () => {
    const said = new Set(findings.codes.flatMap((code) => [`finding.${code}.title`, `finding.${code}.body`]));
    for (const key of working.codes) said.add(`working.${key}`);
    const written = catalogueKeys.filter((key) => /^(finding|working)\./.test(key));
    expect(written.filter((key) => !said.has(key))).toEqual([]);
  });
});

describe('message', () => {
  it('fills figures in the shop’s units, without idle zeros', () => {
    expect(
      message('finding.supply-outside-rating.body', {
        supplyVolts: 480,
        ratedVoltsMin: 120,
        ratedVoltsMax: 277,
      }),
    ).toContain('480 V is outside the 120 V to 277 V');
    expect(
      message('finding.priced-below-cost.body', { netMinor: 123450, costMinor: 130000 }, METRIC),
    ).toContain('the price is £1,234.50, and the work costs £1,300.00');
    expect(message('finding.priced-below-cost.body', { netMinor: 5, costMinor: 6 })).toContain('$0.05');
  });

  it('puts codes in the trade’s words, and leaves others as they are', () => {
    expect(message('finding.fed-end-mismatch.body', { wired: 'double', fedEnd: 'single' })).toContain(
      'wired to feed at both ends, the tube at one end.',
    );
    expect(message('finding.ballast-not-listed.body', { ballast: 'of a new kind' })).toContain(
      '(of a new kind)',
    );
  });

  it('uses the words of the shop’s basis', () => {
    const iec = { ...DEFAULT_SETTINGS, basis: 'iec' } as const;
    expect(message('finding.supply-unknown.body', {}, DEFAULT_SETTINGS)).toContain(
      'at the fixture, or read it at the panel',
    );
    expect(message('finding.supply-unknown.body', {}, iec)).toContain(
      'at the luminaire, or read it at the distribution board',
    );
    expect(message('crew.caution.dead.prove', {}, iec)).toContain('line to earth');
    expect(term('closeout', iec)).toBe('handover');
    expect(fillTerms('{=Lift} and {=lift}', DEFAULT_SETTINGS)).toBe('Lift and lift');
    expect(fillTerms('{=nothing}', iec)).toBe('{=nothing}');
  });

  it('reads the same where the customer’s page loads its own part', () => {
    const values = { name: 'A', revision: 2 };
    expect(customerMessage('customer.accepted-already', values)).toBe(
      message('customer.accepted-already', values),
    );
    expect(customerMessage('customer.accepted-already')).toBe(message('customer.accepted-already'));
  });

  it('counts in English', () => {
    const dropout = (segments: number) =>
      message('finding.below-dropout.body', { segments, dropoutVolts: 18, minVolts: 17.5 });
    expect(dropout(1)).toMatch(/^One segment has less than the 18 V .*lowest 17.5 V/);
    expect(dropout(1200)).toMatch(/^1,200 segments have less/);
    expect(message('quote.blocker.no-price', { line: 'A', count: 2 })).toBe(
      '“A” uses 2 parts without a price.',
    );
    expect(message('quote.blocker.no-price', { line: 'A', count: 1 })).toBe(
      '“A” uses 1 part without a price.',
    );
  });

  it('shows a dash where a value is missing', () => {
    expect(message('label.line-volts', { supplyVolts: null })).toBe('The lampholders carry –.');
    expect(message('label.line-volts')).toBe('The lampholders carry –.');
  });

  it('falls back on the engine’s own English for a code that is new', () => {
    expect(messageOr('finding.from-the-future.title', 'As the engine says.')).toBe('As the engine says.');
    expect(messageOr('constructor', 'As the engine says.')).toBe('As the engine says.');
  });

  it('leaves no placeholder open, whatever is missing', () => {
    for (const key of catalogueKeys)
      expect([key, message(key)]).toEqual([key, expect.not.stringMatching(/[{}]/)]);
  });

  it('speaks plainly: no straight quotes, nothing invalid', () => {
    for (const key of catalogueKeys)
      expect([key, message(key)]).toEqual([key, expect.not.stringMatching(/['"]|invalid/i)]);
  });
});
