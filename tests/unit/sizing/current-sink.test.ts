import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { currentSinkCalculation, type CurrentSinkInput } from '@/lib/sizing/current-sink';
import { E_SERIES_NAMES } from '@/lib/sizing/tables/e-series';

const base: CurrentSinkInput = {
  referenceVolts: 1.2,
  currentRatio: 40,
  ampsPerChannel: 0.03,
  channels: 16,
  strings: 40,
  supply: { volts: 12, tolerancePct: 5 },
  led: { forwardVolts: 3.2, forwardVoltsMin: 3.1, forwardVoltsMax: 3.3, amps: 0.03, maxAmps: 0.04 },
  perString: 3,
  dropoutVolts: 0.7,
  maxPackageWatts: 3,
  thermalCelsiusPerWatt: 20,
  ambientCelsius: 40,
  series: 'E24',
  maxJunctionCelsius: 125,
  channelTolerancePct: 5,
};
const run = (change: Partial<CurrentSinkInput> = {}) =>
  runCalculation(currentSinkCalculation, { ...base, ...change });
const codes = (answer: ReturnType<typeof run>) => answer.findings.map(({ code }) => code);
const finding = (answer: ReturnType<typeof run>, code: string) =>
  answer.findings.find((one) => one.code === code);
const refused = (change: object) => {
  try {
    runCalculation(currentSinkCalculation, { ...base, ...change });
  } catch (error) {
    if (error instanceof EngineError) return error.issues.map(({ path }) => path);
  }
  return [];
};

describe('figures', () => {
  it('follows the formulas, the heat at its worst', () => {
    const { result } = run();
    expect(result.setOhmsExact).toBeCloseTo(1600, 9);
    expect(result.setOhms).toBe(1600);
    expect(result.ampsPerChannel).toBeCloseTo(0.03, 12);
    expect(result.ampsPerChannelMax).toBeCloseTo(0.0315, 12);
    expect(result.headroomVolts).toBeCloseTo(11.4 - 9.9 - 0.7, 12);
    expect(result.channelWatts).toBeCloseTo((12.6 - 9.3) * 0.0315, 12);
    // 40 strings on three boards: 14 on the fullest.
    expect(result).toMatchObject({ boards: 3, stringsPerBoard: 14, governedBy: 'channels' });
    expect(result.packageWatts).toBeCloseTo(14 * 3.3 * 0.0315, 12);
    expect(result.packageWattsNominal).toBeCloseTo(14 * 2.4 * 0.03, 12);
    expect(result.junctionCelsius).toBeCloseTo(40 + 20 * 14 * 3.3 * 0.0315, 12);
  });

  it('takes the next standard value, with which no channel gives more', () => {
    const { result } = run({ ampsPerChannel: 0.025 });
    expect(result.setOhmsExact).toBeCloseTo(1920, 9);
    expect(result.setOhms).toBe(2000);
    expect(result.ampsPerChannel).toBeCloseTo(0.024, 12);
  });

  it('lets the channels, the package or the junction decide the boards', () => {
    // 0.10395 W a string: 9 in 1 W, 40 of them on five boards of eight.
    expect(run({ maxPackageWatts: 1 }).result).toMatchObject({
      boards: 5,
      stringsPerBoard: 8,
      governedBy: 'package-watts',
    });
    // 85 K at 100 K/W: 0.85 W, eight strings.
    expect(run({ thermalCelsiusPerWatt: 100 }).result).toMatchObject({
      boards: 5,
      stringsPerBoard: 8,
      governedBy: 'junction',
    });
    expect(run({ strings: 1 }).result).toMatchObject({ boards: 1, stringsPerBoard: 1 });
    expect(run({ strings: 16 }).result).toMatchObject({ boards: 1, stringsPerBoard: 16 });
    expect(run({ strings: 17 }).result).toMatchObject({ boards: 2, stringsPerBoard: 9 });
  });

  it('takes a package that is just full', () => {
    const exact = { supply: { volts: 3.3 }, perString: 1, dropoutVolts: 0, channelTolerancePct: 0 };
    const led = { forwardVolts: 3.2, forwardVoltsMin: 3.2, forwardVoltsMax: 3.2, maxAmps: 1 };
    // 0.1 V * 30 mA is 3 mW, but for the last bits; ten of them 30 mW.
    const { result } = run({ ...exact, led, maxPackageWatts: 0.03, strings: 10 });
    expect(result).toMatchObject({ boards: 1, stringsPerBoard: 10 });
  });
});

describe('findings', () => {
  it('stops where the lowest supply does not hold the current', () => {
    const answer = run({ supply: { minVolts: 10, maxVolts: 13, volts: 12 } });
    expect(finding(answer, 'no-headroom')?.values.neededVolts).toBeCloseTo(9.9 + 0.7, 12);
    expect(answer.result.boards).not.toBeNull();
    expect(codes(run())).not.toContain('no-headroom');
  });

  it('has no figures where the supply does not reach the LEDs', () => {
    const answer = run({ supply: { volts: 9 } });
    expect(answer.result).toMatchObject({
      setOhms: 1600,
      ampsPerChannel: null,
      ampsPerChannelMax: null,
      channelWatts: null,
      stringsPerBoard: null,
      packageWatts: null,
      packageWattsNominal: null,
      junctionCelsius: null,
      boards: null,
      governedBy: null,
    });
    expect(finding(answer, 'no-headroom')).toMatchObject({ severity: 'stop', hard: false });
  });

  it('stops where one string is too much heat', () => {
    const answer = run({ maxPackageWatts: 0.1 });
    expect(finding(answer, 'one-string-too-hot')).toMatchObject({
      severity: 'stop',
      values: { limitWatts: 0.1 },
    });
    expect(answer.result).toMatchObject({ boards: null, stringsPerBoard: null, packageWatts: null });
    expect(answer.result.channelWatts).toBeCloseTo(0.10395, 12);
    const oven = run({ ambientCelsius: 130, thermalCelsiusPerWatt: 0 });
    expect(finding(oven, 'one-string-too-hot')?.values.limitWatts).toBe(0);
    expect(codes(run({ maxPackageWatts: 0.104 }))).not.toContain('one-string-too-hot');
  });

  it('stops in air hotter than the junction may be, even where nothing heats it', () => {
    const led = { forwardVolts: 3.2, forwardVoltsMin: 3.2, forwardVoltsMax: 3.2, maxAmps: 1 };
    const cold = { supply: { volts: 3.2 }, perString: 1, dropoutVolts: 0, led };
    expect(codes(run({ ...cold, ambientCelsius: 130 }))).toContain('junction-too-hot');
    expect(codes(run(cold))).not.toContain('junction-too-hot');
  });

  it('says where heat decides the boards', () => {
    expect(finding(run({ maxPackageWatts: 1 }), 'boards-by-heat')?.values).toEqual({
      stringsPerBoard: 8,
      channels: 16,
      boards: 5,
    });
    expect(codes(run())).not.toContain('boards-by-heat');
  });

  it('stops above the highest current of the LED, with a resistor that keeps within it', () => {
    const answer = run({ led: { ...base.led, maxAmps: 0.031 } });
    const safer = finding(answer, 'source-over-led-amps')?.values.saferOhms as number;
    expect(safer).toBe(1800);
    expect(((1.2 * 40) / safer) * 1.05).toBeLessThanOrEqual(0.031);
    expect(codes(run())).not.toContain('source-over-led-amps');
  });

  it('holds a channel to its own limits, its volts never overridden', () => {
    expect(finding(run({ maxChannelVolts: 12.5 }), 'channel-over-volts')).toMatchObject({
      severity: 'stop',
      hard: true,
    });
    expect(codes(run({ maxChannelVolts: 12.6 }))).not.toContain('channel-over-volts');
    expect(finding(run({ maxChannelAmps: 0.029 }), 'channel-over-amps')).toMatchObject({ hard: false });
    expect(codes(run({ maxChannelAmps: 0.03 }))).not.toContain('channel-over-amps');
  });

  it('says what is not given', () => {
    const { maxJunctionCelsius: _, channelTolerancePct: __, ...rest } = base;
    const { maxAmps: ___, ...led } = base.led;
    const bare = runCalculation(currentSinkCalculation, { ...rest, led });
    for (const code of ['junction-not-checked', 'channel-tolerance-not-given', 'led-max-amps-not-given']) {
      expect(codes(bare)).toContain(code);
      expect(codes(run())).not.toContain(code);
    }
    expect(bare.result.ampsPerChannelMax).toBe(bare.result.ampsPerChannel);
  });

  it('always says that it is field-built', () => {
    expect(codes(run())[0]).toBe('field-built');
    expect(codes(run({ supply: { volts: 9 } }))[0]).toBe('field-built');
    expect(currentSinkCalculation.bench).toBe(true);
  });
});

describe('refusals', () => {
  it.each([
    [{ channels: 0 }, ['channels']],
    [{ strings: 2.5 }, ['strings']],
    [{ referenceVolts: 0 }, ['referenceVolts']],
    [{ currentRatio: -1 }, ['currentRatio']],
    [{ led: { ...base.led, forwardVoltsMin: 3.4 } }, ['led.forwardVoltsMin']],
    [{ led: { ...base.led, forwardVolts: 3 } }, ['led.forwardVolts']],
    [{ supply: { volts: 12, minVolts: 11 } }, ['supply.maxVolts']],
    [{ channelTolerancePct: 100 }, ['channelTolerancePct']],
    [{ maxPackageWatts: 0 }, ['maxPackageWatts']],
    [{ amps: 0.03 }, ['amps']],
  ])('%j', (change, paths) => expect(refused(change)).toEqual(paths));
});

describe('laws', () => {
  const real = (low: number, high: number) => fc.double({ min: low, max: high, noNaN: true });
  const anySink = fc
    .record({
      typical: real(1.5, 4),
      spread: real(0, 0.3),
      perString: fc.integer({ min: 1, max: 8 }),
      over: real(0, 6),
      tolerancePct: real(0, 5),
      ampsPerChannel: real(0.002, 0.15),
      referenceVolts: real(0.3, 1.3),
      currentRatio: real(5, 1000),
      channels: fc.integer({ min: 1, max: 48 }),
      strings: fc.integer({ min: 1, max: 500 }),
      maxPackageWatts: real(0.2, 5),
      thermalCelsiusPerWatt: real(0, 90),
      channelTolerancePct: real(0, 8),
      series: fc.constantFrom(...E_SERIES_NAMES),
    })
    .map(({ typical, spread, over, tolerancePct, ...rest }) => ({
      ...base,
      ...rest,
      led: {
        forwardVolts: typical,
        forwardVoltsMin: typical - spread,
        forwardVoltsMax: typical + spread,
        maxAmps: 1,
      },
      supply: { volts: rest.perString * typical + over, tolerancePct },
    }));

  it('the set resistor is never below exact, and no channel gives more than is wanted', () => {
    fc.assert(
      fc.property(anySink, (input) => {
        const { setOhms, setOhmsExact, ampsPerChannel } = run(input).result;
        expect(setOhms).toBeGreaterThanOrEqual(setOhmsExact * (1 - 1.1e-9));
        expect(ampsPerChannel).toBeLessThanOrEqual(input.ampsPerChannel * (1 + 1.1e-9));
      }),
      { numRuns: 500 },
    );
  });

  it('boards hold every string within channels, package and junction, and one board less would not', () => {
    fc.assert(
      fc.property(anySink, (input) => {
        const { boards, stringsPerBoard, channelWatts, packageWatts, junctionCelsius } = run(input).result;
        const allowed = (strings: number) =>
          strings <= input.channels &&
          strings * (channelWatts ?? 0) <= input.maxPackageWatts * (1 + 1e-9) &&
          40 + input.thermalCelsiusPerWatt * strings * (channelWatts ?? 0) <= 125 * (1 + 1e-9);
        if (boards === null || stringsPerBoard === null) {
          expect(allowed(1)).toBe(false);
          return;
        }
        expect(boards * stringsPerBoard).toBeGreaterThanOrEqual(input.strings);
        expect(allowed(stringsPerBoard)).toBe(true);
        if (boards > 1) expect(allowed(Math.ceil(input.strings / (boards - 1)))).toBe(false);
        expect(packageWatts).toBeLessThanOrEqual(input.maxPackageWatts * (1 + 1e-9));
        expect(junctionCelsius).toBeLessThanOrEqual(125 * (1 + 1e-9));
      }),
      { numRuns: 1000 },
    );
  });

  it('what the supply gives to a full board is what its LEDs and its package take', () => {
    fc.assert(
      fc.property(anySink, (input) => {
        const { stringsPerBoard, ampsPerChannel, packageWattsNominal } = run(input).result;
        if (stringsPerBoard === null || ampsPerChannel === null || packageWattsNominal === null) return;
        const amps = stringsPerBoard * ampsPerChannel;
        const ledWatts = input.perString * input.led.forwardVolts * amps;
        const supplyWatts = input.supply.volts * amps;
        expect(Math.abs(ledWatts + packageWattsNominal - supplyWatts)).toBeLessThanOrEqual(
          1e-9 * supplyWatts,
        );
      }),
      { numRuns: 500 },
    );
  });

  it('more supply or more heat never needs fewer boards', () => {
    const boards = (input: CurrentSinkInput) => run(input).result.boards ?? Infinity;
    fc.assert(
      fc.property(anySink, real(0, 3), (input, more) => {
        const before = boards(input);
        expect(
          boards({ ...input, supply: { ...input.supply, volts: input.supply.volts + more } }),
        ).toBeGreaterThanOrEqual(before);
        expect(boards({ ...input, ambientCelsius: 60 })).toBeGreaterThanOrEqual(before);
        expect(boards({ ...input, strings: input.strings + 3 })).toBeGreaterThanOrEqual(before);
      }),
      { numRuns: 500 },
    );
  });
});
