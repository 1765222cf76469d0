/** From a change line and what the survey knows to the retrofit check's input: the same in browser and server. */
import type { ShopSettings } from '@/lib/units/settings';
import type { ChangeLine } from '../schema';

export interface RetrofitFacts {
  existing: {
    supplyVolts: number | null;
    watts: number;
    quantity: number;
    electrical: Record<string, unknown>;
  } | null;
  part: { kind: string; listed: boolean; datasheet: Record<string, unknown> } | null;
}

export function retrofitInput(
  line: ChangeLine,
  facts: RetrofitFacts,
  settings: ShopSettings,
): Record<string, unknown> {
  return {
    basis: settings.basis,
    action: line.action,
    ...line.electrical,
    quantity: facts.existing?.quantity ?? line.newQuantity,
  };
}
