import { isId } from '@/lib/access/actor';
import { shopRoute } from '@/lib/access/route';
import { photoBytes } from '@/lib/photos/queries';
import { notFound } from '@/lib/platform/http/errors';

export const GET = shopRoute<{ shop: string; job: string; photo: string }>({
  name: 'photos.show',
  permission: 'work:edit',
  run: async ({ actor, params }) => {
    if (!isId(params.photo) || !isId(params.job)) throw notFound('This photo');
    const { bytes, contentType } = await photoBytes(actor.shopId, params.job, params.photo);
    return new Response(new Uint8Array(bytes), {
      headers: {
        'content-type': contentType,
        'cache-control': 'private, no-store',
        'x-content-type-options': 'nosniff',
      },
    });
  },
});
