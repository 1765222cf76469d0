/** A shop's own row: who it is and what its figures and papers follow. */
import { Shop } from '@/models';
import { withShop } from '@/lib/platform/db';
import { notFound } from '@/lib/platform/http/errors';
import type { ShopSettings } from '@/lib/units/settings';
import type { ShopSettingsForm } from './schema';

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

/** The settings form as it is opened, with the version it is based on. */
export async function loadSettingsForm(shopId: string): Promise<ShopSettingsForm> {
  return withShop(shopId, async () => {
    const shop = await getShop(shopId);
    return {
      ...settingsOf(shop),
      currency: shop.currency as ShopSettingsForm['currency'],
      name: shop.name,
      licenceNumber: shop.licenceNumber,
      email: shop.email,
      phone: shop.phone,
      address: shop.address,
      taxName: shop.taxName,
      taxRatePct: String(Number(shop.taxRatePct)),
      depositPct: String(Number(shop.depositPct)),
      markupPct: String(Number(shop.markupPct)),
      labourRate: String(Number(shop.labourRate)),
      quoteValidDays: shop.quoteValidDays,
      benchWork: shop.benchWork,
      baseVersion: shop.version,
    };
  });
}
