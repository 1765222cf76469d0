/** A change line on an existing circuit goes through the engine's retrofit check. */
import { Area, ExistingLuminaire, Part } from '@/models';
import { type Answer, EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { retrofitCheckCalculation } from '@/lib/sizing/retrofit-check';
import { currentShopId } from '@/lib/platform/db';
import { getSettings } from '@/lib/shops/queries';
import { type RetrofitFacts, retrofitInput } from './schema/retrofit-input';
import type { ChangeLine } from './schema';

async function factsOf(line: ChangeLine): Promise<RetrofitFacts> {
  const existing = line.existingLuminaireId
    ? await ExistingLuminaire.findOne({ where: { id: line.existingLuminaireId } })
    : null;
  const part = line.newPartId ? await Part.findOne({ where: { id: line.newPartId } }) : null;
  const area = await Area.findOne({ where: { id: line.areaId } });
  return {
    hazards: area?.hazards ?? {},
    existing: existing
      ? {
          supplyVolts: existing.supplyVolts === null ? null : Number(existing.supplyVolts),
          watts: Number(existing.watts),
          quantity: Number(existing.quantity),
          electrical: existing.electrical,
        }
      : null,
    part: part ? { kind: part.kind, listed: part.listed, datasheet: part.datasheet } : null,
  };
}

/**
 * @returns null where nothing is to be checked (the line has a circuit of its own, or leaves things as they are);
 * `answer` null where the check could not be made.
 */
export async function checkChangeLine(
  line: ChangeLine,
): Promise<{ engineInput: Record<string, unknown>; answer: Answer | null } | null> {
  if (line.circuitId !== null) return null;
  const engineInput = retrofitInput(line, await factsOf(line), await getSettings(currentShopId()));
  try {
    return { engineInput, answer: runCalculation(retrofitCheckCalculation, engineInput) };
  } catch (error) {
    if (error instanceof EngineError) return { engineInput, answer: null };
    throw error;
  }
}
