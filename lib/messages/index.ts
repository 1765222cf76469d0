/**
 * The message catalogue: every text of the customer's pages, the crew's sheet, findings, working and mails by its
 * key. Numbers in values are formatted by lib/units with the unit that the placeholder names: `{drop:V}`; codes are
 * put in the trade's words: `{ballast:word.ballast}`; words that differ between the bases are chosen: `{=fixture}`.
 */
import { formatFigure, formatNumber } from '@/lib/units/figures';
import { formatMoney } from '@/lib/units/money';
import { DEFAULT_SETTINGS, type ShopSettings } from '@/lib/units/settings';
import { crew } from './en/crew';
import { findings } from './en/findings';
import { circuitFindings } from './en/findings-circuits';
import { retrofitFindings } from './en/findings-retrofit';
import { jobs } from './en/jobs';
import { labels } from './en/labels';
import { people } from './en/people';
import { quotes } from './en/quotes';
import { words } from './en/words';
import { working } from './en/working';
import { fillTerms } from './terms';

export { term } from './terms';

const catalogue = {
  ...quotes,
  ...findings,
  ...working,
  ...crew,
  ...jobs,
  ...people,
  ...circuitFindings,
  ...retrofitFindings,
  ...labels,
  ...words,
};

export type MessageKey = keyof typeof catalogue;
export type MessageValues = Record<string, string | number | null | undefined>;

const texts: Readonly<Record<string, string>> = catalogue;

export const catalogueKeys = Object.keys(catalogue) as MessageKey[];

/** The text as it stands, placeholders and all. */
export const messageText = (key: string): string | undefined =>
  Object.hasOwn(texts, key) ? texts[key] : undefined;

export const hasMessage = (key: string): key is MessageKey => Object.hasOwn(texts, key);

/** In a sentence 277 V is not 277.00 V. */
const trimmed = (text: string) => (text.includes('.') ? text.replace(/\.?0+$/, '') : text);

function render(
  value: string | number | null | undefined,
  unit: string | undefined,
  settings: ShopSettings,
): string {
  if (value === null || value === undefined) return '–';
  if (typeof value === 'string') return texts[`${unit}.${value}`] ?? value;
  if (unit === undefined) return formatNumber(value);
  if (unit === 'minor') return formatMoney(Math.round(value), settings);
  const figure = formatFigure(value, unit, settings);
  return `${trimmed(figure.value)} ${figure.unit}`;
}

/** `{count, plural, one {part} other {# parts}}`, by the plural rules of English. */
const PLURAL = /\{(\w+), plural, one \{([^}]*)\} other \{([^}]*)\}\}/g;

function choosePlurals(text: string, values: MessageValues): string {
  return text.replace(PLURAL, (_, name: string, one: string, other: string) => {
    const count = values[name];
    return (count === 1 ? one : other).replaceAll('#', typeof count === 'number' ? formatNumber(count) : '–');
  });
}

/** Fills a text of the catalogue. A placeholder without a value shows as a dash. */
export function message(
  key: MessageKey,
  values: MessageValues = {},
  settings: ShopSettings = DEFAULT_SETTINGS,
): string {
  return choosePlurals(fillTerms(texts[key] ?? key, settings), values).replace(
    /\{([\w-]+)(?::([^}]+))?\}/g,
    (_, name: string, unit: string | undefined) => render(values[name], unit, settings),
  );
}

/** For keys that come with data (finding codes, working keys): the fallback is the engine's own English. */
export function messageOr(
  key: string,
  fallback: string,
  values?: MessageValues,
  settings?: ShopSettings,
): string {
  return hasMessage(key) ? message(key, values, settings) : fallback;
}
