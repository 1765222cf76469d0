/** Writes a photo anew: upright, of bounded size, in sRGB, without any metadata. */
import sharp, { type Sharp } from 'sharp';
import { captureOf } from './exif';
import type { CleanFile } from './sniff';

/** More than phones take; a picture of this size needs some 400 MB while it is read. */
const MOST_PIXELS = 110_000_000;
/** Enough to read a nameplate across a room, and to print on a page. */
const LONGEST_EDGE = 4_096;
const QUALITY = 86;

const ENCODE = {
  jpeg: (image: Sharp) => image.jpeg({ quality: QUALITY }),
  png: (image: Sharp) => image.png(),
  webp: (image: Sharp) => image.webp({ quality: QUALITY }),
} as const;

const DAMAGED = 'This picture is damaged, or was cut off on its way. Take it again, or send it again.';
const UNREADABLE = 'This is not a picture that can be read here. JPEG, PNG or WebP can be used.';

const isOurs = (format: string): format is keyof typeof ENCODE => Object.hasOwn(ENCODE, format);

/** A damaged picture throws in there, whatever its damage; there is nothing else in it that could. */
async function orProblem<T>(work: () => Promise<T>, problem: string): Promise<T | { problem: string }> {
  try {
    return await work();
  } catch {
    return { problem };
  }
}

async function write(bytes: Uint8Array, format: keyof typeof ENCODE) {
  const image = sharp(bytes, { limitInputPixels: MOST_PIXELS, failOn: 'error', pages: 1 })
    .autoOrient()
    .resize(LONGEST_EDGE, LONGEST_EDGE, { fit: 'inside', withoutEnlargement: true })
    .timeout({ seconds: 30 });
  return ENCODE[format](image).toBuffer({ resolveWithObject: true });
}

/** The size is read from the header first: a small file may unfold to gigabytes. */
export async function cleanPhoto(bytes: Uint8Array): Promise<CleanFile | { problem: string }> {
  const meta = await orProblem(() => sharp(bytes, { limitInputPixels: false }).metadata(), UNREADABLE);
  if ('problem' in meta) return meta;
  const pixels = meta.width * meta.height;
  if (pixels > MOST_PIXELS) {
    const millions = (count: number) => Math.ceil(count / 1_000_000);
    return {
      problem: `This picture has ${millions(pixels)} million pixels; up to ${millions(MOST_PIXELS)} million can be used.`,
    };
  }
  const { format } = meta;
  if (!isOurs(format)) return { problem: UNREADABLE };
  const written = await orProblem(() => write(bytes, format), DAMAGED);
  if ('problem' in written) return written;
  const { width, height } = written.info;
  return {
    bytes: written.data,
    contentType: `image/${format}`,
    width,
    height,
    capture: captureOf(meta.exif),
  };
}
