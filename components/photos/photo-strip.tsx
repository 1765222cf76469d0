'use client';
/** Photos of one thing, by the camera or chosen; kept on the device first, and sent when there is a signal. */
import { useLiveQuery } from 'dexie-react-hooks';
import { useCallback, useEffect, useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/sheet';
import { addPhoto, dropPhoto, PHOTO_MAX_BYTES, type QueuedPhoto } from '@/lib/offline/photos';
import type { OfflineStore } from '@/lib/offline/store';
import { formatDateTime } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';

interface Photo {
  id: string;
  subjectId: string;
  capturedAt: string | null;
  createdAt: string;
}

const FRAME = 'h-28 w-36 rounded-md border border-rule object-cover';

/** Phones keep this kind for themselves; asked for JPEG, most of them hand over a JPEG. */
const isHeic = (file: File) => /^image\/hei[cf]/.test(file.type) || /\.hei[cf]$/i.test(file.name);

/** Before anything is kept: what can be seen to be wrong with it. */
function objection(file: File): string | null {
  if (isHeic(file))
    return `“${file.name}” is a HEIC picture. Set the camera to JPEG (“most compatible”), or save the picture as JPEG, and add that.`;
  if (file.size > PHOTO_MAX_BYTES)
    return `“${file.name}” is larger than ${PHOTO_MAX_BYTES / 2 ** 20} MB: make it smaller, and add that.`;
  return null;
}

function Waiting({ photo, store, name }: { photo: QueuedPhoto; store: OfflineStore; name: string }) {
  const [address, setAddress] = useState('');
  useEffect(() => {
    const made = URL.createObjectURL(photo.blob);
    void Promise.resolve(made).then(setAddress);
    return () => URL.revokeObjectURL(made);
  }, [photo.blob]);
  if (photo.refusal !== undefined)
    return (
      <li className="basis-full">
        <Notice kind="danger" word="Not kept" title={photo.refusal} role="alert">
          <Button look="secondary" onClick={() => void dropPhoto(store, photo.id)}>
            Take it out
          </Button>
        </Notice>
      </li>
    );
  return (
    <li className="w-36">
      {/* From the device's own store. */}
      {/* eslint-disable-next-line @next/next/no-img-element */}
      {address ? <img src={address} alt={`Photo of ${name}, not sent yet`} className={FRAME} /> : null}
      <p className="text-sm text-ink-2">kept here, not sent yet</p>
    </li>
  );
}

export function PhotoStrip({
  base,
  store,
  scope,
  subject,
  name,
  settings,
}: {
  /** `/api/v1/shops/…/jobs/…/photos` */
  base: string;
  store: OfflineStore;
  scope: string;
  subject: { type: 'area' | 'existing-luminaire' | 'circuit'; id: string };
  name: string;
  settings: ShopSettings;
}) {
  const id = useId();
  const [photos, setPhotos] = useState<Photo[]>([]);
  const [wrong, setWrong] = useState<string | null>(null);
  const [added, setAdded] = useState(false);
  const waiting = useLiveQuery(
    () => store.photos.where({ scope, subjectId: subject.id }).sortBy('at'),
    [store, scope, subject.id],
  );
  const load = useCallback(async () => {
    const response = await fetch(base).catch(() => null);
    if (!response?.ok) return;
    const body = (await response.json()) as { photos: Photo[] };
    setPhotos(body.photos.filter((photo) => photo.subjectId === subject.id));
  }, [base, subject.id]);
  const pending = (waiting ?? []).filter((photo) => photo.refusal === undefined).length;
  // One that has gone from here is on the server now.
  useEffect(() => {
    void Promise.resolve().then(load);
  }, [load, pending]);
  const add = async (file: File | undefined) => {
    if (!file) return;
    const reason = objection(file);
    setWrong(reason);
    if (reason) return;
    setAdded(true);
    await addPhoto(store, { scope, subjectType: subject.type, subjectId: subject.id, blob: file });
  };
  return (
    <section aria-label={`Photos of ${name}`}>
      <h3 className="mb-2 text-xl">Photos</h3>
      {photos.length > 0 || (waiting ?? []).length > 0 ? (
        <ul className="mb-3 flex flex-wrap gap-3">
          {photos.map((photo, index) => (
            <li key={photo.id} className="w-36">
              {/* Served through a check, never optimised by a shared cache. */}
              {/* eslint-disable-next-line @next/next/no-img-element */}
              <img src={`${base}/${photo.id}`} alt={`Photo ${index + 1} of ${name}`} className={FRAME} />
              <p className="text-sm text-ink-2">
                {photo.capturedAt ? 'taken' : 'sent'}{' '}
                {formatDateTime(photo.capturedAt ?? photo.createdAt, settings)}
              </p>
            </li>
          ))}
          {(waiting ?? []).map((photo) => (
            <Waiting key={photo.id} photo={photo} store={store} name={name} />
          ))}
        </ul>
      ) : null}
      <label
        htmlFor={id}
        className="inline-flex min-h-touch items-center rounded-md border-2 border-ink px-4 font-bold has-focus-visible:outline-3 has-focus-visible:outline-measured"
      >
        Add a photo
        <input
          id={id}
          type="file"
          accept="image/jpeg,image/png,image/webp"
          capture="environment"
          className="sr-only"
          onChange={(event) => {
            void add(event.target.files?.[0]);
            event.target.value = '';
          }}
        />
      </label>
      {wrong ? (
        <div className="mt-3">
          <Notice kind="danger" word="Not kept" title={wrong} role="alert" />
        </div>
      ) : null}
      {added && pending === 0 && photos.length > 0 ? (
        <p role="status" className="mt-2">
          ✓ Photo kept.
        </p>
      ) : null}
    </section>
  );
}
