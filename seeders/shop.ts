/** A new shop's row: made by the migrator, since nobody is in the shop yet who could be asked. */
import { randomUUID } from 'node:crypto';
import { QueryTypes, Sequelize } from 'sequelize';

export interface NewShop {
  name: string;
  licenceNumber: string;
  email: string;
  phone: string;
  address: string;
  basis: 'us' | 'iec';
  basisEdition: string;
  units: 'us' | 'metric';
  currency: string;
  locale: 'en-US' | 'en-GB';
  timeZone: string;
  paper: 'letter' | 'a4';
  taxName: string;
  taxRatePct: string;
  benchWork: boolean;
}

/** @returns the id of the shop of that name, and whether it has just been made. */
export async function ensureShop(url: string, shop: NewShop): Promise<{ id: string; fresh: boolean }> {
  const sequelize = new Sequelize(url, { dialect: 'postgres', logging: false });
  try {
    const [known] = await sequelize.query<{ id: string }>('select id from shops where name = $1', {
      bind: [shop.name],
      type: QueryTypes.SELECT,
    });
    if (known) return { id: known.id, fresh: false };
    const id = randomUUID();
    await sequelize.query(
      `insert into shops (id, name, licence_number, email, phone, address, basis, basis_edition, units, currency, locale,
         time_zone, paper, tax_name, tax_rate_pct, bench_work)
       values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13, $14, $15, $16)`,
      {
        bind: [
          id,
          shop.name,
          shop.licenceNumber,
          shop.email,
          shop.phone,
          shop.address,
          shop.basis,
          shop.basisEdition,
          shop.units,
          shop.currency,
          shop.locale,
          shop.timeZone,
          shop.paper,
          shop.taxName,
          shop.taxRatePct,
          shop.benchWork,
        ],
      },
    );
    return { id, fresh: true };
  } finally {
    await sequelize.close();
  }
}
