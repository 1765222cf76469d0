/** What the crew does on a circuit or a change, step by step: text keys with values, figures from the solved circuit. */
import type { CircuitKind, BranchCircuit, ResistorArray, TapeRun } from '@/lib/circuits/schema/electrical';
import { formatFigure, formatLength, formatWireSize } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';
import { COLOUR_SOURCE, type Conductor, dcConductors, mainsColourSource, mainsConductors } from './colours';
import type { SheetCircuit, Step } from './sheet';

type Values = Step['values'];
interface Wires {
  conductors: Conductor[];
  source: string;
}

const dc = (): Wires => ({ conductors: dcConductors(), source: COLOUR_SOURCE.dc });

function stepOf(
  owner: string,
  name: string,
  values: Values = {},
  wires?: Wires,
  lines: Step['lines'] = [],
): Step {
  // The same step for several strings or circuits is told apart by its index.
  const index = typeof values['index'] === 'number' ? `.${values['index']}` : '';
  const place = typeof values['place'] === 'string' ? `.${values['place']}` : '';
  return {
    id: `${owner}.${name}${place}${index}`,
    key: `wiring.step.${name}`,
    values,
    conductors: wires?.conductors ?? [],
    conductorSource: wires?.source ?? '',
    lines,
  };
}

const figure = (value: number, unit: string, settings: ShopSettings) => {
  const { value: digits, unit: shown } = formatFigure(value, unit, settings);
  return `${digits} ${shown}`;
};

const PLACES = { start: ['start'], end: ['end'], both: ['start', 'end'], middle: ['middle'] } as const;

function tapeSteps(id: string, run: TapeRun, settings: ShopSettings): Step[] {
  const size = formatWireSize(run.feederSize);
  const places = PLACES[run.feed];
  return [
    stepOf(id, 'driver-place', {
      length: formatLength(run.driverMetres, settings),
      volts: figure(run.driver?.volts ?? 0, 'V', settings),
    }),
    stepOf(id, 'set-switch', { volts: figure(run.driver?.volts ?? 0, 'V', settings) }),
    stepOf(id, 'tape-length', { length: formatLength(run.runMetres, settings) }),
    ...places.map((place) => stepOf(id, 'feeder', { place, size }, dc())),
    stepOf(id, 'joints'),
    stepOf(id, 'joint-photo'),
  ];
}

type BranchResult = Extract<SheetCircuit, { kind: 'branch-circuit' }>['result'];

function branchSteps(
  id: string,
  circuit: BranchCircuit,
  result: BranchResult,
  settings: ShopSettings,
): Step[] {
  const wires = { conductors: mainsConductors(circuit, settings), source: mainsColourSource(settings) };
  const spacing = formatLength(circuit.spacingMetres, settings);
  const each = result.circuits.flatMap((one, index) => {
    const number = result.circuits.length > 1 ? { index: index + 1 } : {};
    const units = one.units.reduce((sum, unit) => sum + unit.quantity, 0);
    const name = circuit.luminaire || 'luminaire';
    return [
      stepOf(id, 'breaker', {
        ...number,
        rating: `${figure(one.breakerAmps ?? circuit.breakerAmps, 'A', settings)}${circuit.curve ? `, curve ${circuit.curve}` : ''}`,
      }),
      stepOf(
        id,
        'home-run',
        {
          ...number,
          size: one.size ? formatWireSize(one.size) : '–',
          length: formatLength(circuit.metres, settings),
        },
        wires,
      ),
      stepOf(id, 'luminaires', { ...number, units, name, spacing }),
    ];
  });
  return [...each, stepOf(id, 'ground'), stepOf(id, 'mains-joints'), stepOf(id, 'joint-photo')];
}

type ArrayResult = Extract<SheetCircuit, { kind: 'resistor-array' }>['result'];

function arraySteps(id: string, array: ResistorArray, result: ArrayResult, settings: ShopSettings): Step[] {
  const strings = (result.strings ?? []).map((string, index) =>
    stepOf(id, 'string', {
      index: index + 1,
      leds: string.leds,
      ohms: string.ballastOhms === null ? '–' : figure(string.ballastOhms, 'ohm', settings),
      watts: string.ballastRatedWatts === null ? '–' : figure(string.ballastRatedWatts, 'W', settings),
    }),
  );
  return [
    ...strings,
    stepOf(id, 'array-supply', { volts: figure(array.supplyVolts, 'V', settings) }, dc()),
    stepOf(id, 'array-insulation'),
    stepOf(id, 'joint-photo'),
    stepOf(id, 'bench-label', {}, undefined, [{ key: 'crew.bench', values: {} }]),
  ];
}

export function stepsOfCircuit(
  id: string,
  kind: CircuitKind,
  electrical: unknown,
  result: unknown,
  settings: ShopSettings,
): Step[] {
  if (kind === 'tape-run') return tapeSteps(id, electrical as TapeRun, settings);
  if (kind === 'branch-circuit')
    return branchSteps(id, electrical as BranchCircuit, result as BranchResult, settings);
  return arraySteps(id, electrical as ResistorArray, result as ArrayResult, settings);
}

/** What the retrofit check says of one change: how it is fed afterwards, and what stays written in it. */
export interface RetrofitWiring {
  wiring: string | null;
  lampholders: string | null;
  ballast: string | null;
  label: { lines: { key: string; values: Step['lines'][number]['values'] }[] };
}

export function stepsOfChange(id: string, retrofit: RetrofitWiring | null): Step[] {
  const steps = [stepOf(id, 'change')];
  if (retrofit?.ballast === 'out') steps.push(stepOf(id, 'ballast-out'));
  if (retrofit?.lampholders === 'non-shunted') steps.push(stepOf(id, 'lampholders'));
  if (retrofit?.wiring === 'line-one-end') steps.push(stepOf(id, 'line-one-end'));
  if (retrofit?.wiring === 'line-both-ends') steps.push(stepOf(id, 'line-both-ends'));
  if (retrofit?.wiring === 'external-driver') steps.push(stepOf(id, 'external-driver'));
  const lines = retrofit?.label.lines ?? [];
  if (lines.length > 0)
    steps.push(
      stepOf(
        id,
        'fixture-label',
        {},
        undefined,
        lines.map(({ key, values }) => ({ key, values })),
      ),
    );
  return steps;
}
