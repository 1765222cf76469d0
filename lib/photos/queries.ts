/** Photos of a job, without their bytes. Inside `withShop`, but for those that say so. */
import { select, withShop } from '@/lib/platform/db';
import { notFound } from '@/lib/platform/http/errors';
import { getFile } from '@/lib/platform/storage';

export interface PhotoRow {
  id: string;
  subjectType: string;
  subjectId: string;
  caption: string;
  capturedAt: Date | null;
  createdAt: Date;
}

export async function photosOfJob(jobId: string): Promise<PhotoRow[]> {
  return select<PhotoRow>(
    `select id, subject_type as "subjectType", subject_id as "subjectId", caption, captured_at as "capturedAt",
       created_at as "createdAt" from photos where job_id = $1 and archived_at is null order by created_at`,
    [jobId],
  );
}

export const loadPhotos = (shopId: string, jobId: string) => withShop(shopId, () => photosOfJob(jobId));

/** The picture itself, served only through this check. Opens the shop itself. */
export async function photoBytes(
  shopId: string,
  jobId: string,
  id: string,
): Promise<{ bytes: Uint8Array; contentType: string }> {
  const rows = await withShop(shopId, () =>
    select<{ sha256: string; contentType: string }>(
      `select f.sha256, f.content_type as "contentType" from photos p
       join files f on f.shop_id = p.shop_id and f.sha256 = p.file_sha256 where p.id = $1 and p.job_id = $2`,
      [id, jobId],
    ),
  );
  const file = rows[0];
  if (!file) throw notFound('This photo');
  return { bytes: await getFile(shopId, file.sha256), contentType: file.contentType };
}
