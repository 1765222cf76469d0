import { answer } from '@/lib/access/route';
import { openLink } from '@/lib/links/request';

export const dynamic = 'force-dynamic';

export function GET(_request: Request, context: { params: Promise<{ token: string }> }): Promise<Response> {
  return answer('links.open', async () => openLink((await context.params).token));
}
