/** Circuits as a quote and a wiring sheet take them. Inside `withShop`. */
import { Area, Circuit } from '@/models';
import type { Answer } from '@/lib/engine/contract';
import { canonical, sha256 } from '@/lib/platform/http/hash';
import { getSettings } from '@/lib/shops/queries';
import { currentShopId } from '@/lib/platform/db';
import { formatLength } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';
import type { BranchCircuit, CircuitChoices, CircuitKind, ResistorArray, TapeRun } from './schema/electrical';

export interface CircuitForQuote {
  id: string;
  areaName: string;
  description: string;
  openStops: number;
  parts: { partId: string; quantity: string }[];
  labourHours: string;
  sourceSha256: string;
}

/** A circuit in plain words, as a customer reads it. */
export function describeCircuit(
  kind: CircuitKind,
  name: string,
  electrical: unknown,
  settings: ShopSettings,
): string {
  if (kind === 'tape-run') {
    const run = electrical as TapeRun;
    return `${name}: ${formatLength(run.runMetres, settings)} of LED tape with its driver`;
  }
  if (kind === 'branch-circuit') {
    const circuit = electrical as BranchCircuit;
    return `${name}: ${circuit.quantity} × ${circuit.luminaire || 'light'} on a circuit of their own`;
  }
  const array = electrical as ResistorArray;
  return `${name}: ${array.count} LEDs, built on the bench (field-built; not a listed luminaire or kit)`;
}

export async function circuitsForQuote(jobId: string): Promise<CircuitForQuote[]> {
  const settings = await getSettings(currentShopId());
  const areas = new Map((await Area.findAll({ where: { jobId } })).map((area) => [area.id, area]));
  const circuits = await Circuit.findAll({ where: { jobId, archivedAt: null } });
  return circuits
    .sort(
      (a, b) =>
        (areas.get(a.areaId)?.position ?? 0) - (areas.get(b.areaId)?.position ?? 0) ||
        a.name.localeCompare(b.name),
    )
    .map((circuit) => {
      const choices = circuit.choices as unknown as CircuitChoices;
      const source = {
        id: circuit.id,
        areaName: areas.get(circuit.areaId)?.name ?? '',
        description: describeCircuit(circuit.kind as CircuitKind, circuit.name, circuit.electrical, settings),
        openStops: circuit.openStops,
        parts: choices.parts ?? [],
        labourHours: choices.labourHours ?? '0',
      };
      return {
        ...source,
        sourceSha256: sha256(canonical({ ...source, openStops: 0, electrical: circuit.electrical })),
      };
    });
}

export interface SolvedCircuit {
  id: string;
  areaId: string;
  areaName: string;
  kind: CircuitKind;
  name: string;
  electrical: Record<string, unknown>;
  choices: CircuitChoices;
  engineInput: Record<string, unknown> | null;
  answer: Answer | null;
  openStops: number;
}

/** Every circuit of a job with what the server figured: what a wiring sheet is made from. */
export async function solvedCircuits(jobId: string): Promise<SolvedCircuit[]> {
  const areas = new Map((await Area.findAll({ where: { jobId } })).map((area) => [area.id, area.name]));
  const circuits = await Circuit.findAll({ where: { jobId, archivedAt: null } });
  return circuits.map((circuit) => ({
    id: circuit.id,
    areaId: circuit.areaId,
    areaName: areas.get(circuit.areaId) ?? '',
    kind: circuit.kind as CircuitKind,
    name: circuit.name,
    electrical: circuit.electrical,
    choices: circuit.choices as unknown as CircuitChoices,
    engineInput: circuit.engineInput,
    answer: circuit.answer as unknown as Answer | null,
    openStops: circuit.openStops,
  }));
}
