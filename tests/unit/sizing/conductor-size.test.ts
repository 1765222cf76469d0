/** conductor-size: each rule of both bases, each finding with what raises it and what does not. */
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { conductorSizeCalculation } from '@/lib/sizing/conductor-size';
import type { ConductorSizeInput } from '@/lib/sizing/conductor-size-input';

type Change = { [K in keyof ConductorSizeInput]?: ConductorSizeInput[K] };

const US: ConductorSizeInput = {
  basis: 'us',
  system: 'single-phase',
  volts: 120,
  amps: 16,
  metres: 5,
  maxDropPct: 3,
  continuous: true,
  ambientCelsius: 30,
  loadedConductors: 2,
  terminalCelsius: 60,
};
const IEC: ConductorSizeInput = {
  basis: 'iec',
  system: 'single-phase',
  volts: 230,
  amps: 10,
  metres: 10,
  maxDropPct: 3,
  continuous: true,
  ambientCelsius: 30,
  loadedConductors: 2,
  installMethod: 'B2',
  zeOhms: 0.35,
  curve: 'B',
};
const us = (change: Change = {}) => runCalculation(conductorSizeCalculation, { ...US, ...change });
const iec = (change: Change = {}) => runCalculation(conductorSizeCalculation, { ...IEC, ...change });
const codes = (answer: ReturnType<typeof us>) => answer.findings.map(({ code }) => code);
const refused = (input: object) => {
  try {
    runCalculation(conductorSizeCalculation, input);
  } catch (error) {
    if (error instanceof EngineError) return error.issues.map(({ path }) => path);
  }
  return [];
};
const NOTHING = {
  size: null,
  ampacity: null,
  dropPct: null,
  overcurrentAmps: null,
  governedBy: null,
  zsOhms: null,
  zsMaxOhms: null,
};

describe('US basis', () => {
  it('puts 16 A continuous on AWG 12 behind 20 A', () => {
    const { result, findings } = us();
    expect(result).toMatchObject({
      size: 'AWG 12',
      ampacity: 20,
      overcurrentAmps: 20,
      governedBy: 'ampacity',
    });
    // 2 * 16 A * 5 m * 6.5 ohm/km of 120 V
    expect(result.dropPct).toBeCloseTo((2 * 16 * 5 * 0.0065 * 100) / 120, 10);
    expect(findings).toEqual([]);
  });

  it('needs A1 for 125 % of a continuous load, and just the load of another', () => {
    expect(us({ amps: 17 }).result.size).toBe('AWG 10');
    expect(us({ amps: 17, continuous: false }).result).toMatchObject({ size: 'AWG 12', overcurrentAmps: 20 });
    expect(us({ amps: 20, continuous: false }).result).toMatchObject({ size: 'AWG 12', overcurrentAmps: 20 });
  });

  it('keeps 15, 20 and 30 A on AWG 14, 12 and 10 however much their column gives', () => {
    const at = (amps: number) => us({ amps, continuous: false, terminalCelsius: 90 }).result;
    expect(
      [at(15), at(15.1), at(20.1), at(30.1)].map(({ size, overcurrentAmps }) => [size, overcurrentAmps]),
    ).toEqual([
      ['AWG 14', 15],
      ['AWG 12', 20],
      ['AWG 10', 25],
      ['AWG 8', 35],
    ]);
  });

  it('takes the insulation column for what heat and company leave, the terminals for the rest', () => {
    // AWG 12: 30 A * 0.91 * 0.7 = 19.11 A; AWG 10: 40 A * 0.91 * 0.7 = 25.48 A.
    const crowded = { ambientCelsius: 40, loadedConductors: 9, terminalCelsius: 75 };
    expect(us(crowded).result).toMatchObject({ size: 'AWG 12', overcurrentAmps: 20 });
    expect(us(crowded).result.ampacity).toBeCloseTo(19.11, 10);
    expect(us({ ...crowded, amps: 20, continuous: false }).result.size).toBe('AWG 10');
    expect(us({ ...crowded, insulationCelsius: 75 }).result.size).toBe('AWG 10');
  });

  it('never protects above the next standard rating over the ampacity', () => {
    // AWG 8 at 60 C: 40 A, and 55 * 0.82 * 0.8 = 36.08 A left, so 40 A at most: 33 A continuous needs 41.25.
    const hot = { ambientCelsius: 50, loadedConductors: 5, volts: 480, metres: 1 };
    expect(us({ ...hot, amps: 32 }).result).toMatchObject({ size: 'AWG 8', overcurrentAmps: 40 });
    expect(us({ ...hot, amps: 33 }).result).toMatchObject({ size: 'AWG 6', overcurrentAmps: 45 });
  });

  it('caps NM cable at its 60 C column, with 90 C to correct from', () => {
    const nm = us({ amps: 18, terminalCelsius: 75, installMethod: 'NM' }).result;
    expect(nm).toMatchObject({ size: 'AWG 10', ampacity: 30 });
    expect(us({ amps: 26, continuous: false, terminalCelsius: 75, volts: 480 }).result.ampacity).toBe(35);
  });

  it('says what governs', () => {
    expect(us({ amps: 2 }).result).toMatchObject({ size: 'AWG 14', governedBy: 'minimum-size' });
    expect(us({ amps: 8 }).result).toMatchObject({ size: 'AWG 14', governedBy: 'minimum-size' });
    expect(us({ amps: 9 }).result).toMatchObject({ size: 'AWG 14', governedBy: 'ampacity' });
    expect(us({ metres: 40 }).result).toMatchObject({ size: 'AWG 8', governedBy: 'voltage-drop' });
    expect(us({ minimumSize: 'AWG 8' }).result).toMatchObject({ size: 'AWG 8', governedBy: 'minimum-size' });
    expect(us({ minimumSize: 'AWG 12' }).result.governedBy).toBe('ampacity');
    expect(us({ minimumSize: 'AWG 18', amps: 1 }).result.size).toBe('AWG 14');
  });

  it('figures the drop at 75 C unless another temperature is given', () => {
    const warm = us({ celsius: 75 }).result.dropPct ?? 0;
    expect(us().result.dropPct).toBe(warm);
    expect(us({ celsius: 25 }).result.dropPct).toBeCloseTo(warm * (1 - 50 * 0.00323), 10);
  });

  it('drops sqrt 3 instead of 2 on three phases, and less at a lower power factor', () => {
    const single = us().result.dropPct ?? 0;
    expect(us({ system: 'three-phase', loadedConductors: 3 }).result.dropPct).toBeCloseTo(
      (single * Math.sqrt(3)) / 2,
      10,
    );
    expect(us({ powerFactor: 0.9 }).result.dropPct).toBeCloseTo(single * 0.9, 10);
  });
});

describe('US basis, extra-low-voltage DC', () => {
  const tape: Change = { system: 'dc', volts: 24, amps: 4, metres: 5, maxDropPct: 3, continuous: false };

  it('goes under AWG 14 behind a Class 2 source, which needs no overcurrent device', () => {
    const answer = us(tape);
    // AWG 18: 2 * 4 A * 5 m * 26.1 ohm/km = 1.044 V, 4.35 %; AWG 16: 2.73 %.
    expect(answer.result).toMatchObject({
      size: 'AWG 16',
      overcurrentAmps: null,
      governedBy: 'voltage-drop',
    });
    expect(codes(answer)).toEqual(['class-two-source']);
    expect(answer.working.map(({ key }) => key)).not.toContain('overcurrent-rating');
  });

  it('goes by load alone where the run is short', () =>
    expect(us({ ...tape, metres: 0.1 }).result).toMatchObject({ size: 'AWG 20', governedBy: 'ampacity' }));

  it.each([
    [12, 5, 5.001],
    [20, 5, 5.001],
    [24, 100 / 24, 4.17],
    [60, 100 / 60, 1.67],
  ])('at %f V the limit is %f A', (volts, fits, over) => {
    expect(codes(us({ ...tape, volts, amps: fits, metres: 0 }))).toEqual(['class-two-source']);
    const above = us({ ...tape, volts, amps: over, metres: 0 });
    expect(codes(above)).toContain('over-class-two');
    expect(above.result).toMatchObject({ size: 'AWG 14', overcurrentAmps: 15 });
  });

  it('has no class above 60 V nor for alternating current', () => {
    expect(codes(us({ ...tape, volts: 61 }))).toEqual([]);
    expect(us({ ...tape, volts: 61 }).result.size).toBe('AWG 14');
    expect(us({ ...tape, system: 'single-phase', metres: 0 }).result.size).toBe('AWG 14');
  });
});

describe('IEC basis', () => {
  it('puts 10 A on 1.5 mm2 behind 10 A', () => {
    const { result, findings } = iec();
    expect(result).toMatchObject({
      size: '1.5 mm2',
      ampacity: 16.5,
      overcurrentAmps: 10,
      governedBy: 'minimum-size',
    });
    // Class 2 at 70 C: 12.1 * (1 + 50 * 0.00393) ohm/km
    const ohms = 0.0121 * (1 + 50 * 0.00393);
    expect(result.dropPct).toBeCloseTo((2 * 10 * 10 * ohms * 100) / 230, 10);
    expect(result.zsOhms).toBeCloseTo(0.35 + 2 * ohms * 10, 10);
    expect(result.zsMaxOhms).toBeCloseTo((0.95 * 230) / (5 * 10), 10);
    expect(findings).toEqual([]);
  });

  it('keeps Ib <= In <= Iz', () => {
    expect(iec({ amps: 16 }).result).toMatchObject({
      size: '1.5 mm2',
      overcurrentAmps: 16,
      governedBy: 'ampacity',
    });
    expect(iec({ amps: 16.1 }).result).toMatchObject({ size: '2.5 mm2', ampacity: 23, overcurrentAmps: 20 });
    expect(iec({ amps: 13, ambientCelsius: 40 }).result).toMatchObject({
      size: '1.5 mm2',
      overcurrentAmps: 13,
    });
    expect(iec({ amps: 13, ambientCelsius: 41 }).result.size).toBe('1.5 mm2');
    expect(iec({ amps: 13, ambientCelsius: 46 }).result.size).toBe('2.5 mm2');
    expect(iec({ amps: 16, groupedCircuits: 4 }).result.ampacity).toBeCloseTo(30 * 0.65, 10);
    expect(iec({ amps: 16, groupedCircuits: 10 }).result.ampacity).toBeCloseTo(38 * 0.45, 10);
  });

  it('knows methods, insulation and three loaded conductors', () => {
    expect(iec({ installMethod: 'C' }).result.ampacity).toBe(19.5);
    expect(iec({ loadedConductors: 3, system: 'three-phase', volts: 400 }).result.ampacity).toBe(15);
    expect(iec({ insulation: 'XLPE90', terminalCelsius: 90 }).result.ampacity).toBe(22);
    expect(iec({ installMethod: undefined }).result.ampacity).toBe(16.5);
  });

  it('figures the drop at 70 C of PVC and 90 C of XLPE', () => {
    const [pvc, xlpe] = [iec().result.dropPct ?? 0, iec({ insulation: 'XLPE90' }).result.dropPct ?? 0];
    expect(xlpe / pvc).toBeCloseTo((1 + 70 * 0.00393) / (1 + 50 * 0.00393), 10);
  });

  it.each([
    ['B', 5],
    ['C', 10],
    ['D', 20],
  ] as const)('curve %s trips for sure at %d times In', (curve, m) =>
    expect(iec({ curve, zeOhms: 0.1 }).result.zsMaxOhms).toBeCloseTo((0.95 * 230) / (m * 10), 10),
  );

  it('takes the volts to earth of a three-phase supply', () => {
    const three = iec({ system: 'three-phase', volts: 400, loadedConductors: 3 }).result;
    expect(three.zsMaxOhms).toBeCloseTo((0.95 * 400) / Math.sqrt(3) / 50, 10);
  });

  it('takes a larger conductor for the fault loop', () => {
    // 2.185 ohm for C 10; 1.5 mm2 over 65 m is 1.88 + 0.35.
    const loop = iec({ curve: 'C', metres: 65, maxDropPct: 9 });
    expect(loop.result).toMatchObject({ size: '2.5 mm2', governedBy: 'fault-loop' });
    expect(loop.result.zsOhms).toBeLessThan(loop.result.zsMaxOhms ?? 0);
  });

  it('figures the fault loop hot, however cool the drop is figured', () => {
    const cool = iec({ celsius: 20 }).result;
    expect(cool.zsOhms).toBe(iec().result.zsOhms);
    expect(cool.dropPct).toBeLessThan(iec().result.dropPct ?? 0);
  });

  it('reckons with another protective conductor', () => {
    const thin = iec({ protectiveSize: '1 mm2' }).result;
    const factor = 1 + 50 * 0.00393;
    expect(thin.zsOhms).toBeCloseTo(0.35 + (0.0121 + 0.0181) * factor * 10, 10);
    // Over 16 mm2 the protective conductor stays at 16 mm2 unless given.
    const thick = iec({ amps: 80, volts: 400, metres: 1 }).result;
    expect(thick.size).toBe('25 mm2');
    expect(thick.zsOhms).toBeCloseTo(0.35 + (0.000727 + 0.00115) * factor, 10);
  });

  it('says what governs', () => {
    expect(iec({ metres: 60, maxDropPct: 3 }).result).toMatchObject({
      size: '4 mm2',
      governedBy: 'voltage-drop',
    });
    expect(iec({ minimumSize: '4 mm2' }).result).toMatchObject({ size: '4 mm2', governedBy: 'minimum-size' });
    expect(iec({ minimumSize: '0.75 mm2', amps: 2 }).result).toMatchObject({ size: '1.5 mm2' });
  });

  it('gives null for a loop that was not asked', () =>
    expect(iec({ zeOhms: undefined, curve: undefined }).result).toMatchObject({
      zsOhms: null,
      zsMaxOhms: null,
    }));
});

describe('where nothing fits: nulls and a stop', () => {
  it.each([
    ['load-over-conductors', true, us({ amps: 230, volts: 480 })],
    ['load-over-conductors', true, iec({ amps: 120, zeOhms: 0.01 })],
    ['ambient-too-hot', true, us({ ambientCelsius: 90 })],
    ['ambient-too-hot', true, iec({ ambientCelsius: 65 })],
    ['no-standard-rating', true, iec({ amps: 130, zeOhms: undefined })],
    ['drop-over-limit', false, us({ metres: 2000 })],
    ['drop-over-limit', false, iec({ metres: 2000, zeOhms: undefined })],
    ['disconnection-time', true, iec({ zeOhms: 5 })],
  ])('%s', (code, hard, answer) => {
    expect(answer.result).toEqual(NOTHING);
    const stops = answer.findings.filter(({ severity }) => severity === 'stop');
    expect(stops.map((stop) => [stop.code, stop.hard])).toEqual([[code, hard]]);
    expect(answer.working.length).toBeGreaterThan(2);
  });

  it('names all that fails at once', () =>
    expect(codes(iec({ amps: 120, metres: 2000 })).slice(0, 3)).toEqual([
      'load-over-conductors',
      'drop-over-limit',
      'disconnection-time',
    ]));

  it('carries no load at all where the insulation has nothing left', () =>
    expect(us({ amps: 0, ambientCelsius: 90 }).result).toEqual(NOTHING));
});

describe('what else is said', () => {
  it.each<[string, ReturnType<typeof us>, ReturnType<typeof us>]>([
    [
      'insulation-below-terminals',
      us({ terminalCelsius: 75, insulationCelsius: 60 }),
      us({ terminalCelsius: 75 }),
    ],
    ['rounded-up-overcurrent', us({ ambientCelsius: 40, loadedConductors: 9 }), us()],
    ['grouped-not-counted', us({ groupedCircuits: 3 }), us({ groupedCircuits: 3, loadedConductors: 6 })],
    ['flexible-as-stranded', us({ stranding: 'flexible' }), iec({ stranding: 'flexible' })],
    ['solid-as-stranded', us({ stranding: 'solid', amps: 40 }), us({ stranding: 'solid' })],
    ['inputs-not-used', us({ zeOhms: 0.3, curve: 'B' }), us({ insulationCelsius: 90 })],
    ['inputs-not-used', iec({ insulationCelsius: 90 }), iec({ protectiveSize: '1.5 mm2' })],
    [
      'terminals-below-insulation',
      iec({ insulation: 'XLPE90' }),
      iec({ insulation: 'XLPE90', terminalCelsius: 90 }),
    ],
    [
      'fault-loop-not-checked',
      iec({ zeOhms: undefined }),
      iec({ system: 'dc', zeOhms: undefined, curve: undefined }),
    ],
  ])('%s', (code, raised, quiet) => {
    expect(codes(raised)).toContain(code);
    expect(codes(quiet)).not.toContain(code);
    expect(raised.findings.every(({ severity }) => severity !== 'stop')).toBe(true);
  });

  it('names the figures that do not count', () =>
    expect(us({ zeOhms: 0.3, curve: 'B' }).findings[0]?.values).toEqual({
      keys: 'zeOhms, curve',
      basis: 'us',
    }));
});

describe('refused, by path', () => {
  it.each<[string, object]>([
    ['terminalCelsius', { ...US, terminalCelsius: undefined }],
    ['terminalCelsius', { ...US, terminalCelsius: 70 }],
    ['insulationCelsius', { ...US, insulationCelsius: 105 }],
    ['installMethod', { ...US, installMethod: 'B1' }],
    ['installMethod', { ...IEC, installMethod: 'NM' }],
    ['loadedConductors', { ...IEC, loadedConductors: 4 }],
    ['loadedConductors', { ...US, loadedConductors: 0 }],
    ['groupedCircuits', { ...IEC, groupedCircuits: 21 }],
    ['minimumSize', { ...US, minimumSize: '2.5 mm2' }],
    ['minimumSize', { ...IEC, minimumSize: 'AWG 12' }],
    ['curve', { ...IEC, curve: undefined }],
    ['zeOhms', { ...IEC, system: 'dc' }],
    ['metres', { ...US, metres: -1 }],
    ['volts', { ...US, volts: 0 }],
    ['maxDropPct', { ...US, maxDropPct: 101 }],
  ])('%s', (path, input) => expect(refused(JSON.parse(JSON.stringify(input)) as object)).toEqual([path]));

  it('takes an IEC circuit without terminalCelsius, as it has no column for it', () =>
    expect(refused(IEC)).toEqual([]));
});
