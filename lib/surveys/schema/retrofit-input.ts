/** From a change line and what the survey knows to the retrofit check's input: the same in browser and server. */
import type { ShopSettings } from '@/lib/units/settings';
import type { LuminaireDatasheet } from '@/lib/parts/schema';
import type { ChangeLine, ExistingElectrical } from '../schema';

export interface RetrofitFacts {
  hazards: Record<string, unknown>;
  existing: {
    supplyVolts: number | null;
    watts: number;
    quantity: number;
    electrical: Record<string, unknown>;
  } | null;
  part: { kind: string; listed: boolean; datasheet: Record<string, unknown> } | null;
}

/** Parts whose datasheet is that of something that gives light. */
const LIGHTS = new Set(['luminaire', 'lamp', 'kit']);

const known = <K extends string, V>(key: K, value: V | null | undefined) =>
  value === null || value === undefined ? {} : ({ [key]: value } as Record<K, V>);

function existingOf({ existing }: RetrofitFacts): object | null {
  if (!existing) return null;
  const electrical = existing.electrical as unknown as ExistingElectrical;
  return {
    lampType: electrical.lampType,
    quantity: Math.round(existing.quantity),
    voltAmps: existing.watts,
    ballast: electrical.ballast,
    lampholder: electrical.lampholder,
  };
}

function productOf({ part }: RetrofitFacts): object | null {
  if (!part || !LIGHTS.has(part.kind)) return null;
  const sheet = part.datasheet as unknown as LuminaireDatasheet;
  // A tube that needs the ballast is not on the supply: its window is the ballast's business.
  const ballastFed = sheet.tubeType === 'A';
  return {
    listed: part.listed,
    ratedVoltsMin: ballastFed ? null : sheet.inputVoltsMin,
    ratedVoltsMax: ballastFed ? null : sheet.inputVoltsMax,
    voltAmps: sheet.voltAmps,
    watts: sheet.watts,
    tubeType: sheet.tubeType,
    fedEnd: sheet.fedEnd,
    dimming: sheet.dimming,
    ...known('unitsPerBreaker', sheet.unitsPerBreaker),
    ...known('unitsPerB16', sheet.unitsPerB16),
    ...known('inrushAmps', sheet.inrushAmps),
  };
}

/** What the survey calls a dimmer is the check's control; without one the luminaires are on a switch. */
function controlOf(electrical: ExistingElectrical): { kind: string } {
  return { kind: electrical.dimmer === 'none' ? 'switch' : electrical.dimmer };
}

export function retrofitInput(
  line: ChangeLine,
  facts: RetrofitFacts,
  settings: Pick<ShopSettings, 'basis'>,
): Record<string, unknown> {
  const electrical = (facts.existing?.electrical ?? null) as unknown as ExistingElectrical | null;
  return {
    basis: settings.basis,
    action: line.action,
    quantity: Math.round(line.newQuantity),
    supplyVolts: facts.existing?.supplyVolts ?? null,
    existing: existingOf(facts),
    product: productOf(facts),
    lampholdersReplaced: line.electrical.lampholdersReplaced,
    disconnectAdded: line.electrical.disconnectAdded,
    hazards: facts.hazards,
    ...(electrical
      ? {
          control: controlOf(electrical),
          emergency: {
            kind: electrical.emergency,
            feedAfter: line.electrical.emergencyFeedAfter,
            driverAfter: line.electrical.emergencyDriverAfter,
          },
          ...(electrical.breakerAmps === null ? {} : { breaker: { amps: electrical.breakerAmps } }),
        }
      : {}),
  };
}
