/** Parts and their dated prices. All must run inside `withShop`. */
import { select, withShop } from '@/lib/platform/db';
import { getSettings } from '@/lib/shops/queries';
import { minorDigits } from '@/lib/units';
import type { PartFigures, PartForm, PartKind } from './schema';

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

/** For the desk: opens the shop itself. Costs have up to six decimals; what is beyond the currency's own is kept only where it says something. */
export async function loadParts(shopId: string) {
  return withShop(shopId, async () => {
    const { currency } = await getSettings(shopId);
    const digits = minorDigits(currency) ?? 2;
    return (await listParts()).map((part) => ({
      id: part.id,
      sku: part.sku,
      kind: part.kind,
      name: part.name,
      unit: part.unit,
      labourHours: String(Number(part.labourHours)),
      cost: part.unitCost === null ? 'no price' : `${costText(part.unitCost, digits)} ${currency}`,
    }));
  });
}

function costText(cost: string, digits: number): string {
  const [units = '0', decimals = ''] = cost.split('.');
  const kept = decimals.replace(/0+$/, '').padEnd(digits, '0');
  return kept === '' ? units : `${units}.${kept}`;
}

/** The form of one part as it is opened. */
export async function loadPartForm(shopId: string, id: string): Promise<PartForm | null> {
  return withShop(shopId, async () => {
    const part = await findPart(id);
    if (!part) return null;
    return {
      id: part.id,
      baseVersion: part.version,
      sku: part.sku,
      kind: part.kind,
      name: part.name,
      unit: part.unit,
      listed: part.listed,
      packSize: String(Number(part.packSize)),
      labourHours: String(Number(part.labourHours)),
      unitCost: part.unitCost === null ? '0' : costText(part.unitCost, 2),
      datasheet: JSON.stringify(part.datasheet, null, 2),
    };
  });
}
