/** A shop with a job, and change lines and circuits that a test can alter: what quote tests start from. */
import { randomUUID } from 'node:crypto';
import { Client } from 'pg';
import type { Actor, Role } from '@/lib/access/policy';
import { saveCustomer } from '@/lib/customers/commands';
import { sha256 } from '@/lib/platform/http/hash';
import { createJob } from '@/lib/jobs/commands';
import { draftState } from '@/lib/quotes/queries';
import { composeQuote } from '@/lib/quotes/compose';
import { openDraft, saveLine, saveTerms, sendQuote } from '@/lib/quotes/commands';
import type { QuoteSource } from '@/lib/quotes/schema/lines';
import type { PartPrice, SourcePorts } from '@/lib/quotes/sources';
import { withShop } from '@/lib/platform/db';

/** As the migrator: what neither web nor worker may do. */
export async function asMigrator<R extends object>(sql: string, values: unknown[] = []): Promise<R[]> {
  const client = new Client({ connectionString: process.env.DATABASE_URL_MIGRATOR });
  await client.connect();
  try {
    return (await client.query(sql, values)).rows as R[];
  } finally {
    await client.end();
  }
}

async function member(shopId: string, role: Role): Promise<Actor> {
  const email = `${role}-${randomUUID().slice(0, 8)}@example.com`;
  const [person] = await asMigrator<{ id: string }>('insert into people (email) values ($1) returning id', [
    email,
  ]);
  const personId = person?.id ?? '';
  const [membership] = await asMigrator<{ id: string }>(
    'insert into memberships (shop_id, person_id, name, email, roles) values ($1, $2, $3, $4, $5) returning id',
    [shopId, personId, `The ${role}`, email, [role]],
  );
  return {
    ...{ sessionId: randomUUID(), personId, shopId, membershipId: membership?.id ?? '', name: `The ${role}` },
    ...{ roles: [role], licenceNumber: '', mainsQualified: false },
  };
}

export interface QuoteShop {
  shopId: string;
  owner: Actor;
  estimator: Actor;
  office: Actor;
  crew: Actor;
}

export async function quoteShop(name = 'Fernhollow Lighting'): Promise<QuoteShop> {
  const [shop] = await asMigrator<{ id: string }>(
    `insert into shops (name, licence_number, email, tax_rate_pct, deposit_pct, markup_pct, labour_rate)
     values ($1, 'EC-000417', 'desk@fernhollow.example.com', 6.25, 30, 35, 85) returning id`,
    [name],
  );
  const shopId = shop?.id ?? '';
  return {
    shopId,
    owner: await member(shopId, 'owner'),
    estimator: await member(shopId, 'estimator'),
    office: await member(shopId, 'office'),
    crew: await member(shopId, 'crew'),
  };
}

export async function quoteJob(shop: QuoteShop, title = 'New lighting for the bakery'): Promise<string> {
  const customer = await saveCustomer(shop.owner, {
    name: 'Tarn Lane Bakery',
    contactName: 'A. Marsh',
    email: 'marsh@tarnlane.example.com',
    phone: '555-0142',
    address: '1 Tarn Lane',
    consumer: false,
    notes: '',
  });
  const job = await createJob(shop.owner, {
    customerId: customer.id,
    siteName: 'Bakery',
    siteAddress: '1 Tarn Lane',
    title,
  });
  return job.id;
}

type Source = Omit<QuoteSource, 'kind' | 'sourceSha256'>;

/** Stands in for the survey's and the circuits' queries: what a test puts in comes out, hashed as they do. */
export class FakeSources implements SourcePorts {
  readonly panel = randomUUID();
  readonly tape = randomUUID();
  readonly priceOf = new Map<string, PartPrice>([
    [this.panel, { unitCost: '92.500000', sku: 'PANEL-22', name: 'Flat panel' }],
    [this.tape, { unitCost: '11.250000', sku: 'TAPE-24', name: 'Tape, a metre' }],
  ]);
  lines: Source[] = [
    {
      id: randomUUID(),
      areaName: 'Back room',
      description: '12 old four-tube fixtures out, 12 flat panels in',
      openStops: 0,
      parts: [{ partId: this.panel, quantity: '12' }],
      labourHours: '6',
    },
  ];
  runs: Source[] = [
    {
      id: randomUUID(),
      areaName: 'Counter',
      description: '9.8 m of warm light, one driver in the store cupboard',
      openStops: 0,
      parts: [{ partId: this.tape, quantity: '9.8' }],
      labourHours: '3.5',
    },
  ];
  changeLines = async () => this.lines.map(hashed);
  circuits = async () => this.runs.map(hashed);
  prices = async () => this.priceOf;
}

const hashed = (source: Source) => ({ ...source, sourceSha256: sha256(JSON.stringify(source)) });

export const typedLine = (jobId: string, over: Partial<Parameters<typeof saveLine>[1]> = {}) => ({
  jobId,
  areaName: '',
  description: 'Old tubes and ballasts taken away, certificate included',
  quantity: '1',
  unitCost: '60',
  unitLabourHours: '0',
  labourRate: '85',
  markupPct: '35',
  taxable: true,
  optional: false,
  chosen: true,
  ...over,
});

/** A job whose draft holds a change line, a circuit, a typed line and two additions. */
export async function draftedJob(shop: QuoteShop, ports: FakeSources): Promise<string> {
  const jobId = await quoteJob(shop);
  await openDraft(shop.estimator, { jobId }, ports);
  await saveLine(shop.estimator, typedLine(jobId));
  await saveLine(
    shop.estimator,
    typedLine(jobId, { description: 'Switch the back room by presence', unitCost: '150', optional: true }),
  );
  await saveLine(
    shop.estimator,
    typedLine(jobId, { description: 'Window display', unitCost: '300', optional: true, chosen: false }),
  );
  return jobId;
}

export async function bodyOf(shop: QuoteShop, jobId: string, ports: SourcePorts): Promise<string> {
  const composed = await withShop(shop.shopId, () => composeQuote(shop.shopId, jobId, new Date(), ports));
  return composed?.bodySha256 ?? '';
}

export async function sendAsIs(shop: QuoteShop, jobId: string, ports: SourcePorts) {
  const bodySha256 = await bodyOf(shop, jobId, ports);
  return sendQuote(
    shop.estimator,
    { jobId, bodySha256, email: 'marsh@tarnlane.example.com', note: 'As we said on site.' },
    ports,
  );
}

export async function changeTerms(
  shop: QuoteShop,
  jobId: string,
  ports: SourcePorts,
  over: Record<string, string>,
): Promise<void> {
  const state = await withShop(shop.shopId, () => draftState(shop.shopId, jobId, ports));
  if (!state) throw new Error('no draft');
  const { depositPct, discountPct, overheadPct, contingencyPct, taxName, taxRatePct, validDays } =
    state.terms;
  await saveTerms(shop.estimator, {
    ...{ jobId, baseVersion: state.terms.version, depositPct, discountPct, overheadPct, contingencyPct },
    ...{ taxName, taxRatePct, validDays: String(validDays), scopeNote: '', exclusions: '' },
    ...over,
  });
}
