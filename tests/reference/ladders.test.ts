/**
 * Tapes against ladders solved by ngspice 39 (data/ladders: netlist and JSON of each) and closed forms
 * (data/08-led-tape.json).
 */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { saturationAt } from '@/lib/sizing/diode';
import { tapeAnalysis, tapeAnalysisCalculation } from '@/lib/sizing/tape-analysis';
import { operatingPoint, type TapeInput, type TapeLoad } from '@/lib/sizing/tape-operating-point';
import { N_SCALE } from '../support/ngspice';
import entries from './data/08-led-tape.json';

interface Feeder {
  length_m: number;
  ohm_per_km_per_conductor: number;
}
interface OpenLadder {
  inputs: {
    V_source: number;
    n_loads: number;
    seg_m: number;
    rail_pos_ohm_per_m: number;
    rail_neg_ohm_per_m: number;
    load:
      | { type: 'cc'; i_A: number }
      | { type: 'res'; r_ohm: number }
      | { type: 'led'; leds_per_string: number; r_ohm: number; diode: Record<string, number> };
    source_R_ohm: number;
    feed: 'one_end' | 'both_ends' | 'centre' | 'two_source';
    feeder: Feeder;
    feeder_B?: Feeder;
    temp_C: number;
    copper_tc1_per_K: number;
    second_source?: { V_source: number; source_R_ohm: number; feeder: Feeder };
  };
  expected: {
    load_voltage_V: number[];
    load_current_A: number[];
    feeder_current_A: Record<string, number>;
    source_power_W: number;
    worst_drop_percent: number;
    min_load_voltage_V: number;
    max_load_voltage_V: number;
    current_uniformity_min_over_max: number;
  };
}

const read = (name: string) =>
  JSON.parse(readFileSync(new URL(`./data/ladders/${name}.json`, import.meta.url), 'utf8')) as OpenLadder;

function loadOf({ load, temp_C }: OpenLadder['inputs']): TapeLoad {
  if (load.type === 'cc') return { model: 'constant-current', amps: load.i_A };
  if (load.type === 'res') return { model: 'resistive', ohms: load.r_ohm };
  const { IS = 0, N = 0, RS = 0, EG = 0, XTI = 0, TNOM = 0 } = load.diode;
  const law = { saturationAmps: IS, emissionCoefficient: N / N_SCALE, gapVolts: EG, xti: XTI / N_SCALE };
  return {
    model: 'led-string',
    leds: load.leds_per_string,
    ballastOhms: load.r_ohm,
    saturationAmps: saturationAt(law, TNOM, temp_C),
    emissionCoefficient: law.emissionCoefficient,
    seriesOhms: RS,
  };
}

function inputOf({ inputs }: OpenLadder): TapeInput {
  // Resistances as they are at the circuit's temperature: the netlists give them at 20 C.
  const hot = 1 + inputs.copper_tc1_per_K * (inputs.temp_C - 20);
  const conductors = ({ length_m, ohm_per_km_per_conductor }: Feeder) => {
    const ohms = ((length_m * ohm_per_km_per_conductor) / 1000) * hot;
    return { positiveOhms: ohms, negativeOhms: ohms };
  };
  const main = { volts: inputs.V_source, ...conductors(inputs.feeder) };
  const end = inputs.n_loads;
  const second = inputs.second_source;
  const feeds = {
    one_end: [{ at: 0, ...main }],
    both_ends: [
      { at: 0, ...main },
      { at: end, ...main, ...conductors(inputs.feeder_B ?? inputs.feeder) },
    ],
    // An odd number is fed at the middle load itself: half a cut from either boundary, which the solver allows.
    centre: [{ at: end / 2, ...main }],
    two_source: [
      { at: 0, ...main },
      {
        at: end,
        volts: second?.V_source ?? 0,
        sourceOhms: second?.source_R_ohm ?? 0,
        ...conductors(second?.feeder ?? inputs.feeder),
      },
    ],
  }[inputs.feed];
  return {
    cuts: end,
    cutMetres: inputs.seg_m,
    railOhmsPerMetre: {
      positive: inputs.rail_pos_ohm_per_m * hot,
      negative: inputs.rail_neg_ohm_per_m * hot,
    },
    load: loadOf(inputs),
    feeds,
    sourceOhms: inputs.source_R_ohm,
    celsius: inputs.temp_C,
  };
}

const expectNear = (got: number | null | undefined, want: number, relative = 1e-8) =>
  expect(Math.abs((got ?? NaN) - want), `${got} against ${want}`).toBeLessThanOrEqual(
    relative * Math.abs(want),
  );

const names = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 19, 20].map(
  (n) => `open-${String(n).padStart(2, '0')}`,
);

describe('ladders solved by ngspice 39', () => {
  it.each(names)('%s', (name) => {
    const ladder = read(name);
    const { expected } = ladder;
    const result = tapeAnalysis(inputOf(ladder));
    expect(result.loadVolts).toHaveLength(expected.load_voltage_V.length);
    result.loadVolts.forEach((volts, k) => expectNear(volts, expected.load_voltage_V[k] ?? NaN));
    result.loadAmps.forEach((amps, k) => expectNear(amps, expected.load_current_A[k] ?? NaN));
    Object.values(expected.feeder_current_A).forEach((amps, i) => expectNear(result.feeds[i]?.amps, amps));
    expectNear(result.minVolts, expected.min_load_voltage_V);
    expectNear(result.maxVolts, expected.max_load_voltage_V);
    expectNear(result.worstDropPct, expected.worst_drop_percent, 1e-7);
    expectNear(result.dimmestPct, expected.current_uniformity_min_over_max * 100);
    expectNear(result.totalWatts, expected.source_power_W);
  });

  it.each(['open-19', 'open-20'])('%s: two sources are a hard stop, and one absorbs', (name) => {
    const { findings, result } = runCalculation(tapeAnalysisCalculation, inputOf(read(name)));
    expect(findings.find(({ code }) => code === 'two-sources')).toMatchObject({
      severity: 'stop',
      hard: true,
    });
    const back = result.feeds.some(({ amps }) => amps < -1e-9);
    expect(findings.some(({ code }) => code === 'backfeed')).toBe(back);
  });
});

const closed = (prefix: string) => entries.filter(({ id }) => id.startsWith(prefix));

describe('constant current, closed form', () => {
  const drop = (r: number, amps: number, cuts: number, both: boolean) => {
    const conductors = { volts: 24, positiveOhms: 0, negativeOhms: 0 };
    return tapeAnalysis({
      cuts,
      cutMetres: 1,
      railOhmsPerMetre: { positive: r * 0.3, negative: r * 0.7 },
      load: { model: 'constant-current', amps },
      feeds: [{ at: 0, ...conductors }, ...(both ? [{ at: cuts, ...conductors }] : [])],
    });
  };

  it.each(closed('ladder-cc-'))('$id', ({ id, inputs, expected, tolerance }) => {
    const { r_pair_per_segment_ohm = 0, i_A = 0, N = 0 } = inputs as Record<string, number>;
    const both = id.includes('both');
    const got = drop(r_pair_per_segment_ohm, i_A, N, both);
    const want = expected as Record<string, number>;
    expectNear(24 - got.minVolts, want.drop_V_at_middle_loads ?? want.drop_V_at_last_load ?? NaN, tolerance);
  });
});

describe('a published trap', () => {
  it('vd-trap-lumped: a load spread along the tape drops half of what it would at its end', () => {
    const [entry] = closed('vd-trap-lumped');
    const { W_per_m = 0, L_m = 0, V = 0, trace_ohm_total = 0 } = entry?.inputs as Record<string, number>;
    const want = entry?.expected as Record<string, number>;
    const cuts = 100_000;
    const { minVolts } = tapeAnalysis({
      cuts,
      cutMetres: L_m / cuts,
      railOhmsPerMetre: { positive: trace_ohm_total / L_m / 2, negative: trace_ohm_total / L_m / 2 },
      load: { model: 'constant-current', amps: (W_per_m * L_m) / V / cuts },
      feeds: [{ at: 0, volts: V, positiveOhms: 0, negativeOhms: 0 }],
    });
    // The load of the last cut sits half a cut before the end.
    expectNear(V - minVolts, want.correct_uniform_const_current_V ?? NaN, 1e-9);
    expect(V - minVolts).toBeLessThan(0.6 * (want.published_drop_V ?? NaN));
  });
});

describe('resistive tape, one end, against the line equation V0 / cosh(L * sqrt(r * g))', () => {
  it.each(closed('ladder-res-'))('$id', ({ inputs, expected, tolerance }) => {
    const { V0 = 0, L_m = 0, r_pair_ohm_per_m = 0, g_S_per_m = 0 } = inputs as Record<string, number>;
    const cuts = 100_000;
    const result = tapeAnalysis({
      cuts,
      cutMetres: L_m / cuts,
      railOhmsPerMetre: { positive: r_pair_ohm_per_m / 2, negative: r_pair_ohm_per_m / 2 },
      load: { model: 'resistive', ohms: cuts / (g_S_per_m * L_m) },
      feeds: [{ at: 0, volts: V0, positiveOhms: 0, negativeOhms: 0 }],
    });
    expectNear(result.minVolts, expected.V_end ?? NaN, tolerance);
    expectNear(result.feeds[0]?.amps, expected.I_in ?? NaN, tolerance);
  });
});

it('a tape fed at the middle of an odd number of cuts agrees from either half', () => {
  const { feedAmps, loadDrops } = operatingPoint(inputOf(read('open-07')));
  const last = loadDrops.length - 1;
  loadDrops.forEach((drop, k) => expectNear(drop, loadDrops[last - k] ?? NaN, 1e-12));
  expectNear(feedAmps[0], 1);
});
