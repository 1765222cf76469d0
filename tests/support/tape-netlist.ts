/** A fed tape as a netlist for ngspice, from the same input that the engine takes. */
import type { TapeInput } from '@/lib/sizing/tape-operating-point';
import { N_SCALE } from './ngspice';

/** A conductor; ngspice wants a source of 0 V where there is no resistance. */
const wire = (name: string, a: string, b: string, ohms: number) =>
  ohms > 0 ? `R${name} ${a} ${b} ${ohms}` : `Vw${name} ${a} ${b} DC 0`;

function loadLines({ load }: TapeInput, k: number): string[] {
  if (load.model === 'constant-current') return [`I${k} q${k} n${k} DC ${load.amps}`];
  if (load.model === 'resistive') return [`Rl${k} q${k} n${k} ${load.ohms}`];
  const lines = [wire(`b${k}`, `q${k}`, `x${k}_0`, load.ballastOhms)];
  for (let i = 0; i < load.leds; i++) {
    lines.push(`D${k}_${i} x${k}_${i} ${i === load.leds - 1 ? `n${k}` : `x${k}_${i + 1}`} M`);
  }
  return lines;
}

/** Node p{k}, n{k}: the rails at load k; branch vm{k}: its current; branch vf{i}: feed i's. */
export function netlistOf(input: TapeInput): string[] {
  const { cuts, cutMetres, railOhmsPerMetre, load, feeds } = input;
  const celsius = input.celsius ?? 25;
  const half = {
    p: (railOhmsPerMetre.positive * cutMetres) / 2,
    n: (railOhmsPerMetre.negative * cutMetres) / 2,
  };
  const lines = [`.options temp=${celsius}`];
  const joints = input.joints ?? [];
  joints.forEach(({ at, rail, ohms }, j) => {
    const [node] = rail;
    lines.push(wire(`j${j}`, `${node}b${at}`, `${node}j${at}`, ohms));
  });
  /** Where the cut after boundary k begins: behind the bad joint, if there is one. */
  const begins = (rail: 'p' | 'n', k: number) =>
    joints.some((joint) => joint.at === k && joint.rail.startsWith(rail)) ? `${rail}j${k}` : `${rail}b${k}`;
  for (let k = 1; k <= cuts; k++) {
    for (const rail of ['p', 'n'] as const) {
      lines.push(`R${rail}a${k} ${begins(rail, k - 1)} ${rail}${k} ${half[rail]}`);
      lines.push(`R${rail}b${k} ${rail}${k} ${rail}b${k} ${half[rail]}`);
    }
    lines.push(`Vm${k} p${k} q${k} DC 0`, ...loadLines(input, k));
  }
  const main = feeds[0]?.volts;
  lines.push(`Vs s 0 DC ${main}`, wire('s', 's', 'st', input.sourceOhms ?? 0));
  feeds.forEach((feed, i) => {
    const own = feed.volts === main ? 'st' : `t${i}`;
    if (own !== 'st')
      lines.push(`Vs${i} s${i} 0 DC ${feed.volts}`, wire(`s${i}`, `s${i}`, own, feed.sourceOhms ?? 0));
    lines.push(`Vf${i} ${own} f${i} DC 0`, wire(`fp${i}`, `f${i}`, `pb${feed.at}`, feed.positiveOhms));
    lines.push(wire(`fn${i}`, `nb${feed.at}`, '0', feed.negativeOhms));
  });
  if (load.model === 'led-string') {
    const n = load.emissionCoefficient * N_SCALE;
    lines.push(
      `.model M D(IS=${load.saturationAmps} N=${n} RS=${load.seriesOhms} EG=1.11 XTI=0 TNOM=${celsius})`,
    );
  }
  return lines;
}
