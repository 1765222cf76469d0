/** Changing a shop's settings. */
import { Shop } from '@/models';
import type { Actor } from '@/lib/access/policy';
import { command } from '@/lib/access/command';
import { conflict } from '@/lib/platform/http/errors';
import { getShop } from './queries';
import type { ShopSettingsInput } from './schema';

export async function saveShopSettings(actor: Actor, input: ShopSettingsInput): Promise<{ version: number }> {
  return command(actor, async ({ audit }) => {
    const { baseVersion, taxRatePct, depositPct, markupPct, labourRate, ...plain } = input;
    const before = (await getShop(actor.shopId)).get({ plain: true });
    const after = {
      ...plain,
      taxRatePct: String(taxRatePct),
      depositPct: String(depositPct),
      markupPct: String(markupPct),
      labourRate: String(labourRate),
    };
    const [changed] = await Shop.update(
      { ...after, version: baseVersion + 1 },
      { where: { id: actor.shopId, version: baseVersion } },
    );
    if (changed !== 1)
      throw conflict('Somebody else changed these settings meanwhile. Both are shown.', before);
    await audit('shop.settings-changed', { type: 'shop', id: actor.shopId }, { before, after });
    return { version: baseVersion + 1 };
  });
}
