/** What is wrong with a fed tape, and how its figures came about. */
import { atLeast, type Finding, type WorkingInput, type WorkingStep } from '@/lib/engine/contract';
import { LED_LAW_BASIS } from './diode';
import type { TapeAnalysis } from './tape-analysis';
import type { OperatingPoint, TapeInput } from './tape-operating-point';

/** Below this a current is rounding, not a flow back. */
const BACKFEED_AMPS = -1e-9;
const KIRCHHOFF = "Kirchhoff's laws";

const stop = (
  code: string,
  hard: boolean,
  message: string,
  values: Finding['values'],
  basis = 'common practice',
): Finding => ({ code, severity: 'stop', hard, message, values, basis });

function twoSources({ sources }: OperatingPoint): Finding[] {
  if (sources.length < 2) return [];
  return [
    stop(
      'two-sources',
      true,
      `${sources.length} sources feed one unbroken tape: separate the rails between sections, one source to each.`,
      { sources: sources.length },
      'common practice: outputs of separate drivers are not joined, nor class-limited outputs unless listed for it',
    ),
  ];
}

function backfeed(result: TapeAnalysis): Finding[] {
  const back = result.feeds
    .map(({ amps }, index) => ({ amps, index }))
    .filter(({ amps }) => amps < BACKFEED_AMPS);
  const worst = back.reduce((a, b) => (b.amps < a.amps ? b : a), { amps: 0, index: 0 });
  if (back.length === 0) return [];
  return [
    stop(
      'backfeed',
      false,
      `One driver feeds back into another: feed ${worst.index + 1} takes in ${-worst.amps} A.`,
      { feed: worst.index + 1, amps: worst.amps, feeds: back.length },
    ),
  ];
}

function belowDropout(input: TapeInput, result: TapeAnalysis): Finding[] {
  if (input.load.model !== 'constant-current' || input.load.dropoutVolts === undefined) return [];
  const dropoutVolts = input.load.dropoutVolts;
  const below = result.loadVolts.filter((volts) => !atLeast(volts, dropoutVolts)).length;
  if (below === 0) return [];
  return [
    stop(
      'below-dropout',
      false,
      `${below} segments have less than the ${dropoutVolts} V that their current needs: the figures are not valid.`,
      { segments: below, minVolts: result.minVolts, dropoutVolts },
      'datasheet',
    ),
  ];
}

export function findingsOf(input: TapeInput, point: OperatingPoint, result: TapeAnalysis): Finding[] {
  return [...twoSources(point), ...backfeed(result), ...belowDropout(input, result)];
}

const given = (name: string, value: WorkingInput['value'], unit: string): WorkingInput => ({
  name,
  value,
  unit,
});

function lawOf(input: TapeInput): { formula: string; inputs: WorkingInput[]; basis: string } {
  const { load } = input;
  if (load.model === 'constant-current') {
    return { formula: 'I at every load', inputs: [given('I', load.amps, 'A')], basis: 'datasheet' };
  }
  if (load.model === 'resistive') {
    return { formula: 'I = V / R at every load', inputs: [given('R', load.ohms, 'ohm')], basis: "Ohm's law" };
  }
  return {
    formula: 'V = (R + leds * Rs) * I + leds * n * k * T / q * ln(1 + I / Is) at every load',
    inputs: [
      given('leds', load.leds, ''),
      given('R', load.ballastOhms, 'ohm'),
      given('Rs', load.seriesOhms, 'ohm'),
      given('Is', load.saturationAmps, 'A'),
      given('n', load.emissionCoefficient, ''),
      given('T', input.celsius ?? 25, 'C'),
    ],
    basis: LED_LAW_BASIS,
  };
}

/** Number of the segment, from 1, whose figure is the lowest. */
function lowestAt(figures: readonly number[]): number {
  let at = 0;
  figures.forEach((own, k) => {
    if (own < (figures[at] ?? 0)) at = k;
  });
  return at + 1;
}

export function workingOf(input: TapeInput, point: OperatingPoint, result: TapeAnalysis): WorkingStep[] {
  const { positive, negative } = input.railOhmsPerMetre;
  const law = lawOf(input);
  const weakest = given('segment', lowestAt(result.loadVolts), '');
  return [
    {
      key: 'piece-ohms',
      name: 'Both rails of one segment',
      formula: '(R+ + R-) * cut length',
      inputs: [
        given('R+', positive, 'ohm/m'),
        given('R-', negative, 'ohm/m'),
        given('cut length', input.cutMetres, 'm'),
      ],
      value: (positive + negative) * input.cutMetres,
      unit: 'ohm',
      basis: "Ohm's law",
    },
    {
      key: 'load-amps',
      name: 'Current of all loads together',
      formula: `sum of ${law.formula}, volts closing around every loop`,
      inputs: [given('segments', input.cuts, ''), ...law.inputs],
      value: result.loadAmps.reduce((sum, amps) => sum + amps, 0),
      unit: 'A',
      basis: `${law.basis}; ${KIRCHHOFF}`,
    },
    {
      key: 'lowest-volts',
      name: 'Lowest volts at a load',
      formula: 'source volts less the drops on the way',
      inputs: [given('V', point.highestVolts, 'V'), weakest],
      value: result.minVolts,
      unit: 'V',
      basis: KIRCHHOFF,
    },
    {
      key: 'worst-drop',
      name: 'Worst drop',
      formula: '(V - Vmin) / V * 100',
      inputs: [given('V', point.highestVolts, 'V'), given('Vmin', result.minVolts, 'V')],
      value: result.worstDropPct,
      unit: '%',
      basis: 'common practice',
    },
    {
      key: 'dimmest',
      name: 'Lowest load current, of the highest',
      formula: 'Imin / Imax * 100',
      inputs: [given('segment', lowestAt(result.loadAmps), '')],
      value: result.dimmestPct,
      unit: '%',
      basis: 'common practice',
    },
    {
      key: 'total-watts',
      name: 'Watts out of the sources',
      formula: 'sum of source volts * feed current',
      inputs: [given('feeds', result.feeds.length, '')],
      value: result.totalWatts,
      unit: 'W',
      basis: KIRCHHOFF,
    },
  ];
}
