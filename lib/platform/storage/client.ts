/** Files in an object store, keyed by shop and content. */
import { createHash } from 'node:crypto';
import {
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  PutObjectCommand,
  S3Client,
} from '@aws-sdk/client-s3';
import { getSignedUrl } from '@aws-sdk/s3-request-presigner';
import { AppError, notFound } from '@/lib/platform/http/errors';
import { log } from '@/lib/platform/log';

export interface StoreConfig {
  /** Without one, the region's own address. */
  endpoint?: string | undefined;
  region: string;
  bucket: string;
  accessKeyId: string;
  secretAccessKey: string;
}

export interface StoredObject {
  sha256: string;
  bytes: number;
  contentType: string;
}

export interface NewFile {
  shopId: string;
  bytes: Uint8Array;
  contentType: string;
}

export interface FileStore {
  /** The same content of a shop is one object, however often it is put. */
  putFile(file: NewFile): Promise<StoredObject>;
  /** @throws {AppError} `not-found`; `unexpected` when what was kept is no longer what was put */
  getFile(shopId: string, sha256: string): Promise<Uint8Array>;
  headFile(shopId: string, sha256: string): Promise<StoredObject | null>;
  /** Nothing happens when it is gone already. */
  deleteFile(shopId: string, sha256: string): Promise<void>;
  /** An address that reads this one file for a while; whoever holds it may. */
  presignFile(shopId: string, sha256: string, seconds: number): Promise<string>;
}

const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;
const SHA256 = /^[0-9a-f]{64}$/;

/** @throws {AppError} `not-found` for what can't be a key: nothing else ever gets into an address. */
function keyOf(shopId: string, sha256: string): string {
  if (!UUID.test(shopId) || !SHA256.test(sha256)) throw notFound('This file');
  return `${shopId.toLowerCase()}/${sha256}`;
}

const hashOf = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');

interface ServiceError {
  name?: string;
  message?: string;
  $metadata?: { httpStatusCode?: number; requestId?: string };
}

const isMissing = (error: unknown) => (error as ServiceError | null)?.$metadata?.httpStatusCode === 404;

/** Maps what the SDK threw; details go to the log alone. */
function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  if (isMissing(error)) return notFound('This file');
  const { name, message, $metadata } = (error ?? {}) as ServiceError;
  log().warn({ name, reason: message, status: $metadata?.httpStatusCode }, 'file store');
  return new AppError('unavailable', 'The file store can not be reached. Try again in a minute.');
}

async function ask<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    throw toAppError(error);
  }
}

function clientOf({ endpoint, region, accessKeyId, secretAccessKey }: StoreConfig): S3Client {
  return new S3Client({
    region,
    credentials: { accessKeyId, secretAccessKey },
    forcePathStyle: endpoint !== undefined,
    ...(endpoint === undefined ? {} : { endpoint }),
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    maxAttempts: 3,
    requestHandler: { connectionTimeout: 5_000, requestTimeout: 30_000 },
  });
}

export function createFileStore(config: StoreConfig): FileStore {
  const client = clientOf(config);
  const at = (shopId: string, sha256: string) => ({ Bucket: config.bucket, Key: keyOf(shopId, sha256) });

  const headFile = (shopId: string, sha256: string) =>
    ask(async () => {
      try {
        const head = await client.send(new HeadObjectCommand(at(shopId, sha256)));
        const contentType = head.ContentType ?? 'application/octet-stream';
        return { sha256, bytes: head.ContentLength ?? 0, contentType };
      } catch (error) {
        if (isMissing(error)) return null;
        throw error;
      }
    });

  return {
    headFile,
    putFile: ({ shopId, bytes, contentType }) =>
      ask(async () => {
        const sha256 = hashOf(bytes);
        const known = await headFile(shopId, sha256);
        if (known?.bytes === bytes.byteLength) return known;
        const body = { Body: bytes, ContentType: contentType, ContentLength: bytes.byteLength };
        await client.send(new PutObjectCommand({ ...at(shopId, sha256), ...body }));
        return { sha256, bytes: bytes.byteLength, contentType };
      }),
    getFile: (shopId, sha256) =>
      ask(async () => {
        const { Body } = await client.send(new GetObjectCommand(at(shopId, sha256)));
        const bytes = await Body?.transformToByteArray();
        if (!bytes) throw notFound('This file');
        if (hashOf(bytes) === sha256) return bytes;
        log().error({ shopId, sha256 }, 'a stored file has changed');
        throw new AppError('unexpected', 'This file is damaged in the store, so it is not shown.');
      }),
    deleteFile: (shopId, sha256) =>
      ask(async () => void (await client.send(new DeleteObjectCommand(at(shopId, sha256))))),
    presignFile: (shopId, sha256, seconds) =>
      ask(() => getSignedUrl(client, new GetObjectCommand(at(shopId, sha256)), { expiresIn: seconds })),
  };
}
