/** A shop of a test's own, with a person in each role: tests never share rows. */
import { randomUUID } from 'node:crypto';
import type { Actor, Role } from '@/lib/access/policy';
import { addPeople } from '@/seeders/demo';
import { ensureShop, type NewShop } from '@/seeders/shop';

export const PASSWORD = 'lamp-in-the-test';

export interface TestShop {
  shopId: string;
  name: string;
  actors: Record<Role, Actor>;
  email: (role: Role) => string;
}

export async function makeShop(more: Partial<NewShop> = {}): Promise<TestShop> {
  const tag = randomUUID().slice(0, 8);
  const name = `Test shop ${tag}`;
  const url = process.env.DATABASE_URL_MIGRATOR;
  if (!url) throw new Error('DATABASE_URL_MIGRATOR is not set: run this by npm test.');
  const { id } = await ensureShop(url, {
    name,
    licenceNumber: 'EC-1',
    email: `office-${tag}@example.com`,
    phone: '555-0100',
    address: '1 Test Road',
    basis: 'us',
    basisEdition: 'NEC 2023',
    units: 'us',
    currency: 'USD',
    locale: 'en-US',
    timeZone: 'America/New_York',
    paper: 'letter',
    taxName: 'Sales tax',
    taxRatePct: '6.25',
    benchWork: true,
    ...more,
  });
  const email = (role: Role) => `${role}-${tag}@example.com`;
  const people = await addPeople(
    id,
    (['owner', 'estimator', 'office', 'crew'] as const).map((role) => ({
      role,
      email: email(role),
      name: `${role} ${tag}`,
      ...(role === 'owner' ? { licenceNumber: 'EC-1' } : {}),
    })),
    PASSWORD,
  );
  return { shopId: id, name, email, actors: Object.fromEntries(people) as Record<Role, Actor> };
}
