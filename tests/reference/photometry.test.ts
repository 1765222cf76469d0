/**
 * Photometric files against geometry: distributions whose flux is an integral known exactly. Cases and fixtures in
 * data/photometry.json and data/photometry, formats in data/photometric-formats.json; the source stands with each.
 */
import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { photometricFileCalculation } from '@/lib/lighting/photometric-file';
import { meanIntensity, zonalFlux } from '@/lib/lighting/photometric-file-flux';
import { cosine, eulumdat, type Law, lm63, RADIANS, steps } from '../support/photometric-files';
import { testSeed } from '../support/random';
import formats from './data/photometric-formats.json';
import entries from './data/photometry.json';

const read = (text: string) => runCalculation(photometricFileCalculation, { text }).result;
const fixture = (name: string) => readFileSync(new URL(`./data/photometry/${name}`, import.meta.url), 'utf8');
const entry = (id: string) => {
  const found = entries.find((one) => one.id === id);
  if (!found) throw new Error(`no entry ${id}`);
  return found as { expected: Record<string, number>; inputs: Record<string, unknown> };
};
const expectNear = (got: number | null, want: number, relative: number) =>
  expect(Math.abs((got ?? NaN) - want), `${got} against ${want}`).toBeLessThanOrEqual(
    relative * Math.abs(want),
  );

describe('fixtures: flux is the integral of intensity over the solid angle', () => {
  it('PH-01: the zonal constants of 10 degrees, and their sum', () => {
    const { expected } = entries.find((one) => one.id === 'PH-01') as unknown as {
      expected: { zonal_constants: number[]; sum: number };
    };
    const level = {
      horizontal: [0, 360],
      candela: [
        [1, 1],
        [1, 1],
      ],
    };
    const constants = steps(0, 80, 10).map(
      (from) => zonalFlux({ ...level, vertical: [from, from + 10] }).totalLumens,
    );
    constants.forEach((one, k) =>
      expect(Math.abs(one - (expected.zonal_constants[k] ?? NaN))).toBeLessThan(1e-4),
    );
    expect(Math.abs(constants.reduce((a, b) => a + b) - expected.sum)).toBeLessThan(1e-4);
  });

  it('PH-02: Lambertian, by the average of the ends exact at any step', () => {
    const result = read(fixture('lambert_1000cd_5deg.ies'));
    expectNear(result.totalLumens, entry('PH-02').expected.by_endpoint_average ?? NaN, 1e-6);
    expectNear(result.totalLumens, Math.PI * 1000, 1e-6);
    expect(result.uplightFraction).toBe(1 - (entry('PH-02').expected.downward_fraction ?? NaN));
    expectNear(result.beamAngleDegrees, 120, 1e-9);
    expectNear(result.efficacy, (Math.PI * 1000) / 40, 1e-6);
  });

  it('PH-03: isotropic', () => {
    const result = read(fixture('isotropic_100cd.ies'));
    expect(Math.abs(result.totalLumens - (entry('PH-03').expected.exact_lm ?? NaN))).toBeLessThan(0.001);
    expectNear(result.totalLumens, 4 * Math.PI * 100, 1e-12);
    expectNear(result.uplightFraction, 0.5, 1e-12);
    expect(result.beamAngleDegrees).toBe(360);
  });

  it('PH-05: cosine cubed, quadrant symmetric', () => {
    const result = read(fixture('cos3_quadrant.ies'));
    expectNear(result.totalLumens, entry('PH-05').expected.exact_lm ?? NaN, 0.005);
    expect(result.header.symmetry).toBe('quadrant');
    expect(result.angles.horizontal).toEqual(steps(0, 360, 22.5));
    // I = 600*cos^3*(1 + 0.4*cos 2C): the plane of C0 holds the peak, half of it at acos(0.5^(1/3)).
    expect(result.peak).toEqual({ candela: 840, horizontalDegrees: 0, verticalDegrees: 0 });
    expectNear(result.beamAngleDegrees, (2 * Math.acos(0.5 ** (1 / 3))) / RADIANS, 1e-3);
  });
});

describe('distributions with a known integral', () => {
  const exact: [string, Law, number, number][] = [
    // Law, lumens, and the relative error at steps of 5 degrees: step^2/3 and step^2/2 for the squared and cubed cosine.
    ['Lambertian', (_, g) => 800 * Math.max(0, cosine(g)), Math.PI * 800, 1e-9],
    ['cosine squared', (_, g) => 800 * Math.max(0, cosine(g)) ** 2, (2 * Math.PI * 800) / 3, 2.6e-3],
    ['cosine cubed', (_, g) => 800 * Math.max(0, cosine(g)) ** 3, (2 * Math.PI * 800) / 4, 3.9e-3],
    ['up and down', (_, g) => 100 * (1 - 0.5 * cosine(g)), 4 * Math.PI * 100, 1e-9],
    ['bilateral', (c, g) => 500 * Math.max(0, cosine(g)) * (1 + 0.5 * cosine(c)), Math.PI * 500, 1e-9],
  ];
  it.each(exact)('%s', (_, law, lumens, tolerance) => {
    for (const step of [10, 5, 2.5]) {
      const result = read(lm63({ law, vertical: steps(0, 180, step), horizontal: steps(0, 360, 15) }));
      expectNear(result.totalLumens, lumens, tolerance * (step / 5) ** 2);
    }
  });

  it('up and down: the share above the horizontal by hand', () => {
    // Up: integral of 100*(1 - 0.5u) over u from -1 to 0 = 125 of 200.
    const result = read(lm63({ law: (_, g) => 100 * (1 - 0.5 * cosine(g)), vertical: steps(0, 180, 20) }));
    expectNear(result.uplightFraction, 125 / 200, 1e-12);
  });

  it('PH-04 shows what the middle of a zone would give, and that the ends do not', () => {
    const result = read(lm63({ law: (_, g) => 1000 * Math.max(0, cosine(g)), vertical: steps(0, 90, 10) }));
    expectNear(result.totalLumens, Math.PI * 1000, 1e-9);
    expect(Math.abs(result.totalLumens - (entry('PH-04').expected.lm ?? NaN))).toBeGreaterThan(10);
  });

  it('mean over planes weighs each by the angle it stands for', () => {
    const horizontal = [0, 10, 50, 90];
    const mean = meanIntensity({
      vertical: [0, 90],
      horizontal: [...horizontal, 360],
      candela: [0, 10, 50, 90, 0].map((one) => [one, one]),
    });
    // Trapezia: 0 to 90 along a straight line, then back to 0 over 270 degrees.
    expectNear(mean[0] ?? NaN, (45 * 90 + 45 * 270) / 360, 1e-12);
  });
});

describe('one distribution, written in every symmetry and format', () => {
  const law: Law = (c, g) => 700 * Math.max(0, cosine(g)) * (1 + 0.3 * cosine(2 * c));
  const vertical = steps(0, 180, 10);
  const all = read(lm63({ law, vertical, horizontal: steps(0, 360, 15) }));
  const same = (text: string, symmetry: string) => {
    const result = read(text);
    expect(result.header.symmetry).toBe(symmetry);
    expect(result.angles).toEqual(all.angles);
    result.candela.forEach((plane, h) =>
      plane.forEach((one, v) =>
        expect(Math.abs(one - (all.candela[h]?.[v] ?? NaN))).toBeLessThanOrEqual(1e-9 * 910),
      ),
    );
    expectNear(result.totalLumens, all.totalLumens, 1e-12);
    expectNear(result.beamAngleDegrees, all.beamAngleDegrees ?? NaN, 1e-12);
  };
  it.each([
    [steps(0, 90, 15), 'quadrant'],
    [steps(0, 180, 15), 'bilateral-0-180'],
    [steps(90, 270, 15), 'bilateral-90-270'],
    [steps(0, 360, 15), 'none'],
  ] as const)('LM-63 %#: %s', (horizontal, symmetry) =>
    same(lm63({ law, vertical, horizontal: [...horizontal] }), symmetry),
  );
  it.each([
    [0, 'none'],
    [2, 'bilateral-0-180'],
    [3, 'bilateral-90-270'],
    [4, 'quadrant'],
  ])('EULUMDAT symmetry %i', (isym, symmetry) => {
    same(eulumdat({ law, isym, vertical }), symmetry);
    same(eulumdat({ law, isym, vertical, decimalComma: true, conversion: 0.8 }), symmetry);
  });

  it('rotational ones too', () => {
    const round: Law = (_, g) => 300 * Math.max(0, cosine(g)) ** 2;
    const ies = read(lm63({ law: round }));
    const ldt = read(eulumdat({ law: round, isym: 1 }));
    expect(ldt.angles).toEqual(ies.angles);
    expectNear(ldt.totalLumens, ies.totalLumens, 1e-12);
    expectNear(ldt.beamAngleDegrees, 90, 1e-9);
  });

  it('a plane of symmetry mirrors about itself: a lopsided distribution comes back as it was', () => {
    const lopsided: Law = (c, g) => 100 * Math.max(0, cosine(g)) * (2 + cosine(c));
    const sideways: Law = (c, g) => lopsided(c - 90, g);
    for (const [text, want] of [
      [lm63({ law: lopsided, horizontal: steps(0, 180, 30) }), lopsided],
      [eulumdat({ law: lopsided, isym: 2 }), lopsided],
      [lm63({ law: sideways, horizontal: steps(90, 270, 30) }), sideways],
      [eulumdat({ law: sideways, isym: 3 }), sideways],
    ] as const) {
      const { angles, candela } = read(text);
      angles.horizontal.forEach((c, h) => expectNear(candela[h]?.[3] ?? NaN, want(c, 15), 1e-9));
    }
  });
});

describe('the format (LM63-1 to LM63-4)', () => {
  const rules = (id: string) => {
    const found = formats.find((one) => one.id === id);
    if (!found) throw new Error(`no entry ${id}`);
    return found.expected as Record<string, unknown>;
  };
  const law: Law = (_, g) => 500 * Math.max(0, cosine(g));

  it('LM63-1: every edition’s first line, any order of line breaks, commas as delimiters', () => {
    const first = String((rules('LM63-1').order as string[])[0]);
    const named = [...first.matchAll(/IESNA91|IES(?:NA)?:LM-63-\d{4}/g)].map(([line]) => line);
    expect(named).toHaveLength(4);
    expect(['', ...named].map((line) => read(lm63({ law, first: line })).header.edition)).toEqual([
      '1986',
      '1991',
      '1995',
      '2002',
      '2019',
    ]);
    const plain = lm63({ law });
    const [head = '', body = ''] = plain.split('TILT=NONE\r\n');
    const wrapped = `${head}TILT=NONE\r\n${body.trim().split(/\s+/).join('\r\n')}`;
    const commas = `${head}TILT=NONE\r\n${body.trim().split(/\s+/).join(', ')}`;
    for (const text of [wrapped, commas, plain.replaceAll('\r\n', '\n'), plain.replaceAll('\r\n', '\r')])
      expect(read(text)).toEqual(read(plain));
  });

  it('LM63-3: the scale is value x multiplier x ballast factor x ballast-lamp factor; -1 lumens is absolute', () => {
    const scaled = read(
      lm63({ law, first: 'IESNA:LM-63-1995', multiplier: 1.5, ballast: 0.88, ballastLamp: 0.95 }),
    );
    expectNear(scaled.totalLumens, Math.PI * 500, 1e-9);
    expect([scaled.header.multiplier, scaled.header.ballastFactor, scaled.header.ballastLampFactor]).toEqual([
      1.5, 0.88, 0.95,
    ]);
    // 2019: the same field is the file's generation type (from memory), no factor.
    expectNear(
      read(lm63({ law, first: 'IES:LM-63-2019', ballastLamp: 1.10001 })).totalLumens,
      Math.PI * 500,
      1e-9,
    );
    expect(scaled.header).toMatchObject({ absolute: true, lampLumens: null, lightOutputRatio: null });
    const lamped = read(lm63({ law, lamps: 2, lumens: 1000 }));
    expect(lamped.header).toMatchObject({ absolute: false, lampLumens: 2000 });
    expectNear(lamped.header.lightOutputRatio, (Math.PI * 500) / 2000, 1e-9);
  });

  it('PH-12: share of the lamp lumens', () => {
    const { inputs, expected } = entry('PH-12');
    const [zone, lamp] = [Number(inputs.lumens_in_zone), Number(inputs.lamp_lumens)];
    const result = read(lm63({ law: (_, g) => (zone / Math.PI) * Math.max(0, cosine(g)), lumens: lamp }));
    expect(
      Math.abs((result.header.lightOutputRatio ?? NaN) * 100 - (expected.percent_lamp ?? NaN)),
    ).toBeLessThan(0.05);
  });

  it('the opening in metres', () => {
    const size: [number, number, number] = [2, 4, 0.5];
    expect(read(lm63({ law, units: 1, size })).header.opening).toEqual({
      widthMetres: 0.6096,
      lengthMetres: 1.2192,
      heightMetres: 0.1524,
      round: false,
    });
    expect(read(lm63({ law, size: [-0.3, -0.3, 0] })).header.opening).toMatchObject({
      widthMetres: 0.3,
      round: true,
    });
  });
});

const seed = testSeed();
describe(`laws, TEST_SEED=${seed}`, () => {
  it('flux is linear in the intensities, and the same however the file is turned', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0, max: 1e4, noNaN: true }), { minLength: 40, maxLength: 40 }),
        fc.double({ min: 0.01, max: 100, noNaN: true }),
        fc.integer({ min: 0, max: 7 }),
        (values, factor, turn) => {
          const law: Law = (c, g) => values[((Math.round(c / 45) % 8) * 5 + Math.round(g / 22.5)) % 40] ?? 0;
          const vertical = steps(0, 90, 22.5);
          const text = (one: Law) => lm63({ law: one, vertical, horizontal: steps(0, 360, 45) });
          const base = read(text(law));
          const more = read(text((c, g) => law(c, g) * factor));
          const turned = read(text((c, g) => law(c + 45 * turn, g)));
          const near = (a: number, b: number) => Math.abs(a - b) <= 1e-9 * Math.max(1, Math.abs(b));
          expect(near(more.totalLumens, base.totalLumens * factor)).toBe(true);
          expect(near(turned.totalLumens, base.totalLumens)).toBe(true);
          // No more than the peak all over the lower half.
          expect(base.totalLumens).toBeLessThanOrEqual(2 * Math.PI * base.peak.candela * (1 + 1e-9));
        },
      ),
      { seed, numRuns: 200 },
    );
  });
});
