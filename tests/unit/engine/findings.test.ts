/**
 * Every finding that an engine can say, once raised and once not: findings.jsonl holds an input of each calculation
 * that raises it and the nearest one that does not (`change`: the figures that differ; `clear`: the whole input, where
 * fields come or go). A finding without its row fails the last test.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { EngineError, type Finding } from '@/lib/engine/contract';
import { calculations } from '@/lib/engine/registry';
import { runCalculation } from '@/lib/engine/run';
import { engineCodes } from '../../support/engine-codes';

interface Row {
  calculation: string;
  code: string;
  severity: Finding['severity'];
  hard: boolean;
  basis: string;
  input: Record<string, unknown>;
  change?: Record<string, unknown>;
  clear?: Record<string, unknown>;
}

const rows = readFileSync(new URL('findings.jsonl', import.meta.url), 'utf8')
  .trim()
  .split('\n')
  .map((line) => JSON.parse(line) as Row);

/** Said with every answer of the calculations that carry them: what they are is the reason, not a figure. */
const ALWAYS = new Set(['field-built', 'point-direct-only', 'maintenance-of-the-leds-alone']);

/**
 * Never overridden: what the design names (overcurrent device above the conductor's limit, disconnection time, voltage
 * or insulation rating exceeded, class-limited outputs joined, unlisted kit, tube type against ballast, lampholder or
 * fed end, emergency unit on a switched feed), and what leaves no conductor, rating or driver that is safe at all.
 */
const HARD = [
  'ambient-too-hot',
  'ballast-not-listed',
  'channel-over-volts',
  'conductor-under-breaker',
  'control-with-power',
  'disconnection-time',
  'emergency-on-switched-feed',
  'fed-end-mismatch',
  'lampholder-shunted',
  'load-over-conductors',
  'no-class-limited-driver',
  'no-selv-driver',
  'no-standard-rating',
  'plan-feeder-too-small',
  'regulator-over-volts',
  'string-over-insulation',
  'supply-outside-rating',
  'tape-volts-over-class',
  'tube-type-against-ballast',
  'two-sources',
  'unlisted-kit',
];

function changed(input: Record<string, unknown>, change: Record<string, unknown>): Record<string, unknown> {
  const copy = structuredClone(input);
  for (const [path, value] of Object.entries(change)) {
    const keys = path.split('.');
    const last = keys.pop() ?? '';
    let at = copy as Record<string, unknown>;
    for (const key of keys) at = at[key] as Record<string, unknown>;
    at[last] = value;
  }
  return copy;
}

function findingsOf(name: string, input: unknown): Finding[] {
  const calculation = calculations.get(name);
  if (!calculation) throw new Error(`There is no calculation ${name}.`);
  try {
    return runCalculation(calculation, input).findings;
  } catch (error) {
    if (error instanceof EngineError) throw new Error(`Refused: ${error.message}`, { cause: error });
    throw error;
  }
}

describe.each(rows.map((row) => ({ name: `${row.calculation}: ${row.code}`, row })))('$name', ({ row }) => {
  it('is raised, with its severity, its hardness and its basis', () => {
    const said = findingsOf(row.calculation, row.input).filter(({ code }) => code === row.code);
    expect(said.length).toBeGreaterThan(0);
    const { severity, hard, basis } = row;
    expect(said).toContainEqual(expect.objectContaining({ severity, hard, basis }));
    for (const { message } of said) expect(message.length).toBeGreaterThan(10);
  });

  if (ALWAYS.has(row.code)) return;
  it('and is not, on the nearest input without its cause', () => {
    const clear = row.clear ?? changed(row.input, row.change ?? {});
    expect(clear).not.toEqual(row.input);
    expect(findingsOf(row.calculation, clear).map(({ code }) => code)).not.toContain(row.code);
  });
});

describe('the table', () => {
  const told = engineCodes(['lib/sizing', 'lib/lighting', 'lib/pricing'], {
    key: 'code',
    marker: 'severity',
    makers: ['hardStop', 'softStop', 'caution', 'note'],
  });

  it('has a row for every finding there is', () => {
    const known = new Set(rows.map(({ code }) => code));
    expect(told.codes.filter((code) => !known.has(code))).toEqual([]);
    expect([...known].filter((code) => !told.codes.includes(code))).toEqual([]);
    expect(known.size).toBeGreaterThanOrEqual(40);
  });

  it('and its hard stops are those that are named here, one by one', () => {
    const hard = new Set(rows.filter((row) => row.hard).map(({ code }) => code));
    expect([...hard].sort()).toEqual(HARD);
    for (const { code, severity } of rows.filter((row) => row.hard))
      expect([code, severity]).toEqual([code, 'stop']);
  });

  it('what bench work always carries, nothing else does', () => {
    for (const [name, { bench }] of calculations) {
      const row = rows.find(({ calculation }) => calculation === name);
      if (!row || name === 'fault-finder') continue;
      expect([name, findingsOf(name, row.input).some(({ code }) => code === 'field-built')]).toEqual([
        name,
        bench,
      ]);
    }
  });
});
