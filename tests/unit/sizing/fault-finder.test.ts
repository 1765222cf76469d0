/** What the fault finder takes and refuses, the laws of its bands, and when it says what. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Answer, EngineError, WEB_LIMITS } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { type FaultFinder, faultFinderCalculation } from '@/lib/sizing/fault-finder';
import { bandOver, judge, nearBand } from '@/lib/sizing/fault-finder-band';
import { tapeAnalysis } from '@/lib/sizing/tape-analysis';
import type { TapeInput } from '@/lib/sizing/tape-operating-point';

const COPPER_75 = 1 + 0.00393 * 55;

/** Two cuts of 1 m, 1 A each, rails of 0.1 ohm/m, feeder 2 x 0.2 ohm: a ladder worked on paper. */
const paper: TapeInput = {
  cuts: 2,
  cutMetres: 1,
  railOhmsPerMetre: { positive: 0.1, negative: 0.1 },
  load: { model: 'constant-current', amps: 1 },
  feeds: [{ at: 0, volts: 24, positiveOhms: 0.2, negativeOhms: 0.2 }],
};
const led = {
  model: 'led-string',
  leds: 7,
  ballastOhms: 60,
  saturationAmps: 1e-18,
  emissionCoefficient: 2.6,
  seriesOhms: 5,
} as const;
const lit: TapeInput = { ...paper, cuts: 40, cutMetres: 0.05, load: led };
const diode = { saturationAmps: 1e-18, emissionCoefficient: 3.2, seriesOhms: 5 };
const strings = Array.from({ length: 3 }, () => ({ ballastOhms: 120, leds: [diode, diode, diode] }));
const array = { supply: { volts: 12 }, strings };
const series = {
  amps: 0.7,
  count: 10,
  module: { forwardVolts: 3.2, forwardVoltsMin: 3.05, forwardVoltsMax: 3.35 },
  positiveOhms: 0.3,
  negativeOhms: 0.3,
};

const tape = (input: TapeInput = paper) => ({ kind: 'tape', input });
const run = (circuit: object, readings: object[], more = {}) =>
  runCalculation(faultFinderCalculation, { circuit, readings, ...more }, WEB_LIMITS);
const codes = ({ findings }: Answer<FaultFinder>) => findings.map(({ code }) => code);
const refused = (input: object) => {
  try {
    runCalculation(faultFinderCalculation, input, WEB_LIMITS);
  } catch (error) {
    if (error instanceof EngineError) return `${error.code} ${error.issues.map(({ path }) => path).join()}`;
  }
  return '';
};
const feed = { at: 'feed', index: 1 };

describe('bands', () => {
  it('reach over supply, conductors and load current, by hand', () => {
    const { result } = run(
      tape(),
      [
        { ...feed, volts: 24 },
        { ...feed, amps: 2 },
        { at: 'cut', index: 2, volts: 23 },
        { at: 'positive-conductor', index: 1, volts: 0.4 },
      ],
      { tolerances: { supplyPct: 2, currentPct: 5, workingCelsius: 75 } },
    );
    const [volts, amps, end, conductor] = result.readings;
    expect(volts?.expected).toBe(24);
    expect(volts?.low).toBeCloseTo(24 * 0.98 * 0.99, 9);
    expect(volts?.high).toBeCloseTo(24 * 1.02 * 1.01, 9);
    expect(amps?.low).toBeCloseTo(2 * 0.95 * 0.97, 9);
    expect(amps?.high).toBeCloseTo(2 * 1.05 * 1.03, 9);
    // 2 A through 0.4 ohm of feeder and half a cut, 0.1 ohm; then 1 A through a whole cut, 0.2 ohm.
    const drop = 2 * 0.5 + 1 * 0.2;
    expect(end?.expected).toBeCloseTo(24 - drop, 9);
    expect(end?.low).toBeCloseTo((24 * 0.98 - drop * 1.05) * 0.99, 9);
    expect(end?.high).toBeCloseTo((24 * 1.02 - (drop * 0.95) / COPPER_75) * 1.01, 9);
    expect(conductor?.expected).toBeCloseTo(0.4, 9);
    expect(conductor?.low).toBeCloseTo(((0.4 * 0.95) / COPPER_75) * 0.99, 9);
    // Half a band more on either side.
    expect(end?.nearLow).toBeCloseTo((end?.low ?? 0) - ((end?.high ?? 0) - (end?.low ?? 0)) / 2, 9);
    expect(end?.nearHigh).toBeCloseTo((end?.high ?? 0) + ((end?.high ?? 0) - (end?.low ?? 0)) / 2, 9);
  });

  it('of a string: every module at its lowest or highest, resistances and current with it', () => {
    const { result } = run({ kind: 'string', input: series }, [
      { ...feed, volts: 32.4 },
      { at: 'cut', index: 4, volts: 3.2 },
      { at: 'string', index: 1, volts: 32 },
    ]);
    const [whole, module, string] = result.readings;
    expect(whole?.expected).toBeCloseTo(32 + 0.7 * 0.6, 9);
    expect(whole?.low).toBeCloseTo((30.5 + (0.7 * 0.95 * 0.6) / COPPER_75) * 0.99, 9);
    expect(whole?.high).toBeCloseTo((33.5 + 0.7 * 1.05 * 0.6) * 1.01, 9);
    expect(module?.low).toBeCloseTo(3.05 * 0.99, 9);
    expect(string?.high).toBeCloseTo(33.5 * 1.01, 9);
  });

  it('of a string in an array: its own LEDs one way, the others the other way', () => {
    const shared = { ...array, sharedOhms: 20 };
    const at = (own: number, others: number) => {
      const slope = 3.2 * (1.380649e-23 / 1.602176634e-19) * 298.15;
      const moved = (by: number) => ({
        ...diode,
        saturationAmps: diode.saturationAmps * Math.exp((-by * 0.1) / slope),
      });
      const of = (by: number) => ({ ballastOhms: 120, leds: [moved(by), moved(by), moved(by)] });
      const input = { ...shared, strings: [of(own), of(others), of(others)] };
      return (
        run({ kind: 'array', input }, [{ at: 'string', index: 1, amps: 0.01 }]).result.readings[0]
          ?.expected ?? 0
      );
    };
    const { result } = run({ kind: 'array', input: shared }, [{ at: 'string', index: 1, amps: 0.01 }], {
      tolerances: { supplyPct: 0, resistorPct: 0, spreadVolts: 0.1 },
    });
    expect(result.readings[0]?.high).toBeCloseTo(at(-1, 1) * 1.03, 9);
    expect(result.readings[0]?.low).toBeCloseTo(at(1, -1) * 0.97, 9);
  });

  const share = fc.double({ min: 0, max: 15, noNaN: true });
  const anyTolerances = fc.record({
    supplyPct: share,
    resistorPct: share,
    currentPct: share,
    spreadVolts: fc.double({ min: 0, max: 0.3, noNaN: true }),
    workingCelsius: fc.double({ min: 20, max: 90, noNaN: true }),
  });
  const anyLoad = fc.constantFrom<TapeInput['load']>(
    led,
    { model: 'resistive', ohms: 600 },
    { model: 'constant-current', amps: 0.02 },
  );
  const anyTape = fc
    .record({
      cuts: fc.integer({ min: 1, max: 40 }),
      rail: fc.double({ min: 0, max: 0.5, noNaN: true }),
      load: anyLoad,
      two: fc.boolean(),
    })
    .map(({ cuts, rail, load, two }): TapeInput => {
      const [first] = paper.feeds;
      const feeds = first ? [first, ...(two ? [{ ...first, at: cuts, positiveOhms: 0.5 }] : [])] : [];
      return { cuts, cutMetres: 0.05, railOhmsPerMetre: { positive: rail, negative: rail / 2 }, load, feeds };
    });
  const readingsAt = (cuts: number) => [
    { ...feed, volts: 24 },
    { ...feed, amps: 1 },
    { at: 'cut', index: cuts, volts: 22 },
    { at: 'negative-conductor', index: 1, volts: 0.1 },
  ];

  it('hold what is expected, and widen with every tolerance and with the meter', () => {
    fc.assert(
      fc.property(anyTape, anyTolerances, anyTolerances, share, (input, some, more, meter) => {
        const wider = Object.fromEntries(
          Object.entries(some).map(([key, own]) => [key, Math.max(own, more[key as keyof typeof more])]),
        );
        const at = (tolerances: object, voltsPct = 1) =>
          run(tape(input), readingsAt(input.cuts), { tolerances, meter: { voltsPct } }).result.readings;
        const wide = at(wider);
        const slack = (own: number) => 1e-9 * (1 + Math.abs(own));
        at(some).forEach(({ expected, low, high }, i) => {
          expect(low).toBeLessThanOrEqual(expected + slack(expected));
          expect(high).toBeGreaterThanOrEqual(expected - slack(expected));
          expect(wide[i]?.low).toBeLessThanOrEqual(low + slack(low));
          expect(wide[i]?.high).toBeGreaterThanOrEqual(high - slack(high));
        });
        at(some, 1 + meter).forEach(({ low, high }, i) => {
          expect(low).toBeLessThanOrEqual((at(some)[i]?.low ?? 0) + slack(low));
          expect(high).toBeGreaterThanOrEqual((at(some)[i]?.high ?? 0) - slack(high));
        });
      }),
      { numRuns: 30 },
    );
  });

  it('are what every corner of the tolerances gives, tried one by one', () => {
    fc.assert(
      fc.property(anyTape, (input) => {
        const { readings } = run(tape(input), readingsAt(input.cuts)).result;
        const figures: number[][] = readings.map(() => []);
        for (let corner = 0; corner < 16; corner++) {
          const [supply = 0, cold = 0, own = 0, spread = 0] = [0, 1, 2, 3].map((bit) =>
            (corner >> bit) & 1 ? 1 : -1,
          );
          const copper = cold < 0 ? 1 / COPPER_75 : 1;
          const { load } = input;
          const slope = 2.6 * (1.380649e-23 / 1.602176634e-19) * 298.15;
          const moved: TapeInput = {
            ...input,
            railOhmsPerMetre: {
              positive: input.railOhmsPerMetre.positive * copper,
              negative: input.railOhmsPerMetre.negative * copper,
            },
            feeds: input.feeds.map((one) => ({
              ...one,
              volts: one.volts * (1 + 0.05 * supply),
              positiveOhms: one.positiveOhms * copper,
              negativeOhms: one.negativeOhms * copper,
            })),
            load:
              load.model === 'led-string'
                ? {
                    ...load,
                    ballastOhms: load.ballastOhms * (1 + 0.05 * own),
                    saturationAmps: load.saturationAmps * Math.exp((-0.1 * spread) / slope),
                  }
                : load.model === 'resistive'
                  ? { ...load, ohms: load.ohms * (1 + 0.05 * own) }
                  : { ...load, amps: load.amps * (1 + 0.05 * own) },
          };
          const { feeds, loadVolts } = tapeAnalysis(moved);
          const amps = feeds[0]?.amps ?? 0;
          figures[0]?.push(moved.feeds[0]?.volts ?? 0);
          figures[1]?.push(amps);
          figures[2]?.push(loadVolts[input.cuts - 1] ?? 0);
          // One place or another: what comes back need not be what went in, so only the single feed is compared.
          figures[3]?.push(input.feeds.length === 1 ? amps * (moved.feeds[0]?.negativeOhms ?? 0) : NaN);
        }
        readings.forEach(({ quantity, low, high }, i) => {
          const own = figures[i] ?? [];
          if (own.some(Number.isNaN)) return;
          const band = bandOver(own, quantity === 'volts' ? 1 : 3);
          expect(low).toBeCloseTo(band.low, 6);
          expect(high).toBeCloseTo(band.high, 6);
        });
      }),
      { numRuns: 40 },
    );
  });

  it('widen a negative figure away from nought as well', () => {
    expect(bandOver([-2, -1], 10)).toEqual({ low: -2.2, high: -0.9 });
    expect(nearBand({ low: 1, high: 2 })).toEqual({ low: 0.5, high: 2.5 });
    expect(judge({ low: 1, high: 2 }, 2.5)).toBe('near');
    expect(judge({ low: 1, high: 2 }, 2.6)).toBe('out');
  });
});

describe('what is refused, by its path', () => {
  const one = { ...feed, volts: 24 };
  it.each([
    [{ ...one, index: 2 }, 'invalid-input readings.0.index'],
    [{ ...one, index: 0 }, 'invalid-input readings.0.index'],
    [{ ...one, index: 1.5 }, 'invalid-input readings.0.index'],
    [{ at: 'cut', index: 3, volts: 20 }, 'invalid-input readings.0.index'],
    [{ at: 'cut', index: 1, amps: 0.1 }, 'invalid-input readings.0.amps'],
    [{ at: 'string', index: 1, volts: 20 }, 'invalid-input readings.0.at'],
    [{ ...one, amps: 1 }, 'invalid-input readings.0.amps'],
    [feed, 'invalid-input readings.0.volts'],
    [{ at: 'negative-conductor', index: 1, amps: 1 }, 'invalid-input readings.0.amps'],
    [{ ...one, volts: 1e9 }, 'invalid-input readings.0.volts'],
  ])('%j on a tape of two segments', (reading, refusal) => {
    expect(refused({ circuit: tape(), readings: [reading] })).toBe(refusal);
  });

  it('places that the circuit has not', () => {
    const on = (circuit: object, reading: object) => refused({ circuit, readings: [reading] });
    expect(on({ kind: 'array', input: array }, { at: 'cut', index: 1, volts: 3 })).toBe(
      'invalid-input readings.0.at',
    );
    expect(on({ kind: 'array', input: array }, { at: 'string', index: 4, amps: 0.02 })).toBe(
      'invalid-input readings.0.index',
    );
    expect(on({ kind: 'string', input: series }, { at: 'cut', index: 11, volts: 3 })).toBe(
      'invalid-input readings.0.index',
    );
  });

  it('the circuit, by its place in this input', () => {
    const readings = [one];
    expect(
      refused({ circuit: tape({ ...paper, feeds: [{ ...paper.feeds[0], at: 3 } as never] }), readings }),
    ).toBe('invalid-input circuit.input.feeds.0.at');
    expect(
      refused({ circuit: tape({ ...paper, load: { model: 'constant-current', amps: 100 } }), readings }),
    ).toBe('no-solution circuit.input.load.amps');
    const joints = [{ at: 1, rail: 'positive' as const, ohms: 1 }];
    expect(refused({ circuit: tape({ ...paper, joints }), readings })).toBe(
      'invalid-input circuit.input.joints',
    );
    expect(refused({ circuit: { kind: 'array', input: { ...array, supply: {} } }, readings })).toBe(
      'invalid-input circuit.input.supply.volts',
    );
    const upsideDown = { ...series.module, forwardVoltsMin: 4 };
    expect(refused({ circuit: { kind: 'string', input: { ...series, module: upsideDown } }, readings })).toBe(
      'invalid-input circuit.input.module.forwardVoltsMin',
    );
  });

  it('what is too large to be searched', () => {
    const readings = [one];
    expect(refused({ circuit: tape({ ...lit, cuts: 5001 }), readings })).toBe('too-large circuit.input.cuts');
    const feeds = Array.from({ length: 21 }, (_, i) => ({ ...paper.feeds[0], at: i }) as never);
    expect(refused({ circuit: tape({ ...lit, feeds }), readings })).toBe('too-large circuit.input.feeds');
    const many = { ...array, strings: Array.from({ length: 51 }, () => strings[0]) };
    expect(refused({ circuit: { kind: 'array', input: many }, readings })).toBe(
      'too-large circuit.input.strings',
    );
  });
});

describe('what is said', () => {
  const good = [
    { ...feed, volts: 24 },
    { at: 'cut', index: 1, volts: 22.9 },
    { at: 'cut', index: 2, volts: 22.7 },
  ];
  const finding = (answer: Answer<FaultFinder>, code: string) =>
    answer.findings.find((one) => one.code === code);

  it('nothing, where every reading is in its band', () => {
    const answer = run(tape(), good);
    expect(answer.result).toMatchObject({ causes: [], nextReading: null });
    expect(codes(answer)).toEqual([]);
  });

  it('a bad joint: soft stop with the heat in it', () => {
    // 1.8 ohm more in the positive conductor, 2 A: 3.6 V and 7.2 W.
    const answer = run(tape(), [
      { ...feed, volts: 24 },
      { ...feed, amps: 2 },
      { at: 'cut', index: 1, volts: 19.4 },
      { at: 'cut', index: 2, volts: 19.2 },
      { at: 'positive-conductor', index: 1, volts: 4 },
      { at: 'negative-conductor', index: 1, volts: 0.4 },
    ]);
    const stop = finding(answer, 'high-resistance-joint');
    expect(stop).toMatchObject({ severity: 'stop', hard: false });
    expect(stop?.values.ohms).toBeCloseTo(1.8, 1);
    expect(stop?.values.watts).toBeGreaterThan(6.5);
    expect(stop?.values.watts).toBeLessThan(7.9);
    expect(stop?.basis).toContain('common practice');
    expect(codes(answer)).toContain('measure-safely');
    expect(answer.working.map(({ key }) => key)).toContain('joint-watts');
  });

  it('reversed polarity: soft stop; a feed that is not connected is none', () => {
    const at = (volts: number) =>
      run(tape(lit), [
        { ...feed, volts: 24 },
        { at: 'cut', index: 20, volts },
      ]);
    expect(finding(at(-24), 'polarity-reversed')).toMatchObject({ severity: 'stop', hard: false });
    expect(at(0).result.causes[0]?.cause).toBe('feed-missing');
    expect(codes(at(0))).not.toContain('polarity-reversed');
  });

  it('another setting of the driver, in what it is set in', () => {
    const volts = run(tape(), [
      { ...feed, volts: 18 },
      { at: 'cut', index: 2, volts: 16.8 },
    ]);
    expect(finding(volts, 'supply-volts-not-as-drawn')).toMatchObject({
      severity: 'caution',
      values: { index: 1 },
    });
    expect(finding(volts, 'supply-volts-not-as-drawn')?.values.volts).toBeCloseTo(18, 0);
    expect(codes(volts)).not.toContain('supply-amps-not-as-drawn');
    const amps = run({ kind: 'string', input: series }, [
      { ...feed, amps: 1.05 },
      { ...feed, volts: 32.6 },
    ]);
    expect(finding(amps, 'supply-amps-not-as-drawn')?.values.amps).toBeCloseTo(1.05, 1);
    expect(codes(amps)).not.toContain('supply-volts-not-as-drawn');
  });

  it('shorted LEDs: what is in series with them is overdriven', () => {
    const one = run({ kind: 'array', input: array }, [
      { at: 'string', index: 1, amps: 0.0333 },
      { at: 'string', index: 2, volts: 6.3 },
      { at: 'string', index: 2, amps: 0.047 },
    ]);
    expect(one.result.causes[0]).toMatchObject({ cause: 'shorted-leds', index: 2, value: 1 });
    expect(codes(one)).toEqual(expect.arrayContaining(['field-built', 'shorted-leds-overdrive']));
    expect(codes(run(tape(), good))).not.toContain('shorted-leds-overdrive');
  });

  it('that no single cause explains the readings', () => {
    const answer = run(tape(), [
      { ...feed, volts: 19 },
      { ...feed, amps: 6 },
      { at: 'cut', index: 1, volts: 12 },
      { at: 'cut', index: 2, volts: 23 },
    ]);
    expect(finding(answer, 'no-cause-explains')).toMatchObject({
      severity: 'caution',
      values: { readings: 3 },
    });
    const explained = run(tape(), [
      { ...feed, volts: 18 },
      { at: 'cut', index: 2, volts: 16.8 },
    ]);
    expect(codes(explained)).not.toContain('no-cause-explains');
  });

  it('which reading would tell, and what it would be under either cause', () => {
    const answer = run(tape(lit), [{ at: 'cut', index: 40, volts: 18 }]);
    const next = answer.result.nextReading;
    expect(next).not.toBeNull();
    expect(finding(answer, 'readings-not-separable')).toMatchObject({
      severity: 'note',
      values: { at: next?.at, index: next?.index, quantity: next?.quantity },
    });
    expect(next?.apart).toBeGreaterThan(2);
    expect(answer.working.at(-1)).toMatchObject({ key: 'reading-apart', value: next?.apart });
    expect(codes(run(tape(), good))).not.toContain('readings-not-separable');
  });

  it('which reading would narrow down the place', () => {
    const answer = run(tape(lit), [
      { ...feed, volts: 24 },
      { at: 'cut', index: 1, volts: 23.6 },
      { at: 'cut', index: 40, volts: 18.5 },
    ]);
    expect(answer.result.causes[0]?.cause).toBe('joint-in-tape');
    expect(answer.result.nextReading).toMatchObject({ at: 'cut', quantity: 'volts', between: [1, 1] });
    const { from = 0, to = 0 } = { ...finding(answer, 'place-not-separable')?.values };
    expect(from).toBe(answer.result.causes[0]?.from);
    expect(Number(to)).toBeLessThanOrEqual(40);
    expect(Number(to)).toBeGreaterThan(Number(from) + 1);
    expect(codes(answer)).not.toContain('readings-not-separable');
    // The heat that is told is the most that any place in the range would have.
    const [best] = answer.result.causes;
    expect(best?.wattsMost).toBeGreaterThanOrEqual(best?.watts ?? Infinity);
    expect(finding(answer, 'high-resistance-joint')?.values.watts).toBe(best?.wattsMost);
  });

  it('that no further reading tells two causes apart', () => {
    // All read that can be: a string's module 1 of 1 and its conductors.
    const single = { ...series, count: 1, positiveOhms: 0, negativeOhms: 0, openCircuitVolts: 10 };
    const answer = run({ kind: 'string', input: single }, [
      { ...feed, amps: 0 },
      { ...feed, volts: 10 },
    ]);
    const found = codes(answer).filter((code) => code === 'causes-look-alike' || code.endsWith('-separable'));
    expect(found).toHaveLength(1);
    expect(codes(run(tape(), good))).not.toContain('causes-look-alike');
  });

  it('how to measure: always on constant current, else where something is looked for', () => {
    const whole = [{ ...feed, volts: 32.4 }];
    const answer = run({ kind: 'string', input: series }, whole);
    expect(answer.result.causes).toEqual([]);
    expect(finding(answer, 'measure-safely')).toMatchObject({ severity: 'caution' });
    expect(finding(answer, 'measure-safely')?.message).toContain(
      'De-energise, connect the meter, energise, read. Never open a running constant-current string',
    );
  });

  it('that bands leave out ends without an operating point', () => {
    // 23 A through 0.4 ohm and half a cut, 0.1 ohm, leave 0.5 of 12 V; 5 % less supply leaves nothing.
    const heavy: TapeInput = {
      ...paper,
      cuts: 1,
      load: { model: 'constant-current', amps: 23 },
      feeds: [{ at: 0, volts: 12, positiveOhms: 0.2, negativeOhms: 0.2 }],
    };
    const answer = run(tape(heavy), [{ ...feed, volts: 12 }]);
    expect(finding(answer, 'band-not-whole')).toMatchObject({ severity: 'caution' });
    expect(codes(run(tape(), good))).not.toContain('band-not-whole');
  });
});

describe('anything that can be read on anything that can be drawn', () => {
  const ohms = fc.oneof(fc.constant(0), fc.double({ min: 1e-3, max: 500, noNaN: true }));
  const anyDiode = fc.record({
    saturationAmps: fc.constantFrom(1e-24, 1e-18, 1e-9),
    emissionCoefficient: fc.double({ min: 0.5, max: 4, noNaN: true }),
    seriesOhms: ohms,
  });
  const anySupply = fc.oneof(
    fc.record({ volts: fc.double({ min: 0.1, max: 60, noNaN: true }), sourceOhms: ohms }),
    fc.record({ amps: fc.double({ min: 0, max: 2, noNaN: true }) }),
  );
  const anyArray = fc.record({
    kind: fc.constant('array'),
    input: fc.record({
      supply: anySupply,
      sharedOhms: ohms,
      strings: fc.array(
        fc.record({ ballastOhms: ohms, leds: fc.array(anyDiode, { minLength: 1, maxLength: 4 }) }),
        { minLength: 1, maxLength: 4 },
      ),
    }),
  });
  const anyString = fc.record({
    kind: fc.constant('string'),
    input: fc.record({
      amps: fc.double({ min: 0.01, max: 3, noNaN: true }),
      count: fc.integer({ min: 1, max: 40 }),
      module: fc.constantFrom(series.module, { forwardVolts: 1, forwardVoltsMin: 1, forwardVoltsMax: 1 }),
      positiveOhms: ohms,
      negativeOhms: ohms,
    }),
  });
  const anyLoad = fc.constantFrom<TapeInput['load']>(
    led,
    { ...led, ballastOhms: 0, leds: 1 },
    { model: 'resistive', ohms: 3 },
    { model: 'constant-current', amps: 0 },
    { model: 'constant-current', amps: 0.5 },
  );
  const anyTape = fc.record({
    kind: fc.constant('tape'),
    input: fc.record({
      cuts: fc.integer({ min: 1, max: 12 }),
      cutMetres: fc.constantFrom(0, 0.05, 1),
      railOhmsPerMetre: fc.record({ positive: ohms, negative: ohms }),
      load: anyLoad,
      feeds: fc.array(
        fc.record({
          at: fc.constantFrom(0, 1),
          volts: fc.constantFrom(12, 24),
          positiveOhms: ohms,
          negativeOhms: ohms,
          sourceOhms: fc.constantFrom(0, 0.1),
        }),
        { minLength: 1, maxLength: 3 },
      ),
    }),
  });
  const figure = fc.oneof(fc.double({ min: -30, max: 60, noNaN: true }), fc.constantFrom(0, 1e6, -1e6, 1e-9));
  const anyReading = fc.record({
    at: fc.constantFrom('feed', 'cut', 'string', 'positive-conductor', 'negative-conductor'),
    index: fc.constantFrom(1, 1, 1, 2, 3),
    quantity: fc.constantFrom('volts', 'amps'),
    figure,
  });

  it('is answered in finite figures, or refused by name', () => {
    let answered = 0;
    let looked = 0;
    fc.assert(
      fc.property(
        fc.oneof(anyArray, anyString, anyTape),
        fc.array(anyReading, { minLength: 1, maxLength: 4 }),
        (circuit, drawn) => {
          const readings = drawn.map(({ quantity, figure: own, ...place }) => ({
            ...place,
            [quantity]: own,
          }));
          try {
            const { result, findings, working } = run(circuit, readings);
            answered++;
            if (result.causes.length > 0) looked++;
            const numbers = JSON.stringify([result, findings, working], (_, value: unknown) => {
              if (typeof value === 'number') expect(Number.isFinite(value)).toBe(true);
              return value;
            });
            expect(numbers).not.toContain('undefined');
            expect(result.causes.map(({ rank }) => rank)).toEqual(result.causes.map((_, i) => i + 1));
          } catch (error) {
            if (!(error instanceof EngineError)) throw error;
            expect(error.issues.length).toBeGreaterThan(0);
          }
        },
      ),
      { numRuns: 500 },
    );
    expect(answered).toBeGreaterThan(50);
    expect(looked).toBeGreaterThan(20);
  });
});
