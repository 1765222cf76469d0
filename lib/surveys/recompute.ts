/** The server figures again whatever is saved: its figures are the stored ones. */
import { currentShopId, select } from '@/lib/platform/db';
import { billOf } from '@/lib/circuits/schema/bill';
import type { CircuitKind } from '@/lib/circuits/schema/electrical';
import { figureCircuit } from '@/lib/circuits/schema/figure';
import type { Answer, Finding } from '@/lib/engine/contract';
import { AppError } from '@/lib/platform/http/errors';
import { partFigures } from '@/lib/parts/queries';
import { getShop, settingsOf } from '@/lib/shops/queries';
import { checkChangeLine } from './retrofit';
import type { ChangeLine, CircuitBody, Collection } from './schema';

async function overridden(subjectType: 'circuit' | 'change-line', id: string): Promise<Set<string>> {
  const rows = await select<{ code: string }>(
    'select code from finding_overrides where subject_type = $1 and subject_id = $2',
    [subjectType, id],
  );
  return new Set(rows.map((row) => row.code));
}

/** Hard stops are never overridden, whatever is on file. */
export function countOpenStops(findings: readonly Finding[], known: ReadonlySet<string>): number {
  return findings.filter(
    (finding) => finding.severity === 'stop' && (finding.hard || !known.has(finding.code)),
  ).length;
}

interface Figures {
  engineInput: Record<string, unknown> | null;
  answer: Answer | null;
  answeredAt: Date | null;
  openStops: number;
}

/** A circuit that can't be figured counts as one open stop: it can't be quoted either. */
const UNFIGURED: Figures = { engineInput: null, answer: null, answeredAt: null, openStops: 1 };

async function figuresOfCircuit(id: string, body: CircuitBody): Promise<Record<string, unknown>> {
  const shop = await getShop(currentShopId());
  if (body.kind === 'resistor-array' && !shop.benchWork)
    throw new AppError('invalid-input', 'Bench work is switched off in this shop.', [
      { path: 'kind', message: 'bench work is switched off in this shop' },
    ]);
  const kind: CircuitKind = body.kind;
  const figured = figureCircuit(kind, body.electrical, settingsOf(shop));
  const strings =
    figured.ok && kind === 'resistor-array'
      ? (figured.answer.result as { strings: unknown[] | null }).strings?.length
      : undefined;
  const bill =
    figured.ok || figured.code !== 'invalid-input'
      ? billOf(kind, body.electrical, body.choices.roles, await partFigures(), strings)
      : { parts: [], labourHours: '0' };
  const choices = { roles: body.choices.roles, ...bill };
  if (!figured.ok) return { ...UNFIGURED, choices };
  const openStops = countOpenStops(figured.answer.findings, await overridden('circuit', id));
  return {
    engineInput: figured.engineInput,
    answer: figured.answer,
    answeredAt: new Date(),
    openStops,
    choices,
  };
}

async function figuresOfChangeLine(id: string, body: ChangeLine): Promise<Record<string, unknown>> {
  const checked = await checkChangeLine(body);
  if (!checked) return { engineInput: null, answer: null, answeredAt: null, openStops: 0 };
  if (!checked.answer) return { ...UNFIGURED };
  const openStops = countOpenStops(checked.answer.findings, await overridden('change-line', id));
  return { engineInput: checked.engineInput, answer: checked.answer, answeredAt: new Date(), openStops };
}

/** Columns that only the server writes, for what has been put. */
export async function serverFigures(
  collection: Collection,
  id: string,
  body: unknown,
): Promise<Record<string, unknown>> {
  if (collection === 'circuits') return figuresOfCircuit(id, body as CircuitBody);
  if (collection === 'change-lines') return figuresOfChangeLine(id, body as ChangeLine);
  return {};
}
