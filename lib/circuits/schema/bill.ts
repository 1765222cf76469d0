/** What a circuit is made of and how long it takes: from its figures and the parts chosen for it. */
import type { PartFigures } from '@/lib/parts/schema';
import type { BranchCircuit, CircuitChoices, CircuitKind, ResistorArray, TapeRun } from './electrical';
import { feedsOf } from './figure';

interface Bill {
  parts: { partId: string; quantity: string }[];
  labourHours: string;
}

type Role = keyof CircuitChoices['roles'];

/** Cable is cut with a tenth to spare (common practice). */
const CABLE_SPARE = 1.1;
const quantity = (value: number) => (Math.round(value * 10_000) / 10_000).toString();

function quantities(kind: CircuitKind, electrical: unknown): Partial<Record<Role, number>> {
  if (kind === 'tape-run') {
    const run = electrical as TapeRun;
    const cable = feedsOf(run, 1).reduce((sum, feed) => sum + feed.metres, 0) * CABLE_SPARE;
    return { tape: run.runMetres, driver: 1, cable };
  }
  if (kind === 'branch-circuit') {
    const circuit = electrical as BranchCircuit;
    const cable = (circuit.metres + circuit.spacingMetres * (circuit.quantity - 1)) * CABLE_SPARE;
    return { luminaire: circuit.quantity, cable };
  }
  const array = electrical as ResistorArray;
  const strings = Math.ceil(array.count / (array.perString ?? array.count));
  return { led: array.count, resistor: strings };
}

/** Parts of the roles that were chosen, with the labour that each part's unit takes. */
export function billOf(
  kind: CircuitKind,
  electrical: unknown,
  roles: CircuitChoices['roles'],
  parts: readonly PartFigures[],
  solvedStrings?: number,
): Bill {
  const wanted = quantities(kind, electrical);
  if (solvedStrings !== undefined && kind === 'resistor-array') wanted.resistor = solvedStrings;
  const lines = (Object.entries(roles) as [Role, string][]).flatMap(([role, partId]) => {
    const part = parts.find((one) => one.id === partId);
    const amount = wanted[role];
    return part && amount !== undefined && amount > 0 ? [{ part, amount }] : [];
  });
  const hours = lines.reduce((sum, { part, amount }) => sum + part.labourHours * amount, 0);
  return {
    parts: lines.map(({ part, amount }) => ({ partId: part.id, quantity: quantity(amount) })),
    labourHours: quantity(hours),
  };
}
