/** How bands, the best cause and the next reading were figured. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import type { FaultFinder } from './fault-finder';
import type { MeterPct } from './fault-finder-weighed';
import type { Tolerances } from './fault-finder-model';

const given = (name: string, value: WorkingInput['value'], unit: string): WorkingInput => ({
  name,
  value,
  unit,
});
const unitOf = (quantity: 'volts' | 'amps') => (quantity === 'volts' ? 'V' : 'A');

/** The reading that is furthest out of its band, in half widths of it. */
function worst({ readings }: FaultFinder) {
  const off = ({ measured, low, high }: FaultFinder['readings'][number]) =>
    Math.max(low - measured, measured - high) / ((high - low) / 2 || 1);
  return readings.reduce((most, own) => (off(own) > off(most) ? own : most));
}

function bandStep(result: FaultFinder, t: Tolerances, meter: MeterPct): WorkingStep {
  const { at, index, quantity, expected, low, high } = worst(result);
  const unit = unitOf(quantity);
  return {
    key: 'reading-band',
    name: 'Highest that the furthest reading can be',
    formula: 'highest over the ends of all tolerances * (1 + meter error)',
    inputs: [
      given('at', `${at} ${index}`, ''),
      given('as drawn', expected, unit),
      given('lowest', low, unit),
      given('supply', t.supplyPct, '%'),
      given('current', t.currentPct, '%'),
      given('resistors', t.resistorPct, '%'),
      given('forward volts', t.spreadVolts, 'V'),
      given('copper at 20 C over working', t.coldShare, ''),
      given('meter', meter[quantity], '%'),
    ],
    value: high,
    unit,
    basis: 'common practice',
  };
}

export function workingOf(
  result: FaultFinder,
  t: Tolerances,
  meter: MeterPct,
  nothing: number,
): WorkingStep[] {
  const steps = [bandStep(result, t, meter)];
  const count = result.readings.length;
  const rms = Math.sqrt(nothing / count);
  const [best] = result.causes;
  steps.push({
    key: 'cause-residual',
    name: 'What the best cause leaves unexplained, in meter errors',
    formula: "sqrt(d' * C^-1 * d / readings), C = meter error^2 + what tolerances move / 3",
    inputs: [
      given('readings', count, ''),
      given('with nothing wrong', rms, ''),
      given('cause', best?.cause ?? null, ''),
      given('value', best?.value ?? null, best?.unit ?? ''),
    ],
    value: best?.residual ?? rms,
    unit: '',
    basis: 'generalised least squares (Gauss-Markov)',
  });
  if (best?.watts != null)
    steps.push({
      key: 'joint-watts',
      name: 'Heat in the joint',
      formula: 'I^2 * R',
      inputs: [given('R', best.value, 'ohm')],
      value: best.watts,
      unit: 'W',
      basis: "Joule's law",
    });
  const { nextReading: next } = result;
  if (next) {
    const unit = unitOf(next.quantity);
    steps.push({
      key: 'reading-apart',
      name: 'How far the next reading tells two causes apart, in errors of the reading',
      formula: '|a - b, less what the readings taken tell of it| / error of meter and tolerances',
      inputs: [
        given('at', `${next.at} ${next.index}`, ''),
        given('a', next.under[0], unit),
        given('b', next.under[1], unit),
        given('meter', meter[next.quantity], '%'),
      ],
      value: next.apart,
      unit: '',
      basis: 'common practice',
    });
  }
  return steps;
}
