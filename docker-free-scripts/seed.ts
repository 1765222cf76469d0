/**
 * Fills the demo: two shops, their people, parts, and three jobs to begin with. Runs at every start and does nothing
 * where the shops are there. Rows are made by the web role's own commands; only the shops themselves are made by
 * the migrator.
 */
import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';

process.env.LAMPWRIGHT_PROCESS = 'web';

const FERNHOLLOW = {
  name: 'Fernhollow Lighting',
  licenceNumber: 'EC-000417',
  email: 'office@fernhollow.example.com',
  phone: '555-0100',
  address: '8 Fernhollow Road',
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
} as const;
const SECOND = {
  name: 'Saltmarsh Electric',
  licenceNumber: 'SE-22',
  email: 'office@saltmarsh.example.com',
  phone: '555-0190',
  address: '1 Saltmarsh Way',
  basis: 'iec',
  basisEdition: 'IEC 60364-5-52:2009',
  units: 'metric',
  currency: 'GBP',
  locale: 'en-GB',
  timeZone: 'Europe/London',
  paper: 'a4',
  taxName: 'VAT',
  taxRatePct: '20',
  benchWork: false,
} as const;
const PEOPLE = [
  { role: 'owner', email: 'owner@fernhollow.example.com', name: 'M. Adeyemi', licenceNumber: 'EC-000417' },
  { role: 'estimator', email: 'estimator@fernhollow.example.com', name: 'S. Lindqvist' },
  { role: 'office', email: 'office@fernhollow.example.com', name: 'P. Okonjo' },
  { role: 'crew', email: 'crew@fernhollow.example.com', name: 'L. Brandt', mainsQualified: true },
] as const;

function passwordOf(file: string | undefined): string {
  const known =
    file && existsSync(file)
      ? (JSON.parse(readFileSync(file, 'utf8')) as { password: string }[] | null)
      : null;
  return known?.[0]?.password ?? `lamp-${randomBytes(5).toString('hex')}`;
}

async function main(): Promise<void> {
  const url = process.env.DATABASE_URL_MIGRATOR;
  if (!url) throw new Error('DATABASE_URL_MIGRATOR is not set.');
  // Imported after the process has been named, since the database module reads the name.
  const demo = await import('../seeders/demo');
  const { ensureShop } = await import('../seeders/shop');
  const { closeDatabase } = await import('@/lib/platform/db');
  const file = process.env.DEMO_FILE;
  const password = passwordOf(file);

  const first = await ensureShop(url, FERNHOLLOW);
  const second = await ensureShop(url, SECOND);
  if (first.fresh) {
    const actors = await demo.addPeople(first.id, [...PEOPLE], password);
    const owner = actors.get('owner');
    if (!owner) throw new Error('The demo has no owner.');
    const part = await demo.addParts(owner);
    await demo.bakery(owner, part);
    await demo.dentalPractice(owner);
    await demo.chandlery(owner, part);
  }
  const other = { role: 'owner', email: 'owner@saltmarsh.example.com', name: 'R. Tierney' } as const;
  if (second.fresh) await demo.addPeople(second.id, [other], password);
  const signIns = [...PEOPLE, other].map(({ role, email }) => ({ role, email, password }));
  if (file && (first.fresh || !existsSync(file)))
    writeFileSync(file, JSON.stringify(signIns, null, 2), { mode: 0o600 });
  await closeDatabase();
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
});
