/** From a draft to what is published: an explicit list, pure. */
import type { ShopSettings } from '@/lib/units/settings';
import type { DraftFigures } from './pricing';
import type { ContentLine, QuoteContent } from './schema/content';
import type { DraftLine, DraftTerms } from './schema/lines';

export interface ContentParts {
  number: string;
  revision: number;
  title: string;
  issuedOn: string;
  validUntil: string;
  shop: QuoteContent['shop'];
  customer: QuoteContent['customer'];
  site: QuoteContent['site'];
  settings: ShopSettings;
  terms: DraftTerms;
  lines: readonly DraftLine[];
  figures: DraftFigures;
  assumedCounts: string[];
  cautions: string[];
}

/** Trailing zeros of a column are no part of what a person agreed to: '30.000000' is '30'. */
export const plainDecimal = (text: string): string =>
  text.includes('.') ? text.replace(/0+$/, '').replace(/\.$/, '') : text;

export const paragraphsOf = (text: string): string[] =>
  text
    .split(/\r?\n/)
    .map((line) => line.trim())
    .filter((line) => line !== '');

function contentLine(line: DraftLine, figures: DraftFigures): ContentLine {
  return {
    id: line.id,
    area: line.areaName,
    text: line.description,
    amountMinor: figures.lines.get(line.id)?.amountMinor ?? 0,
    taxable: line.taxable,
  };
}

export function buildContent(parts: ContentParts): QuoteContent {
  const { settings, terms, lines, figures } = parts;
  return {
    schema: 'lampwright.quote/1',
    number: parts.number,
    revision: parts.revision,
    title: parts.title,
    issuedOn: parts.issuedOn,
    validUntil: parts.validUntil,
    shop: parts.shop,
    customer: parts.customer,
    site: parts.site,
    settings: {
      currency: settings.currency,
      locale: settings.locale,
      timeZone: settings.timeZone,
      paper: settings.paper,
      taxRounding: settings.taxRounding,
    },
    scopeNote: terms.scopeNote,
    lines: lines.filter((line) => !line.optional).map((line) => contentLine(line, figures)),
    options: lines
      .filter((line) => line.optional)
      .map((line) => ({ ...contentLine(line, figures), chosen: line.chosen })),
    terms: {
      discountPct: plainDecimal(terms.discountPct),
      depositPct: plainDecimal(terms.depositPct),
      taxName: terms.taxName,
      taxRatePct: plainDecimal(terms.taxRatePct),
    },
    totals: figures.totals,
    exclusions: paragraphsOf(terms.exclusions),
    assumedCounts: parts.assumedCounts,
    cautions: parts.cautions,
  };
}
