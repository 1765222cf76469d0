/**
 * The message catalogue: every text of the customer's pages, the crew's sheet, findings, working and mails by its
 * key. Numbers in values are formatted by lib/units with the unit that the placeholder names: `{drop:V}`.
 */
import { formatFigure, formatNumber } from '@/lib/units/figures';
import { DEFAULT_SETTINGS, type ShopSettings } from '@/lib/units/settings';
import { crew } from './en/crew';
import { findings } from './en/findings';
import { jobs } from './en/jobs';
import { people } from './en/people';
import { quotes } from './en/quotes';
import { working } from './en/working';

const catalogue = { ...quotes, ...findings, ...working, ...crew, ...jobs, ...people };

export type MessageKey = keyof typeof catalogue;
export type MessageValues = Record<string, string | number | null | undefined>;

const texts: Readonly<Record<string, string>> = catalogue;

export const hasMessage = (key: string): key is MessageKey => Object.hasOwn(texts, key);

function render(
  value: string | number | null | undefined,
  unit: string | undefined,
  settings: ShopSettings,
): string {
  if (value === null || value === undefined) return '–';
  if (typeof value === 'string') return value;
  if (unit === undefined) return formatNumber(value);
  const figure = formatFigure(value, unit, settings);
  return `${figure.value} ${figure.unit}`;
}

/** Fills a text of the catalogue. A placeholder without a value shows as a dash. */
export function message(
  key: MessageKey,
  values: MessageValues = {},
  settings: ShopSettings = DEFAULT_SETTINGS,
): string {
  return (texts[key] ?? key).replace(
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
