/**
 * When a photo was taken, from its EXIF block. Everything else in there (place, device, owner) is dropped with it.
 * Tags as in CIPA DC-008 (Exif 2.32), table 4 and 8: 0x8769 Exif IFD, 0x9003 DateTimeOriginal,
 * 0x9011 OffsetTimeOriginal, 0x0132 DateTime; the layout is that of TIFF 6.0, section 2.
 */
import { TZDate } from '@date-fns/tz';

export interface Capture {
  /** As the camera's clock showed it: `2026-11-30T14:05:07`. */
  local: string;
  /** `+02:00` where the camera wrote it. */
  offset: string | null;
}

const EXIF_IFD = 0x8769;
const DATE_TIME = 0x0132;
const DATE_TIME_ORIGINAL = 0x9003;
const OFFSET_TIME_ORIGINAL = 0x9011;
const ASCII = 2;
const LONG = 4;
const ENTRY_BYTES = 12;

interface Tiff {
  view: DataView;
  little: boolean;
}

type Entries = Map<number, { type: number; count: number; at: number }>;

/** @throws {RangeError} when an offset points outside, which DataView sees to */
function entriesAt({ view, little }: Tiff, offset: number): Entries {
  const entries: Entries = new Map();
  const count = view.getUint16(offset, little);
  for (let index = 0; index < count; index += 1) {
    const at = offset + 2 + index * ENTRY_BYTES;
    const type = view.getUint16(at + 2, little);
    entries.set(view.getUint16(at, little), { type, count: view.getUint32(at + 4, little), at: at + 8 });
  }
  return entries;
}

function textOf({ view, little }: Tiff, entries: Entries, tag: number): string | null {
  const entry = entries.get(tag);
  if (entry?.type !== ASCII || entry.count > 64) return null;
  // Up to four bytes stand in the entry itself.
  const start = entry.count <= 4 ? entry.at : view.getUint32(entry.at, little);
  const codes = Array.from({ length: entry.count }, (_, index) => view.getUint8(start + index));
  return String.fromCharCode(...codes)
    .replace(/\0.*$/s, '')
    .trim();
}

function tiffOf(exif: Uint8Array): Tiff | null {
  const marker = String.fromCharCode(...exif.subarray(0, 6)) === 'Exif\0\0';
  const bytes = marker ? exif.subarray(6) : exif;
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const order = view.getUint16(0);
  if (order !== 0x4949 && order !== 0x4d4d) return null;
  const tiff = { view, little: order === 0x4949 };
  return view.getUint16(2, tiff.little) === 42 ? tiff : null;
}

/** `2026:11:30 14:05:07`; a camera without a set clock writes zeros or blanks. */
function localTime(text: string | null): string | null {
  const match = /^(\d{4}):(\d{2}):(\d{2}) (\d{2}):(\d{2}):(\d{2})$/.exec(text ?? '');
  if (!match) return null;
  const [, year, month, day, hour, minute, second] = match;
  const local = `${year}-${month}-${day}T${hour}:${minute}:${second}`;
  const date = new Date(`${local}Z`);
  const real = !Number.isNaN(date.getTime()) && date.toISOString().startsWith(local);
  return real && date.getUTCFullYear() >= 1990 ? local : null;
}

function read(exif: Uint8Array): Capture | null {
  const tiff = tiffOf(exif);
  if (!tiff) return null;
  const main = entriesAt(tiff, tiff.view.getUint32(4, tiff.little));
  const pointer = main.get(EXIF_IFD);
  const own: Entries =
    pointer?.type === LONG ? entriesAt(tiff, tiff.view.getUint32(pointer.at, tiff.little)) : new Map();
  const taken = localTime(textOf(tiff, own, DATE_TIME_ORIGINAL));
  const local = taken ?? localTime(textOf(tiff, main, DATE_TIME));
  const offset = taken ? textOf(tiff, own, OFFSET_TIME_ORIGINAL) : null;
  if (local === null) return null;
  return { local, offset: offset && /^[+-](0\d|1[0-4]):[0-5]\d$/.test(offset) ? offset : null };
}

/** @returns null when the block holds no time, or is not to be trusted */
export function captureOf(exif: Uint8Array | undefined): Capture | null {
  try {
    return exif ? read(exif) : null;
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

/** The moment itself. Where the camera wrote no offset, its clock is taken to be the shop's. */
export function captureInstant({ local, offset }: Capture, timeZone: string): Date {
  if (offset) return new Date(`${local}${offset}`);
  const [year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0] = local.split(/\D/).map(Number);
  return new Date(new TZDate(year, month - 1, day, hour, minute, second, timeZone).getTime());
}
