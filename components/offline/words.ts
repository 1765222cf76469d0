/** Fields and values of an entry in plain words, for choices and refusals. */
import { formatLength } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';

export interface Words {
  settings: ShopSettings;
  /** The name of another entry that a field points at. */
  nameById: (id: string) => string | null;
}

const text = (value: unknown) => (typeof value === 'string' && value.trim() !== '' ? value : null);

export const nameOf = (data: Record<string, unknown>): string =>
  text(data['name']) ??
  text(data['luminaireType']) ??
  text(data['newType']) ??
  text(data['description']) ??
  'this entry';

/** Where the field's name would not tell. */
const LABELS: Record<string, string> = {
  use: 'used for',
  weeklyHours: 'hours a week',
  quantity: 'count',
  watts: 'input watts each',
  luminaireType: 'type',
};

/** `details.ceilingHeightMetres` as "ceiling height": the fields' own labels stand on the screen below. */
export function fieldWords(path: string): string {
  const key = path.split('.').at(-1) ?? path;
  const known = LABELS[key];
  if (known) return known;
  const words = key
    .replace(/(Metres|Celsius|Id)$/, '')
    .replace(/([A-Z])/g, ' $1')
    .toLowerCase()
    .trim();
  return words === '' ? key : words;
}

export function valueWords(path: string, value: unknown, { settings, nameById }: Words): string {
  if (value === null || value === undefined || value === '') return 'not known';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'number')
    return path.endsWith('Metres') ? formatLength(value, settings) : String(value);
  if (typeof value === 'string')
    return path.endsWith('Id') ? (nameById(value) ?? 'another entry') : `“${value}”`;
  if (Array.isArray(value) && value.every((one) => typeof one !== 'object')) return value.join(', ');
  return JSON.stringify(value);
}
