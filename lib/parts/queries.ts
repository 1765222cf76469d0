/** Parts and their dated prices. All must run inside `withShop`. */
import { select } from '@/lib/platform/db';
import type { PartFigures, PartKind } from './schema';

export interface PartRow extends Omit<PartFigures, 'labourHours'> {
  labourHours: string;
  packSize: string;
  version: number;
  /** Null where no price has been typed yet. */
  unitCost: string | null;
  pricedAt: Date | null;
}

const COLUMNS = `p.id, p.sku, p.kind, p.name, p.unit, p.listed, p.datasheet, p.version,
  p.labour_hours::text as "labourHours", p.pack_size::text as "packSize"`;
const PRICE = `left join lateral (
    select unit_cost::text as "unitCost", valid_from as "pricedAt" from part_prices x
    where x.shop_id = p.shop_id and x.part_id = p.id and x.valid_from <= $1 order by valid_from desc limit 1
  ) price on true`;

export async function listParts(kind?: PartKind): Promise<PartRow[]> {
  return select<PartRow>(
    `select ${COLUMNS}, price."unitCost", price."pricedAt" from parts p ${PRICE}
     where p.archived_at is null and ($2::text is null or p.kind = $2) order by p.kind, p.name limit 2000`,
    [new Date(), kind ?? null],
  );
}

export async function findPart(id: string): Promise<PartRow | null> {
  const rows = await select<PartRow>(
    `select ${COLUMNS}, price."unitCost", price."pricedAt" from parts p ${PRICE} where p.id = $2`,
    [new Date(), id],
  );
  return rows[0] ?? null;
}

/** What survey and circuit screens need, without any cost. */
export async function partFigures(): Promise<PartFigures[]> {
  const rows = await select<PartRow>(
    `select ${COLUMNS} from parts p where p.archived_at is null order by p.kind, p.name`,
  );
  return rows.map(({ id, sku, kind, name, unit, listed, datasheet, labourHours }) => ({
    id,
    sku,
    kind,
    name,
    unit,
    listed,
    datasheet,
    labourHours: Number(labourHours),
  }));
}

/** The price of each part at a moment; a part without one is left out. */
export async function priceOfParts(
  partIds: string[],
  at: Date,
): Promise<Map<string, { unitCost: string; sku: string; name: string }>> {
  if (partIds.length === 0) return new Map();
  const rows = await select<{ id: string; sku: string; name: string; unitCost: string | null }>(
    `select p.id, p.sku, p.name, price."unitCost" from parts p ${PRICE} where p.id = any ($2::uuid[])`,
    [at, partIds],
  );
  return new Map(
    rows.flatMap(({ id, sku, name, unitCost }) =>
      unitCost === null ? [] : [[id, { unitCost, sku, name }] as const],
    ),
  );
}
