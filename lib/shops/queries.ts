/** A shop's own row: who it is and what its figures and papers follow. */
import { Shop } from '@/models';
import { withShop } from '@/lib/platform/db';
import { notFound } from '@/lib/platform/http/errors';
import type { ShopSettings } from '@/lib/units/settings';

export type ShopDetails = InstanceType<typeof Shop>;

/** Must run inside `withShop`. */
export async function getShop(shopId: string): Promise<ShopDetails> {
  const shop = await Shop.findByPk(shopId);
  if (!shop) throw notFound('The shop');
  return shop;
}

export function settingsOf(shop: ShopDetails): ShopSettings {
  return {
    basis: shop.basis,
    basisEdition: shop.basisEdition,
    units: shop.units,
    currency: shop.currency,
    locale: shop.locale === 'en-GB' ? 'en-GB' : 'en-US',
    timeZone: shop.timeZone,
    paper: shop.paper,
    taxRounding: shop.taxRounding,
  };
}

export async function getSettings(shopId: string): Promise<ShopSettings> {
  return settingsOf(await getShop(shopId));
}

/** For the head of a page. */
export async function shopName(shopId: string): Promise<string> {
  return withShop(shopId, async () => (await getShop(shopId)).name);
}
