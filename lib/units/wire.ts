/** Conductor sizes: kept as the engine names them, shown and typed as the trade does. */
import { ALL_SIZES } from '@/lib/sizing/tables/conductors';
import { numberFrom, parsed, type Parsed, unread } from './parsed';
import type { ShopSettings } from './settings';

/** "AWG 12" as "12 AWG", "1.5 mm2" as "1.5 mm²". */
export function formatWireSize(size: string): string {
  const awg = /^AWG (.+)$/.exec(size);
  return awg ? `${awg[1]} AWG` : size.replace('mm2', 'mm²');
}

const known = (size: string): string | null => (ALL_SIZES.includes(size) ? size : null);

/** "12", "#12", "12 AWG", "AWG 1/0", "2.5", "2.5 mm2" as the engine's size; a bare number by the shop's basis. */
export function parseWireSize(text: string, settings: Pick<ShopSettings, 'basis'>): Parsed<string> {
  const clean = text.trim().toLowerCase().replace(/²/g, '2');
  const gauge = /^(?:awg|#|no\.?)?\s*(\d{1,2}|[1-4]\/0)\s*(?:awg|ga(?:uge)?)?$/.exec(clean)?.[1];
  const area = numberFrom(clean.replace(/\s*(?:sq\.?\s*mm|mm2|mm)$/, ''));
  const named = /[a-z#]/.test(clean) ? (/mm/.test(clean) ? 'iec' : 'us') : settings.basis;
  const size =
    named === 'us' || gauge?.includes('/')
      ? gauge && known(`AWG ${gauge}`)
      : area !== null && known(`${area} mm2`);
  return size ? parsed(size) : unread('Type a size such as 12 AWG or 2.5 mm².');
}
