import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { photometricFileCalculation, type PhotometricFileInput } from '@/lib/lighting/photometric-file';
import {
  cosine,
  lambertEulumdat as ldt,
  lambertLm63 as ies,
  type Law,
  type Lm63Options,
  steps,
  withLine,
} from '../../support/photometric-files';

const run = (text: string, more: Partial<PhotometricFileInput> = {}) =>
  runCalculation(photometricFileCalculation, { text, ...more });
const codes = (text: string, more: Partial<PhotometricFileInput> = {}) =>
  run(text, more).findings.map(({ code }) => code);
const expectNear = (got: number | null, want: number, relative: number) =>
  expect(Math.abs((got ?? NaN) - want), `${got} against ${want}`).toBeLessThanOrEqual(
    relative * Math.abs(want),
  );

describe('beam', () => {
  const beam = (law: Law, change: Partial<Lm63Options> = {}) => run(ies({ law, ...change })).result;

  it('between the outermost halves of the peak, where a batwing dips below', () => {
    const batwing: Law = (_, g) => ({ 0: 300, 30: 1000, 60: 1000, 90: 0 })[g] ?? 0;
    // 1000 at 60 to 0 at 90: half at 75 either side.
    expect(beam(batwing, { vertical: [0, 30, 60, 90] }).beamAngleDegrees).toBe(150);
  });

  it('of a beam to one side: from its inner to its outer half', () => {
    const side: Law = (c, g) => (c === 90 ? (({ 30: 1000 } as Record<number, number>)[g] ?? 0) : 0);
    const result = beam(side, { vertical: [0, 30, 60, 90], horizontal: steps(0, 360, 90) });
    expect(result.peak).toEqual({ candela: 1000, horizontalDegrees: 90, verticalDegrees: 30 });
    expect(result.beamAngleDegrees).toBe(30);
    expect(result.beamByPlaneDegrees).toEqual({ c0: null, c90: 30 });
  });

  it('upwards where the peak is there, past the horizontal only where half of it goes on', () => {
    const up: Law = (_, g) => 1000 * Math.max(0, -cosine(g));
    expectNear(beam(up, { vertical: steps(90, 180, 5) }).beamAngleDegrees, 120, 1e-9);
    expect(beam(() => 5).beamAngleDegrees).toBe(180);
    const wide: Law = (_, g) => (g <= 120 ? 100 : 0);
    expect(beam(wide, { vertical: steps(0, 180, 30) }).beamAngleDegrees).toBe(2 * 135);
  });

  it('along and across differ', () => {
    const result = beam((c, g) => (g <= 60 - 0.5 * (c % 180 === 90 ? 60 : 0) ? 100 : 0), {
      vertical: steps(0, 90, 10),
      horizontal: [0, 90],
    });
    expect(result.beamByPlaneDegrees).toEqual({ c0: 130, c90: 70 });
    expect(result.beamAngleDegrees).toBe(130);
  });
});

describe('what the file says of itself', () => {
  it('keywords in order, [MORE] joined, lines of 1986 without a key', () => {
    const keywords = ['[TEST] a', '[more] b', '[_OWN] c', '[TEST] d', '[__proto__] e'];
    expect(run(ies({ keywords })).result.header.keywords).toEqual([
      { key: 'TEST', value: 'a b' },
      { key: '_OWN', value: 'c' },
      { key: 'TEST', value: 'd' },
      { key: '__PROTO__', value: 'e' },
    ]);
    const old = run(ies({ first: '', keywords: ['A lamp', 'by hand'] })).result.header;
    expect([old.edition, old.keywords.map(({ value }) => value)]).toEqual(['1986', ['A lamp', 'by hand']]);
  });

  it('a tilt block is read and kept', () => {
    const tilt = ['TILT=INCLUDE', '2', '3', '0 45 90', '1 0.95 0.9'];
    const { header, totalLumens } = run(ies({ tilt })).result;
    expect(header.tilt).toEqual({ lampGeometry: 2, angles: [0, 45, 90], multipliers: [1, 0.95, 0.9] });
    expectNear(totalLumens, 1000 * Math.PI, 1e-9);
  });

  it('EULUMDAT: lines under LM-63’s names, the set of lamps that is asked for, absolute photometry', () => {
    const text = ldt({
      lampSets: [
        { lumens: 2000, watts: 20 },
        { lumens: 3000, watts: 31 },
      ],
    });
    const [first, second] = [run(text).result, run(text, { lampSet: 2 }).result];
    expect(first.header.keywords).toContainEqual({ key: 'LUMCAT', value: 'L-1' });
    expect([first.wattsInput, second.wattsInput]).toEqual([20, 31]);
    expectNear(second.totalLumens, first.totalLumens * 1.5, 1e-12);
    expect(first.header.edition).toBe('none');
    const absolute = run(ldt({ lampSets: [{ lamps: -1, lumens: 1000 * Math.PI }] })).result.header;
    expect(absolute).toMatchObject({ absolute: true, lamps: 1, lampLumens: null, lightOutputRatio: null });
    expect(first.header.opening).toEqual({
      lengthMetres: 0.6,
      widthMetres: 0.6,
      heightMetres: 0,
      round: false,
    });
    expect(run(ldt({ area: [200, 0] })).result.header.opening).toMatchObject({
      widthMetres: 0.2,
      round: true,
    });
  });

  it('a byte-order mark, an end-of-file mark, blank lines at the end and lost letters in the header do no harm', () => {
    const plain = run(ies()).result;
    expect(run(`\ufeff${ies()}`).result).toEqual(plain);
    expect(run(`${ies()}\r\n\r\n \u001a\r\n`).result).toEqual(plain);
    const lost = run(withLine(ies(), 5, () => '[MANUFAC] M\ufffdller')).result;
    expect([lost.totalLumens, lost.header.keywords[3]?.value]).toEqual([plain.totalLumens, 'M\ufffdller']);
  });
});

describe('findings', () => {
  const both: [string, string, string][] = [
    // code, a file that raises it, one that does not
    ['photometry-no-watts', ies({ watts: 0 }), ies({ watts: 1e3 })],
    ['photometry-efficacy-unlikely', ies({ watts: 12.5 }), ies({ watts: 12.6 })],
    ['photometry-no-light', ies({ law: () => 0 }), ies()],
    [
      'photometry-uplight',
      ies({ law: () => 10, vertical: steps(0, 180, 10) }),
      ies({ vertical: steps(0, 180, 10) }),
    ],
    [
      'photometry-coarse-angles',
      ies({ law: (_, g) => (g === 0 ? 1000 : 0), vertical: steps(0, 90, 10) }),
      ies({ law: (_, g) => 1000 * Math.max(0, cosine(g)) ** 2, vertical: steps(0, 90, 5) }),
    ],
    [
      'photometry-poles-disagree',
      ies({ law: (c) => 100 + c, horizontal: [0, 90] }),
      ies({ law: (c, g) => 100 + (g && c), horizontal: [0, 90] }),
    ],
    ['photometry-edition-unknown', ies({ first: 'IESNA:LM-63-2044' }), ies({ first: 'IES:LM-63-2019' })],
    ['photometry-keywords-missing', ies({ keywords: ['[TEST] 1'] }), ies({ keywords: [], first: 'IESNA91' })],
    [
      'photometry-reserved-factor',
      ies({ ballastLamp: 0.9 }),
      ies({ ballastLamp: 0.9, first: 'IESNA:LM-63-1995' }),
    ],
    ['photometry-tilt-block', ies({ tilt: ['TILT=INCLUDE', '1', '1', '0', '1'] }), ies()],
    ['photometry-lamp-sets', ldt({ lampSets: [{ lumens: 4000 }, { lumens: 5000 }] }), ldt()],
    ['photometry-more-than-lamps', ies({ lumens: 3000 }), ies({ lumens: 3200 })],
    ['photometry-stated-differs', ldt({ lorl: 80 }), ldt({ lorl: 99 })],
    ['photometry-stated-differs', ldt({ dff: 60 }), ldt({ dff: 99 })],
  ];
  it.each(both)('%s (%#)', (code, raised, quiet) => {
    expect(codes(raised)).toContain(code);
    expect(codes(quiet)).not.toContain(code);
  });

  it('a plain file raises none', () => {
    expect(codes(ies())).toEqual([]);
    expect(codes(ldt({ lorl: 100 }))).toEqual([]);
  });

  it('without light there is no share, no beam and no efficacy of note', () => {
    const { result } = run(ies({ law: () => 0 }));
    expect(result).toMatchObject({
      totalLumens: 0,
      efficacy: 0,
      beamAngleDegrees: null,
      uplightFraction: null,
    });
    expect(run(ies({ watts: 0 })).result).toMatchObject({ wattsInput: 0, efficacy: null });
  });
});
