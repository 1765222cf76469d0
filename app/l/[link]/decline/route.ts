import { parseWith, readJson } from '@/lib/access/route';
import { customerRoute } from '@/lib/links/request';
import { declineQuote } from '@/lib/quotes/commands';
import { declineForm } from '@/lib/quotes/schema/forms';

export const POST = customerRoute<{ link: string }>({
  name: 'links.decline',
  write: true,
  run: async (call) => {
    const input = parseWith(declineForm, await readJson(call.request));
    return Response.json(await declineQuote(call.visit, input));
  },
});
