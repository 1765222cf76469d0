import * as z from 'zod/mini';
import { Part, PartPrice } from '@/models';
import { type AnyActor, command } from '@/lib/access/command';
import { toIssues } from '@/lib/engine/run';
import { AppError, conflict, invalid, notFound } from '@/lib/platform/http/errors';
import { getSettings } from '@/lib/shops/queries';
import { findPart } from './queries';
import { DATASHEETS, type PartForm } from './schema';

function datasheetOf(input: PartForm): Record<string, unknown> {
  let typed: unknown;
  try {
    typed = JSON.parse(input.datasheet.trim() || '{}');
  } catch {
    throw invalid('datasheet', 'The datasheet figures are not complete: check commas, quotes and brackets.');
  }
  const parsed = z.safeParse(DATASHEETS[input.kind], typed);
  if (parsed.success) return parsed.data as Record<string, unknown>;
  const said = toIssues(parsed.error).map((issue) => `${issue.path || 'figures'} ${issue.message}`);
  throw new AppError('invalid-input', 'The datasheet figures need another look.', [
    { path: 'datasheet', message: said.join('; ') },
  ]);
}

/** A changed price is a new dated row: a quote that went out keeps the one it was figured with. */
async function addPrice(
  shopId: string,
  partId: string,
  unitCost: string,
  before: string | null,
): Promise<void> {
  if (before !== null && Number(before) === Number(unitCost)) return;
  await PartPrice.create({ shopId, partId, unitCost, currency: (await getSettings(shopId)).currency });
}

export async function savePart(actor: AnyActor, input: PartForm): Promise<{ id: string; version: number }> {
  const { id, baseVersion, unitCost, datasheet: _typed, ...plain } = input;
  const values = { ...plain, datasheet: datasheetOf(input) };
  return command(actor, async ({ audit, shopId }) => {
    if (await Part.findOne({ where: { sku: input.sku } }).then((other) => other !== null && other.id !== id))
      throw invalid('sku', 'Another part has this number.');
    if (id === undefined || baseVersion === undefined) {
      const row = await Part.create({ shopId, ...values });
      await addPrice(shopId, row.id, unitCost, null);
      await audit('part.created', { type: 'part', id: row.id }, { after: { sku: input.sku } });
      return { id: row.id, version: 1 };
    }
    const before = await findPart(id);
    if (!before) throw notFound('This part');
    const [changed] = await Part.update(
      { ...values, version: baseVersion + 1 },
      { where: { id, version: baseVersion } },
    );
    if (changed !== 1) throw conflict('Somebody else changed this part meanwhile. Both are shown.', before);
    await addPrice(shopId, id, unitCost, before.unitCost);
    await audit(
      'part.changed',
      { type: 'part', id },
      { before: { ...before }, after: { ...values, unitCost } },
    );
    return { id, version: baseVersion + 1 };
  });
}
