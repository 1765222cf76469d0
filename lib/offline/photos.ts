/** Photos that were taken with no signal: kept whole on the device, sent one by one when there is one, each once. */
import type { OfflineStore } from './store';

/** Of one photo, as it comes from the camera: browser and server refuse more alike. */
export const PHOTO_MAX_BYTES = 20 * 1024 * 1024;

export interface QueuedPhoto {
  id: string;
  scope: string;
  subjectType: string;
  subjectId: string;
  blob: Blob;
  at: string;
  /** Why the server does not want it; it is kept until the person takes it out. */
  refusal?: string;
}

export async function addPhoto(
  store: OfflineStore,
  photo: Pick<QueuedPhoto, 'scope' | 'subjectType' | 'subjectId' | 'blob'>,
): Promise<void> {
  await store.photos.add({ ...photo, id: crypto.randomUUID(), at: new Date().toISOString() });
}

export const dropPhoto = (store: OfflineStore, id: string): Promise<void> => store.photos.delete(id);

const reasonOf = async (response: Response): Promise<string> => {
  const body = (await response.json().catch(() => null)) as { title?: string } | null;
  return body?.title ?? 'The server did not take this photo.';
};

/** Sends what waits. The photo's own id is its idempotency key: a repeat after a lost answer makes no second one. */
export async function sendPhotos(
  store: OfflineStore,
  scope: string,
  address: string,
  fetcher: typeof fetch = fetch,
): Promise<number> {
  let sent = 0;
  for (const photo of await store.photos.where({ scope }).sortBy('at')) {
    if (photo.refusal !== undefined) continue;
    const query = new URLSearchParams({ subjectType: photo.subjectType, subjectId: photo.subjectId });
    const response = await fetcher(`${address}?${query}`, {
      method: 'POST',
      body: photo.blob,
      headers: { 'idempotency-key': photo.id },
    }).catch(() => null);
    // No signal, signed out, or a server in trouble: it waits, and so do those after it.
    if (!response || response.status === 401 || response.status === 403 || response.status >= 500)
      return sent;
    if (response.ok) {
      await store.photos.delete(photo.id);
      sent++;
    } else await store.photos.update(photo.id, { refusal: await reasonOf(response) });
  }
  return sent;
}
