/** Lighting power allowances by edition of the energy code, and how they are looked up. */
import { ASHRAE_2016 } from './power-density-ashrae-2016';
import { ASHRAE_2019 } from './power-density-ashrae-2019';
import { ASHRAE_2022 } from './power-density-ashrae-2022';
import { IECC_2018 } from './power-density-iecc-2018';
import { IECC_2021 } from './power-density-iecc-2021';

/** Type, kind of it ("General" where there is one kind only), watts a square foot. */
export type AllowanceRow = readonly [type: string, subtype: string, wattsPerSquareFoot: number];

export interface AllowanceTables {
  edition: string;
  buildingTable: string;
  spaceTable: string;
  /** The whole building by its use. */
  building: readonly AllowanceRow[];
  /** Spaces found in many buildings, and those of one kind of building. */
  common: readonly AllowanceRow[];
  specific: readonly AllowanceRow[];
}

export const ALLOWANCE_EDITIONS: readonly AllowanceTables[] = [
  ASHRAE_2016,
  ASHRAE_2019,
  ASHRAE_2022,
  IECC_2018,
  IECC_2021,
];

/** Editions write the same words with other capitals. */
const same = (a: string, b: string) => a.toLowerCase() === b.toLowerCase();

const SQUARE_METRES_PER_SQUARE_FOOT = 0.3048 ** 2;

export interface Allowance {
  wattsPerSquareFoot: number;
  wattsPerSquareMetre: number;
  /** For a finding: code, edition, table. */
  basis: string;
}

/**
 * What an edition allows.
 * @param method the whole building by its use, or one space
 * @returns null where the edition has no such entry
 */
export function allowanceOf(
  edition: string,
  method: 'building' | 'space',
  type: string,
  subtype = 'General',
): Allowance | null {
  const tables = ALLOWANCE_EDITIONS.find((one) => one.edition === edition);
  if (!tables) return null;
  const rows = method === 'building' ? tables.building : [...tables.common, ...tables.specific];
  const row = rows.find(([of, kind]) => same(of, type) && same(kind, subtype));
  if (!row) return null;
  const table = method === 'building' ? tables.buildingTable : tables.spaceTable;
  return {
    wattsPerSquareFoot: row[2],
    wattsPerSquareMetre: row[2] / SQUARE_METRES_PER_SQUARE_FOOT,
    basis: `${tables.edition}, ${table}, read in a transcription`,
  };
}
