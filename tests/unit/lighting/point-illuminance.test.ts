import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError, type Limits, WEB_LIMITS } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { photometricFileCalculation } from '@/lib/lighting/photometric-file';
import { pointIlluminanceCalculation, type PointIlluminanceInput } from '@/lib/lighting/point-illuminance';
import { cosine, eulumdat, type Law, lm63, steps } from '../../support/photometric-files';
import { testSeed } from '../../support/random';

const ROOM: PointIlluminanceInput = {
  lengthMetres: 8,
  widthMetres: 5,
  mountingMetres: 2.5,
  photometry: { source: 'cosine', lumens: 4000 },
  layout: { rows: 2, columns: 3 },
  lightLossFactor: 0.8,
};
const run = (change: Partial<PointIlluminanceInput> = {}, limits?: Limits) =>
  runCalculation(pointIlluminanceCalculation, { ...ROOM, ...change }, limits);
const at = (luminaires: NonNullable<PointIlluminanceInput['luminaires']>) => ({
  luminaires,
  layout: undefined,
});
const codes = (change: Partial<PointIlluminanceInput> = {}) => run(change).findings.map(({ code }) => code);
const refusal = (change: object, limits?: Limits) => {
  try {
    run(change, limits);
  } catch (error) {
    if (error instanceof EngineError) return { code: error.code, ...error.issues[0] };
    throw error;
  }
  return null;
};
const near = (a: number, b: number, relative = 1e-9) =>
  Math.abs(a - b) <= relative * Math.max(Math.abs(a), Math.abs(b));
const expectNear = (got: number | null | undefined, want: number) =>
  expect(near(got ?? NaN, want), `${got} against ${want}`).toBe(true);
const expectSame = (a: number[][], b: number[][]) => {
  expect(a.map((row) => row.length)).toEqual(b.map((row) => row.length));
  a.forEach((row, k) => row.forEach((one, j) => expectNear(one, b[k]?.[j] ?? NaN)));
};
const mirrored = (lux: number[][]) => lux.map((row) => [...row].reverse());
const transposed = (lux: number[][]) => (lux[0] ?? []).map((_, k) => lux.map((row) => row[k] ?? NaN));

const lopsided: Law = (c, g) => 500 * Math.max(0, cosine(g)) * (1 + 0.8 * cosine(c));
const LOPSIDED = { text: lm63({ law: lopsided, horizontal: steps(0, 180, 15) }) };

describe('figures', () => {
  it('layout: columns along the length, rows along the width, half a spacing from the walls', () => {
    const { luminaires, xs, ys, lux, points, installedLumens } = run().result;
    const places = luminaires.map(({ xMetres, yMetres }) => [xMetres, yMetres]);
    expect(places[0]).toEqual([8 / 6, 1.25]);
    expect(places.at(-1)).toEqual([(8 * 5) / 6, 3.75]);
    expect(lux).toHaveLength(ys.length);
    expect(lux[0]).toHaveLength(xs.length);
    expect(points).toBe(xs.length * ys.length);
    expectNear(installedLumens, 6 * 4000);
  });

  it('average, minimum, maximum and uniformity are the grid’s', () => {
    const { lux, average, minimum, maximum, uniformity } = run().result;
    const all = lux.flat();
    expectNear(average, all.reduce((a, b) => a + b) / all.length);
    expect([minimum, maximum]).toEqual([Math.min(...all), Math.max(...all)]);
    expectNear(uniformity, minimum / average);
  });

  it('lumens or candela of a cosine source are the same thing', () => {
    expectSame(
      run({ photometry: { source: 'cosine', candela: 4000 / Math.PI } }).result.lux,
      run().result.lux,
    );
  });

  it('a file, the answer of photometric-file, and its planes before unfolding give the same', () => {
    const { angles, candela } = runCalculation(photometricFileCalculation, LOPSIDED).result;
    const from = (photometry: PointIlluminanceInput['photometry']) => run({ photometry }).result.lux;
    expectSame(from({ angles, candela }), from(LOPSIDED));
    const half = {
      angles: { ...angles, horizontal: angles.horizontal.slice(0, 13) },
      candela: candela.slice(0, 13),
    };
    expectSame(from(half), from(LOPSIDED));
    const sets = [{ lumens: 1000 }, { lumens: 2000 }];
    const text = eulumdat({ law: lopsided, isym: 2, lampSets: sets });
    expectSame(
      from({ text, lampSet: 2 }),
      from(LOPSIDED).map((row) => row.map((one) => one * 2)),
    );
  });

  it('a luminaire’s own height stands before the room’s', () => {
    const low = run({
      ...at([{ xMetres: 4, yMetres: 2.5, mountingMetres: 1.25 }]),
      gridMetres: 1,
      wallBandMetres: 0,
    });
    const high = run({ ...at([{ xMetres: 4, yMetres: 2.5 }]), gridMetres: 1, wallBandMetres: 0 });
    expect(low.result.maximum).toBeGreaterThan(high.result.maximum * 2);
  });

  it('C0 points along x, and turns from x towards y', () => {
    const one = (rotationDegrees: number) => {
      const { lux } = run({
        lengthMetres: 3,
        widthMetres: 3,
        wallBandMetres: 0,
        gridMetres: 1,
        photometry: LOPSIDED,
        ...at([{ xMetres: 1.5, yMetres: 1.5, rotationDegrees }]),
      }).result;
      // Points beside the luminaire towards +x, +y, -x, -y.
      return [lux[1]?.[2], lux[2]?.[1], lux[1]?.[0], lux[0]?.[1]].map((value) => value ?? NaN);
    };
    for (const [k, degrees] of [0, 90, 180, -90].entries()) {
      const beside = one(degrees);
      expect(beside.indexOf(Math.max(...beside))).toBe(k);
      beside.forEach((value, j) => expectNear(value, one(0)[(j - k + 4) % 4] ?? NaN));
    }
  });

  it('a grid of one’s own', () => {
    const { xs, ys, stepMetres } = run({ gridMetres: 1, wallBandMetres: 0 }).result;
    expect([xs.length, ys.length, xs[0], stepMetres]).toEqual([8, 5, 0.5, { x: 1, y: 1 }]);
    expect(run({ gridMetres: 3, wallBandMetres: 0 }).result.points).toBe(3 * 2);
    expect(run({ gridMetres: 1e15 }).result.points).toBe(1);
  });
});

const seed = testSeed();
describe(`laws, TEST_SEED=${seed}`, () => {
  const rooms = fc.record({
    lengthMetres: fc.double({ min: 2, max: 30, noNaN: true }),
    widthMetres: fc.double({ min: 2, max: 30, noNaN: true }),
    mountingMetres: fc.double({ min: 1, max: 6, noNaN: true }),
    layout: fc.record({ rows: fc.integer({ min: 1, max: 4 }), columns: fc.integer({ min: 1, max: 4 }) }),
  });
  const holds = (law: (room: Partial<PointIlluminanceInput>) => void) =>
    fc.assert(fc.property(rooms, law), { seed, numRuns: 60 });

  it('twice the lumens, or two luminaires in one place, are twice the lux; half the light loss factor half', () =>
    holds((room) => {
      const base = run(room).result;
      const doubled = base.lux.map((row) => row.map((one) => one * 2));
      expectSame(run({ ...room, photometry: { source: 'cosine', lumens: 8000 } }).result.lux, doubled);
      const hung = base.luminaires;
      expectSame(run({ ...room, ...at([...hung, ...hung]) }).result.lux, doubled);
      expectSame(
        run({ ...room, lightLossFactor: 0.4 }).result.lux.map((row) => row.map((one) => one * 2)),
        base.lux,
      );
    }));

  it('a symmetric layout gives a symmetric grid', () =>
    holds((room) => {
      const { lux } = run(room).result;
      expectSame(mirrored(lux), lux);
      expectSame([...lux].reverse(), lux);
    }));

  it('turning the room turns the grid', () =>
    holds((room) => {
      const { lux, luminaires } = run({ ...room, gridMetres: 0.9, photometry: LOPSIDED }).result;
      const turned = run({
        ...room,
        lengthMetres: room.widthMetres ?? 1,
        widthMetres: room.lengthMetres ?? 1,
        gridMetres: 0.9,
        photometry: LOPSIDED,
        // Reflected in x = y: a distribution that is symmetric to its plane C0 turns to 90 degrees less.
        ...at(luminaires.map((one) => ({ xMetres: one.yMetres, yMetres: one.xMetres, rotationDegrees: 90 }))),
      }).result;
      expectSame(turned.lux, transposed(lux));
    }));

  it('no more light arrives than leaves, nor does any point get more than all luminaires right over it', () =>
    holds((room) => {
      const { result } = run({ ...room, wallBandMetres: 0, gridMetres: 0.5 });
      expect(result.directUtilisation).toBeLessThanOrEqual(1);
      expect(result.directUtilisation).toBeGreaterThan(0);
      const most = (0.8 * (4000 / Math.PI) * result.luminaires.length) / (room.mountingMetres ?? 1) ** 2;
      expect(result.maximum).toBeLessThanOrEqual(most * (1 + 1e-9));
    }));

  it('another luminaire never takes light away', () =>
    holds((room) => {
      const base = run(room).result;
      const more = run({ ...room, ...at([...base.luminaires, { xMetres: 1, yMetres: 1 }]) }).result;
      base.lux.forEach((row, k) =>
        row.forEach((one, j) => expect(more.lux[k]?.[j]).toBeGreaterThanOrEqual(one)),
      );
    }));
});

describe('refused', () => {
  it.each<[string, object]>([
    ['lengthMetres', { lengthMetres: 0 }],
    ['mountingMetres', { mountingMetres: 0 }],
    ['lightLossFactor', { lightLossFactor: 1.1 }],
    ['lightLossFactor', { lightLossFactor: 0 }],
    ['layout', { luminaires: [{ xMetres: 1, yMetres: 1 }] }],
    ['luminaires', { layout: undefined }],
    ['luminaires', at([])],
    [
      'luminaires.1.xMetres',
      at([
        { xMetres: 8, yMetres: 5 },
        { xMetres: 8.1, yMetres: 1 },
      ]),
    ],
    ['luminaires.0.yMetres', at([{ xMetres: 1, yMetres: -0.1 }])],
    ['layout.rows', { layout: { rows: 0, columns: 1 } }],
    ['layout.columns', { layout: { rows: 1, columns: 1.5 } }],
    ['photometry', { photometry: { source: 'cosine' } }],
    ['photometry', { photometry: { source: 'cosine', lumens: 1, candela: 1 } }],
    ['photometry.text', { photometry: { text: 'nothing' } }],
    [
      'photometry.angles.vertical',
      { photometry: { angles: { vertical: [0, 80], horizontal: [0] }, candela: [[1, 1]] } },
    ],
    [
      'photometry.angles.vertical',
      { photometry: { angles: { vertical: [], horizontal: [0] }, candela: [[]] } },
    ],
    [
      'photometry.angles.horizontal',
      {
        photometry: {
          angles: { vertical: [0, 90], horizontal: [0, 45] },
          candela: [
            [1, 1],
            [1, 1],
          ],
        },
      },
    ],
    [
      'photometry.angles.horizontal',
      { photometry: { angles: { vertical: [0, 90], horizontal: [0, 90, 90] }, candela: [] } },
    ],
    ['photometry.candela', { photometry: { angles: { vertical: [0, 90], horizontal: [0] }, candela: [] } }],
    [
      'photometry.candela.1',
      { photometry: { angles: { vertical: [0, 90], horizontal: [0, 90] }, candela: [[1, 1], [1]] } },
    ],
    [
      'photometry.candela.0.1',
      { photometry: { angles: { vertical: [0, 90], horizontal: [0] }, candela: [[1, -1]] } },
    ],
  ])('%s: %j', (path, change) => expect(refusal(change)).toMatchObject({ code: 'invalid-input', path }));

  it('a damaged file by its line', () => {
    const text = lm63({ law: lopsided }).slice(0, -40);
    expect(refusal({ photometry: { text } })).toMatchObject({ path: 'photometry.text' });
    expect(refusal({ photometry: { text } })?.message).toMatch(/^line 11: the file ends here/);
  });

  it('what is too large, before it is begun', () => {
    expect(refusal({ gridMetres: 1e-9 })).toMatchObject({ code: 'too-large', path: 'gridMetres' });
    expect(refusal({ gridMetres: 0.01 }, WEB_LIMITS)).toMatchObject({
      code: 'too-large',
      path: 'gridMetres',
    });
    expect(refusal({ layout: { rows: 1000, columns: 1000 } })).toMatchObject({
      code: 'too-large',
      path: 'layout',
    });
    const many = Array.from({ length: 30_000 }, () => ({ xMetres: 1, yMetres: 1 }));
    expect(refusal(at(many), WEB_LIMITS)).toMatchObject({ code: 'too-large', path: 'luminaires' });
    const onePoint = { gridMetres: 100, layout: { rows: 100, columns: 100 } };
    expect(refusal(onePoint, WEB_LIMITS)).toMatchObject({ code: 'too-large', path: 'layout' });
    expect(refusal({ layout: { rows: 20, columns: 20 } }, WEB_LIMITS)).toBeNull();
  });
});

describe('findings', () => {
  const file = (law: Law, more: object = {}) => ({ text: lm63({ law, ...more }) });
  const both: [string, Partial<PointIlluminanceInput>, Partial<PointIlluminanceInput>][] = [
    // code, a room that raises it, one that does not
    ['point-no-light', { photometry: { source: 'cosine', lumens: 0 } }, {}],
    [
      'point-no-light',
      { photometry: file((_, g) => Math.max(0, -cosine(g)), { vertical: steps(90, 180, 10) }) },
      {},
    ],
    [
      'point-uplight-not-counted',
      { photometry: file(() => 100, { vertical: steps(0, 180, 10) }) },
      { photometry: file(() => 100) },
    ],
    [
      'point-near-field',
      { mountingMetres: 2.9, photometry: file(lopsided) },
      { mountingMetres: 3, photometry: file(lopsided) },
    ],
    ['point-grid-coarse', { gridMetres: 2.7, wallBandMetres: 0 }, { gridMetres: 2.5, wallBandMetres: 0 }],
    [
      'point-grid-coarse',
      { photometry: file((_, g) => (g <= 5 ? 9000 : 0)) },
      { photometry: file((_, g) => (g <= 5 ? 9000 : 0)), gridMetres: 0.2 },
    ],
    ['point-wall-band-dropped', { widthMetres: 1.9 }, { widthMetres: 2 }],
    ['point-under-target', { targetLux: 1000 }, { targetLux: 200 }],
    ['point-over-target', { targetLux: 100 }, { targetLux: 300 }],
    ['point-under-minimum', { minimumLux: 500 }, { minimumLux: 50 }],
    ['point-uneven', { minimumUniformity: 0.95 }, { minimumUniformity: 0.3 }],
    [
      'point-uneven',
      { minimumUniformity: 0.1, photometry: { source: 'cosine', lumens: 0 } },
      { minimumUniformity: 0.1 },
    ],
    [
      'photometry-coarse-angles',
      { photometry: file((_, g) => (g === 0 ? 1000 : 0)) },
      { photometry: file(lopsided) },
    ],
  ];
  it.each(both)('%s (%#)', (code, raised, quiet) => {
    expect(codes(raised)).toContain(code);
    expect(codes(quiet)).not.toContain(code);
  });

  it('the average with the target exactly is enough', () => {
    const { average, minimum, uniformity } = run().result;
    expect(codes({ targetLux: average, minimumLux: minimum, minimumUniformity: uniformity ?? 0 })).toEqual([
      'point-direct-only',
    ]);
  });

  it('says that it is direct light, here and not where a file alone is read', () => {
    expect(codes()).toEqual(['point-direct-only']);
    const alone = runCalculation(photometricFileCalculation, LOPSIDED).findings.map(({ code }) => code);
    expect(alone).not.toContain('point-direct-only');
  });

  it('leaves out what a file says of watts and papers', () => {
    expect(codes({ mountingMetres: 5, photometry: file(lopsided, { watts: 0, keywords: [] }) })).toEqual([
      'point-direct-only',
    ]);
  });

  it('without light: figures are zero, ratios null', () => {
    const { result } = run({ photometry: { source: 'cosine', lumens: 0 } });
    expect(result).toMatchObject({
      average: 0,
      minimum: 0,
      maximum: 0,
      uniformity: null,
      directUtilisation: null,
    });
  });
});
