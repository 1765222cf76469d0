/** Strings in parallel on one node, fed by volts behind a resistance or by amps. */
import { EngineError } from '@/lib/engine/contract';
import { type SeriesString, stringAmps, stringSlopeOhms, stringVolts } from './diode';

const MAX_STEPS = 500;

export type NodeSupply = { volts: number; ohms: number } | { amps: number };

export interface NodeSolution {
  /** Across every string. */
  volts: number;
  /** Of each string. */
  amps: number[];
  /** Into the node. */
  supplyAmps: number;
}

function currents(strings: readonly SeriesString[], volts: number) {
  let total = 0;
  let slope = 0;
  const amps = strings.map((string) => {
    const own = stringAmps(string, volts);
    total += own;
    slope += 1 / stringSlopeOhms(string, own);
    return own;
  });
  return { amps, total, slope };
}

/** No string carries more than the supply can give, so the node is at most at the volts of the easiest string. */
function startVolts(strings: readonly SeriesString[], supply: NodeSupply): number {
  const most = 'amps' in supply ? supply.amps : supply.volts / supply.ohms;
  const cap = 'amps' in supply ? Infinity : supply.volts;
  if (most === Infinity) return cap;
  return strings.reduce((lowest, string) => Math.min(lowest, stringVolts(string, most)), cap);
}

/**
 * The node's volts by Newton from above: every string's current is convex and rising in the volts, so the sum less
 * what the supply gives is too, and each step falls monotonically to the root: no damping is needed.
 * @returns volts V, amps A
 * @throws {EngineError} `no-solution` where nothing limits a string's current.
 */
export function solveNode(strings: readonly SeriesString[], supply: NodeSupply): NodeSolution {
  let volts = startVolts(strings, supply);
  let now = currents(strings, volts);
  for (let i = 0; i < MAX_STEPS; i++) {
    if (!Number.isFinite(now.total)) {
      const message = 'nothing limits the current: add a ballast, series or source resistance';
      throw new EngineError('no-solution', `The array has no operating point: ${message}.`, [
        { path: 'strings', message },
      ]);
    }
    // Scaled by the supply's ohms, so that zero ohms need no case of their own.
    const step =
      'amps' in supply
        ? (now.total - supply.amps) / now.slope
        : (supply.ohms * now.total - (supply.volts - volts)) / (supply.ohms * now.slope + 1);
    const next = volts - step;
    // Rounding ends the fall: a step up or none at all is the last bit.
    if (!(next < volts)) break;
    volts = next;
    now = currents(strings, volts);
  }
  return { volts, amps: now.amps, supplyAmps: now.total };
}
