import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { PartEditor } from '@/components/parts/part-editor';
import { PageBody } from '@/components/shell/header';
import { Sheet } from '@/components/ui/sheet';
import { isId, pageActor } from '@/lib/access/actor';
import { loadPartForm } from '@/lib/parts/queries';

export const metadata: Metadata = { title: 'Part' };

export default async function PartPage({ params }: { params: Promise<{ shop: string; part: string }> }) {
  const { shop, part: id } = await params;
  await pageActor(shop, 'parts:edit');
  const part = isId(id) ? await loadPartForm(shop, id) : null;
  if (!part) notFound();
  return (
    <PageBody title={part.name}>
      <Sheet className="max-w-2xl">
        <PartEditor shopId={shop} part={part} />
      </Sheet>
    </PageBody>
  );
}
