/**
 * Every finding that a circuit calculation can say, raised and not raised. A finding about a threshold is raised just
 * beyond it (one part in a million) and not within its margin of 1e-9: what the threshold is worth. The rows stand in
 * findings/, by calculation.
 */
import { describe, expect, it } from 'vitest';
import { EngineError, type Finding } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { sizingCalculations } from '@/lib/sizing';
import { engineCodes } from '../../support/engine-codes';
import { benchArrayRows } from './findings/bench-arrays';
import { branchCircuitRows } from './findings/branch-circuits';
import { conductorRows } from './findings/conductors';
import { currentSourceRows } from './findings/current-sources';
import { dimmingBusRows } from './findings/dimming-buses';
import { readingRows } from './findings/readings';
import { retrofitCheckRows } from './findings/retrofit-checks';
import { changed, type Change, type FindingRow } from './findings/row';
import { seriesStringRows } from './findings/series-strings';
import { tapeRows } from './findings/tapes';

const rows: FindingRow[] = [
  ...conductorRows,
  ...benchArrayRows,
  ...currentSourceRows,
  ...seriesStringRows,
  ...branchCircuitRows,
  ...dimmingBusRows,
  ...tapeRows,
  ...readingRows,
  ...retrofitCheckRows,
];

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

function findingsOf({ calculation, base }: FindingRow, change: Change): Finding[] {
  const found = sizingCalculations.find(({ name }) => name === calculation);
  if (!found) throw new Error(`There is no calculation ${calculation}.`);
  try {
    return runCalculation(found, changed(base, change)).findings;
  } catch (error) {
    if (error instanceof EngineError) throw new Error(`Refused: ${error.message}`, { cause: error });
    throw error;
  }
}

/** How often a row's calculation and code came before it, to tell its name from theirs. */
const numbered = rows.map((row, i) => {
  const before = rows
    .slice(0, i)
    .filter((own) => own.calculation === row.calculation && own.code === row.code);
  return { name: `${row.calculation}: ${row.code}${before.length ? ` (${before.length + 1})` : ''}`, row };
});

describe.each(numbered)('$name', ({ row }) => {
  it('is raised with its severity, hard or soft, its basis and its figures', () => {
    const said = findingsOf(row, row.raises).filter(({ code }) => code === row.code);
    expect(said.length).toBeGreaterThan(0);
    for (const { severity, hard, basis, message, values } of said) {
      expect({ severity, hard }).toEqual({ severity: row.severity, hard: row.hard });
      expect(basis).toMatch(row.basis);
      expect(message).toMatch(/^\S.{10,}/s);
      expect(message).not.toMatch(/\b(null|undefined|NaN|Infinity)\b/);
      for (const [key, value] of Object.entries(values))
        expect([key, value === null || typeof value === 'string' || Number.isFinite(value)]).toEqual([
          key,
          true,
        ]);
    }
  });

  const { clear } = row;
  if (clear !== null)
    it('is not raised by the nearest input without its cause', () => {
      expect(changed(row.base, clear)).not.toEqual(changed(row.base, row.raises));
      expect(findingsOf(row, clear).map(({ code }) => code)).not.toContain(row.code);
    });
});

describe('the table of findings', () => {
  const { codes, unread } = engineCodes(['lib/sizing'], {
    key: 'code',
    marker: 'severity',
    makers: ['hardStop', 'softStop', 'caution', 'note'],
  });

  it('holds every code that stands in the sources, and no other', () => {
    expect(unread).toEqual([]);
    expect([...new Set(rows.map(({ code }) => code))].sort()).toEqual(codes);
    expect(codes.length).toBeGreaterThanOrEqual(40);
  });

  it('and its hard stops are those that are named here, one by one', () => {
    expect([...new Set(rows.filter((row) => row.hard).map(({ code }) => code))].sort()).toEqual(HARD);
  });

  it('has no near miss only for what bench work always says', () => {
    const always = rows.filter(({ clear }) => clear === null);
    expect([...new Set(always.map(({ code }) => code))]).toEqual(['field-built']);
    const bench = sizingCalculations.filter((one) => one.bench).map(({ name }) => name);
    expect(always.map(({ calculation }) => calculation).sort()).toEqual(bench.sort());
  });
});
