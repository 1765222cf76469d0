/** branch-circuit: counts, circuits, rows, existing circuits; each finding with what raises it and what does not. */
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { branchCircuitCalculation } from '@/lib/sizing/branch-circuit';
import type { BranchCircuitInput, BranchLoad } from '@/lib/sizing/branch-circuit-input';

type Change = { [K in keyof BranchCircuitInput]?: BranchCircuitInput[K] };
type LoadChange = { [K in keyof BranchLoad]?: BranchLoad[K] };

const load = (change: LoadChange = {}): BranchLoad =>
  ({ name: 'panel', quantity: 30, voltAmps: 40, unitsPerBreaker: 50, ...change }) as BranchLoad;
const US: BranchCircuitInput = {
  basis: 'us',
  volts: 120,
  system: 'single-phase',
  loads: [load()],
  breakerAmps: 20,
  continuous: true,
  metres: 10,
  maxDropPct: 3,
};
const IEC: BranchCircuitInput = {
  ...US,
  basis: 'iec',
  volts: 230,
  loads: [load({ unitsPerBreaker: undefined, unitsPerB16: 20 })],
  breakerAmps: 10,
  curve: 'C',
  zeOhms: 0.3,
};
const of = (base: BranchCircuitInput) => (change: Change, one?: LoadChange) =>
  runCalculation(branchCircuitCalculation, {
    ...base,
    ...(one ? { loads: [{ ...base.loads[0], ...one }] } : {}),
    ...change,
  });
const us = of(US);
const iec = of(IEC);
type Answer = ReturnType<typeof us>;
const codes = ({ findings }: Answer) => findings.map(({ code }) => code);
const quantities = ({ result }: Answer) =>
  result.circuits.map(({ units }) => units.reduce((sum, { quantity }) => sum + quantity, 0));
const refused = (change: object) => {
  try {
    runCalculation(branchCircuitCalculation, { ...US, ...change });
  } catch (error) {
    if (error instanceof EngineError) return [error.code, ...error.issues.map(({ path }) => path)];
  }
  return [];
};

describe('units by load', () => {
  it('takes 125 % of a continuous load on the US basis', () => {
    expect(us({}).result.unitsByLoad).toBe(48);
    expect(us({ continuous: false }).result.unitsByLoad).toBe(60);
    expect(iec({}).result.unitsByLoad).toBe(57);
  });

  it('takes three phases by line to line', () =>
    expect(us({ system: 'three-phase', volts: 208 }).result.unitsByLoad).toBe(
      Math.floor((20 * 208 * Math.sqrt(3)) / 1.25 / 40),
    ));

  it('gives no figure for what takes nothing', () => {
    const { result } = us({}, { voltAmps: 0 });
    expect(result).toMatchObject({ unitsByLoad: null, unitsByInrush: 50 });
    expect(result.circuits).toHaveLength(1);
    expect(result.circuits[0]).toMatchObject({ amps: 0, size: 'AWG 12', dropPct: 0 });
  });
});

describe('units by inrush', () => {
  it('US: the maker’s count, and the control’s listed rating', () => {
    expect(us({}).result.unitsByInrush).toBe(50);
    expect(us({ control: { ratedInrushAmps: 400 } }, { inrushAmps: 30 }).result.unitsByInrush).toBe(13);
    expect(us({ control: { maxUnits: 12 } }).result.unitsByInrush).toBe(12);
    expect(us({}, { unitsPerBreaker: undefined, unitsPerB16: 20 }).result.unitsByInrush).toBeNull();
  });

  it.each([
    ['B', 10, 12],
    ['B', 16, 20],
    ['C', 10, 20],
    ['C', 16, 33],
    ['C', 20, 41],
  ] as const)('IEC: twenty on B16 are on %s%d %d', (curve, breakerAmps, units) =>
    expect(iec({ curve, breakerAmps, zeOhms: undefined }).result.unitsByInrush).toBe(units),
  );

  it('IEC: a D curve only by the breaker maker’s pulse factor, or by a count', () => {
    const d: Change = { curve: 'D', zeOhms: undefined };
    expect(iec(d).result.unitsByInrush).toBeNull();
    expect(iec(d, { inrushAmps: 40, pulseFactor: 4 }).result.unitsByInrush).toBe(10);
    expect(iec(d, { unitsPerBreaker: 17 }).result.unitsByInrush).toBe(17);
  });

  it('IEC: has no pulse factor of its own', () =>
    expect(iec({}, { unitsPerB16: undefined, inrushAmps: 40 }).result.unitsByInrush).toBeNull());

  it('equal within 1e-9 is a whole unit', () =>
    expect(iec({}, { unitsPerB16: undefined, inrushAmps: 0.3, pulseFactor: 0.3 }).result.unitsByInrush).toBe(
      50,
    ));
});

describe('circuits', () => {
  it('takes the least number of circuits, evenly filled', () => {
    expect(quantities(us({}, { quantity: 48 }))).toEqual([48]);
    expect(quantities(us({}, { quantity: 49 }))).toEqual([25, 24]);
    expect(quantities(us({}, { quantity: 100, unitsPerBreaker: 30 }))).toEqual([25, 25, 25, 25]);
  });

  it('says what governs', () => {
    expect(us({}, { quantity: 100 }).result.governedBy).toBe('load');
    expect(us({}, { quantity: 100, unitsPerBreaker: 30 }).result.governedBy).toBe('inrush');
    expect(us({ metres: 60 }, { quantity: 30 }).result.governedBy).toBe('voltage-drop');
    const loop = iec({ metres: 85, maxDropPct: 10 }, { quantity: 5, voltAmps: 20 }).result;
    expect(loop).toMatchObject({ governedBy: 'fault-loop', circuits: [{ size: '2.5 mm2' }] });
  });

  it('sizes the conductor for the breaker, not for the load alone', () => {
    expect(us({}, { quantity: 2 }).result.circuits[0]?.size).toBe('AWG 12');
    expect(us({ breakerAmps: 15 }, { quantity: 2 }).result.circuits[0]?.size).toBe('AWG 14');
    expect(us({ breakerAmps: 30 }, { quantity: 2 }).result.circuits[0]?.size).toBe('AWG 10');
    expect(iec({ breakerAmps: 20, zeOhms: 0.1 }, { quantity: 2 }).result.circuits[0]?.size).toBe('2.5 mm2');
  });

  it('counts a row as metres + spacing * (N - 1) / 2', () => {
    const row = us({ spacingMetres: 2 }, { quantity: 11 }).result.circuits[0];
    const lump = us({ metres: 20 }, { quantity: 11 }).result.circuits[0];
    expect(row?.dropPct).toBeCloseTo(lump?.dropPct ?? 0, 12);
    // The same, added up section by section along the row.
    let volts = 0;
    const each = 40 / 120;
    for (let unit = 1; unit <= 11; unit++) volts += 2 * 0.0065 * (unit === 1 ? 10 : 2) * each * (12 - unit);
    expect(row?.dropPct).toBeCloseTo((volts / 120) * 100, 10);
  });

  it('takes the fault loop to the end of the row', () => {
    const [row] = iec({ spacingMetres: 2 }, { quantity: 11 }).result.circuits;
    expect(row?.zsOhms).toBeCloseTo(0.3 + 2 * 0.0121 * (1 + 50 * 0.00393) * 30, 10);
  });

  it('makes circuits smaller where no conductor keeps the drop', () => {
    const far = us({ metres: 1500, spacingMetres: 2 }, { quantity: 40, voltAmps: 50 });
    expect(far.result.governedBy).toBe('voltage-drop');
    expect(far.result.circuits.length).toBeGreaterThan(2);
    for (const { dropPct } of far.result.circuits) expect(dropPct).toBeLessThanOrEqual(3);
    const fewer = us({ metres: 1500, spacingMetres: 2, loads: [load({ quantity: 20, voltAmps: 50 })] });
    expect(fewer.result.circuits.length).toBeGreaterThan(1);
  });

  it('answers the whole load where no conductor serves even one unit: no size, and a stop', () => {
    const never = us({ metres: 1e6 });
    expect(never.result.circuits).toMatchObject([{ size: null, dropPct: null }]);
    expect(codes(never)).toContain('drop-over-limit');
    const large = us({ breakerAmps: 400 });
    expect(large.result.circuits).toMatchObject([{ size: null }]);
    expect(codes(large)).toContain('load-over-conductors');
  });

  it('gives nulls for counts of mixed loads, and keeps the fractions under one', () => {
    const loads = [load({ name: 'a', quantity: 24 }), load({ name: 'b', quantity: 25, unitsPerBreaker: 25 })];
    const mixed = us({ loads });
    expect(mixed.result).toMatchObject({ unitsByLoad: null, unitsByInrush: null });
    // 24/48 + 25/25 = 1.5 circuits.
    expect(mixed.result.circuits).toHaveLength(2);
    expect(
      us({ loads: [loads[0] ?? load(), load({ name: 'b', quantity: 12, unitsPerBreaker: 24 })] }).result
        .circuits,
    ).toHaveLength(1);
  });
});

describe('an existing circuit is checked, not resized', () => {
  const old = { voltAmps: 1800 };

  it('stays one circuit with its breaker, with no size where none is known', () => {
    const { result, findings } = us({ existing: old });
    expect(result.circuits).toMatchObject([{ breakerAmps: 20, size: null, dropPct: null, voltAmps: 1200 }]);
    expect(result.circuits).toHaveLength(1);
    expect(findings.map(({ code, values }) => [code, values])).toEqual([
      ['load-before-and-after', { voltAmpsBefore: 1800, voltAmpsAfter: 1200 }],
    ]);
  });

  it('counts what stays on it', () => {
    const { result } = us({ existing: { voltAmps: 1200, otherVoltAmps: 720 } });
    expect(result).toMatchObject({ unitsByLoad: 30, circuits: [{ voltAmps: 1920, amps: 16 }] });
    expect(codes(us({ existing: { ...old, otherVoltAmps: 760 } }))).toContain('breaker-overloaded');
  });

  it('figures the drop on the conductor that is there', () => {
    const { result } = us({ existing: { ...old, size: 'AWG 12' } });
    expect(result.circuits[0]).toMatchObject({ size: 'AWG 12' });
    expect(result.circuits[0]?.dropPct).toBeCloseTo((2 * 10 * 10 * 0.0065 * 100) / 120, 10);
  });

  it('shows no steps for a conductor that is not known', () => {
    expect(us({ existing: old }).working.map(({ key }) => key)).toEqual([
      'units-by-load',
      'units-by-inrush',
      'row-length',
    ]);
    expect(us({ existing: { ...old, size: 'AWG 12' } }).working.map(({ key }) => key)).toContain(
      'conductor-ampacity',
    );
  });
});

describe('what is said', () => {
  const old = { voltAmps: 1800 };
  it.each<[string, boolean, Answer, Answer]>([
    ['unit-over-breaker', false, us({}, { voltAmps: 2000 }), us({}, { voltAmps: 1920 })],
    ['unit-over-breaker', false, iec({}, { unitsPerB16: 0.5 }), iec({}, { unitsPerB16: 1 })],
    [
      'supply-outside-rating',
      true,
      us({}, { ratedVoltsMin: 220, ratedVoltsMax: 240 }),
      us({}, { ratedVoltsMax: 277 }),
    ],
    [
      'supply-outside-rating',
      true,
      us({ system: 'three-phase', volts: 480 }, { ratedVoltsMax: 250 }),
      us({ system: 'three-phase', volts: 480 }, { ratedVoltsMin: 120, ratedVoltsMax: 278 }),
    ],
    [
      'breaker-overloaded',
      false,
      us({ existing: old }, { quantity: 49 }),
      us({ existing: old }, { quantity: 48 }),
    ],
    [
      'inrush-over-breaker',
      false,
      us({ existing: old }, { unitsPerBreaker: 29 }),
      us({ existing: old }, { unitsPerBreaker: 30 }),
    ],
    [
      'units-over-control',
      false,
      us({ existing: old, control: { maxUnits: 29 } }),
      us({ existing: old, control: { maxUnits: 30 } }),
    ],
    [
      'conductor-under-breaker',
      true,
      us({ existing: { ...old, size: 'AWG 14' } }),
      us({ existing: { ...old, size: 'AWG 12' } }, { quantity: 49 }),
    ],
    [
      'drop-over-limit',
      false,
      us({ metres: 40, existing: { ...old, size: 'AWG 12' } }),
      us({ existing: { ...old, size: 'AWG 12' } }),
    ],
    [
      'disconnection-time',
      true,
      iec({ metres: 80, maxDropPct: 10, existing: { ...old, size: '1.5 mm2' } }),
      iec({ metres: 20, maxDropPct: 10, existing: { ...old, size: '1.5 mm2' } }),
    ],
  ])('%s stops', (code, hard, raised, quiet) => {
    const stop = raised.findings.find((finding) => finding.code === code);
    expect(stop).toMatchObject({ severity: 'stop', hard });
    expect(codes(quiet)).not.toContain(code);
  });

  it.each<[string, Answer, Answer]>([
    ['inrush-not-checked', us({}, { unitsPerBreaker: undefined }), us({})],
    ['inrush-not-checked', iec({}, { unitsPerB16: undefined, inrushAmps: 40 }), iec({})],
    [
      'control-inrush-not-checked',
      us({ control: { ratedInrushAmps: 400 } }),
      us({ control: { maxUnits: 60 } }),
    ],
    ['rating-not-standard', us({ breakerAmps: 18 }), us({})],
    ['curve-taken-as-b', iec({ curve: undefined, zeOhms: undefined }), iec({})],
    ['load-before-and-after', us({ existing: old }), us({})],
    ['load-grows', us({ existing: { voltAmps: 1000 } }), us({ existing: old })],
  ])('%s', (code, raised, quiet) => {
    expect(codes(raised)).toContain(code);
    expect(codes(quiet)).not.toContain(code);
    expect(raised.findings.every(({ severity }) => severity !== 'stop')).toBe(true);
  });

  it('says what a conductor has to say once, however many circuits', () =>
    expect(
      codes(us({ stranding: 'flexible' }, { quantity: 300 })).filter(
        (code) => code === 'flexible-as-stranded',
      ),
    ).toHaveLength(1));

  it('asks once for all loads whose inrush is not known', () => {
    const loads = ['a', 'b', 'c'].map((name) =>
      load({ name, ...(name === 'b' ? {} : { unitsPerBreaker: undefined }) }),
    );
    const asked = us({ loads }).findings.filter(({ code }) => code === 'inrush-not-checked');
    expect(asked.map(({ values }) => values)).toEqual([{ names: 'a, c', units: 60, breakerAmps: 20 }]);
  });

  it('answers nothing but the stop where one unit is too much', () => {
    const { result } = us({}, { voltAmps: 2000 });
    expect(result).toEqual({ circuits: [], unitsByLoad: 0, unitsByInrush: 50, governedBy: 'load' });
  });
});

describe('refused', () => {
  it.each<[string[], object]>([
    [['too-large', 'loads.0.quantity'], { loads: [load({ quantity: 10_001 })] }],
    [['too-large', 'loads'], { loads: [load({ quantity: 10_000 }), load({ quantity: 1 })] }],
    [['too-large', 'loads'], { loads: Array.from({ length: 101 }, () => load({ quantity: 1 })) }],
    [['invalid-input', 'loads'], { loads: [] }],
    [['invalid-input', 'loads.0.quantity'], { loads: [load({ quantity: 0 })] }],
    [
      ['invalid-input', 'loads.0.ratedVoltsMin'],
      { loads: [load({ ratedVoltsMin: 277, ratedVoltsMax: 120 })] },
    ],
    [['invalid-input', 'existing.size'], { existing: { voltAmps: 1, size: '2.5 mm2' } }],
    [['invalid-input', 'breakerAmps'], { breakerAmps: 0 }],
  ])('%s', (wanted, change) => expect(refused(JSON.parse(JSON.stringify(change)) as object)).toEqual(wanted));

  it('takes 10,000 units', () =>
    expect(quantities(us({}, { quantity: 10_000 })).reduce((sum, units) => sum + units)).toBe(10_000));
});
