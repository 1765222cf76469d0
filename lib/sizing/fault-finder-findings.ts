/** What the readings of a circuit mean for whoever stands before it. */
import type { Finding } from '@/lib/engine/contract';
import { caution, note, softStop } from '@/lib/engine/finding';
import { fieldBuilt } from './bench-work';
import type { Cause, FaultFinder } from './fault-finder';
import type { FaultFinderInput } from './fault-finder-input';
import type { CauseCode } from './fault-finder-model';
import type { NextReading } from './fault-finder-rank';

const COMMON_PRACTICE = 'common practice';
const JOINTS: readonly CauseCode[] = ['joint-in-feed', 'joint-in-tape', 'joint-in-string'];
/** Further off than this, in meter errors, nothing that was tried explains the readings. */
const EXPLAINS = 2;

export interface Found {
  input: FaultFinderInput;
  result: FaultFinder;
  /** Causes that the readings do not tell from the best, the best first. */
  suspected: readonly Cause[];
  /** Ends of tolerances without an operating point. */
  unsolved: number;
}

function joint({ suspected }: Found): Finding[] {
  const worst = suspected.find(({ cause }) => JOINTS.includes(cause));
  if (!worst) return [];
  const { cause, index, value, wattsMost: watts, rank } = worst;
  return [
    softStop(
      'high-resistance-joint',
      `A joint of ${value} ohm explains the readings: up to ${watts} W heat it. Fire risk: switch off and remake it before anything else.`,
      { cause, index, ohms: value, watts, rank },
      'common practice; NEC 2023, 110.14 on electrical connections (from memory)',
    ),
  ];
}

function polarity({ suspected }: Found): Finding[] {
  if (suspected[0]?.cause !== 'feed-reversed') return [];
  return [
    softStop(
      'polarity-reversed',
      'A feed is connected the wrong way round: switch off and exchange its conductors.',
      { index: suspected[0].index },
      COMMON_PRACTICE,
    ),
  ];
}

function shorted({ suspected }: Found): Finding[] {
  const [best] = suspected;
  if (best?.cause !== 'shorted-leds') return [];
  return [
    caution(
      'shorted-leds-overdrive',
      `${best.value} LEDs of a string look shorted: the others of that string carry more than they are made for.`,
      { leds: best.value, index: best.index },
      "Kirchhoff's laws",
    ),
  ];
}

function setting({ suspected }: Found): Finding[] {
  const [best] = suspected;
  if (best?.cause !== 'supply-setting') return [];
  const { index, value, unit } = best;
  return [
    caution(
      unit === 'V' ? 'supply-volts-not-as-drawn' : 'supply-amps-not-as-drawn',
      `The driver of feed ${index} is not set or made as drawn: ${value} ${unit} explains the readings.`,
      unit === 'V' ? { index, volts: value } : { index, amps: value },
      COMMON_PRACTICE,
    ),
  ];
}

function unexplained({ result }: Found): Finding[] {
  const off = result.readings.filter(({ verdict }) => verdict !== 'in').length;
  const best = result.causes[0];
  if (off === 0 || (best && best.residual <= EXPLAINS)) return [];
  return [
    caution(
      'no-cause-explains',
      `${off} readings are off, and no single cause explains all of them: take them again, look for two faults, or for a circuit that is not as drawn.`,
      { readings: off, residual: best?.residual ?? null, limit: EXPLAINS },
      COMMON_PRACTICE,
    ),
  ];
}

/** What the next reading would be under either. */
const under = ({ at, index, quantity, under: [one, other], apart }: NextReading): Finding['values'] => ({
  at,
  index,
  quantity,
  volts: quantity === 'volts' ? one : null,
  otherVolts: quantity === 'volts' ? other : null,
  amps: quantity === 'amps' ? one : null,
  otherAmps: quantity === 'amps' ? other : null,
  apart,
});

function notTold({ result, suspected }: Found): Finding[] {
  const { nextReading: next } = result;
  const [first, second] = suspected;
  if (next && next.between[0] === next.between[1]) {
    // Boundary b lies between segments b and b + 1.
    const [from, to] = [first?.from ?? null, (first?.to ?? 0) + 1];
    return [
      note(
        'place-not-separable',
        `It lies between segments ${from} and ${to}: ${next.quantity} at ${next.at} ${next.index} would tell more (${next.under[0]} or ${next.under[1]}).`,
        { from, to, ...under(next) },
        'least squares in units of the meter error',
      ),
    ];
  }
  if (next) {
    const rival = result.causes[next.between[1] - 1];
    return [
      note(
        'readings-not-separable',
        `The readings do not tell ${first?.cause} from ${rival?.cause}: ${next.quantity} at ${next.at} ${next.index} would (${next.under[0]} or ${next.under[1]}).`,
        {
          first: first?.cause ?? null,
          second: rival?.cause ?? null,
          ...under(next),
        },
        'least squares in units of the meter error',
      ),
    ];
  }
  if (!first || !second) return [];
  return [
    note(
      'causes-look-alike',
      `No further reading tells ${first.cause} from ${second.cause}: look at the place itself, without power.`,
      { first: first.cause, second: second.cause, causes: suspected.length },
      'least squares in units of the meter error',
    ),
  ];
}

/** A running constant-current string that is opened arcs at the driver's full volts. */
function liveWork({ input: { circuit }, result }: Found): Finding[] {
  const constantCurrent =
    circuit.kind === 'string' || (circuit.kind === 'array' && circuit.input.supply.amps !== undefined);
  if (!constantCurrent && result.causes.length === 0) return [];
  return [
    caution(
      'measure-safely',
      'De-energise, connect the meter, energise, read. Never open a running constant-current string.',
      { kind: circuit.kind },
      'common practice: an open constant-current output rises to its full volts and arcs',
    ),
  ];
}

function corners({ unsolved }: Found): Finding[] {
  if (unsolved === 0) return [];
  return [
    caution(
      'band-not-whole',
      `At ${unsolved} ends of the tolerances the circuit has no operating point: the bands leave them out.`,
      { ends: unsolved },
      'computed',
    ),
  ];
}

export const findingsOf = (found: Found): Finding[] => [
  ...(found.input.circuit.kind === 'array' ? [fieldBuilt()] : []),
  ...joint(found),
  ...polarity(found),
  ...shorted(found),
  ...setting(found),
  ...unexplained(found),
  ...notTold(found),
  ...liveWork(found),
  ...corners(found),
];
