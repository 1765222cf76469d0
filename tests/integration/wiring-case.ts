/** A job with an accepted quote and a solved tape run, ready for its wiring sheet. */
import { randomUUID } from 'node:crypto';
import type { Actor } from '@/lib/access/policy';
import type { TapeRun } from '@/lib/circuits/schema/electrical';
import type { ClientEvent } from '@/lib/offline/protocol';
import { recordAcceptance } from '@/lib/quotes/commands';
import { saveVisit } from '@/lib/visits/commands';
import { addParts, SurveyPen } from '@/seeders/demo';
import { asMigrator, draftedJob, FakeSources, type QuoteShop, quoteShop, sendAsIs } from '../support/quotes';

export async function wiringShop(): Promise<QuoteShop & { run: object }> {
  const shop = await quoteShop();
  await asMigrator('update shops set bench_work = true where id = $1', [shop.shopId]);
  const part = await addParts(shop.owner);
  const run = {
    tape: part('TP-24-144').datasheet as TapeRun['tape'],
    ...{ runMetres: 4.8, driverMetres: 2.5, feed: 'both' },
    driver: { volts: 24, watts: 96, classTwo: true },
  };
  return { ...shop, run };
}

/** Surveyed with a circuit of each kind. */
export async function surveyedJob(shop: QuoteShop & { run: object }, ports: FakeSources): Promise<string> {
  const jobId = await draftedJob(shop, ports);
  const pen = new SurveyPen(shop.estimator, jobId);
  const area = await pen.area(0, 'Counter', [8, 4, 3], 60, { hazards: { suspectCeiling: 'yes' } });
  await pen.circuit(area, 'tape-run', 'Counter cove', shop.run, {});
  await pen.circuit(area, 'branch-circuit', 'Back room lights', { quantity: 12, voltAmps: 37 }, {});
  await pen.circuit(area, 'resistor-array', 'Sign', { supplyVolts: 12.6, count: 6 }, {});
  return jobId;
}

export async function acceptQuoteOf(shop: QuoteShop, jobId: string, ports: FakeSources): Promise<void> {
  const { documentId } = await sendAsIs(shop, jobId, ports);
  await recordAcceptance(shop.office, {
    jobId,
    documentId,
    name: 'A. Marsh',
    reference: 'PO 1',
    choices: [],
  });
}

export async function acceptedJob(shop: QuoteShop & { run: object }): Promise<string> {
  const ports = new FakeSources();
  const jobId = await surveyedJob(shop, ports);
  await acceptQuoteOf(shop, jobId, ports);
  return jobId;
}

export const visitOf = (jobId: string, crew: Actor[], over: object = {}) => ({
  jobId,
  startsAt: '2026-12-02T08:30',
  endsAt: '2026-12-02T16:00',
  crew: crew.map((one) => one.membershipId),
  notes: '',
  ...over,
});

export const goTo = (shop: QuoteShop, jobId: string, crew: Actor[]) =>
  saveVisit(shop.office, visitOf(jobId, crew));

let tick = 0;
export function sheetEvent(kind: string, body: object, more: Partial<ClientEvent> = {}): ClientEvent {
  const id = randomUUID();
  // Each a second after the one before, as a person's taps are.
  const at = new Date(Date.UTC(2026, 11, 2, 9) + 1000 * tick++).toISOString();
  return { id, kind, entityId: id, baseVersion: null, body: { ...body }, at, ...more };
}
