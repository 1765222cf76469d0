/**
 * Every finding of light and price, once raised and once not (those of the circuits, at their very thresholds, stand in
 * tests/unit/sizing/findings): findings.jsonl holds an input of each calculation
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
  const told = engineCodes(['lib/lighting', 'lib/pricing'], {
    key: 'code',
    marker: 'severity',
    makers: ['hardStop', 'softStop', 'caution', 'note'],
  });

  it('has a row for every finding there is', () => {
    const known = new Set(rows.map(({ code }) => code));
    expect(told.codes.filter((code) => !known.has(code))).toEqual([]);
    expect([...known].filter((code) => !told.codes.includes(code))).toEqual([]);
    expect(rows.filter((row) => row.hard)).toEqual([]);
  });
});
