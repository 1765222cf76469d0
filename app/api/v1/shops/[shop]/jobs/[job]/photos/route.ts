import { parseWith, readBytes, shopRoute } from '@/lib/access/route';
import { addPhoto } from '@/lib/photos/commands';
import { loadPhotos } from '@/lib/photos/queries';
import { PHOTO_MAX_BYTES, photoQuery } from '@/lib/photos/schema';

type Params = { shop: string; job: string };

export const GET = shopRoute<Params>({
  name: 'photos.list',
  permission: 'work:edit',
  run: async ({ actor, params, json }) => json({ photos: await loadPhotos(actor.shopId, params.job) }),
});

/** The body is the file; what it shows stands in the address. */
export const POST = shopRoute<Params>({
  name: 'photos.add',
  permission: 'work:edit',
  write: true,
  run: async ({ actor, params, request, json }) => {
    const query = parseWith(photoQuery, Object.fromEntries(new URL(request.url).searchParams));
    return json(await addPhoto(actor, params.job, query, await readBytes(request, PHOTO_MAX_BYTES + 1)), 201);
  },
});
