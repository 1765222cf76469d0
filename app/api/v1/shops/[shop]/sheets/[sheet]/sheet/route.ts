import { shopRoute, unlessKnown } from '@/lib/access/route';
import { loadSheet } from '@/lib/wiring/queries';

/** All that a phone needs to go on with this sheet without a signal. No cost, no price. */
export const GET = shopRoute<{ shop: string; sheet: string }>({
  name: 'wiring.sheet',
  permission: 'sheet:write',
  run: async ({ actor, params, request, json }) => {
    const { takenAt, ...sheet } = await loadSheet(actor, params.sheet);
    return unlessKnown(request, sheet, () => json({ ...sheet, takenAt }));
  },
});
