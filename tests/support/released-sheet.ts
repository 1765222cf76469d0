/** The wiring sheet of a surveyed job, released: its quote is one typed line, accepted through the office. */
import { withShop } from '@/lib/platform/db';
import { openDraft, recordAcceptance, saveLine, sendQuote } from '@/lib/quotes/commands';
import { composeQuote } from '@/lib/quotes/compose';
import { releaseSheet } from '@/lib/wiring/commands';
import { FakeSources, typedLine } from './quotes';
import type { TestShop } from './shop';

export async function releasedSheet(shop: TestShop, jobId: string): Promise<{ sheetId: string }> {
  const { owner } = shop.actors;
  const ports = new FakeSources();
  await openDraft(owner, { jobId }, ports);
  await saveLine(owner, typedLine(jobId));
  const composed = await withShop(shop.shopId, () => composeQuote(shop.shopId, jobId, new Date(), ports));
  if (!composed) throw new Error('no draft');
  const { documentId } = await sendQuote(
    owner,
    { jobId, bodySha256: composed.bodySha256, email: 'customer@example.com', note: '' },
    ports,
  );
  await recordAcceptance(owner, { jobId, documentId, name: 'A. Marsh', reference: 'PO 17', choices: [] });
  const { id } = await releaseSheet(owner, jobId);
  return { sheetId: id };
}
