/** What an upload is told to be, and what is left of a photo. */
import { deflateSync } from 'node:zlib';
import sharp, { type Exif } from 'sharp';
import { describe, expect, test } from 'vitest';
import { captureInstant, PDF_TYPE, PHOTO_TYPES, sniffAndClean } from '@/lib/platform/storage';
import { captureOf } from '@/lib/platform/storage/exif';

const MANY = 10_000_000;
const photos = { allow: PHOTO_TYPES, maxBytes: MANY };

const EXIF = {
  IFD0: { Make: 'Camera of the test', Artist: 'Ada Holder', DateTime: '2026:12:01 09:00:00' },
  IFD2: { DateTimeOriginal: '2026:11:30 14:05:07', OffsetTimeOriginal: '-05:00' },
  IFD3: {
    GPSLatitudeRef: 'N',
    GPSLatitude: '48/1 51/1 2952/100',
    GPSLongitudeRef: 'E',
    GPSLongitude: '2/1 17/1 40/1',
  },
};

const plain = (width = 60, height = 40) =>
  sharp({ create: { width, height, channels: 3, background: { r: 200, g: 120, b: 20 } } });

const photo = (exif: Exif = EXIF) => plain().withExif(exif).jpeg().toBuffer();

async function refusal(work: Promise<unknown>): Promise<{ code: string; message: string; issues: unknown }> {
  return work.then(
    () => Promise.reject(new Error('it was taken')),
    (error: unknown) => error as { code: string; message: string; issues: unknown },
  );
}

describe('photos', () => {
  test('lose place, device and owner, and keep when they were taken', async () => {
    const original = await photo();
    const before = await sharp(original).metadata();
    expect(before.exif?.includes('Camera of the test')).toBe(true);
    // The tag that leads to the block of the place, in either order of bytes.
    const place = [Buffer.from([0x25, 0x88]), Buffer.from([0x88, 0x25])];
    expect(place.some((tag) => before.exif?.includes(tag))).toBe(true);
    const clean = await sniffAndClean(original, photos);
    expect(clean).toMatchObject({
      contentType: 'image/jpeg',
      width: 60,
      height: 40,
      capture: { local: '2026-11-30T14:05:07', offset: '-05:00' },
    });
    const after = await sharp(clean.bytes).metadata();
    expect([after.exif, after.xmp, after.iptc, after.comments]).toEqual([
      undefined,
      undefined,
      undefined,
      undefined,
    ]);
    for (const word of ['Camera of the test', 'Ada Holder', 'Exif', '2026'])
      expect(Buffer.from(clean.bytes).includes(word)).toBe(false);
  });

  test('are turned upright, since what said so is gone', async () => {
    const sideways = await plain(60, 40).withMetadata({ orientation: 6 }).jpeg().toBuffer();
    expect(await sniffAndClean(sideways, photos)).toMatchObject({ width: 40, height: 60 });
  });

  test.each(['png', 'webp'] as const)('of the kind %s keep their kind', async (kind) => {
    const bytes = await plain().withExif(EXIF).toFormat(kind).toBuffer();
    const clean = await sniffAndClean(bytes, photos);
    expect(clean.contentType).toBe(`image/${kind}`);
    expect((await sharp(clean.bytes).metadata()).exif).toBeUndefined();
  });

  test('of great size are made smaller, in proportion', async () => {
    const wide = await plain(8_000, 1_000).png().toBuffer();
    expect(await sniffAndClean(wide, photos)).toMatchObject({ width: 4_096, height: 512 });
  });

  test('come out the same each time, so that a second sending is the same file', async () => {
    const original = await photo();
    const [first, second] = [await sniffAndClean(original, photos), await sniffAndClean(original, photos)];
    expect(Buffer.from(first.bytes).equals(second.bytes)).toBe(true);
  });
});

/** A PNG that says it is huge; its one row of data is short. */
function bomb(width: number, height: number): Buffer {
  const chunk = (type: string, data: Buffer) => {
    const body = Buffer.concat([Buffer.from(type), data]);
    const frame = Buffer.alloc(body.length + 8);
    frame.writeUInt32BE(data.length, 0);
    body.copy(frame, 4);
    frame.writeUInt32BE(crc32(body), body.length + 4);
    return frame;
  };
  const header = Buffer.alloc(13);
  header.writeUInt32BE(width, 0);
  header.writeUInt32BE(height, 4);
  header.set([1, 0, 0, 0, 0], 8);
  const data = deflateSync(Buffer.alloc(1_000_000));
  const signature = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);
  return Buffer.concat([
    signature,
    chunk('IHDR', header),
    chunk('IDAT', data),
    chunk('IEND', Buffer.alloc(0)),
  ]);
}

/** ISO 3309, as PNG wants it. */
function crc32(bytes: Buffer): number {
  let crc = 0xffffffff;
  for (const byte of bytes) {
    crc ^= byte;
    for (let bit = 0; bit < 8; bit += 1) crc = crc & 1 ? (crc >>> 1) ^ 0xedb88320 : crc >>> 1;
  }
  return (crc ^ 0xffffffff) >>> 0;
}

describe('what is refused, in words', () => {
  test('HEIC, with what to do', async () => {
    const heic = Buffer.concat([
      Buffer.from([0, 0, 0, 24]),
      Buffer.from('ftypheic\0\0\0\0mif1heic'),
      Buffer.alloc(64),
    ]);
    const error = await refusal(sniffAndClean(heic, photos));
    expect(error.code).toBe('invalid-input');
    expect(error.message).toContain('HEIC');
    expect(error.message).toContain('Set the camera to JPEG');
  });

  test('a photo that is none', async () => {
    const error = await refusal(sniffAndClean(Buffer.from('not a photo, whatever its name says'), photos));
    expect(error.message).toBe('What this file is can not be told; JPEG, PNG or WebP can be used here.');
    expect(error.issues).toEqual([{ path: 'file', message: error.message }]);
  });

  test('a document where a photo is wanted, and markup with a script in it', async () => {
    const pdf = Buffer.from('%PDF-1.7\n%\n');
    expect((await refusal(sniffAndClean(pdf, photos))).message).toBe(
      'This file is PDF; JPEG, PNG or WebP can be used here.',
    );
    const svg = Buffer.from('<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg"><script/></svg>');
    await refusal(sniffAndClean(svg, photos));
  });

  test('a picture that was cut off on its way', async () => {
    const whole = await plain(800, 600).jpeg().toBuffer();
    const error = await refusal(sniffAndClean(whole.subarray(0, whole.length / 2), photos));
    expect(error.message).toContain('cut off on its way');
  });

  test('the head of a picture with rubbish behind it', async () => {
    const head = Buffer.from([0xff, 0xd8, 0xff, 0xe0]);
    const error = await refusal(sniffAndClean(Buffer.concat([head, Buffer.alloc(500, 7)]), photos));
    expect(error.code).toBe('invalid-input');
  });

  test('a small file that unfolds to gigabytes, without unfolding it', async () => {
    const small = bomb(60_000, 60_000);
    expect(small.length).toBeLessThan(5_000);
    const before = Date.now();
    const error = await refusal(sniffAndClean(small, photos));
    expect(error.message).toBe('This picture has 3600 million pixels; up to 110 million can be used.');
    expect(Date.now() - before).toBeLessThan(2_000);
  });

  test('too many bytes, and none', async () => {
    const options = { ...photos, maxBytes: 1_048_576, field: 'photo' };
    const large = await refusal(sniffAndClean(Buffer.alloc(1_600_000), options));
    expect(large).toMatchObject({
      code: 'too-large',
      message: 'The file has 1.5 MB; up to 1 MB can be sent.',
    });
    expect(large.issues).toEqual([{ path: 'photo', message: large.message }]);
    expect((await refusal(sniffAndClean(Buffer.alloc(0), options))).message).toBe('The file is empty.');
  });
});

test('a PDF passes as it is, by its content', async () => {
  const pdf = Buffer.from('%PDF-1.7\n1 0 obj << >> endobj\n');
  const clean = await sniffAndClean(pdf, { allow: [PDF_TYPE, ...PHOTO_TYPES], maxBytes: MANY });
  expect(clean).toMatchObject({ contentType: 'application/pdf', capture: null });
  expect(Buffer.from(clean.bytes).equals(pdf)).toBe(true);
});

describe('the time in a photo', () => {
  const exifOf = async (exif: Exif) => (await sharp(await photo(exif)).metadata()).exif;

  test.each([
    [
      'without an offset',
      { IFD2: { DateTimeOriginal: '2026:02:28 23:59:59' } },
      { local: '2026-02-28T23:59:59', offset: null },
    ],
    [
      'only when it was written',
      { IFD0: { DateTime: '2026:12:01 09:00:00' } },
      { local: '2026-12-01T09:00:00', offset: null },
    ],
    ['of a clock never set', { IFD2: { DateTimeOriginal: '0000:00:00 00:00:00' } }, null],
    ['on a day that is none', { IFD2: { DateTimeOriginal: '2026:02:30 10:00:00' } }, null],
    ['none', { IFD0: { Make: 'Camera' } }, null],
  ])('%s', async (_what, exif, expected) => {
    expect(captureOf(await exifOf(exif))).toEqual(expected);
  });

  test('cut or changed anywhere, the block never throws and never lies about its form', async () => {
    const whole = (await exifOf(EXIF)) ?? Buffer.alloc(0);
    expect(whole.length).toBeGreaterThan(100);
    for (let end = 0; end < whole.length; end += 1) captureOf(whole.subarray(0, end));
    for (let at = 0; at < whole.length; at += 1)
      for (const value of [0, 0x7f, 0xff]) {
        const changed = Buffer.from(whole);
        changed[at] = value;
        const found = captureOf(changed);
        if (found) expect(found.local).toMatch(/^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d$/);
      }
  });

  test("is the camera's where it says so, else the shop's", () => {
    const local = '2026-07-01T12:00:00';
    expect(captureInstant({ local, offset: '+02:00' }, 'America/Chicago').toISOString()).toBe(
      '2026-07-01T10:00:00.000Z',
    );
    expect(captureInstant({ local, offset: null }, 'America/Chicago').toISOString()).toBe(
      '2026-07-01T17:00:00.000Z',
    );
    const winter = { local: '2026-01-15T12:00:00', offset: null };
    expect(captureInstant(winter, 'America/Chicago').toISOString()).toBe('2026-01-15T18:00:00.000Z');
  });
});
