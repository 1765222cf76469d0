import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { lumenMethodCalculation, type LumenMethodInput } from '@/lib/lighting/lumen-method';
import { pointIlluminanceCalculation } from '@/lib/lighting/point-illuminance';
import { testSeed } from '../../support/random';

const ROOM: LumenMethodInput = {
  lengthMetres: 10,
  widthMetres: 8,
  mountingMetres: 2,
  utilisationFactor: 0.8,
  lumensPerLuminaire: 4000,
  lightLossFactor: 0.75,
  targetLux: 300,
};
const FILE: LumenMethodInput = {
  ...ROOM,
  utilisationFactor: undefined,
  photometry: { source: 'cosine', lumens: 4000 },
  reflectances: { ceiling: 0.7, walls: 0.5, floor: 0.2 },
};
const answer = (input: LumenMethodInput) => runCalculation(lumenMethodCalculation, input);
const run = (change: Partial<LumenMethodInput> = {}) => answer({ ...ROOM, ...change }).result;
const file = (change: Partial<LumenMethodInput> = {}) => answer({ ...FILE, ...change }).result;
const given = (quantity: number, change: Partial<LumenMethodInput> = {}) => ({
  targetLux: undefined,
  quantity,
  ...change,
});
const codes = (change: Partial<LumenMethodInput>, room = ROOM) =>
  answer({ ...room, ...change }).findings.map(({ code }) => code);
const refusal = (change: object, room = ROOM) => {
  try {
    answer({ ...room, ...change });
  } catch (error) {
    if (error instanceof EngineError) return error.issues[0]?.path;
    throw error;
  }
  return null;
};
const UPWARDS = {
  angles: { vertical: [90, 135, 180], horizontal: [0] },
  candela: [[0, 1000, 1000]],
};
const DARK = { angles: { vertical: [0, 90], horizontal: [0] }, candela: [[0, 0]] };

describe('figures', () => {
  it('quantity for a target, rounded up, and the light it gives', () => {
    // 300 * 80 / (4000 * 0.8 * 0.75) = 10
    expect(run()).toMatchObject({ quantity: 10, wattsPerSquareMetre: null, maxSpacingMetres: null });
    expect(run().lux).toBeCloseTo(300, 9);
    expect(run().initialLux).toBeCloseTo(400, 9);
    expect(run({ targetLux: 301 })).toMatchObject({ quantity: 11 });
    expect(run({ targetLux: 300 * (1 + 1e-10) }).quantity).toBe(10);
    expect(run({ targetLux: 0.001 }).quantity).toBe(1);
  });

  it('light of a quantity', () => {
    expect(run(given(5)).lux).toBeCloseTo(150, 9);
    expect(run(given(5)).quantityExact).toBeNull();
    expect(run(given(5, { requiredLux: 300 })).quantityExact).toBeCloseTo(10, 9);
    expect(run(given(5, { wattsPerLuminaire: 40 })).wattsPerSquareMetre).toBeCloseTo(2.5, 12);
  });

  it('a table of factors is read on a line, held at its end, and not stretched at its beginning', () => {
    const table = (roomIndex: number[], factor: number[]) => ({
      utilisationFactor: undefined,
      utilisationTable: { roomIndex, factor },
    });
    // The room's index is 80 / (2 * 18) = 2.222.
    expect(run(table([2, 2.5], [0.6, 0.7])).utilisationFactor).toBeCloseTo(
      0.6 + (0.1 * (80 / 36 - 2)) / 0.5,
      12,
    );
    expect(run(table([1, 2], [0.5, 0.6])).utilisationFactor).toBe(0.6);
    expect(run(table([80 / 36, 3], [0.5, 0.6])).utilisationFactor).toBe(0.5);
    expect(refusal(table([2.5, 3], [0.5, 0.6]))).toBe('utilisationTable.roomIndex');
    expect(refusal(table([1, 2, 3], [0.5, 0.6]))).toBe('utilisationTable.factor');
    expect(refusal(table([1, 1], [0.5, 0.6]))).toBe('utilisationTable.roomIndex.1');
  });

  it('photometry counts by its shape alone', () => {
    const shape = file();
    expect(file({ photometry: { source: 'cosine', lumens: 9 } }).utilisationFactor).toBeCloseTo(
      shape.utilisationFactor ?? NaN,
      12,
    );
    expect(shape.directRatio).toBeGreaterThan(0.5);
    expect(run().directRatio).toBeNull();
  });

  it('all light up or none at all: nulls and a stop', () => {
    const black = { photometry: UPWARDS, reflectances: { ceiling: 0, walls: 0.5, floor: 0.2 } };
    for (const change of [black, { photometry: DARK }]) {
      expect(file(change)).toMatchObject({ quantityExact: null, quantity: null, lux: null });
      expect(codes(change, FILE)).toContain('lumen-no-light');
    }
    expect(file(given(4, black)).lux).toBe(0);
    expect(file({ photometry: UPWARDS }).quantity).toBeGreaterThan(0);
    expect(codes({ photometry: UPWARDS }, FILE)).not.toContain('lumen-no-light');
  });
});

describe('laws', () => {
  const seed = testSeed();
  const share = (max: number) => fc.double({ min: 0, max, noNaN: true });
  const rooms = fc.record({
    lengthMetres: fc.double({ min: 2, max: 60, noNaN: true }),
    widthMetres: fc.double({ min: 2, max: 60, noNaN: true }),
    mountingMetres: fc.double({ min: 0.5, max: 12, noNaN: true }),
  });

  it(`room cavity ratio is five over the room index; the quantity is the least that does (seed ${seed})`, () => {
    fc.assert(
      fc.property(rooms, fc.double({ min: 20, max: 2000, noNaN: true }), (room, targetLux) => {
        const got = run({ ...room, targetLux });
        expect(got.roomCavityRatio * got.roomIndex).toBeCloseTo(5, 9);
        const quantity = got.quantity ?? NaN;
        expect(got.lux).toBeGreaterThanOrEqual(targetLux * (1 - 1e-9));
        const fewer = ((got.lux ?? NaN) * (quantity - 1)) / quantity;
        expect(fewer).toBeLessThan(targetLux);
      }),
      { seed, numRuns: 300 },
    );
  });

  it(`brighter surfaces and lower rooms never lower the utilisation (seed ${seed})`, () => {
    fc.assert(
      fc.property(
        rooms,
        share(0.85),
        share(0.85),
        share(0.85),
        share(1),
        (room, ceiling, walls, floor, up) => {
          // Part of the light up, part down.
          const photometry = {
            angles: { vertical: [0, 60, 90, 120, 180], horizontal: [0] },
            candela: [[1000 * (1 - up), 700 * (1 - up), 0, 700 * up, 1000 * up]],
          };
          const of = (change: object, reflectances = { ceiling, walls, floor }) =>
            file({ ...room, photometry, reflectances, ...change }).utilisationFactor ?? NaN;
          const factor = of({});
          const slack = 1e-9;
          for (const key of ['ceiling', 'walls', 'floor'] as const) {
            const now = { ceiling, walls, floor };
            expect(of({}, { ...now, [key]: now[key] + 0.05 })).toBeGreaterThanOrEqual(factor - slack);
          }
          expect(of({ mountingMetres: room.mountingMetres * 0.9 })).toBeGreaterThanOrEqual(factor - slack);
          // What the floor swallows can not be more than what the luminaires give.
          expect(factor * (1 - floor)).toBeLessThanOrEqual(1 + slack);
        },
      ),
      { seed, numRuns: 200 },
    );
  });

  it(`cavities above and below take light, and are none where they have no height (seed ${seed})`, () => {
    fc.assert(
      fc.property(rooms, share(0.8), share(0.5), (room, ceiling, walls) => {
        const reflectances = { ceiling, walls, floor: 0.2 };
        const photometry = {
          angles: { vertical: [0, 90, 180], horizontal: [0] },
          candela: [[500, 100, 500]],
        };
        const at = (ceilingCavityMetres: number) =>
          file({ ...room, reflectances, photometry, ceilingCavityMetres }).utilisationFactor ?? NaN;
        expect(at(0)).toBe(file({ ...room, reflectances, photometry }).utilisationFactor);
        if (walls < ceiling) expect(at(2)).toBeLessThanOrEqual(at(0.5) + 1e-9);
      }),
      { seed, numRuns: 100 },
    );
  });

  it('in a black room it is what point-illuminance adds up over the whole plane', () => {
    for (const [lengthMetres, widthMetres, mountingMetres] of [
      [10, 10, 2],
      [16, 10, 3],
      [12, 6, 3],
    ] as const) {
      const plain = { lengthMetres, widthMetres, mountingMetres };
      const photometry = { source: 'cosine', lumens: 1000 } as const;
      const black = { ceiling: 0, walls: 0, floor: 0 };
      const points = runCalculation(pointIlluminanceCalculation, {
        ...plain,
        photometry,
        lightLossFactor: 1,
        wallBandMetres: 0,
        gridMetres: 0.5,
        layout: { rows: 12, columns: 12 },
      }).result;
      const got = file({ ...plain, photometry, reflectances: black }).utilisationFactor ?? NaN;
      expect(Math.abs(got - (points.directUtilisation ?? NaN))).toBeLessThan(0.03);
    }
  });
});

describe('findings', () => {
  it.each([
    ['lumen-under-target', given(9, { requiredLux: 300 }), given(10, { requiredLux: 300 })],
    ['lumen-over-target', given(16, { requiredLux: 300 }), given(15, { requiredLux: 300 })],
    ['lumen-over-target', { targetLux: 10 }, { targetLux: 21 }],
    ['lumen-layout-other-quantity', { layout: { rows: 3, columns: 3 } }, { layout: { rows: 2, columns: 5 } }],
    [
      'lumen-spacing-too-wide',
      { layout: { rows: 2, columns: 5 }, spacingRatioMax: 1.99 },
      { layout: { rows: 2, columns: 5 }, spacingRatioMax: 2 },
    ],
    ['lumen-too-few-to-space', { spacingRatioMax: 1.2 }, { spacingRatioMax: 1.7 }],
    ['lumen-loss-factor-unusual', { lightLossFactor: 0.49 }, { lightLossFactor: 0.5 }],
    ['lumen-loss-factor-unusual', { lightLossFactor: 0.91 }, { lightLossFactor: 0.9 }],
    ['lumen-utilisation-over-one', { utilisationFactor: 1.01 }, { utilisationFactor: 1 }],
    [
      'lumen-power-over-allowance',
      { wattsPerLuminaire: 60, allowance: { wattsPerSquareMetre: 7.4, basis: 'code 2019, Table 1' } },
      { wattsPerLuminaire: 60, allowance: { wattsPerSquareMetre: 7.5, basis: 'code 2019, Table 1' } },
    ],
  ] as [string, Partial<LumenMethodInput>, Partial<LumenMethodInput>][])('%s', (code, raises, doesNot) => {
    expect(codes(raises)).toContain(code);
    expect(codes(doesNot)).not.toContain(code);
  });

  it.each([
    ['lumen-cavity-beyond-tables', { mountingMetres: 9 }, { mountingMetres: 8 }],
    ['lumen-file-other-lumens', { lumensPerLuminaire: 3800 }, { lumensPerLuminaire: 3810 }],
  ] as [string, Partial<LumenMethodInput>, Partial<LumenMethodInput>][])(
    '%s, with photometry',
    (code, raises, doesNot) => {
      expect(codes(raises, FILE)).toContain(code);
      expect(codes(doesNot, FILE)).not.toContain(code);
    },
  );

  it('an allowance is the basis of its finding, and only no light is a stop, a soft one', () => {
    const over = {
      wattsPerLuminaire: 60,
      allowance: { wattsPerSquareMetre: 1, basis: 'code 2019, Table 1' },
    };
    const finding = answer({ ...ROOM, ...over }).findings.find(({ code }) => code.startsWith('lumen-power'));
    expect(finding?.basis).toBe('code 2019, Table 1');
    const stops = answer({ ...FILE, photometry: DARK }).findings.filter(
      ({ severity }) => severity === 'stop',
    );
    expect(stops.map(({ code, hard }) => [code, hard])).toEqual([['lumen-no-light', false]]);
  });
});

describe('refusals', () => {
  it.each([
    ['lengthMetres', { lengthMetres: 0 }],
    ['mountingMetres', { mountingMetres: -1 }],
    ['lumensPerLuminaire', { lumensPerLuminaire: 0 }],
    ['lightLossFactor', { lightLossFactor: 1.1 }],
    ['utilisationFactor', { utilisationFactor: undefined }],
    ['utilisationFactor', { photometry: { source: 'cosine', lumens: 1 } }],
    ['quantity', { quantity: 5 }],
    ['targetLux', { targetLux: undefined }],
    ['requiredLux', { requiredLux: 500 }],
    ['reflectances', { reflectances: { ceiling: 0.7, walls: 0.5, floor: 0.2 } }],
    ['ceilingCavityMetres', { ceilingCavityMetres: 1 }],
  ])('%s', (at, change) => expect(refusal(change)).toBe(at));

  it.each([
    ['reflectances', { reflectances: undefined }],
    ['reflectances.walls', { reflectances: { ceiling: 0.7, walls: 0.96, floor: 0.2 } }],
    ['photometry.text', { photometry: { text: 'nothing' } }],
  ])('%s, with photometry', (at, change) => expect(refusal(change, FILE)).toBe(at));
});
