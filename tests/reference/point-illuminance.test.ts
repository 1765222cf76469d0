/**
 * Illuminance at points against printed examples (data/photometry.json), the grid of EN 12464-1
 * (data/calculation-grid.json) and geometry: where all the light must end up.
 */
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { pointIlluminanceCalculation, type PointIlluminanceInput } from '@/lib/lighting/point-illuminance';
import { gridOf, gridStep } from '@/lib/lighting/point-illuminance-grid';
import { cosine, eulumdat, type Law, lm63, RADIANS, steps } from '../support/photometric-files';
import { seeded, testSeed } from '../support/random';
import grids from './data/calculation-grid.json';
import entries from './data/photometry.json';

const run = (input: Partial<PointIlluminanceInput>) =>
  runCalculation(pointIlluminanceCalculation, {
    lengthMetres: 10,
    widthMetres: 10,
    mountingMetres: 3,
    photometry: { source: 'cosine', candela: 1000 },
    lightLossFactor: 1,
    wallBandMetres: 0,
    ...input,
  }).result;
const figures = (id: string) => {
  const found = entries.find((one) => one.id === id);
  if (!found) throw new Error(`no entry ${id}`);
  return { ...found.inputs, ...found.expected } as unknown as Record<string, number>;
};
const expectNear = (got: number | null | undefined, want: number, relative: number) =>
  expect(Math.abs((got ?? NaN) - want), `${got} against ${want}`).toBeLessThanOrEqual(
    relative * Math.abs(want),
  );

const isotropic = (candela: number): PointIlluminanceInput['photometry'] => ({
  angles: { vertical: [0, 90, 180], horizontal: [0] },
  candela: [[candela, candela, candela]],
});
/** Lux at `metres` beside a luminaire at `height`: points lie a metre apart, the first under the luminaire. */
function beside(
  photometry: PointIlluminanceInput['photometry'],
  height: number,
  step: number,
  steps_: number,
) {
  const { lux, xs } = run({
    lengthMetres: step * (steps_ + 1),
    widthMetres: step,
    mountingMetres: height,
    gridMetres: step,
    luminaires: [{ xMetres: step / 2, yMetres: step / 2 }],
    photometry,
  });
  expectNear(xs[steps_], step * (steps_ + 0.5), 1e-12);
  return lux[0]?.[steps_];
}

describe('printed examples', () => {
  it('PH-06: 1200 lm all round, 8 m up and 6 m aside', () => {
    const { flux_lm = NaN, height_m = NaN, horizontal_m = NaN, E_h_lx = NaN, I_cd = NaN } = figures('PH-06');
    const candela = flux_lm / (4 * Math.PI);
    expect(Math.abs(candela - I_cd)).toBeLessThan(0.005);
    expect(Math.abs((beside(isotropic(candela), height_m, 1, horizontal_m) ?? NaN) - E_h_lx)).toBeLessThan(
      0.005,
    );
  });

  it('PH-07: where the light has fallen to a tenth', () => {
    const { height_m = NaN, ratio = NaN, horizontal_m = NaN } = figures('PH-07');
    const [under = NaN, there = NaN] = [0, 1].map((k) => beside(isotropic(500), height_m, horizontal_m, k));
    expect(Math.abs(there / under - ratio)).toBeLessThan(1e-4);
  });

  it('PH-08: 0.6 m over a table, 0.8 m aside', () => {
    const { height_m = NaN, E_below_lx = NaN, horizontal_m = NaN, E_lx = NaN, I_cd = NaN } = figures('PH-08');
    expect(Math.abs((beside(isotropic(I_cd), height_m, 0.4, 0) ?? NaN) - E_below_lx)).toBeLessThan(0.001);
    expect(Math.abs((beside(isotropic(I_cd), height_m, horizontal_m, 1) ?? NaN) - E_lx)).toBeLessThan(0.001);
  });

  it('PH-09: 4000 cd, 8 m up', () => {
    const { I_cd = NaN, mounting_height_m = NaN, E_lx = NaN } = figures('PH-09');
    expectNear(beside(isotropic(I_cd), mounting_height_m, 1, 0), E_lx, 1e-12);
  });
});

describe('the grid of EN 12464-1', () => {
  it('steps and numbers as its table prints them', () => {
    for (const { d_m, p_m, points } of grids.grid.expected) {
      expectNear(gridStep(d_m), p_m, 0.1);
      expect(Math.abs(gridOf(d_m, d_m, 0).columns - points)).toBeLessThanOrEqual(1);
    }
    expect(gridStep(1e4)).toBe(10);
  });

  it('the printed example', () => {
    const { inputs, expected } = grids['grid-5x4'];
    expect(gridOf(inputs.length_m, inputs.width_m, inputs.band_m)).toMatchObject(expected);
    expect(gridOf(inputs.width_m, inputs.length_m, inputs.band_m)).toMatchObject({
      columns: expected.rows,
      rows: expected.columns,
    });
  });

  it('takes the shorter side where the longer is twice as long or more, and keeps cells within 1:2', () => {
    expect(gridOf(20, 10, 0).mostStepMetres).toBe(gridStep(10));
    expect(gridOf(19.9, 10, 0).mostStepMetres).toBe(gridStep(19.9));
    for (const [length, width] of [
      [3, 7],
      [50, 4],
      [8.3, 8.1],
      [1.2, 40],
      [100, 90],
    ] as const) {
      const { columns, rows, x, y } = gridOf(length, width, 0.5);
      const shape = x.metres / columns / (y.metres / rows);
      expect(shape).toBeGreaterThan(0.5);
      expect(shape).toBeLessThan(2);
    }
  });

  it('leaves out 0.5 m along the walls, but not in a corridor', () => {
    const { xs, ys, stepMetres } = run({
      lengthMetres: 12,
      widthMetres: 1.5,
      wallBandMetres: 0.5,
      layout: { rows: 1, columns: 3 },
    });
    expectNear((xs[0] ?? NaN) - stepMetres.x / 2, 0.5, 1e-12);
    expectNear((xs.at(-1) ?? NaN) + stepMetres.x / 2, 11.5, 1e-12);
    expectNear((ys[0] ?? NaN) - stepMetres.y / 2 + 1, 1, 1e-12);
  });
});

/** Share of a Lambertian source's flux on a rectangle, the source over its corner. */
function formFactor(a: number, b: number, h: number): number {
  const [A, B] = [a / h, b / h];
  const side = (p: number, q: number) => (p / Math.hypot(1, p)) * Math.atan(q / Math.hypot(1, p));
  return (side(A, B) + side(B, A)) / (2 * Math.PI);
}

describe('the light that leaves is the light that arrives', () => {
  it('the form factor itself, against integration', () => {
    const [a, b, h, cells] = [3, 2, 1.5, 400];
    let sum = 0;
    for (let i = 0; i < cells; i++)
      for (let j = 0; j < cells; j++) {
        const r2 = ((a * (i + 0.5)) / cells) ** 2 + ((b * (j + 0.5)) / cells) ** 2 + h * h;
        sum += (h * h) / (Math.PI * r2 * r2);
      }
    expectNear((sum * a * b) / cells ** 2, formFactor(a, b, h), 1e-5);
    expectNear(formFactor(1e6, 1e6, 1), grids['form-factor'].expected['A=B=infinity'], 1e-6);
  });

  it('a cosine source over the middle and over a corner of a rectangle', () => {
    const room = {
      lengthMetres: 6,
      widthMetres: 4,
      mountingMetres: 1.5,
      gridMetres: 0.05,
      lightLossFactor: 0.7,
    };
    const middle = run({ ...room, luminaires: [{ xMetres: 3, yMetres: 2 }] });
    expectNear(middle.average * 24, 0.7 * 1000 * Math.PI * 4 * formFactor(3, 2, 1.5), 1e-4);
    const corner = run({ ...room, luminaires: [{ xMetres: 0, yMetres: 0 }] });
    expectNear(corner.directUtilisation, formFactor(6, 4, 1.5), 1e-4);
  });

  const wide = {
    lengthMetres: 60,
    widthMetres: 60,
    mountingMetres: 1,
    gridMetres: 0.2,
    luminaires: [{ xMetres: 30, yMetres: 30 }],
  };
  it.each<[string, Law]>([
    ['Lambertian', (_, g) => 900 * Math.max(0, cosine(g))],
    [
      'cosine cubed, along more than across',
      (c, g) => 900 * Math.max(0, cosine(g)) ** 3 * (1 + 0.4 * cosine(2 * c)),
    ],
    ['to one side', (c, g) => 300 * Math.max(0, cosine(g)) ** 2 * (1 + cosine(c)) * (1 - 0.5 * cosine(g))],
  ])('on a very large plane it is all that goes down: %s', (_, law) => {
    const vertical = steps(0, 90, 2.5);
    for (const text of [
      lm63({ law, vertical, horizontal: steps(0, 360, 15) }),
      eulumdat({ law, isym: 0, vertical }),
    ]) {
      const result = run({ ...wide, photometry: { text } });
      // At most 1/(1 + 30^2) of a Lambertian's light passes outside.
      expectNear(result.directUtilisation, 1, 2.5e-3);
      expect(result.average * 3600).toBeLessThanOrEqual(result.installedLumens);
    }
  });

  it('uplight never arrives', () => {
    const result = run({ ...wide, photometry: isotropic(100) });
    expectNear(result.installedLumens, 400 * Math.PI, 1e-12);
    // A share of 1 - h/sqrt(h^2 + r^2) of the lower half within r: 30 m at least, 42.4 m at most.
    expect(result.directUtilisation).toBeGreaterThan(0.5 * (1 - 1 / Math.hypot(1, 30)));
    expect(result.directUtilisation).toBeLessThan(0.5 * (1 - 1 / Math.hypot(1, 42.5)));
  });
});

const seed = testSeed();
describe(`against the point formula by itself, TEST_SEED=${seed}`, () => {
  const random = seeded(seed);
  const law: Law = (c, g) =>
    800 * Math.max(0, cosine(g)) * (1 + 0.5 * cosine(c) + 0.2 * Math.sin(2 * c * RADIANS));
  const text = lm63({ law, vertical: steps(0, 90, 1), horizontal: steps(0, 360, 2) });
  it.each(Array.from({ length: 10 }, (_, k) => k))('room %i', () => {
    const [length, width] = [random.between(2, 20), random.between(2, 20)];
    const luminaires = Array.from({ length: random.whole(1, 6) }, () => ({
      xMetres: random.between(0, length),
      yMetres: random.between(0, width),
      mountingMetres: random.between(1.5, 5),
      rotationDegrees: random.between(-180, 180),
    }));
    const factor = random.between(0.5, 1);
    const { lux, xs, ys } = run({
      lengthMetres: length,
      widthMetres: width,
      luminaires,
      lightLossFactor: factor,
      photometry: { text },
    });
    ys.forEach((y, row) =>
      xs.forEach((x, column) => {
        let want = 0;
        for (const one of luminaires) {
          const [dx, dy, h] = [x - one.xMetres, y - one.yMetres, one.mountingMetres];
          const cos = h / Math.sqrt(dx * dx + dy * dy + h * h);
          const c = Math.atan2(dy, dx) / RADIANS - one.rotationDegrees;
          want += (factor * law(c, Math.acos(cos) / RADIANS) * cos ** 3) / (h * h);
        }
        // Straight lines over 2 degrees of C miss by step^2/8 of 1.3 where the law is at 0.3 at least: 7e-4.
        expectNear(lux[row]?.[column], want, 1e-3);
      }),
    );
  });
});
