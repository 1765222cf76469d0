/** What an upload is, by its content and not by its name; pictures leave here as new files without metadata. */
import { fileTypeFromBuffer } from 'file-type';
import { AppError } from '@/lib/platform/http/errors';
import { cleanPhoto } from './photo';
import type { Capture } from './exif';

export const PHOTO_TYPES = ['image/jpeg', 'image/png', 'image/webp'] as const;
export const PDF_TYPE = 'application/pdf';

export interface SniffOptions {
  /** Media types that are wanted here. */
  allow: readonly string[];
  maxBytes: number;
  /** The field that an error names. */
  field?: string;
}

export interface CleanFile {
  bytes: Uint8Array;
  contentType: string;
  /** Of pictures only. */
  width?: number;
  height?: number;
  capture: Capture | null;
}

const NAMES: Record<string, string> = {
  'image/jpeg': 'JPEG',
  'image/png': 'PNG',
  'image/webp': 'WebP',
  'application/pdf': 'PDF',
  'text/csv': 'CSV',
};
const HEIC = /^image\/hei[cf]/;

const nameOf = (type: string) => NAMES[type] ?? type;

function listOf(types: readonly string[]): string {
  const names = types.map(nameOf);
  const last = names.at(-1) ?? '';
  return names.length < 2 ? last : `${names.slice(0, -1).join(', ')} or ${last}`;
}

const mebibytes = (bytes: number) => `${(bytes / 1_048_576).toFixed(1).replace(/\.0$/, '')} MB`;

function refusal(detected: string | undefined, { allow }: SniffOptions): string {
  if (detected && HEIC.test(detected))
    return 'This photo is in the HEIC format, which can not be read here. Set the camera to JPEG (often called "most compatible"), or send a JPEG copy of it.';
  const what = detected ? `This file is ${nameOf(detected)}` : 'What this file is can not be told';
  return `${what}; ${listOf(allow)} can be used here.`;
}

/** @throws {AppError} `invalid-input` or `too-large`, naming the field, in a sentence for whoever sent the file */
export async function sniffAndClean(bytes: Uint8Array, options: SniffOptions): Promise<CleanFile> {
  const path = options.field ?? 'file';
  const refuse = (message: string, code: 'invalid-input' | 'too-large' = 'invalid-input') =>
    new AppError(code, message, [{ path, message }]);
  if (bytes.byteLength === 0) throw refuse('The file is empty.');
  if (bytes.byteLength > options.maxBytes)
    throw refuse(
      `The file has ${mebibytes(bytes.byteLength)}; up to ${mebibytes(options.maxBytes)} can be sent.`,
      'too-large',
    );
  const detected = (await fileTypeFromBuffer(bytes))?.mime;
  if (detected === undefined || !options.allow.includes(detected)) throw refuse(refusal(detected, options));
  // Every picture is written anew; what can't be is not passed through.
  if (!detected.startsWith('image/')) return { bytes, contentType: detected, capture: null };
  const photo = await cleanPhoto(bytes);
  if ('problem' in photo) throw refuse(photo.problem);
  return photo;
}
