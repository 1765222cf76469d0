import { describe, expect, it } from 'vitest';
import { EngineError, WEB_LIMITS } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { seriesStringCalculation, type SeriesStringInput } from '@/lib/sizing/series-string';
import { voltageDrop } from '@/lib/sizing/voltage-drop';

type Driver = SeriesStringInput['drivers'][number];
const small: Driver = { sku: 'small', amps: 0.35, minVolts: 18, maxVolts: 42, maxWatts: 15, cost: 14 };
const large: Driver = { sku: 'large', amps: 0.35, minVolts: 30, maxVolts: 58, maxWatts: 40, cost: 20 };
const twin: Driver = { ...large, sku: 'twin', cost: 26, channels: 2 };

/** 11 V hot, 12.95 V cold: `small` takes 2 or 3 in series, `large` 3 or 4, `twin` that on each channel. */
const base: SeriesStringInput = {
  module: {
    forwardVolts: 12,
    forwardVoltsMin: 11.4,
    forwardVoltsMax: 12.6,
    voltsPerKelvin: -0.01,
    maxAmps: 0.5,
  },
  count: 9,
  ambientMinCelsius: -10,
  ambientMaxCelsius: 40,
  riseCelsius: 25,
  drivers: [small, large, twin],
  loadFraction: 0.9,
};
const run = (change: Partial<SeriesStringInput> = {}) =>
  runCalculation(seriesStringCalculation, { ...base, ...change });
const withModule = (change: Partial<SeriesStringInput['module']>, more: Partial<SeriesStringInput> = {}) =>
  run({ ...more, module: { ...base.module, ...change } });
const codes = (answer: ReturnType<typeof run>) => answer.findings.map(({ code }) => code);
const stops = (answer: ReturnType<typeof run>) =>
  answer.findings.filter(({ severity }) => severity === 'stop').map(({ code, hard }) => [code, hard]);
const finding = (answer: ReturnType<typeof run>, code: string) =>
  answer.findings.find((one) => one.code === code);
const lengths = (answer: ReturnType<typeof run>) => answer.result.strings.map(({ modules }) => modules);
const refused = (change: object) => {
  try {
    runCalculation(seriesStringCalculation, { ...base, ...change });
  } catch (error) {
    if (error instanceof EngineError) return error.issues.map(({ path }) => path);
  }
  return [];
};

describe('windows', () => {
  it('figures a module hot and cold', () => {
    const { result } = run();
    expect(result.moduleHotVolts).toBeCloseTo(11.4 - 0.01 * (40 + 25 - 25), 12);
    expect(result.moduleColdVolts).toBeCloseTo(12.6 - 0.01 * (-10 - 25), 12);
  });

  it('shows what each string needs beside what its driver gives', () => {
    const [string] = run({ count: 3, drivers: [small] }).result.strings;
    expect(string).toMatchObject({
      driver: 1,
      channel: 1,
      sku: 'small',
      modules: 3,
      minVolts: 18,
      maxVolts: 42,
    });
    expect(string?.hotVolts).toBeCloseTo(33, 12);
    expect(string?.coldVolts).toBeCloseTo(38.85, 12);
    expect(string?.watts).toBeCloseTo(0.35 * 36, 12);
  });

  it('adds the feeder at the top of the window and to the watts', () => {
    const feeder = { metres: 30, size: 'AWG 22', celsius: 60 };
    const { dropVolts } = voltageDrop({
      system: 'dc',
      volts: 42,
      amps: 0.35,
      stranding: 'stranded',
      ...feeder,
    });
    const [string] = run({ count: 3, drivers: [small], feeder }).result.strings;
    expect(dropVolts).toBeGreaterThan(1);
    expect(string?.hotVolts).toBeCloseTo(33, 12);
    expect(string?.coldVolts).toBeCloseTo(38.85 + dropVolts, 12);
    expect(string?.watts).toBeCloseTo(0.35 * (36 + dropVolts), 12);
    // Three modules cold are 38.85 V: a feeder of more than 3.15 V leaves room for two.
    const long = run({ count: 6, drivers: [small], feeder: { ...feeder, metres: 100 } });
    expect(lengths(long)).toEqual([2, 2, 2]);
  });

  it('a warm feeder is taken where its temperature is not given', () => {
    const cold = (celsius?: number) =>
      run({
        count: 3,
        drivers: [small],
        feeder: { metres: 30, size: 'AWG 22', ...(celsius === undefined ? {} : { celsius }) },
      }).result.strings[0]?.coldVolts;
    expect(cold()).toBe(cold(75));
    expect(cold()).toBeGreaterThan(cold(20) ?? Infinity);
  });
});

describe('choice', () => {
  it('takes the cheapest drivers, not the fewest or the largest', () => {
    // 8 on one twin cost 26; two large 40; three small 42.
    const eight = run({ count: 8 });
    expect(eight.result.purchase).toEqual([{ sku: 'twin', quantity: 1, cost: 26 }]);
    expect(lengths(eight)).toEqual([4, 4]);
    // One more than a twin holds: twin and small, 3 on the small one so that each string has three.
    const nine = run();
    expect(nine.result.cost).toBe(40);
    expect(nine.result.purchase).toEqual([
      { sku: 'small', quantity: 1, cost: 14 },
      { sku: 'twin', quantity: 1, cost: 26 },
    ]);
    expect(lengths(nine)).toEqual([3, 3, 3]);
  });

  it('leaves a channel unused where that is cheapest, and says so', () => {
    const answer = run({ count: 4, drivers: [twin] });
    expect(answer.result.strings).toHaveLength(1);
    expect(answer.result.drivers).toMatchObject([{ sku: 'twin', strings: 1, modules: 4 }]);
    expect(finding(answer, 'spare-channels')).toMatchObject({ severity: 'note', values: { spare: 1 } });
    expect(codes(run({ count: 8, drivers: [twin] }))).not.toContain('spare-channels');
  });

  it('splits evenly, the first of equals', () => {
    expect(lengths(run({ count: 5, drivers: [small] }))).toEqual([3, 2]);
    expect(lengths(run({ count: 6, drivers: [{ ...large, minVolts: 18 }] }))).toEqual([3, 3]);
    const same = run({ count: 3, drivers: [small, { ...small, sku: 'other' }] });
    expect(same.result.purchase[0]?.sku).toBe('small');
  });

  it('takes fewer drivers of one cost, whatever the last bits of the sum', () => {
    // 0.7 + 0.1 is a little less than 0.8 in binary.
    const drivers = [
      { ...small, sku: 'two', cost: 0.7, minVolts: 20, maxVolts: 27 },
      { ...small, sku: 'three', cost: 0.1, minVolts: 30 },
      { ...large, sku: 'five', cost: 0.8, minVolts: 50, maxVolts: 65 },
    ];
    expect(0.7 + 0.1).toBeLessThan(0.8);
    expect(run({ count: 5, drivers }).result.purchase).toEqual([{ sku: 'five', quantity: 1, cost: 0.8 }]);
    const dearer = drivers.map((driver) => (driver.sku === 'five' ? { ...driver, cost: 0.81 } : driver));
    expect(run({ count: 5, drivers: dearer }).result.drivers).toHaveLength(2);
  });

  it('holds all channels of a driver to its watts together', () => {
    // Eight modules take 33.6 W: a twin of 36 W may be loaded with 32.4 W.
    const answer = run({ count: 8, drivers: [{ ...twin, maxWatts: 36 }] });
    expect(answer.result.drivers.map(({ modules }) => modules)).toEqual([4, 4]);
    for (const { loadPct } of answer.result.drivers) expect(loadPct).toBeLessThanOrEqual(90);
    // Just enough is enough: 33.6 W of 0.8 * 42 W, whatever the last bits.
    const just = run({ count: 8, drivers: [{ ...twin, maxWatts: 42 }], loadFraction: 0.8 });
    expect(just.result.drivers).toHaveLength(1);
  });

  it('takes a window that just holds', () => {
    const edge = { ...small, minVolts: 33, maxVolts: 38.85 };
    expect(lengths(run({ count: 3, drivers: [edge] }))).toEqual([3]);
    expect(lengths(run({ count: 3, drivers: [{ ...edge, minVolts: 33.001 }] }))).toEqual([]);
    expect(lengths(run({ count: 3, drivers: [{ ...edge, maxVolts: 38.849 }] }))).toEqual([]);
  });

  it('plans thousands of modules', () => {
    const { result } = run({ count: 5000 });
    expect(result.strings.reduce((sum, { modules }) => sum + modules, 0)).toBe(5000);
    // 625 twins of eight.
    expect(result.cost).toBe(625 * 26);
  });
});

describe('no driver fits: the reason of the one that came nearest', () => {
  it.each([
    ['string-over-insulation', true, withModule({ insulationVolts: 40 }, { drivers: [small] })],
    ['driver-over-module-amps', false, withModule({ maxAmps: 0.3 })],
    ['string-window-too-narrow', false, run({ drivers: [{ ...small, minVolts: 30, maxVolts: 38 }] })],
    ['string-over-watts', false, run({ drivers: [{ ...small, maxWatts: 9 }] })],
    ['too-few-modules', false, run({ count: 1 })],
    ['count-does-not-split', false, run({ count: 5, drivers: [large] })],
  ] as const)('%s', (code, hard, answer) => {
    expect(stops(answer)).toEqual([[code, hard]]);
    expect(answer.result).toMatchObject({ purchase: [], drivers: [], strings: [], cost: null });
    expect(answer.result.moduleHotVolts).toBeGreaterThan(0);
  });

  it('none of them where a plan holds', () => {
    expect(stops(run())).toEqual([]);
    expect(stops(withModule({ insulationVolts: 42 }, { drivers: [small] }))).toEqual([]);
  });

  it('names the reason that is nearest to a fit', () => {
    const answer = run({
      drivers: [
        { ...large, sku: 'strong', amps: 0.7 },
        { ...small, maxWatts: 9 },
      ],
    });
    expect(finding(answer, 'string-over-watts')?.values).toMatchObject({ sku: 'small', fewest: 2 });
  });

  it('says which numbers of modules would split', () => {
    // Strings of three or four make 3, 4, 6, 7, 8 and all above.
    expect(finding(run({ count: 5, drivers: [large] }), 'count-does-not-split')?.values).toMatchObject({
      countBelow: 4,
      countAbove: 6,
    });
    const ten = { ...small, minVolts: 106, maxVolts: 140, maxWatts: 100 };
    expect(finding(run({ count: 12, drivers: [ten] }), 'count-does-not-split')?.values).toMatchObject({
      countBelow: 10,
      countAbove: 20,
    });
  });

  it('counts open volts where the sheet gives them', () => {
    const open = { ...small, openCircuitVolts: 50 };
    expect(stops(withModule({ insulationVolts: 45 }, { drivers: [open] }))).toEqual([
      ['string-over-insulation', true],
    ]);
  });
});

describe('what to know about a plan', () => {
  const one = (change: Partial<Driver>) =>
    run({ count: 3, drivers: [{ ...small, maxWatts: 60, ...change }] });

  it('warns of open strings, and more so above 60 and 120 V', () => {
    expect(finding(one({}), 'live-string')).toMatchObject({ severity: 'caution', values: { openVolts: 42 } });
    expect(codes(run({ count: 1 }))).not.toContain('live-string');
    expect(codes(one({ maxVolts: 60 }))).not.toContain('string-over-class-two-volts');
    expect(codes(one({ maxVolts: 61 }))).toContain('string-over-class-two-volts');
    expect(codes(one({ maxVolts: 120 }))).toContain('string-over-class-two-volts');
    expect(codes(one({ maxVolts: 120 }))).not.toContain('string-over-selv-volts');
    expect(codes(one({ maxVolts: 121 }))).toContain('string-over-selv-volts');
    expect(codes(one({ openCircuitVolts: 121 }))).toContain('string-over-selv-volts');
  });

  it('warns of a cold start above the full watts', () => {
    // Three modules: 12.6 W in use, 13.6 W at a cold start.
    expect(
      finding(
        run({ count: 3, loadFraction: 1, drivers: [{ ...small, maxWatts: 13 }] }),
        'cold-start-over-watts',
      )?.values.watts,
    ).toBeCloseTo(0.35 * 38.85, 9);
    expect(codes(run({ count: 3, drivers: [small] }))).not.toContain('cold-start-over-watts');
  });

  it('warns of strings that will not look alike', () => {
    const bright = { ...large, sku: 'bright', amps: 0.5 };
    // Two on the small one and three on the bright one: nothing else makes five.
    const answer = run({ count: 5, drivers: [{ ...small, maxVolts: 30 }, bright] });
    expect(answer.result.purchase.map(({ sku }) => sku)).toEqual(['small', 'bright']);
    expect(finding(answer, 'strings-of-different-amps')?.values).toEqual({
      lowestAmps: 0.35,
      highestAmps: 0.5,
    });
    expect(codes(run())).not.toContain('strings-of-different-amps');
  });

  it('says what was not given', () => {
    const { voltsPerKelvin: _, maxAmps: __, ...module } = base.module;
    const bare = run({ module });
    expect(bare.result.moduleHotVolts).toBe(11.4);
    expect(bare.result.moduleColdVolts).toBe(12.6);
    expect(finding(bare, 'temperature-not-counted')?.severity).toBe('caution');
    expect(codes(bare)).toContain('led-max-amps-not-given');
    const { riseCelsius: ___, ...cool } = base;
    const still = runCalculation(seriesStringCalculation, cool);
    expect(codes(still)).toContain('rise-not-counted');
    for (const code of ['temperature-not-counted', 'rise-not-counted', 'led-max-amps-not-given'])
      expect(codes(run())).not.toContain(code);
  });
});

describe('refusals', () => {
  it.each([
    [{ module: { ...base.module, voltsPerKelvin: 0.01 } }, ['module.voltsPerKelvin']],
    [{ module: { ...base.module, voltsPerKelvin: -1 } }, ['module.voltsPerKelvin']],
    [{ module: { ...base.module, forwardVoltsMin: 13 } }, ['module.forwardVoltsMin']],
    [{ module: { ...base.module, forwardVolts: 13 } }, ['module.forwardVolts']],
    [{ ambientMinCelsius: 50 }, ['ambientMinCelsius']],
    [{ drivers: [small, { ...large, sku: 'small' }] }, ['drivers.1.sku']],
    [{ drivers: [{ ...small, minVolts: 43 }] }, ['drivers.0.minVolts']],
    [{ drivers: [small, { ...large, openCircuitVolts: 57 }] }, ['drivers.1.openCircuitVolts']],
    [{ drivers: [{ ...small, channels: 0 }] }, ['drivers.0.channels']],
    [{ drivers: [] }, ['drivers']],
    [{ loadFraction: 1.1 }, ['loadFraction']],
    [{ count: 2.5 }, ['count']],
    [{ riseCelsius: -1 }, ['riseCelsius']],
    [{ feeder: { metres: 1, size: 'AWG 13' } }, ['feeder.size']],
    [{ driver: small }, ['driver']],
  ])('%j', (change, paths) => expect(refused(change)).toEqual(paths));

  it('keeps the web to its limit, and every answer to what can be computed', () => {
    expect(() => runCalculation(seriesStringCalculation, { ...base, count: 5001 }, WEB_LIMITS)).toThrow(
      expect.objectContaining({ code: 'too-large' }),
    );
    const endless = { ...small, minVolts: 0, maxVolts: 1e9, maxWatts: 1e9 };
    expect(() => run({ count: 100_000, drivers: [endless] })).toThrow(
      expect.objectContaining({ code: 'too-large' }),
    );
  });
});
