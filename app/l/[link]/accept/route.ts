import { parseWith, readJson } from '@/lib/access/route';
import { customerRoute } from '@/lib/links/request';
import { acceptQuote } from '@/lib/quotes/commands';
import { acceptForm } from '@/lib/quotes/schema/forms';

export const POST = customerRoute<{ link: string }>({
  name: 'links.accept',
  write: true,
  run: async (call) => {
    const input = parseWith(acceptForm, await readJson(call.request));
    return Response.json(await acceptQuote(call.visit, input));
  },
});
