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
 * How near two steps must come. Currents through milliohms carry the last bits of the volts over them as noise: where
 * that is more than a tolerance, ngspice would step on for hours, so each is given up after a while for the next. The
 * step after the one that passes is far nearer, Newton's being what it is.
 */
const TOLERANCES = [
  'vntol=1e-10 abstol=1e-12',
  'vntol=1e-10 abstol=1e-10',
  'vntol=1e-8 abstol=1e-9',
] as const;
const PATIENCE_MILLISECONDS = 3000;

// Full pivoting: with ngspice's own threshold conductors of no resistance cost six digits in loops of milliohms.
const OPTIONS = '.options reltol=1e-9 gmin=1e-18 pivrel=0.9 itl1=200 itl2=200';

function attempt(file: string, lines: readonly string[], tolerance: string): Map<string, number> {
  writeFileSync(file, ['* operating point', `${OPTIONS} ${tolerance}`, ...lines, ...CONTROL].join('\n'));
  try {
    const output = execFileSync('ngspice', ['-b', file], {
      encoding: 'utf8',
      maxBuffer: 1 << 28,
      stdio: 'pipe',
      timeout: PATIENCE_MILLISECONDS,
      killSignal: 'SIGKILL',
    });
    return readValues(output);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ETIMEDOUT') return new Map();
    throw error;
  }
}

/** Solves the operating point; `lines` without title, tolerances and control. Returns node volts and branch amps. */
export function operatingPoint(lines: readonly string[]): Map<string, number> {
  const folder = mkdtempSync(join(tmpdir(), 'netlist-'));
  try {
    for (const tolerance of TOLERANCES) {
      const values = attempt(join(folder, 'circuit.cir'), lines, tolerance);
      if (values.size > 0 && ![...values.values()].some(Number.isNaN)) return values;
    }
    throw new Error('ngspice finds no operating point for this circuit');
  } finally {
    rmSync(folder, { recursive: true });
  }
}

/** What ngspice itself says its analysis of the operating point took: no start, no reading, no printing. */
export function analysisSeconds(lines: readonly string[]): number {
  const folder = mkdtempSync(join(tmpdir(), 'netlist-'));
  try {
    const file = join(folder, 'circuit.cir');
    const control = ['.control', 'op', 'rusage time', 'quit', '.endc', '.end'];
    writeFileSync(
      file,
      ['* operating point', '.options reltol=1e-9 gmin=1e-18', ...lines, ...control].join('\n'),
    );
    const output = execFileSync('ngspice', ['-b', file], {
      encoding: 'utf8',
      maxBuffer: 1 << 28,
      stdio: 'pipe',
    });
    const seconds = /Total analysis time \(seconds\) = (\S+)/.exec(output)?.[1];
    if (seconds === undefined) throw new Error('ngspice does not say how long it took');
    return Number(seconds);
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
