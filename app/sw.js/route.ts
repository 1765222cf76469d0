import { serviceWorker } from '@/lib/offline/service-worker';
import { BUILD } from '@/lib/platform/env';

/** Asked for again at every visit: a new build is a new worker. */
export function GET(): Response {
  // While developing, files change under their names: nothing may be kept.
  if (!BUILD) return new Response(null, { status: 404 });
  return new Response(`(${serviceWorker.toString()})(self, ${JSON.stringify(BUILD)});\n`, {
    headers: { 'content-type': 'text/javascript; charset=utf-8', 'cache-control': 'no-cache' },
  });
}
