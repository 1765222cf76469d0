/** A photo: re-encoded without metadata, kept by its hash, with the time it was taken. */
import { Photo } from '@/models';
import { command } from '@/lib/access/command';
import type { Actor } from '@/lib/access/policy';
import { getJob } from '@/lib/jobs/queries';
import { run, withShop } from '@/lib/platform/db';
import { captureInstant, PHOTO_TYPES, putFile, sniffAndClean } from '@/lib/platform/storage';
import { getSettings } from '@/lib/shops/queries';
import { PHOTO_MAX_BYTES, type PhotoQuery } from './schema';

export interface KeptPhoto {
  sha256: string;
  contentType: string;
  bytes: number;
  capturedAt: Date | null;
}

/** Cleans and stores the file before any transaction: a row never points at a file that is not there. */
export async function keepPhoto(actor: Actor, jobId: string, bytes: Uint8Array): Promise<KeptPhoto> {
  const settings = await withShop(actor.shopId, async () => {
    await getJob(jobId);
    return getSettings(actor.shopId);
  });
  const clean = await sniffAndClean(bytes, { allow: PHOTO_TYPES, maxBytes: PHOTO_MAX_BYTES, field: 'photo' });
  const stored = await putFile({
    shopId: actor.shopId,
    bytes: clean.bytes,
    contentType: clean.contentType,
  });
  return {
    sha256: stored.sha256,
    contentType: clean.contentType,
    bytes: clean.bytes.byteLength,
    capturedAt: clean.capture ? captureInstant(clean.capture, settings.timeZone) : null,
  };
}

export async function addPhoto(
  actor: Actor,
  jobId: string,
  query: PhotoQuery,
  kept: KeptPhoto,
): Promise<{ id: string }> {
  return command(actor, async ({ audit, shopId }) => {
    await run(
      `insert into files (shop_id, sha256, content_type, bytes, captured_at) values ($1, $2, $3, $4, $5)
       on conflict (shop_id, sha256) do nothing returning id`,
      [shopId, kept.sha256, kept.contentType, kept.bytes, kept.capturedAt],
    );
    const row = await Photo.create({
      shopId,
      jobId,
      ...query,
      fileSha256: kept.sha256,
      capturedAt: kept.capturedAt,
      membershipId: actor.membershipId,
    });
    await audit('photo.added', { type: 'photo', id: row.id }, { after: { subject: query.subjectType } });
    return { id: row.id };
  });
}
