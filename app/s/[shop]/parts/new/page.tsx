import type { Metadata } from 'next';
import { PartEditor } from '@/components/parts/part-editor';
import { PageBody } from '@/components/shell/header';
import { Sheet } from '@/components/ui/sheet';
import { pageActor } from '@/lib/access/actor';

export const metadata: Metadata = { title: 'New part' };

export default async function NewPartPage({ params }: { params: Promise<{ shop: string }> }) {
  const { shop } = await params;
  await pageActor(shop, 'parts:edit');
  return (
    <PageBody title="New part">
      <Sheet className="max-w-2xl">
        <PartEditor shopId={shop} part={null} />
      </Sheet>
    </PageBody>
  );
}
