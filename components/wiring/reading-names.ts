/** A reading's name, and the unit in which a meter shows it. Used by the crew's screen and the desk's table. */
import { message, type MessageKey } from '@/lib/messages';
import type { ShopSettings } from '@/lib/units/settings';
import type { ExpectedReading } from '@/lib/wiring/schema/sheet';

/** Of several of one kind each is numbered. */
export function readingName(
  reading: ExpectedReading,
  among: readonly ExpectedReading[],
  settings: ShopSettings,
): string {
  const several = among.filter((one) => one.kind === reading.kind).length > 1;
  const key = `wiring.reading.${reading.kind}${several ? '-of' : ''}` as MessageKey;
  return message(key, { index: reading.index }, settings);
}

/** Currents under an ampere are read in milliamperes. */
export function scaleOf(reading: Pick<ExpectedReading, 'unit' | 'high'>): {
  factor: number;
  unit: string;
  decimals: number;
} {
  if (reading.unit === 'A' && reading.high < 1) return { factor: 1000, unit: 'mA', decimals: 1 };
  return { factor: 1, unit: reading.unit, decimals: 2 };
}
