/** The beacon of a page that somebody can see. */
import { parseWith, readJson } from '@/lib/access/route';
import { customerRoute } from '@/lib/links/request';
import { markOpened } from '@/lib/quotes/commands';
import { openedForm } from '@/lib/quotes/schema/forms';

export const POST = customerRoute<{ link: string }>({
  name: 'links.opened',
  write: true,
  run: async (call) => {
    const { documentId } = parseWith(openedForm, await readJson(call.request));
    return Response.json(await markOpened(call.visit, documentId));
  },
});
