/** Files: uploads and PDFs in the object store, and what is made of an upload before it gets there. */
import { env, required } from '@/lib/platform/env';
import { createFileStore, type FileStore } from './client';

export type { FileStore, NewFile, StoreConfig, StoredObject } from './client';
export { createFileStore } from './client';
export { type Capture, captureInstant } from './exif';
export { type CleanFile, PHOTO_TYPES, PDF_TYPE, sniffAndClean, type SniffOptions } from './sniff';

let store: FileStore | undefined;

/** The store that the environment names. */
export function fileStore(): FileStore {
  store ??= createFileStore({
    endpoint: env().S3_ENDPOINT,
    region: env().S3_REGION,
    bucket: env().S3_BUCKET,
    accessKeyId: required('S3_ACCESS_KEY_ID'),
    secretAccessKey: required('S3_SECRET_ACCESS_KEY'),
  });
  return store;
}

export const putFile: FileStore['putFile'] = (file) => fileStore().putFile(file);
export const getFile: FileStore['getFile'] = (shopId, sha256) => fileStore().getFile(shopId, sha256);
export const headFile: FileStore['headFile'] = (shopId, sha256) => fileStore().headFile(shopId, sha256);
export const deleteFile: FileStore['deleteFile'] = (shopId, sha256) => fileStore().deleteFile(shopId, sha256);
