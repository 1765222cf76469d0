/** Runs Debian's ngspice on a netlist and reads its operating point. */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** ngspice 39 computes with k and q of CODATA 2014; N scaled by the ratio makes its kT/q ours. */
export const NGSPICE_K_OVER_Q = 1.38064852e-23 / 1.6021766208e-19;
const K_OVER_Q = 1.380649e-23 / 1.602176634e-19;
export const N_SCALE = K_OVER_Q / NGSPICE_K_OVER_Q;

const CONTROL = ['.control', 'set numdgt=16', 'set width=400', 'op', 'print all', 'quit', '.endc', '.end'];

/**
 * How near two steps must come. Currents through milliohms carry 1e-16 of the volts over them as noise: where the
 * first pair can't be met ngspice would step for hours, so the second is tried; its last step is still far nearer.
 */
const TOLERANCES = ['vntol=1e-12 abstol=1e-14', 'vntol=1e-10 abstol=1e-11'] as const;
const PATIENCE_MILLISECONDS = 4000;

/** Solves the operating point; `lines` without title, tolerances and control. Returns node volts and branch amps. */
export function operatingPoint(lines: readonly string[]): Map<string, number> {
  const folder = mkdtempSync(join(tmpdir(), 'netlist-'));
  const file = join(folder, 'circuit.cir');
  const run = (tolerance: string) => {
    const options = `.options reltol=1e-9 gmin=1e-18 itl1=500 itl2=500 ${tolerance}`;
    writeFileSync(file, ['* operating point', options, ...lines, ...CONTROL].join('\n'));
    return readValues(
      execFileSync('ngspice', ['-b', file], {
        encoding: 'utf8',
        maxBuffer: 1 << 28,
        stdio: 'pipe',
        timeout: PATIENCE_MILLISECONDS,
        killSignal: 'SIGKILL',
      }),
    );
  };
  try {
    return run(TOLERANCES[0]);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ETIMEDOUT') throw error;
    return run(TOLERANCES[1]);
  } finally {
    rmSync(folder, { recursive: true });
  }
}

function readValues(output: string): Map<string, number> {
  const values = new Map<string, number>();
  for (const line of output.split('\n')) {
    const match = /^\s*(\S+) = (\S+)\s*$/.exec(line);
    if (match?.[1] && match[2]) values.set(match[1], Number(match[2]));
  }
  return values;
}
