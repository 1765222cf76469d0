/** Key figures and drawing of a solved circuit, by kind. Used at the desk; the drawing also on the wiring sheet. */
import { ArrayDiagram, type ArrayString } from '@/components/diagram/array-diagram';
import { BranchDiagram, type SolvedBranch } from '@/components/diagram/branch-diagram';
import { TapeDiagram, TapePlot } from '@/components/diagram/tape-diagram';
import { KeyFigure } from '@/components/ui/sheet';
import type { BranchCircuit, CircuitKind, ResistorArray, TapeRun } from '@/lib/circuits/schema/electrical';
import { figureFedAtBothEnds, type TapeResult } from '@/lib/circuits/schema/figure';
import type { Answer } from '@/lib/engine/contract';
import { formatFigure, formatNumber, formatWireSize } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';

interface BranchResult {
  circuits: {
    units: { name: string; quantity: number }[];
    voltAmps: number;
    amps: number;
    breakerAmps: number | null;
    size: string | null;
    dropPct: number | null;
  }[];
  unitsByLoad: number | null;
  unitsByInrush: number | null;
  governedBy: string | null;
}

interface ArrayResult {
  perString: number | null;
  strings: (ArrayString & { ballastWatts: number | null; ampsMax: number | null })[] | null;
  supplyAmps: number | null;
  efficiency: number | null;
}

export function solvedBranch(answer: Answer): SolvedBranch {
  const first = (answer.result as BranchResult).circuits[0];
  return {
    breakerAmps: first?.breakerAmps ?? null,
    size: first?.size ?? null,
    dropPct: first?.dropPct ?? null,
    amps: first?.amps ?? null,
    units: first?.units.reduce((sum, unit) => sum + unit.quantity, 0) ?? 0,
  };
}

export function CircuitDrawing({
  kind,
  electrical,
  answer,
  settings,
  plot = false,
}: {
  kind: CircuitKind;
  electrical: unknown;
  answer: Answer;
  settings: ShopSettings;
  plot?: boolean;
}) {
  if (kind === 'tape-run') {
    const run = electrical as TapeRun;
    const result = answer.result as TapeResult;
    return (
      <>
        <TapeDiagram run={run} result={result} settings={settings} />
        {plot ? (
          <TapePlot
            run={run}
            result={result}
            bothEnds={figureFedAtBothEnds(run, settings)}
            settings={settings}
          />
        ) : null}
      </>
    );
  }
  if (kind === 'branch-circuit')
    return (
      <BranchDiagram
        circuit={electrical as BranchCircuit}
        solved={solvedBranch(answer)}
        settings={settings}
      />
    );
  const strings = (answer.result as ArrayResult).strings ?? [];
  return strings.length > 0 ? (
    <ArrayDiagram array={electrical as ResistorArray} strings={strings} settings={settings} />
  ) : null;
}

interface Row {
  label: string;
  value: number | string | null;
  unit: string;
  bad?: boolean;
}

function tapeRows(run: TapeRun, result: TapeResult): Row[] {
  const load = run.driver ? (result.totalWatts / run.driver.watts) * 100 : null;
  return [
    { label: 'Lowest volts', value: result.minVolts, unit: 'V' },
    { label: 'Drop to it', value: result.worstDropPct, unit: '%', bad: result.worstDropPct > run.maxDropPct },
    {
      label: 'Dimmest over brightest',
      value: result.dimmestPct,
      unit: '%',
      bad: (result.dimmestPct ?? 100) < run.minDimmestPct,
    },
    { label: 'Driver load', value: load, unit: '%', bad: (load ?? 0) > run.loadFractionPct },
    { label: 'Supply', value: result.totalWatts, unit: 'W' },
  ];
}

function branchRows(result: BranchResult): Row[] {
  const first = result.circuits[0];
  return [
    { label: 'Circuits', value: result.circuits.length, unit: '' },
    { label: 'Current of the first', value: first?.amps ?? null, unit: 'A' },
    { label: 'Breaker', value: first?.breakerAmps ?? null, unit: 'A' },
    { label: 'Conductor', value: first?.size ? formatWireSize(first.size) : null, unit: '' },
    { label: 'Drop', value: first?.dropPct ?? null, unit: '%' },
    { label: 'Most units by load', value: result.unitsByLoad, unit: '' },
    { label: 'Most units by inrush', value: result.unitsByInrush, unit: '' },
  ];
}

function arrayRows(result: ArrayResult): Row[] {
  const first = result.strings?.[0];
  return [
    { label: 'LEDs in series', value: result.perString, unit: '' },
    { label: 'Resistor', value: first?.ballastOhms ?? null, unit: 'ohm' },
    { label: 'Rating', value: first?.ballastRatedWatts ?? null, unit: 'W' },
    { label: 'Current', value: first?.amps ?? null, unit: 'A' },
    { label: 'Highest current', value: first?.ampsMax ?? null, unit: 'A' },
    { label: 'Supply current', value: result.supplyAmps, unit: 'A' },
    { label: 'Efficiency', value: result.efficiency === null ? null : result.efficiency * 100, unit: '%' },
  ];
}

export function CircuitFigures({
  kind,
  electrical,
  answer,
  settings,
}: {
  kind: CircuitKind;
  electrical: unknown;
  answer: Answer;
  settings: ShopSettings;
}) {
  const rows =
    kind === 'tape-run'
      ? tapeRows(electrical as TapeRun, answer.result as TapeResult)
      : kind === 'branch-circuit'
        ? branchRows(answer.result as BranchResult)
        : arrayRows(answer.result as ArrayResult);
  return (
    <dl>
      {rows.map(({ label, value, unit, bad }) => {
        const figure =
          value === null
            ? { value: '–', unit: '' }
            : typeof value === 'string'
              ? { value, unit: '' }
              : unit === ''
                ? { value: formatNumber(value), unit: '' }
                : formatFigure(value, unit, settings);
        return (
          <KeyFigure
            key={label}
            label={label}
            value={figure.value}
            unit={figure.unit}
            tone={bad ? 'danger' : undefined}
          />
        );
      })}
    </dl>
  );
}
