/** Lengths as surveyors write them. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatLength, parseLength } from '@/lib/units';

const US = { units: 'us' } as const;
const METRIC = { units: 'metric' } as const;
const inches = (text: string, settings: typeof US | typeof METRIC = US) => {
  const parsed = parseLength(text, settings);
  return parsed.ok ? Number((parsed.value / 0.0254).toFixed(9)) : null;
};

describe('parseLength', () => {
  it.each([
    [`12' 6 1/2"`, 150.5],
    [`12'-6 1/2"`, 150.5],
    [`12’ 6½”`, 150.5],
    ['12ft 6in', 150],
    ['12 feet 6 inches', 150],
    [`12'6`, 150],
    [`12'`, 144],
    ['150"', 150],
    [`150''`, 150],
    ['12.5', 150],
    ['12 1/2', 150],
    ['15/16"', 0.9375],
    ['31/2"', 15.5],
    ['1-1/2"', 1.5],
    ['7 ½ ft', 90],
  ])('%s is %d inches', (text, expected) => expect(inches(text)).toBe(expected));

  it.each([
    ['3.2 m', 3.2],
    ['3,2', 3.2],
    ['320 cm', 3.2],
    ['3200mm', 3.2],
    ['1,200 mm', 1.2],
    ['2 metres', 2],
    ['250 millimeters', 0.25],
    ['12 centimetres', 0.12],
  ])('%s is %d metres', (text, expected) => {
    expect(parseLength(text, METRIC)).toEqual({ ok: true, value: expected });
  });

  it.each([
    '',
    ' ',
    'long',
    `'`,
    '"',
    '-3',
    `12' 6' 2"`,
    '1/0',
    '6 1/0"',
    '3 m 2',
    '3 yards',
    `${'9'.repeat(90)} m`,
  ])('refuses %j with an example', (text) => {
    expect(parseLength(text, US)).toEqual({ ok: false, message: `Type a length such as 12' 6".` });
    expect(parseLength(text, METRIC)).toEqual({ ok: false, message: 'Type a length such as 3.8.' });
  });
});

it.each([`3 m 6"`, `12' 20 cm`, `3.2m 4'`])('names two units in one length: %s', (text) => {
  expect(parseLength(text, US)).toEqual({
    ok: false,
    message: 'Two units in one length: type feet and inches, or metres.',
  });
});

describe('formatLength', () => {
  it.each([
    [0, `0' 0"`],
    [3.81, `12' 6"`],
    [0.0127, `0' 1/2"`],
    [3.8227, `12' 6 1/2"`],
    [0.3047, `1' 0"`],
    [-0.3048, `−1' 0"`],
    [Number.NaN, '–'],
  ])('%d m as %s', (metres, text) => expect(formatLength(metres, US)).toBe(text));

  it('is read back within half an eighth of an inch, or half a centimetre', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 500, noNaN: true }), (metres) => {
        for (const [settings, within] of [
          [US, 0.0254 / 16],
          [METRIC, 0.005],
        ] as const) {
          const parsed = parseLength(formatLength(metres, settings), settings);
          expect(Math.abs((parsed.ok ? parsed.value : -1) - metres)).toBeLessThanOrEqual(within + 1e-9);
        }
      }),
    );
  });
});
