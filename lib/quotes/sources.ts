/** Change lines and circuits as they may be quoted, with today's prices. Runs inside `withShop`. */
import Decimal from 'decimal.js';
import type { PricedSource, QuoteSource } from './schema/lines';

export interface PartPrice {
  unitCost: string;
  sku: string;
  name: string;
}

type Unlabelled = Omit<QuoteSource, 'kind'>;

/** Where lines come from: the survey's and the circuits' own queries, or a test's. */
export interface SourcePorts {
  changeLines: (jobId: string) => Promise<Unlabelled[]>;
  circuits: (jobId: string) => Promise<Unlabelled[]>;
  prices: (partIds: string[], at: Date) => Promise<Map<string, PartPrice>>;
}

function priced(source: QuoteSource, prices: ReadonlyMap<string, PartPrice>): PricedSource {
  let cost = new Decimal(0);
  const unpriced: string[] = [];
  for (const { partId, quantity } of source.parts) {
    const price = prices.get(partId);
    if (price) cost = cost.plus(new Decimal(quantity).times(price.unitCost));
    else unpriced.push(partId);
  }
  return { ...source, unitCost: cost.toDecimalPlaces(6, Decimal.ROUND_HALF_UP).toFixed(6), unpriced };
}

/** In the order of the survey: change lines first, then circuits. */
export async function pricedSources(ports: SourcePorts, jobId: string, at: Date): Promise<PricedSource[]> {
  const changeLines = await ports.changeLines(jobId);
  const circuits = await ports.circuits(jobId);
  const sources: QuoteSource[] = [
    ...changeLines.map((line) => ({ ...line, kind: 'change-line' as const })),
    ...circuits.map((circuit) => ({ ...circuit, kind: 'circuit' as const })),
  ];
  const partIds = [...new Set(sources.flatMap((source) => source.parts.map((part) => part.partId)))];
  const prices = partIds.length > 0 ? await ports.prices(partIds, at) : new Map<string, PartPrice>();
  return sources.map((source) => priced(source, prices));
}
