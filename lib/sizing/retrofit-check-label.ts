/**
 * What must stay written in the luminaire, so that nobody fits the wrong lamp later. The kit's own label comes
 * first; these lines say what it must cover. Screens and sheets render `key` and `values` by the catalogue.
 */
import type { FindingValue } from '@/lib/engine/contract';
import type { RetrofitCase } from './retrofit-check-case';
import type { Product } from './retrofit-check-input';

export interface LabelLine {
  key: string;
  /** English, for the command line. */
  text: string;
  values: Record<string, FindingValue>;
}

const line = (key: string, text: string, values: LabelLine['values'] = {}): LabelLine => ({
  key,
  text,
  values,
});

const NO_FLUORESCENT = line('label.no-fluorescent', 'Modified for LED. Do not fit fluorescent lamps.');

function fedLine({ fedEnd }: Product): LabelLine[] {
  if (fedEnd === 'single')
    return [line('label.fed-single', 'Line and neutral at one end only: the end that is marked.')];
  if (fedEnd === 'double') return [line('label.fed-double', 'Line at one end, neutral at the other.')];
  return [];
}

function windowLine(product: Product): LabelLine[] {
  const { tubeType, fedEnd, ratedVoltsMin, ratedVoltsMax } = product;
  if (tubeType === null || ratedVoltsMin === null || ratedVoltsMax === null) return [];
  const values = { tubeType, fedEnd, ratedVoltsMin, ratedVoltsMax };
  return [
    line(
      'label.replace-with',
      `Replace only with Type ${tubeType} tubes rated for ${ratedVoltsMin} to ${ratedVoltsMax} V.`,
      values,
    ),
  ];
}

function lampLines(c: RetrofitCase, product: Product): LabelLine[] {
  const { supplyVolts } = c.input;
  switch (c.feeding) {
    case 'line':
      if (product.tubeType === null) return [];
      return [
        NO_FLUORESCENT,
        line('label.line-volts', `The lampholders carry ${supplyVolts ?? '__'} V.`, { supplyVolts }),
        ...fedLine(product),
        ...windowLine(product),
      ];
    case 'driver':
      return [
        NO_FLUORESCENT,
        line(
          'label.driver-fed',
          'The lampholders are fed by an LED driver: fit Type C tubes of this driver only.',
        ),
      ];
    case 'ballast':
      if (product.tubeType === null) return [];
      return [
        line('label.ballast-fed', `LED tubes of Type ${product.tubeType} on the ballast.`, {
          tubeType: product.tubeType,
        }),
      ];
    case 'own':
      return c.input.action === 'listed-kit'
        ? [NO_FLUORESCENT, line('label.kit', 'LED retrofit kit fitted: parts only as its own label says.')]
        : [];
    case 'none':
      return [];
  }
}

/** A second supply must be written where the hand goes in. */
function feedLines({ input }: RetrofitCase): LabelLine[] {
  const kind = input.emergency?.kind ?? 'unknown';
  if (kind === 'none' || kind === 'unknown' || input.action === 'remove') return [];
  return [
    line(
      'label.second-supply',
      'More than one supply: an unswitched emergency feed stays live when the switch is off.',
      { kind },
    ),
  ];
}

/** @returns the lines, empty where no label is needed */
export function labelLines(c: RetrofitCase): LabelLine[] {
  const { action } = c.input;
  if (action === 'leave' || action === 'remove' || action === 'relocate') return [];
  const lines = c.product ? [...lampLines(c, c.product), ...feedLines(c)] : [];
  if (lines.length === 0) return [];
  return [...lines, line('label.modified-by', 'Modified by (name) on (date).')];
}
