/**
 * What a sent quote says, and all of it: the explicit list of fields that is frozen, hashed, printed and shown to
 * the customer. No cost, hour, markup or margin is among them. Money is in integer minor units.
 */
import type { ShopSettings } from '@/lib/units/settings';

export interface ContentLine {
  id: string;
  /** '' where a line belongs to no one area. */
  area: string;
  text: string;
  /** Before the discount on the whole. */
  amountMinor: number;
  taxable: boolean;
}

export interface ContentOption extends ContentLine {
  /** Whether it is taken unless the customer leaves it out. */
  chosen: boolean;
}

export interface QuoteTotals {
  /** Lines and chosen additions, before the discount. */
  linesMinor: number;
  discountMinor: number;
  netMinor: number;
  taxMinor: number;
  totalMinor: number;
  depositMinor: number;
}

export interface QuoteContent {
  schema: 'lampwright.quote/1';
  number: string;
  revision: number;
  title: string;
  issuedOn: string;
  validUntil: string;
  shop: { name: string; licenceNumber: string; email: string; phone: string; address: string };
  customer: { name: string; contactName: string; email: string; address: string };
  site: { name: string; address: string };
  /** How figures and dates are written, now and in ten years. */
  settings: Pick<ShopSettings, 'currency' | 'locale' | 'timeZone' | 'paper' | 'taxRounding'>;
  scopeNote: string;
  lines: ContentLine[];
  options: ContentOption[];
  terms: { discountPct: string; depositPct: string; taxName: string; taxRatePct: string };
  /** With the additions as they stand when sent; the customer's choices are figured from lines and terms. */
  totals: QuoteTotals;
  exclusions: string[];
  assumedCounts: string[];
  cautions: string[];
}

/** The ids of the additions that are taken unless the customer says otherwise. */
export const defaultChoices = (content: Pick<QuoteContent, 'options'>): string[] =>
  content.options.filter((option) => option.chosen).map((option) => option.id);

export interface AreaGroup<L> {
  area: string;
  lines: L[];
}

/** Lines under their areas, both in the order in which they come. */
export function byArea<L extends { area: string }>(lines: readonly L[]): AreaGroup<L>[] {
  const groups = new Map<string, L[]>();
  for (const line of lines) groups.set(line.area, [...(groups.get(line.area) ?? []), line]);
  return [...groups].map(([area, group]) => ({ area, lines: group }));
}
