/** A draft's lines and what feeds them. */
export type LineSource = 'change-line' | 'circuit' | 'typed';

/** A change line or a circuit as the survey gives it for quoting. */
export interface QuoteSource {
  kind: Exclude<LineSource, 'typed'>;
  id: string;
  areaName: string;
  /** Plain words for a customer. */
  description: string;
  /** Stops that nobody has overridden: with any, the line can't be quoted. */
  openStops: number;
  parts: { partId: string; quantity: string }[];
  /** Hours of work on the whole line. */
  labourHours: string;
  sourceSha256: string;
}

export interface PricedSource extends QuoteSource {
  /** Parts of the whole line, in currency units with six decimals. */
  unitCost: string;
  /** Parts without a price in parts and prices, by SKU or id. */
  unpriced: string[];
}

export interface DraftLine {
  id: string;
  position: number;
  source: LineSource;
  sourceId: string | null;
  sourceSha256: string | null;
  sourceDescription: string;
  areaName: string;
  description: string;
  quantity: string;
  unitCost: string;
  unitLabourHours: string;
  labourRate: string;
  markupPct: string;
  taxable: boolean;
  optional: boolean;
  chosen: boolean;
  version: number;
}

export interface DraftTerms {
  id: string;
  jobId: string;
  depositPct: string;
  discountPct: string;
  overheadPct: string;
  contingencyPct: string;
  taxName: string;
  taxRatePct: string;
  validDays: number;
  scopeNote: string;
  exclusions: string;
  pricesAt: Date;
  version: number;
}

/** One thing about a line that its source now says otherwise. Cost is left out for those who may not see it. */
export interface LineChange {
  what: 'description' | 'area' | 'parts-cost' | 'hours' | 'figures';
  before: string;
  after: string;
}

export type BlockerCode =
  'no-lines' | 'open-stop' | 'source-gone' | 'out-of-date' | 'no-price' | 'accepted' | 'nothing-to-charge';

/** Why the draft can't be sent; `line` names the line in the customer's words. */
export interface Blocker {
  code: BlockerCode;
  lineId: string | null;
  line: string;
  values: Record<string, string | number>;
}
