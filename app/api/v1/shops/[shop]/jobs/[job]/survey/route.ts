import { shopRoute, unlessKnown } from '@/lib/access/route';
import { loadSurvey } from '@/lib/surveys/queries';

/** All that a phone needs to go on with this survey without a signal. No cost, no price. */
export const GET = shopRoute<{ shop: string; job: string }>({
  name: 'surveys.snapshot',
  permission: 'work:edit',
  run: async ({ actor, params, request, json }) => {
    const { takenAt, ...survey } = await loadSurvey(actor.shopId, params.job);
    return unlessKnown(request, survey, () => json({ ...survey, takenAt }));
  },
});
