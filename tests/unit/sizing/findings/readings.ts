/** Findings of `led-fit` and `fault-finder`: what readings say. */
import { thermalVolts } from '@/lib/sizing/diode';
import { AT_LEAST, AT_MOST, type FindingRow, OVER, rowsOf, UNDER } from './row';

const AMPS = [0.001, 0.003, 0.01, 0.03];
/** Volts by the law itself, n * kT/q * ln(1 + I/Is) + Rs * I. */
const points = (law: { n?: number; rs?: number } = {}, amps: readonly number[] = AMPS, sample?: string) =>
  amps.map((own) => ({
    amps: own,
    volts: (law.n ?? 3.2) * thermalVolts(25) * Math.log1p(own / 1e-18) + (law.rs ?? 5) * own,
    ...(sample === undefined ? {} : { sample }),
  }));
const fit = rowsOf('led-fit', { points: points(), celsius: 25 });
/** The third of five readings is off by so much. */
const off = (volts: number) =>
  points({}, [...AMPS, 0.1]).map((point, i) => ({ ...point, volts: point.volts + (i === 2 ? volts : 0) }));
const bunched = (lowest: number) => points({}, [0.001, lowest, (lowest + 0.01) / 2, 0.01]);
const samples = [...points({}, AMPS, 'a'), ...points({ rs: 6 }, AMPS, 'b')];

/** Two segments of 1 m and 1 A each, rails of 0.1 ohm/m, 0.2 ohm in each conductor of the feeder. */
const paper = {
  ...{ cuts: 2, cutMetres: 1, railOhmsPerMetre: { positive: 0.1, negative: 0.1 } },
  load: { model: 'constant-current', amps: 1 },
  feeds: [{ at: 0, volts: 24, positiveOhms: 0.2, negativeOhms: 0.2 }],
};
const lit = {
  ...{ ...paper, cuts: 40, cutMetres: 0.05 },
  load: {
    ...{ model: 'led-string', leds: 7, ballastOhms: 60 },
    ...{ saturationAmps: 1e-18, emissionCoefficient: 2.6, seriesOhms: 5 },
  },
};
const diode = { saturationAmps: 1e-18, emissionCoefficient: 3.2, seriesOhms: 5 };
const string = { ballastOhms: 120, leds: [diode, diode, diode] };
const series = {
  ...{ amps: 0.7, count: 10, positiveOhms: 0.3, negativeOhms: 0.3 },
  module: { forwardVolts: 3.2, forwardVoltsMin: 3.05, forwardVoltsMax: 3.35 },
};
const atFeed = { at: 'feed', index: 1 };
const cut = (index: number, volts: number) => ({ at: 'cut', index, volts });
const whole = [{ ...atFeed, volts: 24 }, cut(1, 22.9), cut(2, 22.7)];
const found = rowsOf('fault-finder', { circuit: { kind: 'tape', input: paper }, readings: whole });
const array = rowsOf('fault-finder', {
  circuit: { kind: 'array', input: { supply: { volts: 12 }, strings: [string, string, string] } },
  readings: [{ ...atFeed, volts: 12 }],
});
const constant = rowsOf('fault-finder', {
  circuit: { kind: 'string', input: series },
  readings: [{ ...atFeed, volts: 32.4 }],
});
const light = rowsOf('fault-finder', { circuit: { kind: 'tape', input: lit }, readings: [cut(40, 18)] });
/** One string that carries 20 mA, as if its resistor had 50 ohm more than drawn. */
const LEDS_VOLTS = 3 * (3.2 * thermalVolts(25) * Math.log1p(0.02 / 1e-18) + 5 * 0.02);
const alone = rowsOf('fault-finder', {
  circuit: { kind: 'array', input: { supply: { volts: LEDS_VOLTS + 170 * 0.02 }, strings: [string] } },
  readings: [
    { ...atFeed, volts: LEDS_VOLTS + 170 * 0.02 },
    { ...atFeed, amps: 0.02 },
    { at: 'string', index: 1, volts: LEDS_VOLTS },
    { at: 'string', index: 1, amps: 0.02 },
  ],
  tolerances: { supplyPct: 0, resistorPct: 0, spreadVolts: 0 },
});
const read = (...readings: object[]) => ({ readings });

/** 24 V, 5 % of the supply and 1 % of the meter up and down; 0.7 A, 5 % and 3 % up. */
const MOST_VOLTS = 24 * 1.05 * 1.01;
const LEAST_VOLTS = 24 * 0.95 * 0.99;
const MOST_AMPS = 0.7 * 1.05 * 1.03;
/** A driver 5 % low leaves 11.4 V; 0.4 ohm of feeder and half a segment, 0.1 ohm, take all of it at 22.8 A. */
const heavy = (amps: number) => ({
  'circuit.input': {
    ...{ ...paper, cuts: 1, load: { model: 'constant-current', amps } },
    feeds: [{ at: 0, volts: 12, positiveOhms: 0.2, negativeOhms: 0.2 }],
  },
  tolerances: { supplyPct: 5, currentPct: 0, resistorPct: 0, spreadVolts: 0, workingCelsius: 20 },
  ...read({ ...atFeed, volts: 12 }),
});
const SQUARES = /least squares/;

export const readingRows: FindingRow[] = [
  fit.note('field-built', /common practice/, {}, null),
  fit.softStop(
    'not-an-led-curve',
    /Shockley/,
    { points: AMPS.map((amps) => ({ amps, volts: 100 * amps })) },
    { points: points() },
  ),
  // A straight line of readings bends the other way as soon as the resistance falls below none.
  fit.caution(
    'fit-no-series-ohms',
    /Shockley/,
    { points: points({ rs: -0.01 }) },
    { points: points({ rs: 0.01 }) },
  ),
  fit.caution(
    'fit-unusual-emission',
    /common practice/,
    { points: points({ n: 5 * OVER }) },
    { points: points({ n: 5 }) },
  ),
  fit.caution(
    'fit-unusual-emission',
    /common practice/,
    { points: points({ n: UNDER }) },
    { points: points({ n: 1 }) },
  ),
  // Two junctions in one package make twice the usual n.
  fit.caution(
    'fit-unusual-emission',
    /common practice/,
    { points: points({ n: 10 }), junctions: 1 },
    { points: points({ n: 10 }), junctions: 2 },
  ),
  fit.caution(
    'fit-ill-conditioned',
    /condition index over 30/,
    { points: bunched(0.00749) },
    { points: bunched(0.00748) },
  ),
  fit.caution('fit-residual-large', /common practice/, { points: off(0.093) }, { points: off(0.0929) }),
  fit.note(
    'fit-working-amps-not-given',
    /common practice/,
    { points: samples },
    { points: samples, workingAmps: 0.02 },
  ),
  fit.caution(
    'fit-beyond-readings',
    /common practice/,
    { workingAmps: 0.03 * OVER },
    { workingAmps: 0.03 * AT_MOST },
  ),
  fit.caution(
    'fit-beyond-readings',
    /common practice/,
    { workingAmps: 0.001 * UNDER },
    { workingAmps: 0.001 * AT_LEAST },
  ),

  array.note('field-built', /common practice/, {}, { circuit: { kind: 'tape', input: paper } }),
  // 1.8 ohm more in one conductor take 3.6 V at 2 A, seen on both sides of it.
  found.softStop(
    'high-resistance-joint',
    /110\.14/,
    read(
      ...[{ ...atFeed, volts: 24 }, { ...atFeed, amps: 2 }, cut(1, 19.4), cut(2, 19.2)],
      { at: 'positive-conductor', index: 1, volts: 4 },
      { at: 'negative-conductor', index: 1, volts: 0.4 },
    ),
    {},
  ),
  // At the edge of its band a reading is in it, and nothing is looked for.
  found.caution(
    'measure-safely',
    /arcs/,
    read({ ...atFeed, volts: MOST_VOLTS * OVER }),
    read({ ...atFeed, volts: MOST_VOLTS * AT_MOST }),
  ),
  constant.caution(
    'measure-safely',
    /arcs/,
    {},
    { ...read(...whole), circuit: { kind: 'tape', input: paper } },
  ),
  found.caution(
    'supply-volts-not-as-drawn',
    /common practice/,
    read({ ...atFeed, volts: 18 }, cut(2, 16.8)),
    read({ ...atFeed, volts: LEAST_VOLTS * AT_LEAST }),
  ),
  constant.caution(
    'supply-amps-not-as-drawn',
    /common practice/,
    read({ ...atFeed, amps: 1.05 }, { ...atFeed, volts: 32.6 }),
    read({ ...atFeed, amps: MOST_AMPS * AT_MOST }, { ...atFeed, volts: 32.6 }),
  ),
  light.softStop(
    'polarity-reversed',
    /common practice/,
    read({ ...atFeed, volts: 24 }, cut(20, -24)),
    read({ ...atFeed, volts: 24 }, cut(20, 0)),
  ),
  array.caution(
    'shorted-leds-overdrive',
    /Kirchhoff/,
    read(
      { at: 'string', index: 1, amps: 0.0333 },
      { at: 'string', index: 2, volts: 6.3 },
      { at: 'string', index: 2, amps: 0.047 },
    ),
    {},
  ),
  found.caution(
    'no-cause-explains',
    /common practice/,
    read({ ...atFeed, volts: 19 }, { ...atFeed, amps: 6 }, cut(1, 12), cut(2, 23)),
    read({ ...atFeed, volts: 18 }, cut(2, 16.8)),
  ),
  light.note('readings-not-separable', SQUARES, {}, read(cut(40, 22))),
  light.note(
    'place-not-separable',
    SQUARES,
    read({ ...atFeed, volts: 24 }, cut(1, 23.6), cut(40, 18.5)),
    read({ ...atFeed, volts: 24 }, cut(1, 23.6)),
  ),
  // All of one string is read: a joint before it and a joint in it are one.
  alone.note('causes-look-alike', SQUARES, {}, { 'circuit.input.strings.0.ballastOhms': 170 }),
  found.caution('band-not-whole', /computed/, heavy(22.8 * OVER), heavy(22.8 * AT_MOST)),
];
