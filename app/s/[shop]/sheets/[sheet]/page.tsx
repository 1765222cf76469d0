import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { SheetScreen } from '@/components/wiring/sheet-screen';
import { isId, pageActor } from '@/lib/access/actor';
import { checkSheet } from '@/lib/wiring/queries';

export const metadata: Metadata = { title: 'Wiring sheet' };

/** A shell without private data: what it shows comes from the device's store and the API. */
export default async function SheetPage({ params }: { params: Promise<{ shop: string; sheet: string }> }) {
  const { shop, sheet } = await params;
  const actor = await pageActor(shop, 'sheet:write');
  if (!isId(sheet)) notFound();
  await checkSheet(actor, sheet).catch(() => notFound());
  return (
    <main id="main" className="px-4 pb-8 sm:px-8">
      <SheetScreen shopId={shop} membershipId={actor.membershipId} sheetId={sheet} />
    </main>
  );
}
