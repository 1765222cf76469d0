/** The shipped faces for paper. One family for each subset: text falls through to the next that has the glyph. */
import { join } from 'node:path';
import { Font } from '@react-pdf/renderer';

const SUBSETS = [
  ['plate', 'sofia-sans-extra-condensed', ['latin', 'latin-ext', 'greek', 'cyrillic'], [700]],
  ['text', 'atkinson-hyperlegible-next', ['latin', 'latin-ext'], [400, 700]],
  ['figures', 'atkinson-hyperlegible-mono', ['latin', 'latin-ext'], [400, 700]],
  ['more', 'noto-sans', ['greek', 'cyrillic'], [400, 700]],
] as const;

let registered = false;

/** Idempotent. Fonts are read from the shipped files, never from the network. */
export function registerFonts(): void {
  if (registered) return;
  registered = true;
  for (const [family, file, subsets, weights] of SUBSETS)
    for (const subset of subsets)
      Font.register({
        family: `${family}-${subset}`,
        fonts: weights.map((fontWeight) => ({
          src: join(process.cwd(), 'fonts', `${file}-${subset}-${fontWeight}-normal.woff`),
          fontWeight,
        })),
      });
  // Words are not broken: a trade name cut in two is no longer findable in the PDF.
  Font.registerHyphenationCallback((word) => [word]);
}

const MORE = ['more-greek', 'more-cyrillic'];
export const PLATE = ['plate-latin', 'plate-latin-ext', 'plate-greek', 'plate-cyrillic'];
export const TEXT = ['text-latin', 'text-latin-ext', ...MORE];
export const FIGURES = ['figures-latin', 'figures-latin-ext', ...MORE];
