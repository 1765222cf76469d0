/**
 * The quote's own texts without the rest of the catalogue: what a customer's page loads. They hold plain
 * placeholders only, without units, plurals or the trade's pairs of words.
 */
import { quotes } from './en/quotes';

export type QuoteKey = keyof typeof quotes;

export function quoteMessage(key: QuoteKey, values: Record<string, string | number> = {}): string {
  return quotes[key].replace(/\{(\w+)\}/g, (_, name: string) => String(values[name] ?? '–'));
}
