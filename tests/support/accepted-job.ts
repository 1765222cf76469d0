/** A job whose quote has been sent and accepted: where money and wiring begin. */
import { randomUUID } from 'node:crypto';
import { saveCustomer } from '@/lib/customers/commands';
import { createJob, markSurveyDone } from '@/lib/jobs/commands';
import { withShop } from '@/lib/platform/db';
import { openDraft, recordAcceptance, saveLine, sendQuote } from '@/lib/quotes/commands';
import { composeQuote } from '@/lib/quotes/compose';
import { FakeSources, typedLine } from './quotes';
import type { TestShop } from './shop';

export interface AcceptedJob {
  jobId: string;
  documentId: string;
  totalMinor: number;
  depositMinor: number;
}

export async function acceptedJob(shop: TestShop): Promise<AcceptedJob> {
  const { owner } = shop.actors;
  const email = 'customer@example.com';
  const customer = await saveCustomer(owner, {
    name: `Customer ${randomUUID().slice(0, 8)}`,
    contactName: 'A. Marsh',
    email,
    phone: '',
    address: '1 Tarn Lane',
    consumer: false,
    notes: '',
  });
  const { id: jobId } = await createJob(owner, {
    customerId: customer.id,
    siteName: 'Bakery',
    siteAddress: '',
    title: 'New lighting',
  });
  await markSurveyDone(owner, { jobId, done: true });
  const ports = new FakeSources();
  await openDraft(owner, { jobId }, ports);
  await saveLine(owner, typedLine(jobId));
  const composed = await withShop(shop.shopId, () => composeQuote(shop.shopId, jobId, new Date(), ports));
  if (!composed) throw new Error('no draft');
  const { documentId } = await sendQuote(
    owner,
    { jobId, bodySha256: composed.bodySha256, email, note: '' },
    ports,
  );
  const { totalMinor, depositMinor } = await recordAcceptance(owner, {
    jobId,
    documentId,
    name: 'A. Marsh',
    reference: 'PO 17',
    choices: [],
  });
  return { jobId, documentId, totalMinor, depositMinor };
}
