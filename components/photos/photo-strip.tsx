'use client';
/** Photos of one thing, taken by the camera or chosen; each says when it was taken. */
import { useCallback, useEffect, useId, useState } from 'react';
import { Notice } from '@/components/ui/sheet';
import { formatDateTime } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';

interface Photo {
  id: string;
  subjectId: string;
  capturedAt: string | null;
  createdAt: string;
}

interface Said {
  text: string;
  bad: boolean;
}

/** Phones keep this kind for themselves; asked for JPEG, most of them hand over a JPEG. */
const isHeic = (file: File) => /^image\/hei[cf]/.test(file.type) || /\.hei[cf]$/i.test(file.name);

export function PhotoStrip({
  base,
  subject,
  name,
  settings,
}: {
  /** `/api/v1/shops/…/jobs/…/photos` */
  base: string;
  subject: { type: 'area' | 'existing-luminaire' | 'circuit'; id: string };
  name: string;
  settings: ShopSettings;
}) {
  const id = useId();
  const [photos, setPhotos] = useState<Photo[]>([]);
  const [said, setSaid] = useState<Said | null>(null);
  const load = useCallback(async () => {
    const response = await fetch(base).catch(() => null);
    if (!response?.ok) return;
    const body = (await response.json()) as { photos: Photo[] };
    setPhotos(body.photos.filter((photo) => photo.subjectId === subject.id));
  }, [base, subject.id]);
  useEffect(() => {
    void Promise.resolve().then(load);
  }, [load]);
  const add = async (file: File | undefined) => {
    if (!file) return;
    if (isHeic(file)) {
      setSaid({
        text: `“${file.name}” is a HEIC picture. Set the camera to JPEG (“most compatible”), or save the picture as JPEG, and add that.`,
        bad: true,
      });
      return;
    }
    setSaid({ text: 'Sending the photo …', bad: false });
    const query = new URLSearchParams({ subjectType: subject.type, subjectId: subject.id });
    const response = await fetch(`${base}?${query}`, {
      method: 'POST',
      body: file,
      headers: { 'idempotency-key': crypto.randomUUID() },
    }).catch(() => null);
    if (response?.ok) {
      setSaid({ text: '✓ Photo kept.', bad: false });
      await load();
      return;
    }
    const body = response ? ((await response.json().catch(() => null)) as { title?: string } | null) : null;
    setSaid({
      text: body?.title ?? 'No signal: the photo is still on your phone; send it when there is one.',
      bad: true,
    });
  };
  return (
    <section aria-label={`Photos of ${name}`}>
      <h3 className="mb-2 text-xl">Photos</h3>
      {photos.length > 0 ? (
        <ul className="mb-3 flex flex-wrap gap-3">
          {photos.map((photo, index) => {
            const when = formatDateTime(photo.capturedAt ?? photo.createdAt, settings);
            return (
              <li key={photo.id} className="w-36">
                {/* Served through a check, never optimised by a shared cache. */}
                {/* eslint-disable-next-line @next/next/no-img-element */}
                <img
                  src={`${base}/${photo.id}`}
                  alt={`Photo ${index + 1} of ${name}`}
                  className="h-28 w-36 rounded-md border border-rule object-cover"
                />
                <p className="text-sm text-ink-2">
                  {photo.capturedAt ? 'taken' : 'sent'} {when}
                </p>
              </li>
            );
          })}
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
      {said ? (
        <div className="mt-3">
          {said.bad ? (
            <Notice kind="danger" word="Not kept" title={said.text} role="alert" />
          ) : (
            <p role="status">{said.text}</p>
          )}
        </div>
      ) : null}
    </section>
  );
}
