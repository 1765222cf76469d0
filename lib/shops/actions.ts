'use server';
import { shopAction } from '@/lib/access/action';
import { saveShopSettings } from './commands';
import { type ShopSettingsForm, shopSettingsForm } from './schema';

const save = shopAction({
  name: 'shops.saveSettings',
  permission: 'settings:edit',
  schema: shopSettingsForm,
  run: saveShopSettings,
});

export async function saveSettings(
  shopId: string,
  input: ShopSettingsForm,
  meta?: { idempotencyKey?: string },
) {
  return save(shopId, input, meta);
}
