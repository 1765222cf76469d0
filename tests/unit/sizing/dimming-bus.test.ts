import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { conductorResistance } from '@/lib/sizing/conductor-resistance';
import { dimmingBusCalculation } from '@/lib/sizing/dimming-bus';
import { segmentsByLength } from '@/lib/sizing/dimming-bus-cable';
import type { DimmingBusInput } from '@/lib/sizing/dimming-bus-input';
import { pack, type Units } from '@/lib/sizing/dimming-bus-packing';

const analogue: DimmingBusInput = {
  bus: '0-10v',
  basis: 'us',
  devices: [{ name: 'driver', count: 20, amps: 0.002 }],
  control: { ratedAmps: 0.05 },
  legs: [{ metres: 30 }],
  stranding: 'solid',
  celsius: 20,
  wiring: 'class-2-separate',
};
const dali: DimmingBusInput = {
  bus: 'dali',
  basis: 'iec',
  devices: [
    { name: 'driver', count: 40, amps: 0.002 },
    { name: 'sensor', count: 4, amps: 0.005, kind: 'input' },
  ],
  control: { ratedAmps: 0.24, maxAmps: 0.25, volts: 12 },
  legs: [{ metres: 100 }],
  stranding: 'solid',
  celsius: 20,
};
const phase: DimmingBusInput = {
  bus: 'phase-cut',
  basis: 'us',
  devices: [{ name: 'downlight', count: 6, watts: 12 }],
  dimmer: { minWatts: 40, maxWatts: 600, ledMaxWatts: 150 },
};
const run = (base: DimmingBusInput, change: Partial<DimmingBusInput> = {}) =>
  runCalculation(dimmingBusCalculation, { ...base, ...change });
type Answer = ReturnType<typeof run>;
const codes = ({ findings }: Answer) => findings.map(({ code }) => code);
const finding = ({ findings }: Answer, code: string) => findings.find((one) => one.code === code);
const stops = ({ findings }: Answer) =>
  findings.filter(({ severity }) => severity === 'stop').map(({ code }) => code);
const refused = (input: object) => {
  try {
    runCalculation(dimmingBusCalculation, input);
  } catch (error) {
    if (error instanceof EngineError) return error.issues.map(({ path }) => path);
  }
  return [];
};
const without = (input: DimmingBusInput, key: keyof DimmingBusInput) =>
  Object.fromEntries(Object.entries(input).filter(([own]) => own !== key));
const drivers = (count: number, more: object = {}) => ({
  devices: [{ name: 'driver', count, amps: 0.002, ...more }],
});

describe('0-10 V: figures', () => {
  it('adds up what the drivers source, and loses it over both conductors', () => {
    const { result } = run(analogue, { size: 'AWG 18' });
    const perMetre = conductorResistance('AWG 18', 'solid', 20).ohmsPerMetre;
    expect(result.amps).toBeCloseTo(0.04, 12);
    expect(result.dropVolts).toBeCloseTo(2 * 0.04 * perMetre * 30, 12);
    expect(result.errorPct).toBeCloseTo((result.dropVolts ?? 0) * 10, 12);
    expect(result.metresByDrop).toBeCloseTo(0.1 / (2 * 0.04 * perMetre), 9);
    expect(result).toMatchObject({ ok: true, section: 'AWG 18', segments: 1, governedBy: null });
    expect(result.devices).toEqual([{ name: 'driver', count: 20, amps: 0.002, mostAlone: 25, moreFit: 5 }]);
  });

  it('takes the smallest section that keeps the drop', () => {
    const { result } = run(analogue);
    expect(result.section).toBe('AWG 20');
    expect(run(analogue, { sizes: ['AWG 14', 'AWG 22'] }).result.section).toBe('AWG 14');
    expect(run(analogue, { maxErrorPct: 5 }).result.section).toBe('AWG 22');
    expect(run(analogue, { legs: [{ metres: 0 }] }).result).toMatchObject({
      section: 'AWG 22',
      dropVolts: 0,
    });
  });

  it('a leg counts for its own units, and units along it for part of its length', () => {
    const drop = (change: Partial<DimmingBusInput>) =>
      run(analogue, { size: 'AWG 18', ...change }).result.dropVolts ?? NaN;
    const whole = drop({});
    const star = [
      { metres: 30, units: 5 },
      { metres: 10, units: 15 },
    ];
    expect(drop({ legs: star })).toBeCloseTo(whole / 4, 12);
    expect(drop({ legs: star.map(({ metres }) => ({ metres })) })).toBeCloseTo(whole, 12);
    expect(drop({ placed: 'along' })).toBeCloseTo((whole * 21) / 40, 12);
    expect(
      drop({
        legs: [
          { metres: 30, units: 1 },
          { metres: 0, units: 19 },
        ],
        placed: 'along',
      }),
    ).toBeCloseTo(whole / 20, 12);
  });

  it('more than the control sinks: as many controls as it takes', () => {
    const answer = run(analogue, drivers(60));
    expect(answer.result).toMatchObject({ ok: false, segments: 3, governedBy: 'current', ratedAmps: 0.05 });
    expect(answer.result.segmentAmps).toBeCloseTo(0.05, 12);
    expect(finding(answer, 'bus-over-current')).toMatchObject({
      severity: 'stop',
      hard: false,
      values: { segments: 3, ratedAmps: 0.05 },
    });
    expect(codes(run(analogue, drivers(25)))).not.toContain('bus-over-current');
  });

  it('more drop than the largest section keeps: fewer on each control', () => {
    const answer = run(analogue, { sizes: ['AWG 22', 'AWG 20'], legs: [{ metres: 60 }] });
    const { result } = answer;
    expect(result).toMatchObject({ ok: false, section: 'AWG 20', segments: 2, governedBy: 'drop' });
    expect(result.segmentDropVolts).toBeLessThanOrEqual(0.1);
    expect(finding(answer, 'bus-drop-over-limit')?.severity).toBe('stop');
    expect(codes(run(analogue))).not.toContain('bus-drop-over-limit');
  });

  it('a resistance from the sheet stands for the section', () => {
    const { result } = run(without(analogue, 'stranding') as DimmingBusInput, { ohmsPerMetre: 0.02 });
    expect(result.section).toBeNull();
    expect(result.dropVolts).toBeCloseTo(2 * 0.04 * 0.02 * 30, 12);
  });
});

describe('0-10 V: findings', () => {
  it('bus-unit-too-much: one driver alone is over the rating', () => {
    const answer = run(analogue, { control: { ratedAmps: 0.001 } });
    expect(answer.result).toMatchObject({ segments: null, governedBy: 'current', segmentAmps: null });
    expect(stops(answer)).toContain('bus-unit-too-much');
    expect(codes(run(analogue))).not.toContain('bus-unit-too-much');
  });

  it('bus-current-assumed: 2 mA by the standard', () => {
    const answer = run(analogue, { devices: [{ name: 'driver', count: 20 }] });
    expect(answer.result.amps).toBeCloseTo(0.04, 12);
    expect(finding(answer, 'bus-current-assumed')?.basis).toContain('IEC 60929');
    expect(codes(run(analogue))).not.toContain('bus-current-assumed');
  });

  it('bus-unit-over-standard', () => {
    expect(codes(run(analogue, drivers(5, { amps: 0.004 })))).toContain('bus-unit-over-standard');
    expect(codes(run(analogue))).not.toContain('bus-unit-over-standard');
  });

  it('control-under-min-current: what an old control needs', () => {
    const old = { control: { ratedAmps: 0.05, minAmps: 0.01 } };
    expect(stops(run(analogue, { ...old, ...drivers(4) }))).toEqual(['control-under-min-current']);
    expect(codes(run(analogue, { ...old, ...drivers(5) }))).not.toContain('control-under-min-current');
  });

  it('control-current-direction: one sources, the other sinks', () => {
    expect(stops(run(analogue, drivers(5, { current: 'sink' })))).toEqual(['control-current-direction']);
    expect(stops(run(analogue, { control: { ratedAmps: 0.05, current: 'source' } }))).toEqual([
      'control-current-direction',
    ]);
    const other = { control: { ratedAmps: 0.05, current: 'source' as const } };
    expect(stops(run(analogue, { ...other, ...drivers(5, { current: 'sink' }) }))).toEqual([]);
  });

  it('control-run-long', () => {
    expect(codes(run(analogue, { legs: [{ metres: 51 }] }))).toContain('control-run-long');
    expect(codes(run(analogue, { legs: [{ metres: 50 }] }))).not.toContain('control-run-long');
    expect(codes(run(dali))).not.toContain('control-run-long');
  });

  it('no-off-at-minimum: 1-10 V only', () => {
    expect(codes(run(analogue, { bus: '1-10v' }))).toContain('no-off-at-minimum');
    expect(codes(run(analogue))).not.toContain('no-off-at-minimum');
  });

  it('control-pair-colours: US pairs only', () => {
    expect(finding(run(analogue), 'control-pair-colours')).toMatchObject({
      severity: 'caution',
      basis: expect.stringContaining('410.69'),
    });
    expect(codes(run(analogue, { basis: 'iec' }))).not.toContain('control-pair-colours');
    expect(codes(run(dali, { basis: 'us' }))).not.toContain('control-pair-colours');
  });

  it('kept apart, reclassified, or stopped for good', () => {
    const unsaid = run(without(analogue, 'wiring') as DimmingBusInput);
    expect(finding(unsaid, 'control-separation')?.severity).toBe('caution');
    expect(codes(run(analogue))).not.toContain('control-separation');
    const beside = run(analogue, { wiring: 'class-2-with-power' });
    expect(finding(beside, 'control-with-power')).toMatchObject({ severity: 'stop', hard: true });
    expect(beside.result.ok).toBe(false);
    expect(codes(run(analogue))).not.toContain('control-with-power');
    const reclassified = run(analogue, { wiring: 'class-1' });
    expect(codes(reclassified)).toContain('control-as-class-1');
    expect(codes(reclassified)).not.toContain('control-separation');
    expect(codes(run(analogue))).not.toContain('control-as-class-1');
    expect(codes(run(dali))).not.toContain('control-separation');
  });

  it('bus-not-selv: DALI anywhere, other pairs on the IEC side', () => {
    expect(codes(run(dali))).toContain('bus-not-selv');
    expect(codes(run(dali, { basis: 'us' }))).toContain('bus-not-selv');
    expect(codes(run(analogue, { basis: 'iec' }))).toContain('bus-not-selv');
    expect(codes(run(analogue))).not.toContain('bus-not-selv');
  });

  it('inputs-not-used names what another bus would read', () => {
    const answer = run(analogue, { maxDropVolts: 1, groups: 3, dimmer: { minWatts: 5 } });
    expect(finding(answer, 'inputs-not-used')?.values.keys).toBe('maxDropVolts, groups, dimmer');
    expect(codes(run(analogue))).not.toContain('inputs-not-used');
  });
});

describe('DALI', () => {
  it('figures: the drop at what the supplies can give, between the two farthest', () => {
    const { result } = run(dali, { legs: [{ metres: 60 }, { metres: 20 }, { metres: 40 }], size: '1 mm2' });
    const perMetre = conductorResistance('1 mm2', 'solid', 20).ohmsPerMetre;
    expect(result.metres).toEqual({ farthest: 60, betweenAny: 100, total: 120 });
    expect(result.dropVolts).toBeCloseTo(2 * 0.25 * perMetre * 100, 12);
    expect(result.farVolts).toBeCloseTo(12 - (result.dropVolts ?? 0), 12);
    expect(result.amps).toBeCloseTo(0.1, 12);
    expect(result.addresses).toEqual({ gear: 40, inputs: 4, most: 64 });
    expect(result).toMatchObject({ ok: true, segments: 1, errorPct: null, dropLimitVolts: 2 });
  });

  it('a supply that can give less costs fewer volts; more than 250 mA is stopped', () => {
    const weak = run(dali, { control: { ratedAmps: 0.12, maxAmps: 0.125 }, size: '1 mm2' });
    expect(weak.result.dropVolts).toBeCloseTo((run(dali, { size: '1 mm2' }).result.dropVolts ?? 0) / 2, 12);
    const strong = run(dali, { control: { ratedAmps: 0.24, maxAmps: 0.3 } });
    expect(stops(strong)).toContain('dali-supply-over-limit');
    expect(codes(run(dali))).not.toContain('dali-supply-over-limit');
  });

  it('dali-over-addresses: gear and input devices count apart', () => {
    const most = run(dali, { devices: [{ name: 'd', count: 64, amps: 0.001 }] });
    expect(stops(most)).toEqual([]);
    const over = run(dali, { devices: [{ name: 'd', count: 65, amps: 0.001 }] });
    expect(stops(over)).toEqual(['dali-over-addresses']);
    expect(over.result).toMatchObject({ segments: 2, governedBy: 'addresses' });
    expect(over.result.devices[0]).toMatchObject({ mostAlone: 64, moreFit: 0 });
    const both = [
      { name: 'd', count: 64, amps: 0.001 },
      { name: 's', count: 64, amps: 0.001, kind: 'input' as const },
    ];
    expect(stops(run(dali, { devices: both }))).toEqual([]);
    const inputs = run(dali, {
      devices: [{ name: 's', count: 33, amps: 0.001, kind: 'input', addresses: 2 }],
    });
    expect(stops(inputs)).toEqual(['dali-over-input-addresses']);
    expect(codes(over)).not.toContain('dali-over-input-addresses');
  });

  it('two-channel gear takes two addresses; what has none is limited by current alone', () => {
    const two = run(dali, { devices: [{ name: 'd', count: 33, amps: 0.002, addresses: 2 }] });
    expect(two.result).toMatchObject({ segments: 2, governedBy: 'addresses' });
    const none = run(dali, { devices: [{ name: 'coupler', count: 100, amps: 0.002, addresses: 0 }] });
    expect(none.result).toMatchObject({ segments: 1, ok: true });
    expect(none.result.devices[0]?.mostAlone).toBe(120);
  });

  it('dali-too-long: no section helps over 300 m', () => {
    const long = run(dali, { legs: [{ metres: 200 }, { metres: 150 }], sizes: ['10 mm2'] });
    expect(stops(long)).toEqual(['dali-too-long']);
    expect(long.result).toMatchObject({ segments: 2, governedBy: 'length', metresAllowed: 300 });
    expect(codes(run(dali, { legs: [{ metres: 200 }, { metres: 100 }] }))).not.toContain('dali-too-long');
  });

  it('bus-drop-over-limit: split where the section does not reach', () => {
    const thin = run(dali, { legs: [{ metres: 200 }], size: '0.5 mm2' });
    expect(stops(thin)).toContain('bus-drop-over-limit');
    expect(thin.result).toMatchObject({ segments: 2, governedBy: 'drop' });
    expect(codes(run(dali, { legs: [{ metres: 200 }] }))).not.toContain('bus-drop-over-limit');
  });

  it('dali-low-volts: 9.5 V at the receiver', () => {
    const low = { control: { ratedAmps: 0.24, volts: 10 } };
    expect(stops(run(dali, low))).toEqual(['dali-low-volts']);
    expect(codes(run(dali))).not.toContain('dali-low-volts');
    expect(run(dali, { control: { ratedAmps: 0.24 } }).result.farVolts).toBeNull();
  });

  it('dali-over-groups: 16 groups, 16 scenes', () => {
    expect(stops(run(dali, { groups: 17 }))).toEqual(['dali-over-groups']);
    expect(stops(run(dali, { scenes: 17 }))).toEqual(['dali-over-groups']);
    expect(stops(run(dali, { groups: 16, scenes: 16 }))).toEqual([]);
  });
});

describe('phase-cut', () => {
  it('connected watts between the least and the most load', () => {
    const { result } = run(phase);
    expect(result).toMatchObject({ ok: true, watts: 72, segments: 1, section: null, dropVolts: null });
    expect(result.devices[0]).toMatchObject({ mostAlone: 12, moreFit: 6 });
  });

  it('dimmer-under-least-load, of the dimmer with the least where they are several', () => {
    const few = run(phase, { devices: [{ name: 'downlight', count: 3, watts: 12 }] });
    expect(stops(few)).toEqual(['dimmer-under-least-load']);
    const split = run(phase, { devices: [{ name: 'downlight', count: 13, watts: 12 }] });
    expect(split.result.segments).toBe(2);
    expect(finding(split, 'dimmer-under-least-load')?.values.watts).toBe(12);
    expect(codes(run(phase))).not.toContain('dimmer-under-least-load');
  });

  it('dimmer-over-most-load: the LED rating, or the maker’s share of the old one', () => {
    const many = { devices: [{ name: 'downlight', count: 20, watts: 12 }] };
    expect(stops(run(phase, many))).toContain('dimmer-over-most-load');
    const share = { dimmer: { minWatts: 40, maxWatts: 600, ledFraction: 0.25 } };
    expect(run(phase, share).result.devices[0]?.mostAlone).toBe(12);
    expect(codes(run(phase))).not.toContain('dimmer-over-most-load');
  });

  it('what is not given is said, and not made up', () => {
    const bare = run(phase, { dimmer: { maxWatts: 600 } });
    expect(codes(bare)).toEqual(['dimmer-least-not-given', 'dimmer-led-rating-not-given']);
    const none = run(phase, { dimmer: {} });
    expect(none.result.devices[0]).toMatchObject({ mostAlone: null, moreFit: null });
    expect(codes(none)).toContain('dimmer-led-rating-not-given');
    expect(codes(run(phase))).toEqual([]);
  });

  it('one unit over the rating', () => {
    const { result } = run(phase, { devices: [{ name: 'flood', count: 1, watts: 200 }] });
    expect(result).toMatchObject({ segments: null, governedBy: 'load', ok: false });
  });
});

describe('refused by path', () => {
  it.each(['control', 'legs', 'stranding', 'celsius'] as const)('a pair needs %s', (key) => {
    expect(refused(without(analogue, key))).toEqual([key]);
    expect(refused(without(dali, key))).toEqual([key]);
  });
  it('a dimmer needs its figures and the watts behind it', () => {
    expect(refused(without(phase, 'dimmer'))).toEqual(['dimmer']);
    expect(refused({ ...phase, devices: [{ name: 'd', count: 1 }] })).toEqual(['devices.0.watts']);
    expect(refused({ ...phase, dimmer: { ledFraction: 0.3 } })).toEqual(['dimmer.maxWatts']);
    expect(refused({ ...phase, dimmer: { minWatts: 9, maxWatts: 8 } })).toEqual(['dimmer.minWatts']);
    const twice = { maxWatts: 600, ledMaxWatts: 100, ledFraction: 0.3 };
    expect(refused({ ...phase, dimmer: twice })).toEqual(['dimmer.ledFraction']);
  });
  it('the section in two ways', () => {
    expect(refused({ ...analogue, size: 'AWG 18', ohmsPerMetre: 0.02 })).toEqual(['size']);
    expect(refused({ ...analogue, sizes: ['AWG 18'], ohmsPerMetre: 0.02 })).toEqual(['ohmsPerMetre']);
  });
  it('units of legs that do not come to the devices, or of some legs only', () => {
    expect(refused({ ...analogue, legs: [{ metres: 5, units: 19 }] })).toEqual(['legs']);
    const some = [{ metres: 5, units: 20 }, { metres: 5 }];
    expect(refused({ ...analogue, legs: some })).toEqual(['legs.1.units']);
  });
  it('a drop over what DALI allows, a supply below its own rating', () => {
    expect(refused({ ...dali, maxDropVolts: 2.5 })).toEqual(['maxDropVolts']);
    expect(refused({ ...dali, control: { ratedAmps: 0.2, maxAmps: 0.1 } })).toEqual(['control.maxAmps']);
  });
});

describe('how many buses', () => {
  /** The same, unit by unit. */
  function oneByOne(units: readonly Units[], limits: readonly number[]): number {
    const share = ({ uses }: Units) => Math.max(...uses.map((each, i) => each / (limits[i] ?? 1)));
    const buses: number[][] = [limits.map(() => 0)];
    for (const { count, uses } of [...units].sort((a, b) => share(b) - share(a)))
      for (let unit = 0; unit < count; unit++) {
        const fits = (used: number[]) => uses.every((each, i) => (used[i] ?? 0) + each <= (limits[i] ?? 0));
        let bus = buses.find(fits);
        if (!bus) buses.push((bus = limits.map(() => 0)));
        uses.forEach((each, i) => (bus[i] = (bus[i] ?? 0) + each));
      }
    return buses.length;
  }

  it('is what filling them unit by unit gives, and no bus is over its limits', () => {
    const kind = fc.record({
      count: fc.integer({ min: 1, max: 60 }),
      uses: fc.tuple(fc.integer({ min: 1, max: 20 }), fc.integer({ min: 0, max: 4 })),
    });
    const limits = fc.tuple(fc.integer({ min: 20, max: 100 }), fc.integer({ min: 4, max: 64 }));
    fc.assert(
      fc.property(fc.array(kind, { minLength: 1, maxLength: 5 }), limits, (units, most) => {
        const packed = pack(units, most);
        expect(packed.segments).toBe(oneByOne(units, most));
        most.forEach((limit, i) => {
          const total = units.reduce((sum, { count, uses }) => sum + count * (uses[i] ?? 0), 0);
          expect(packed.fullest[i]).toBeLessThanOrEqual(limit);
          expect((packed.segments ?? 0) * limit).toBeGreaterThanOrEqual(total);
          expect(packed.emptiest[i]).toBeLessThanOrEqual(packed.fullest[i] ?? 0);
        });
      }),
      { numRuns: 500 },
    );
  });

  it('answers a million units at once', () =>
    expect(run(analogue, drivers(1_000_000)).result.segments).toBe(40_000));

  it.each([
    [[300], 1],
    [[301], 2],
    [[600], 2],
    [[900.1], 4],
    [[150, 150, 150], 1],
    [[200, 100, 50], 1],
    [[200, 200], 2],
    [[200, 120], 2],
    [[200, 160, 120], 2],
    [[200, 200, 120], 3],
    [[500, 100], 2],
    [[0], 1],
  ] as const)('legs of %j m: %i', (metres, segments) => expect(segmentsByLength(metres, 300)).toBe(segments));

  it('a longer pair or one more unit never needs fewer, a larger section never more', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 300 }),
        fc.double({ min: 0, max: 500, noNaN: true }),
        fc.constantFrom(analogue, dali),
        (count, metres, base) => {
          const segments = (change: Partial<DimmingBusInput>) =>
            run(base, { ...drivers(count), legs: [{ metres }], size: '1 mm2', ...change }).result.segments ??
            Infinity;
          const now = segments({});
          expect(segments(drivers(count + 1))).toBeGreaterThanOrEqual(now);
          expect(segments({ legs: [{ metres: metres * 1.3 }] })).toBeGreaterThanOrEqual(now);
          expect(segments({ size: '2.5 mm2' })).toBeLessThanOrEqual(now);
        },
      ),
      { numRuns: 300 },
    );
  });
});
