import { parseWith, readJson, shopRoute } from '@/lib/access/route';
import { eventBatch } from '@/lib/offline/protocol';
import { applySheetEvents } from '@/lib/wiring/commands';

/** What the crew did, as phones send it; one answer per event. */
export const POST = shopRoute<{ shop: string; sheet: string }>({
  name: 'wiring.events',
  permission: 'sheet:write',
  write: true,
  run: async ({ actor, params, request, json }) => {
    const batch = parseWith(eventBatch, await readJson(request, 512 * 1024));
    return json({ answers: await applySheetEvents(actor, params.sheet, batch.events) });
  },
});
