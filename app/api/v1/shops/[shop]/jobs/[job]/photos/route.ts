import { once, parseWith, readBytes, shopRoute } from '@/lib/access/route';
import { addPhoto, keepPhoto } from '@/lib/photos/commands';
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
  run: async (call) => {
    const { actor, params, request, json } = call;
    const query = parseWith(photoQuery, Object.fromEntries(new URL(request.url).searchParams));
    const kept = await keepPhoto(actor, params.job, await readBytes(request, PHOTO_MAX_BYTES + 1));
    const body = { ...query, job: params.job, sha256: kept.sha256 };
    return json(await once(call, 'photos.add', body, () => addPhoto(actor, params.job, query, kept)), 201);
  },
});
