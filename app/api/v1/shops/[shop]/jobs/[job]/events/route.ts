import { parseWith, readJson, shopRoute } from '@/lib/access/route';
import { eventBatch } from '@/lib/offline/protocol';
import { applySurveyEvents } from '@/lib/surveys/commands';

/** Edits of a survey as phones send them; one answer per event. */
export const POST = shopRoute<{ shop: string; job: string }>({
  name: 'surveys.events',
  permission: 'work:edit',
  write: true,
  run: async ({ actor, params, request, json }) => {
    const batch = parseWith(eventBatch, await readJson(request, 1024 * 1024));
    return json({ answers: await applySurveyEvents(actor, params.job, batch.events) });
  },
});
