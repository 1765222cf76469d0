import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import {
  linearCurrentSourceCalculation,
  type LinearCurrentSourceInput,
} from '@/lib/sizing/linear-current-source';
import { E_SERIES_NAMES } from '@/lib/sizing/tables/e-series';

const base: LinearCurrentSourceInput = {
  supply: { volts: 12, tolerancePct: 5 },
  led: { forwardVolts: 3.2, forwardVoltsMin: 3, forwardVoltsMax: 3.4, amps: 0.1, maxAmps: 0.15 },
  perString: 2,
  amps: 0.1,
  referenceVolts: 1.25,
  referenceMaxVolts: 1.3,
  dropoutVolts: 2.5,
  thermalCelsiusPerWatt: 50,
  maxJunctionCelsius: 125,
  ambientCelsius: 40,
  series: 'E24',
  switchingEfficiencyPct: 50,
};
const run = (change: Partial<LinearCurrentSourceInput> = {}) =>
  runCalculation(linearCurrentSourceCalculation, { ...base, ...change });
const codes = (answer: ReturnType<typeof run>) => answer.findings.map(({ code }) => code);
const finding = (answer: ReturnType<typeof run>, code: string) =>
  answer.findings.find((one) => one.code === code);
const refused = (change: object) => {
  try {
    runCalculation(linearCurrentSourceCalculation, { ...base, ...change });
  } catch (error) {
    if (error instanceof EngineError) return error.issues.map(({ path }) => path);
  }
  return [];
};

describe('figures', () => {
  it('follows the formulas, nominal and worst', () => {
    const { result } = run();
    expect(result.setOhmsExact).toBeCloseTo(12.5, 12);
    expect(result.setOhms).toBe(13);
    expect(result.amps).toBeCloseTo(1.25 / 13, 12);
    expect(result.ampsMax).toBeCloseTo(1.3 / 13, 12);
    expect(result.setWatts).toBeCloseTo((1.25 * 1.25) / 13, 12);
    expect(result.headroomVolts).toBeCloseTo(11.4 - 6.8 - 1.25 - 2.5, 12);
    expect(result.regulatorWatts).toBeCloseTo((12 - 6.4 - 1.25) * (1.25 / 13), 12);
    expect(result.regulatorWattsMax).toBeCloseTo((12.6 - 6 - 1.25) * 0.1, 12);
    expect(result.junctionCelsius).toBeCloseTo(40 + 50 * 0.535, 12);
    expect(result.efficiency).toBeCloseTo(6.4 / 12, 12);
  });

  it('takes 1.25 V where no reference is given, and the set resistor at the low end of its tolerance', () => {
    const { referenceVolts: _, referenceMaxVolts: __, ...rest } = base;
    const { result } = runCalculation(linearCurrentSourceCalculation, { ...rest, setTolerancePct: 2 });
    expect(result.setOhms).toBe(13);
    expect(result.ampsMax).toBeCloseTo(1.25 / (13 * 0.98), 12);
  });

  it('says of the current that is allowed what heats the junction to its limit', () => {
    const step = (key: string) => run().working.find((one) => one.key === key)?.value as number;
    expect(step('regulator-watts-allowed')).toBeCloseTo(85 / 50, 12);
    expect(step('regulator-amps-allowed')).toBeCloseTo(85 / 50 / 5.35, 12);
    const free = run({ thermalCelsiusPerWatt: 0 });
    expect(free.working.find(({ key }) => key === 'regulator-watts-allowed')?.value).toBeNull();
    expect(free.result.junctionCelsius).toBe(40);
  });

  it('sets a resistor and a switching driver beside it', () => {
    const { comparison } = run().result;
    const amps = 1.25 / 13;
    expect(comparison.ledWatts).toBeCloseTo(6.4 * amps, 12);
    expect(comparison.linear.heatWatts).toBeCloseTo(5.6 * amps, 12);
    expect(comparison.resistor).toMatchObject({ ohms: 56, ampsMin: expect.closeTo(4.6 / 56, 12) as number });
    expect(comparison.resistor.ampsMax).toBeCloseTo(6.6 / 56, 12);
    expect(comparison.resistor.heatWatts).toBeCloseTo((5.6 * 5.6) / 56, 12);
    expect(comparison.resistor.efficiency).toBe(comparison.linear.efficiency);
    expect(comparison.switching.heatWatts).toBeCloseTo(6.4 * amps, 12);
  });
});

describe('findings', () => {
  it('stops where the lowest supply does not reach, and names the one that would', () => {
    const answer = run({ supply: { minVolts: 10, maxVolts: 14, volts: 12 } });
    expect(finding(answer, 'no-headroom')).toMatchObject({ severity: 'stop', hard: false });
    expect(finding(answer, 'no-headroom')?.values.neededVolts).toBeCloseTo(6.8 + 1.25 + 2.5, 12);
    expect(answer.result.headroomVolts).toBeCloseTo(-0.55, 12);
    expect(answer.result.comparison.linear.ampsMin).toBeNull();
    expect(codes(run())).not.toContain('no-headroom');
  });

  it('takes a supply that just reaches, in spite of the last bits', () => {
    const led = { forwardVolts: 0.1, forwardVoltsMin: 0.1, forwardVoltsMax: 0.1, maxAmps: 1 };
    // 3 * 0.1 is a little more than 0.3 in binary.
    const answer = run({ supply: { volts: 0.3 + 1.25 }, led, perString: 3, dropoutVolts: 0 });
    expect(answer.result.headroomVolts).toBe(0);
    expect(codes(answer)).not.toContain('no-headroom');
    expect(answer.result.amps).not.toBeNull();
  });

  it('has no figures where the supply does not reach LEDs and reference at all', () => {
    const answer = run({ supply: { volts: 5 } });
    expect(answer.result).toMatchObject({
      setOhms: 13,
      amps: null,
      ampsMax: null,
      setWatts: null,
      regulatorWatts: null,
      regulatorWattsMax: null,
      junctionCelsius: null,
      efficiency: null,
      comparison: { ledWatts: null, linear: { efficiency: null, heatWatts: null } },
    });
    expect(codes(answer)).toContain('no-headroom');
  });

  it('stops on a junction over its limit, with the thermal resistance that would do', () => {
    const answer = run({ thermalCelsiusPerWatt: 200 });
    expect(finding(answer, 'junction-too-hot')).toMatchObject({ severity: 'stop', hard: false });
    const needed = finding(answer, 'junction-too-hot')?.values.neededCelsiusPerWatt as number;
    expect(codes(run({ thermalCelsiusPerWatt: needed }))).not.toContain('junction-too-hot');
    expect(codes(run({ thermalCelsiusPerWatt: needed * 1.001 }))).toContain('junction-too-hot');
    const oven = run({ ambientCelsius: 130 });
    expect(finding(oven, 'junction-too-hot')?.values.neededCelsiusPerWatt).toBeNull();
    expect(codes(run())).not.toContain('junction-too-hot');
  });

  it('stops above the highest current of the LED, with a resistor that keeps within it', () => {
    const led = { ...base.led, maxAmps: 0.098 };
    const answer = run({ led });
    expect(finding(answer, 'source-over-led-amps')).toMatchObject({ severity: 'stop', hard: false });
    const safer = finding(answer, 'source-over-led-amps')?.values.saferOhms as number;
    expect(1.3 / safer).toBeLessThanOrEqual(0.098);
    expect(safer).toBe(15);
    expect(codes(run())).not.toContain('source-over-led-amps');
  });

  it('says what is not checked or taken from elsewhere', () => {
    const { amps: _, maxAmps: __, ...led } = base.led;
    const bare = run({ led });
    expect(finding(bare, 'led-max-amps-not-given')?.severity).toBe('caution');
    expect(codes(bare)).not.toContain('forward-volts-at-other-amps');
    expect(codes(run({ led: { ...base.led, amps: 0.05 } }))).toContain('forward-volts-at-other-amps');
    expect(codes(run({ led: { ...base.led, amps: 0.105 } }))).not.toContain('forward-volts-at-other-amps');
    const { referenceMaxVolts: ___, switchingEfficiencyPct: ____, ...rest } = base;
    const assumed = runCalculation(linearCurrentSourceCalculation, rest);
    expect(codes(assumed)).toEqual(
      expect.arrayContaining(['reference-spread-not-given', 'switching-efficiency-assumed']),
    );
    expect(assumed.result.comparison.switching.efficiency).toBe(0.85);
    for (const code of [
      'led-max-amps-not-given',
      'reference-spread-not-given',
      'switching-efficiency-assumed',
    ])
      expect(codes(run())).not.toContain(code);
  });

  it('holds the regulator to its own limits, its volts never overridden', () => {
    // 12.6 V less 6 V of LEDs and 1.25 V of reference: 5.35 V.
    expect(finding(run({ maxDifferenceVolts: 5.3 }), 'regulator-over-volts')).toMatchObject({
      severity: 'stop',
      hard: true,
    });
    expect(codes(run({ maxDifferenceVolts: 5.35 }))).not.toContain('regulator-over-volts');
    expect(finding(run({ minLoadAmps: 0.1 }), 'under-min-load')).toMatchObject({ severity: 'stop' });
    expect(codes(run({ minLoadAmps: 0.0096 }))).not.toContain('under-min-load');
  });

  it('says which of the three is worth it', () => {
    expect(codes(run({ switchingEfficiencyPct: 90 }))).toContain('switching-wastes-less');
    expect(codes(run({ switchingEfficiencyPct: 50 }))).not.toContain('switching-wastes-less');
    const steady = {
      supply: { volts: 12 },
      led: { forwardVolts: 3.2, forwardVoltsMin: 3.2, forwardVoltsMax: 3.2, maxAmps: 0.15 },
    };
    expect(codes(run(steady))).toContain('resistor-would-do');
    expect(codes(run({ ...steady, led: { ...steady.led, maxAmps: 0.09 } }))).not.toContain(
      'resistor-would-do',
    );
    expect(codes(run())).not.toContain('resistor-would-do');
  });

  it('always says that it is field-built', () => {
    expect(codes(run())[0]).toBe('field-built');
    expect(codes(run({ supply: { volts: 5 } }))[0]).toBe('field-built');
    expect(linearCurrentSourceCalculation.bench).toBe(true);
  });
});

describe('refusals', () => {
  it.each([
    [{ referenceMaxVolts: 1.2 }, ['referenceMaxVolts']],
    [{ led: { ...base.led, forwardVoltsMin: 3.5 } }, ['led.forwardVoltsMin']],
    [{ led: { ...base.led, forwardVolts: 3.5 } }, ['led.forwardVolts']],
    [{ supply: { minVolts: 12 } }, ['supply.maxVolts']],
    [{ amps: 0 }, ['amps']],
    [{ perString: 0 }, ['perString']],
    [{ perString: 1.5 }, ['perString']],
    [{ dropoutVolts: -1 }, ['dropoutVolts']],
    [{ thermalCelsiusPerWatt: -1 }, ['thermalCelsiusPerWatt']],
    [{ switchingEfficiencyPct: 101 }, ['switchingEfficiencyPct']],
    [{ setTolerancePct: 100 }, ['setTolerancePct']],
    [{ series: 'E7' }, ['series']],
    [{ heatSink: 1 }, ['heatSink']],
  ])('%j', (change, paths) => expect(refused(change)).toEqual(paths));
});

describe('laws', () => {
  const volts = (low: number, high: number) => fc.double({ min: low, max: high, noNaN: true });
  const anySource = fc
    .record({
      typical: volts(1.5, 4),
      spread: volts(0, 0.5),
      perString: fc.integer({ min: 1, max: 12 }),
      over: volts(0, 20),
      tolerancePct: volts(0, 10),
      amps: volts(0.005, 1.5),
      referenceVolts: volts(0.1, 2.5),
      referenceSpread: volts(0, 0.1),
      setTolerancePct: volts(0, 10),
      dropoutVolts: volts(0, 3),
      series: fc.constantFrom(...E_SERIES_NAMES),
    })
    .map(({ typical, spread, over, tolerancePct, referenceSpread, ...rest }) => ({
      ...base,
      ...rest,
      referenceMaxVolts: rest.referenceVolts + referenceSpread,
      led: {
        forwardVolts: typical,
        forwardVoltsMin: typical - spread,
        forwardVoltsMax: typical + spread,
        maxAmps: 2,
      },
      supply: { volts: rest.perString * typical + rest.referenceVolts + over, tolerancePct },
    }));
  const near = (got: number, want: number) =>
    expect(Math.abs(got - want)).toBeLessThanOrEqual(1e-9 * Math.abs(want) + 1e-12);

  it('what the supply gives is what LEDs, set resistor and regulator take', () => {
    fc.assert(
      fc.property(anySource, (input) => {
        const { result } = run(input);
        const { amps, setWatts, regulatorWatts, efficiency, comparison } = result;
        if (amps === null || setWatts === null || regulatorWatts === null || efficiency === null)
          throw new Error('every such source has figures');
        const supplyWatts = input.supply.volts * amps;
        near((comparison.ledWatts ?? 0) + setWatts + regulatorWatts, supplyWatts);
        near((comparison.ledWatts ?? 0) / supplyWatts, efficiency);
        near(comparison.linear.heatWatts ?? 0, setWatts + regulatorWatts);
      }),
      { numRuns: 500 },
    );
  });

  it('the set resistor is never below exact, the current never above what is wanted', () => {
    fc.assert(
      fc.property(anySource, (input) => {
        const { setOhms, setOhmsExact, amps } = run(input).result;
        expect(setOhms).toBeGreaterThanOrEqual(setOhmsExact * (1 - 1.1e-9));
        expect(amps ?? 0).toBeLessThanOrEqual(input.amps * (1 + 1.1e-9));
      }),
      { numRuns: 500 },
    );
  });

  it('no operating point within the window is hotter than the worst, or above the highest current', () => {
    const share = fc.double({ min: 0, max: 1, noNaN: true });
    fc.assert(
      fc.property(anySource, share, share, share, (input, atSupply, atLed, atSet) => {
        const { result } = run(input);
        const swing = (input.supply.tolerancePct / 100) * (2 * atSupply - 1);
        const supplyVolts = input.supply.volts * (1 + swing);
        const { forwardVoltsMin: low, forwardVoltsMax: high } = input.led;
        const stringVolts = input.perString * (low + (high - low) * atLed);
        const ohms = result.setOhms * (1 + (input.setTolerancePct / 100) * (2 * atSet - 1));
        const amps = input.referenceVolts / ohms;
        expect(amps).toBeLessThanOrEqual((result.ampsMax ?? 0) * (1 + 1e-9));
        const watts = (supplyVolts - stringVolts - input.referenceVolts) * amps;
        expect(watts).toBeLessThanOrEqual((result.regulatorWattsMax ?? 0) * (1 + 1e-9) + 1e-12);
      }),
      { numRuns: 500 },
    );
  });

  it('more supply is never cooler and never more efficient', () => {
    fc.assert(
      fc.property(anySource, volts(0.1, 10), (input, more) => {
        const before = run(input).result;
        const after = run({ ...input, supply: { ...input.supply, volts: input.supply.volts + more } }).result;
        expect(after.junctionCelsius ?? 0).toBeGreaterThan(before.junctionCelsius ?? 0);
        expect(after.efficiency ?? 1).toBeLessThan(before.efficiency ?? 0);
        expect(after.headroomVolts).toBeGreaterThan(before.headroomVolts);
      }),
      { numRuns: 300 },
    );
  });
});
