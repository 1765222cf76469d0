/**
 * The customer's texts without the rest of the catalogue: what their page loads. They hold plain placeholders
 * only, without units, plurals or the trade's pairs of words.
 */
import { quotes } from './en/quotes';

export type CustomerKey = Extract<keyof typeof quotes, `customer.${string}`>;

export function customerMessage(key: CustomerKey, values: Record<string, string | number> = {}): string {
  return quotes[key].replace(/\{(\w+)\}/g, (_, name: string) => String(values[name] ?? '–'));
}
