/** The tape ladder: against ngspice's own analysis time on the same netlist, and how its cost grows with cuts. */
import { tapeAnalysis } from '@/lib/sizing/tape-analysis';
import type { TapeInput } from '@/lib/sizing/tape-operating-point';
import { analysisSeconds, operatingPoint } from '../support/ngspice';
import { netlistOf } from '../support/tape-netlist';
import { median, milliseconds, type Row } from './row';

const LEAST_RATIO = 20;
const AGREEMENT = 1e-6;
const MOST_EXPONENT = 1.1;

/** 24 V tape, seven LEDs and a resistor a cut, fed at both ends; rails that let even long tapes work. */
function tape(cuts: number): TapeInput {
  return {
    cuts,
    cutMetres: 0.05,
    railOhmsPerMetre: { positive: 3 / cuts, negative: 3 / cuts },
    load: {
      model: 'led-string',
      leds: 7,
      ballastOhms: 120,
      saturationAmps: 1e-18,
      emissionCoefficient: 3,
      seriesOhms: 2,
    },
    feeds: [
      { at: 0, volts: 24, positiveOhms: 0.02, negativeOhms: 0.02 },
      { at: cuts, volts: 24, positiveOhms: 0.05, negativeOhms: 0.05 },
    ],
  };
}

function againstSpice(): Row[] {
  const input = tape(1000);
  const lines = netlistOf(input);
  const spice = operatingPoint(lines);
  const worst = tapeAnalysis(input).loadVolts.reduce((most, volts, k) => {
    const want = (spice.get(`p${k + 1}`) ?? NaN) - (spice.get(`n${k + 1}`) ?? NaN);
    return Math.max(most, Math.abs(volts - want) / want);
  }, 0);
  const theirs = median(Array.from({ length: 20 }, () => analysisSeconds(lines))) * 1000;
  const ours = milliseconds(() => tapeAnalysis(input));
  return [
    { what: 'tape of 1,000 cuts, engine', value: ours, unit: 'ms', ok: null },
    { what: 'tape of 1,000 cuts, ngspice analysis', value: theirs, unit: 'ms', ok: null },
    {
      what: 'engine faster than ngspice',
      value: theirs / ours,
      unit: 'times',
      target: `${LEAST_RATIO} or more`,
      ok: theirs / ours >= LEAST_RATIO,
    },
    {
      what: 'largest relative difference of a load’s volts',
      value: worst,
      unit: '',
      target: `${AGREEMENT} at most`,
      ok: worst <= AGREEMENT,
    },
  ];
}

/** Least-squares slope of log time over log cuts. */
function growth(): Row[] {
  const sizes = [100, 1000, 10_000, 100_000];
  const times = sizes.map((cuts) => {
    const input = tape(cuts);
    return milliseconds(() => tapeAnalysis(input), cuts > 10_000 ? 7 : 20);
  });
  const x = sizes.map(Math.log);
  const y = times.map(Math.log);
  const mean = (figures: readonly number[]) => figures.reduce((a, b) => a + b, 0) / figures.length;
  const [mx, my] = [mean(x), mean(y)];
  const exponent =
    x.reduce((sum, own, i) => sum + (own - mx) * ((y[i] ?? 0) - my), 0) /
    x.reduce((sum, own) => sum + (own - mx) ** 2, 0);
  return [
    ...sizes.map((cuts, i) => ({
      what: `tape of ${cuts.toLocaleString('en')} cuts`,
      value: times[i] ?? NaN,
      unit: 'ms',
      ok: null,
    })),
    {
      what: 'growth with cuts, exponent from 100 to 100,000',
      value: exponent,
      unit: '',
      target: `${MOST_EXPONENT} at most`,
      ok: exponent <= MOST_EXPONENT,
    },
  ];
}

export function benchLadder(): Row[] {
  return [...againstSpice(), ...growth()];
}
