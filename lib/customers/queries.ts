/** Customers of the shop. All must run inside `withShop`. */
import { select, withShop } from '@/lib/platform/db';

export interface CustomerRow {
  id: string;
  name: string;
  contactName: string;
  email: string;
  phone: string;
  address: string;
  consumer: boolean;
  notes: string;
  version: number;
}

const COLUMNS = `id, name, contact_name as "contactName", email, phone, address, consumer, notes, version`;

export interface CustomerListRow extends CustomerRow {
  jobs: number;
}

export async function listCustomers(): Promise<CustomerListRow[]> {
  return select<CustomerListRow>(
    `select ${COLUMNS}, (select count(*)::int from jobs where jobs.customer_id = customers.id) as jobs
     from customers where archived_at is null order by lower(name), id limit 500`,
  );
}

export async function findCustomer(id: string): Promise<CustomerRow | null> {
  const rows = await select<CustomerRow>(
    `select ${COLUMNS} from customers where id = $1 and archived_at is null`,
    [id],
  );
  return rows[0] ?? null;
}

export const loadCustomers = (shopId: string) => withShop(shopId, listCustomers);
export const loadCustomer = (shopId: string, id: string) => withShop(shopId, () => findCustomer(id));
