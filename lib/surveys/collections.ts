/** How each collection of a survey is stored: its table, and what goes between a phone's body and a row. */
import * as z from 'zod/mini';
import {
  Area,
  ChangeLine,
  Circuit,
  Cove,
  ExistingLuminaire,
  IlluminanceReading,
  LuminaireType,
  UtilityAccount,
} from '@/models';
import type { Entity } from '@/lib/offline/protocol';
import { type Collection, COLLECTIONS } from './schema';
import { areaDetails, luminaireDetails } from './schema/details';

interface Row {
  id: string;
  version: number;
  archivedAt: Date | null;
}

/** The little that commands need of a Sequelize model, without its type parameters. */
export interface Table {
  findOne: (options: {
    where: Record<string, unknown>;
  }) => Promise<(Row & { get: (o: { plain: true }) => Record<string, unknown> }) | null>;
  findAll: (options: {
    where: Record<string, unknown>;
  }) => Promise<(Row & { get: (o: { plain: true }) => Record<string, unknown> })[]>;
  create: (values: Record<string, unknown>) => Promise<unknown>;
  update: (values: Record<string, unknown>, options: { where: Record<string, unknown> }) => Promise<[number]>;
}

export const TABLES: Record<Collection, Table> = {
  areas: Area as unknown as Table,
  luminaires: ExistingLuminaire as unknown as Table,
  coves: Cove as unknown as Table,
  circuits: Circuit as unknown as Table,
  'change-lines': ChangeLine as unknown as Table,
  readings: IlluminanceReading as unknown as Table,
  'utility-accounts': UtilityAccount as unknown as Table,
  'luminaire-types': LuminaireType as unknown as Table,
};

/** Kept from one job, offered in every job of the shop. */
export const SHOP_WIDE: ReadonlySet<Collection> = new Set(['luminaire-types']);

/** Decimal columns arrive as strings; phones work with numbers. */
const NUMBERS = new Set([
  'lengthMetres',
  'widthMetres',
  'heightMetres',
  'weeklyHours',
  'ambientCelsius',
  'quantity',
  'watts',
  'supplyVolts',
  'tapeMetres',
  'driverMetres',
  'oldQuantity',
  'newQuantity',
  'newWatts',
  'lux',
  'energyRate',
  'demandRate',
]);

const fieldsOf = (collection: Collection): string[] =>
  Object.keys((COLLECTIONS[collection] as unknown as z.ZodMiniObject).shape);

/** What the server figured, sent along so that a screen can show it without figuring it again. */
const FIGURED: Partial<Record<Collection, string[]>> = {
  circuits: ['answer', 'openStops'],
  'change-lines': ['answer', 'openStops'],
};

/** Details that an older row does not have yet are unknown, not missing. */
const DETAILS: Partial<Record<Collection, z.ZodMiniType>> = {
  areas: areaDetails,
  luminaires: luminaireDetails,
};

function asSent(collection: Collection, field: string, value: unknown): unknown {
  if (value instanceof Date) return value.toISOString();
  if (NUMBERS.has(field) && typeof value === 'string') return Number(value);
  const details = field === 'details' ? DETAILS[collection] : undefined;
  return details ? z.parse(details, value ?? {}) : value;
}

export function toEntity(collection: Collection, row: Row & Record<string, unknown>): Entity {
  const data: Record<string, unknown> = {};
  for (const field of [...fieldsOf(collection), ...(FIGURED[collection] ?? [])]) {
    data[field] = asSent(collection, field, row[field]);
  }
  return { collection, id: row.id, version: row.version, archived: row.archivedAt !== null, data };
}

/** A body as a phone sends it, without what only the server writes. */
export function bodyOf(collection: Collection, data: Record<string, unknown>): Record<string, unknown> {
  return Object.fromEntries(fieldsOf(collection).map((field) => [field, data[field]]));
}
