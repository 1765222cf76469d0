/**
 * Arrays against circuits solved by ngspice 39 (data/ladders), closed forms (data/07-led.json) and ngspice run
 * on the spot on random arrays. N is scaled where the other side computes with older constants.
 */
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { type ArrayAnalysis, arrayAnalysisCalculation, type ArrayInput } from '@/lib/sizing/array-analysis';
import { thermalVolts } from '@/lib/sizing/diode';
import { N_SCALE, operatingPoint } from '../support/ngspice';
import { type Random, seeded, testSeed } from '../support/random';
import entries from './data/07-led.json';
import open13 from './data/ladders/open-13.json';
import open14 from './data/ladders/open-14.json';
import open15 from './data/ladders/open-15.json';
import open16 from './data/ladders/open-16.json';
import open17 from './data/ladders/open-17.json';
import open18 from './data/ladders/open-18.json';

const solve = (input: ArrayInput) => runCalculation(arrayAnalysisCalculation, input);
const expectNear = (got: number | null | undefined, want: number, relative: number) =>
  expect(Math.abs((got ?? NaN) - want), `${got} against ${want}`).toBeLessThanOrEqual(
    relative * Math.abs(want),
  );

describe('thermal voltage', () => {
  it.each(entries.filter(({ id }) => id.startsWith('vt-')))('$id', ({ inputs, expected, tolerance }) => {
    expectNear(thermalVolts(inputs.T_C ?? NaN) * 1000, expected.Vt_mV ?? NaN, tolerance);
  });
});

describe('identical LEDs and a resistor, closed form (Lambert W)', () => {
  it.each(entries.filter(({ id }) => id.startsWith('lambert-')))('$id', ({ inputs, expected, tolerance }) => {
    const { V, n, N, IS_A, RS_ohm, R_ohm, T_C, k_over_q } = inputs as Record<string, number>;
    const led = {
      saturationAmps: IS_A ?? 0,
      // The closed form computed with this k/q.
      emissionCoefficient: ((N ?? 0) * (k_over_q ?? 0)) / (1.380649e-23 / 1.602176634e-19),
      seriesOhms: RS_ohm ?? 0,
      celsius: T_C,
    };
    const { result } = solve({
      supply: { volts: V, sourceOhms: 0 },
      strings: [{ ballastOhms: R_ohm ?? 0, leds: Array.from({ length: n ?? 0 }, () => led) }],
    });
    expectNear(result.supplyAmps, expected.I_A ?? NaN, tolerance);
    expectNear(result.strings[0]?.ledVolts[0], expected.V_led_each ?? NaN, tolerance);
    expectNear(result.strings[0]?.ballastWatts, expected.P_R_W ?? NaN, tolerance);
  });
});

interface OpenArray {
  id: string;
  inputs: {
    V_source: number | null;
    I_source: number | null;
    supply: string;
    resistor_ohm: number | null;
    strings: { diode: Record<'IS' | 'N' | 'RS' | 'EG' | 'XTI' | 'TNOM', number>; junction_C: number }[][];
  };
  expected: {
    string_current_A: number[];
    led_voltage_V: number[][];
    total_current_A: number;
    source_voltage_V: number;
    current_imbalance_max_over_min: number;
  };
}

function inputOf({ inputs }: OpenArray): ArrayInput {
  const own = inputs.supply === 'cv_own_resistor' ? (inputs.resistor_ohm ?? 0) : 0;
  const shared = inputs.supply === 'cv_shared_resistor' ? { sharedOhms: inputs.resistor_ohm ?? 0 } : {};
  return {
    supply:
      inputs.V_source === null ? { amps: inputs.I_source ?? 0 } : { volts: inputs.V_source, sourceOhms: 0 },
    ...shared,
    strings: inputs.strings.map((leds) => ({
      ballastOhms: own,
      leds: leds.map(({ diode, junction_C }) => ({
        saturationAmps: diode.IS,
        emissionCoefficient: diode.N / N_SCALE,
        seriesOhms: diode.RS,
        celsius: junction_C,
        saturationCelsius: diode.TNOM,
        gapVolts: diode.EG,
        xti: diode.XTI / N_SCALE,
      })),
    })),
  };
}

describe('arrays solved by ngspice 39', () => {
  it.each([open13, open14, open15, open16, open17, open18] as OpenArray[])('$id', (circuit) => {
    const { result } = solve(inputOf(circuit));
    const { expected } = circuit;
    expectNear(result.supplyAmps, expected.total_current_A, 1e-9);
    expectNear(result.supplyVolts, expected.source_voltage_V, 1e-9);
    expectNear(result.imbalance, expected.current_imbalance_max_over_min, 1e-9);
    result.strings.forEach((string, i) => {
      expectNear(string.amps, expected.string_current_A[i] ?? NaN, 1e-8);
      string.ledVolts.forEach((volts, k) => expectNear(volts, expected.led_voltage_V[i]?.[k] ?? NaN, 1e-8));
    });
  });
});

function randomArray(random: Random): ArrayInput {
  const perString = random.whole(1, 7);
  const volts = perString * random.between(2.6, 4.2);
  const kind = random.pick(['volts', 'amps'] as const);
  const own = random.chance(0.75);
  const strings = Array.from({ length: random.whole(1, 6) }, () => ({
    ballastOhms: own ? random.decades(5, 500) : 0,
    leds: Array.from({ length: perString }, () => ({
      saturationAmps: random.decades(1e-20, 1e-15),
      emissionCoefficient: random.between(2, 3.8),
      seriesOhms: random.between(0.5, 6),
      celsius: random.between(-20, 110),
      saturationCelsius: 25,
      gapVolts: random.between(2, 3.9),
      xti: random.between(0, 5),
    })),
  }));
  return {
    supply: kind === 'amps' ? { amps: random.decades(1e-3, 2) } : { volts, sourceOhms: random.between(0, 2) },
    ...(random.chance(0.5) ? { sharedOhms: random.between(1, 40) } : {}),
    strings,
  };
}

function netlistOf({ supply, sharedOhms = 0, strings }: ArrayInput): string[] {
  const lines =
    'amps' in supply
      ? [`Is 0 s DC ${supply.amps}`]
      : [`Vs e 0 DC ${supply.volts}`, `Re e s ${supply.sourceOhms}`];
  lines.push(sharedOhms > 0 ? `Rs s b ${sharedOhms}` : 'Vz s b DC 0');
  strings.forEach(({ ballastOhms, leds }, i) => {
    lines.push(`Vm${i} b y${i}_b DC 0`);
    lines.push(ballastOhms > 0 ? `R${i} y${i}_b y${i}_0 ${ballastOhms}` : `Vb${i} y${i}_b y${i}_0 DC 0`);
    leds.forEach((led, k) => {
      const to = k === leds.length - 1 ? '0' : `y${i}_${k + 1}`;
      lines.push(`D${i}_${k} y${i}_${k} ${to} M${i}_${k} TEMP=${led.celsius}`);
      lines.push(
        `.model M${i}_${k} D(IS=${led.saturationAmps} N=${led.emissionCoefficient * N_SCALE} RS=${led.seriesOhms} ` +
          `EG=${led.gapVolts} XTI=${(led.xti ?? 3) * N_SCALE} TNOM=${led.saturationCelsius})`,
      );
    });
  });
  return lines;
}

describe('random arrays against ngspice', () => {
  const seed = testSeed();
  const random = seeded(seed);
  const arrays = Array.from({ length: 36 }, () => randomArray(random));
  it.each(arrays.map((input, i) => ({ i, input })))(`seed ${seed}, array $i`, ({ input }) => {
    const { result } = solve(input);
    const spice = operatingPoint(netlistOf(input));
    // ngspice's own steps end at 1e-13 V and its gmin passes 1e-18 S: below this a current is noise there.
    const floor = 1e-15;
    const near = (got: number, want: number) =>
      expect(Math.abs(got - want), `${got} against ${want}`).toBeLessThanOrEqual(
        1e-6 * Math.abs(want) + floor,
      );
    near(result.supplyVolts, spice.get('s') ?? NaN);
    result.strings.forEach((string, i) => near(string.amps, spice.get(`vm${i}#branch`) ?? NaN));
    checkLaws(input, result);
  });
});

/** Kirchhoff's laws from the answer alone. */
function checkLaws({ supply, sharedOhms = 0, strings }: ArrayInput, result: ArrayAnalysis) {
  const sum = result.strings.reduce((total, { amps }) => total + amps, 0);
  expectNear(result.supplyAmps, sum, 1e-9);
  if (supply.volts !== undefined) {
    expectNear(result.supplyVolts + (supply.sourceOhms ?? 0) * result.supplyAmps, supply.volts, 1e-9);
  }
  result.strings.forEach((string, i) => {
    const leds = string.ledVolts.reduce((total, volts) => total + volts, 0);
    const across = leds + string.amps * (strings[i]?.ballastOhms ?? 0) + sharedOhms * result.supplyAmps;
    expectNear(across, result.supplyVolts, 1e-9);
  });
}
