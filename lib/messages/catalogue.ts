/**
 * How a catalogue of texts is read. Numbers in values are formatted by lib/units with the unit that the placeholder
 * names: `{drop:V}`; codes are put in the trade's words: `{ballast:word.ballast}`; words that differ between the
 * bases are chosen: `{=fixture}`; counts by the plural rules of English: `{count, plural, one {part} other {# parts}}`.
 */
import { formatFigure, formatNumber } from '@/lib/units/figures';
import { formatMoney } from '@/lib/units/money';
import { DEFAULT_SETTINGS, type ShopSettings } from '@/lib/units/settings';
import { fillTerms } from './terms';

export type MessageValues = Record<string, string | number | null | undefined>;
type Texts = Readonly<Record<string, string>>;

export interface Catalogue<K extends string> {
  keys: readonly K[];
  has: (key: string) => key is K;
  /** The text as it stands, placeholders and all. */
  text: (key: string) => string | undefined;
  /** The text with its values. A placeholder without a value shows as a dash. */
  message: (key: K, values?: MessageValues, settings?: ShopSettings) => string;
}

/** In a sentence 277 V is not 277.00 V. */
const trimmed = (text: string) => (text.includes('.') ? text.replace(/\.?0+$/, '') : text);

function render(
  value: string | number | null | undefined,
  unit: string | undefined,
  settings: ShopSettings,
  texts: Texts,
): string {
  if (value === null || value === undefined) return '–';
  if (typeof value === 'string') return (unit === undefined ? undefined : texts[`${unit}.${value}`]) ?? value;
  if (unit === undefined) return formatNumber(value);
  if (unit === 'minor') return formatMoney(Math.round(value), settings);
  const figure = formatFigure(value, unit, settings);
  return `${trimmed(figure.value)} ${figure.unit}`;
}

const PLURAL = /\{(\w+), plural, one \{([^}]*)\} other \{([^}]*)\}\}/g;
const PLACEHOLDER = /\{([\w-]+)(?::([^}]+))?\}/g;

function choosePlurals(text: string, values: MessageValues): string {
  return text.replace(PLURAL, (_, name: string, one: string, other: string) => {
    const count = values[name];
    return (count === 1 ? one : other).replaceAll('#', typeof count === 'number' ? formatNumber(count) : '–');
  });
}

export function catalogueOf<const T extends Texts>(texts: T): Catalogue<keyof T & string> {
  type Key = keyof T & string;
  const all: Texts = texts;
  return {
    keys: Object.keys(texts) as Key[],
    has: (key): key is Key => Object.hasOwn(texts, key),
    text: (key) => (Object.hasOwn(texts, key) ? all[key] : undefined),
    message: (key, values = {}, settings = DEFAULT_SETTINGS) =>
      choosePlurals(fillTerms(all[key] ?? key, settings), values).replace(
        PLACEHOLDER,
        (_, name: string, unit: string | undefined) => render(values[name], unit, settings, all),
      ),
  };
}
