import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { photometricFileCalculation } from '@/lib/lighting/photometric-file';
import { lambertEulumdat as ldt, lambertLm63 as ies, steps, withLine } from '../../support/photometric-files';
import { testSeed } from '../../support/random';

const run = (text: string) => runCalculation(photometricFileCalculation, { text });
const refusal = (text: unknown, more: object = {}) => {
  try {
    runCalculation(photometricFileCalculation, { text, ...more });
  } catch (error) {
    if (error instanceof EngineError) return { code: error.code, ...error.issues[0] };
    throw error;
  }
  return null;
};
const cut = (text: string, lines: number) => text.split('\r\n').slice(0, lines).join('\r\n');
const expectNear = (got: number | null, want: number, relative: number) =>
  expect(Math.abs((got ?? NaN) - want), `${got} against ${want}`).toBeLessThanOrEqual(
    relative * Math.abs(want),
  );

// Lines of ies(): 1 edition, 2 to 5 keywords, 6 TILT, 7 counts, 8 factors, 9 vertical, 10 horizontal, 11 candela.

describe('LM-63 that is refused, by its line', () => {
  it.each<[string, string, RegExp]>([
    [
      'cut short in the candela',
      withLine(ies(), 11, (old) => old.slice(0, 60)),
      /^line 11: the file ends here, cut short: candela of horizontal angle 1 of 1, value \d+ of 19 missing$/,
    ],
    ['cut short in the counts', cut(ies(), 7), /^line 7: .*cut short: ballast factor missing/],
    ['cut short in the header', cut(ies(), 4), /^line 4: there is no TILT= line/],
    ['more candela than counted', `${ies()}5 6\r\n`, /^line 12: "5" is more than the counts/],
    [
      'one vertical angle too many',
      withLine(ies(), 9, (old) => `${old} 95`),
      /^line 10: .*horizontal|^line 9: .*horizontal/,
    ],
    [
      'angles that do not ascend',
      withLine(ies(), 9, (old) => old.replace('45', '39')),
      /^line 9: vertical angles must ascend, and 39 follows 40/,
    ],
    ['an angle twice', withLine(ies(), 9, (old) => old.replace('45', '40')), /^line 9: .*40 follows 40/],
    [
      'vertical angles that start elsewhere',
      withLine(ies(), 9, (old) => old.replace(/^0/, '1')),
      /^line 9: .*start at 0 or 90/,
    ],
    [
      'vertical angles that end elsewhere',
      withLine(ies(), 9, (old) => old.replace(/90$/, '89')),
      /^line 9: .*end at 90 or 180/,
    ],
    [
      'type A angles below zero',
      withLine(ies(), 9, (old) => old.replace(/^0/, '-90')),
      /^line 9: .*start at 0 or 90/,
    ],
    [
      'a lone plane that is not 0',
      withLine(ies(), 10, () => '45'),
      /^line 10: horizontal angles must be 0 alone/,
    ],
    ['planes to 345', ies({ horizontal: steps(0, 345, 15) }), /^line 10: horizontal angles/],
    [
      'planes that descend',
      ies({ horizontal: [0, 90, 45] }),
      /^line 10: horizontal angles must ascend, and 45 follows 90/,
    ],
    [
      'a word among the candela',
      withLine(ies(), 11, (old) => old.replace(' ', ' dim ')),
      /^line 11: "dim" is not a number \(candela/,
    ],
    [
      'hexadecimal',
      withLine(ies(), 8, (old) => old.replace('40', '0x28')),
      /^line 8: "0x28" is not a number \(input watts\)/,
    ],
    [
      'a number beyond all range',
      withLine(ies(), 11, (old) => old.replace('1000', '1e999')),
      /^line 11: "1e999" is too large/,
    ],
    [
      'negative candela',
      withLine(ies(), 11, (old) => old.replace('1000', '-1')),
      /^line 11: candela must not be negative, and one is -1/,
    ],
    ['negative watts', ies({ watts: -1 }), /^line 8: input watts/],
    [
      'multiplier 0',
      withLine(ies(), 7, (old) => old.replace('1 -1 1', '1 -1 0')),
      /^line 7: candela multiplier must be greater than zero/,
    ],
    ['ballast factor 0', withLine(ies(), 8, () => '0 1 40'), /^line 8: ballast factor/],
    ['no lumens, and not absolute', ies({ lumens: 0 }), /^line 7: lumens per lamp .* -1 for absolute/],
    ['lumens of -2', ies({ lumens: -2 }), /^line 7: lumens per lamp/],
    ['half a lamp', ies({ lamps: 0.5 }), /^line 7: number of lamps must be a whole number/],
    [
      'a broken count',
      withLine(ies(), 7, (old) => old.replace(' 19 ', ' 19.5 ')),
      /^line 7: number of vertical angles must be a whole number of at least 2/,
    ],
    ['type B', ies({ type: 2 }), /^line 7: this is type B photometry/],
    ['type A', ies({ type: 3 }), /^line 7: this is type A photometry/],
    ['type 4', ies({ type: 4 }), /^line 7: photometric type must be 1/],
    ['units of 3', ies({ units: 3 }), /^line 7: units must be 1 \(feet\) or 2 \(metres\)/],
    [
      'tilt in another file',
      ies({ tilt: ['TILT=LAMP7.TLT'] }),
      /^line 6: TILT="LAMP7.TLT" refers to another file/,
    ],
    ['tilt left open', ies({ tilt: ['TILT='] }), /^line 6: TILT= must be/],
    [
      'a tilt geometry of 4',
      ies({ tilt: ['TILT=INCLUDE', '4', '1', '0', '1'] }),
      /^line 7: lamp-to-luminaire geometry/,
    ],
    [
      'tilt angles out of order',
      ies({ tilt: ['TILT=INCLUDE', '1', '2', '90 0', '1 1'] }),
      /^line 9: tilt angles must ascend/,
    ],
    [
      'tilt angles out of range',
      ies({ tilt: ['TILT=INCLUDE', '1', '2', '0 270', '1 1'] }),
      /^line 9: tilt angles lie from 0 to 180/,
    ],
    [
      'a negative tilt factor',
      ies({ tilt: ['TILT=INCLUDE', '1', '2', '0 90', '1 -1'] }),
      /^line 10: a tilt multiplier/,
    ],
    [
      'too many tilt angles',
      ies({ tilt: ['TILT=INCLUDE', '1', '5000', '0', '1'] }),
      /^line 8: 5000 tilt angles/,
    ],
    [
      'a tilt count with no angles behind it',
      ies({ tilt: ['TILT=INCLUDE', '1', '3', '0 45', '1 1'] }),
      /^line \d+: /,
    ],
    [
      'UTF-16 read as text',
      [...ies()].map((one) => `${one}\u0000`).join(''),
      /^line 1: holds zero bytes, as UTF-16/,
    ],
    ['UTF-16 the other way round', `\ufffe${ies()}`, /^line 1: .*UTF-16/],
    [
      'a lost letter among the numbers',
      withLine(ies(), 11, (old) => old.replace(' ', ' \ufffd5 ')),
      /^line 11: .* is not a number/,
    ],
    ['a picture', '\x89PNG\r\n\x1a\nIHDR', /^line 1: neither LM-63/],
    ['a page of the web', '<html>\n<body>404</body></html>', /^line 1: neither/],
  ])('%s', (_, text, message) => {
    const found = refusal(text);
    expect(found).toMatchObject({ code: 'invalid-input', path: 'text' });
    expect(found?.message).toMatch(message);
  });
});

// Lines of ldt(): 3 symmetry, 4 and 5 planes, 6 and 7 angles, 24 factor, 26 sets, 27 to 32 the set, 33 to 42 ratios,
// 43 to 66 planes, 67 to 85 angles, 86 to 104 intensities.
describe('EULUMDAT that is refused, by its line', () => {
  it.each<[string, string, RegExp]>([
    [
      'cut short in the intensities',
      cut(ldt(), 100),
      /^line 100: the file ends here, cut short: intensity of plane C0, value 16 of 19 missing/,
    ],
    ['cut short in the angles', cut(ldt(), 70), /^line 70: .*gamma angle 5 of 19 missing/],
    ['cut short in the head', cut(ldt(), 20), /^line 20: .*conversion factor .*line 24\) missing/],
    ['cut short in the lamps', cut(ldt(), 28), /^line 28: .*luminous flux of the lamps \(line 29\) missing/],
    ['more intensities than counted', `${ldt()}7\r\n`, /^line 105: "7" is more than the counts/],
    ['a symmetry of 5', withLine(ldt(), 3, () => '5'), /^line 3: symmetry indicator must be 0 to 4/],
    [
      'planes that the symmetry does not divide',
      withLine(ldt({ isym: 4 }), 4, () => '22'),
      /^line 4: .*multiple of 4/,
    ],
    [
      'planes that miss the symmetry’s ends',
      ldt({ isym: 4, planes: steps(0, 345, 15).map((c) => (c > 0 ? c + 1 : 0)) }),
      /^line 43: planes of symmetry 4 must go from C0 to C90, and go from C0 to C91/,
    ],
    ['C angles that start elsewhere', withLine(ldt(), 43, () => '5'), /^line 43: C angles must start at 0/],
    [
      'C angles that descend',
      withLine(ldt(), 45, () => '10'),
      /^line 45: C angles must ascend, and 10 follows 15/,
    ],
    ['a plane at 360', withLine(ldt(), 66, () => '360'), /^line 66: C angles must stay under 360/],
    ['gamma that ends elsewhere', withLine(ldt(), 85, () => '89'), /^line 85: vertical angles must end/],
    ['gamma that descends', withLine(ldt(), 69, () => '4'), /^line 69: vertical angles must ascend/],
    ['a word for an intensity', withLine(ldt(), 90, () => 'bright'), /^line 90: "bright" is not a number/],
    ['two commas', withLine(ldt(), 90, () => '1,2,3'), /^line 90: "1,2,3" is not a number/],
    ['a negative intensity', withLine(ldt(), 90, () => '-4'), /^line 90: intensity must not be negative/],
    ['lamps without flux', ldt({ lampSets: [{ lumens: 0 }] }), /^line 29: luminous flux/],
    ['no lamps', ldt({ lampSets: [{ lamps: 0, lumens: 100 }] }), /^line 27: number of lamps/],
    ['negative watts', ldt({ lampSets: [{ lumens: 100, watts: -1 }] }), /^line 32: watts/],
    ['no set of lamps', withLine(ldt(), 26, () => '0'), /^line 26: number of lamp sets/],
    ['too many sets', withLine(ldt(), 26, () => '999'), /^line 26: 999 lamp sets/],
    ['a factor of 0', ldt({ conversion: 0 }), /^line 24: conversion factor/],
    ['a negative share', ldt({ lorl: -5 }), /^line 23: light output ratio/],
    ['an empty line where a figure should stand', withLine(ldt(), 29, () => ''), /^line 29: is empty/],
  ])('%s', (_, text, message) => {
    const found = refusal(text);
    expect(found).toMatchObject({ code: 'invalid-input', path: 'text' });
    expect(found?.message).toMatch(message);
  });

  it('a set of lamps that is not there, or in a format that has none', () => {
    expect(refusal(ldt(), { lampSet: 2 })).toMatchObject({ path: 'lampSet' });
    expect(refusal(ies(), { lampSet: 1 })).toMatchObject({ path: 'lampSet' });
  });

  it('a format that is named is believed', () => {
    expect(refusal(ldt(), { format: 'lm-63' })?.message).toMatch(/TILT/);
    expect(refusal(ies(), { format: 'eulumdat' })?.message).toMatch(
      /^line 3: "\[TESTLAB\] none" is not a number/,
    );
    expect(refusal('')).toMatchObject({ path: 'text', message: 'is empty' });
  });
});

describe('size', () => {
  it.each<[string, () => string]>([
    ['50 MB of candela', () => `${ies()}${'1234 '.repeat(10_000_000)}`],
    ['50 MB of one token', () => '9'.repeat(50_000_000)],
    ['a million angles promised', () => withLine(ies(), 7, (old) => old.replace(' 19 1 ', ' 1000000 1 '))],
    ['a million planes promised', () => withLine(ies(), 7, (old) => old.replace(' 19 1 ', ' 19 1000000 '))],
    ['EULUMDAT promising as much', () => withLine(ldt(), 6, () => '100000')],
    ['more candela than are read', () => withLine(ies(), 7, (old) => old.replace(' 19 1 ', ' 1801 721 '))],
    [
      'a quadrant that unfolds to more',
      () => ies({ vertical: steps(0, 180, 0.5), horizontal: steps(0, 90, 0.25) }),
    ],
  ])('%s is too large', (_, text) =>
    expect(refusal(text())).toMatchObject({ code: 'too-large', path: 'text' }),
  );

  it('a header of half a million lines is read line by line', () => {
    const keywords = ['[TEST] a', ...Array.from({ length: 500_000 }, () => '[MORE] b')];
    expect(run(ies({ keywords })).result.header.keywords[0]?.value).toHaveLength(1_000_001);
  });

  it('a fine file is read', () => {
    const { result } = run(ies({ vertical: steps(0, 180, 0.5), horizontal: steps(0, 360, 2.5) }));
    expect([result.candela.length, result.candela[0]?.length]).toEqual([145, 361]);
    expectNear(result.totalLumens, 1000 * Math.PI, 1e-9);
  });
});

const seed = testSeed();
describe(`damage, TEST_SEED=${seed}`, () => {
  const whole = [
    ies({ horizontal: steps(0, 90, 30) }),
    ldt({ isym: 4 }),
    ies({ tilt: ['TILT=INCLUDE', '1', '2', '0 90', '1 1'] }),
  ];
  it('any file, cut, spliced or scribbled in, is answered or refused by its line', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...whole),
        fc.nat(3000),
        fc.nat(200),
        fc.oneof(
          fc.string(),
          fc.constantFrom('-1', '1e9', '0', ',', '\r\n', ' 5 5 5 ', 'TILT=', '\u0000', 'NaN'),
        ),
        (text, at, gone, put) => {
          const damaged = text.slice(0, at) + put + text.slice(at + gone);
          const found = refusal(damaged === '' ? ' ' : damaged);
          if (found === null) return;
          expect(['invalid-input', 'too-large']).toContain(found.code);
          if (found.code === 'invalid-input') expect(found.message).toMatch(/^line \d+: /);
        },
      ),
      { seed, numRuns: 2000 },
    );
  });
});
