import type { Metadata } from 'next';
import { SettingsForm } from '@/components/shops/settings-form';
import { PageBody } from '@/components/shell/header';
import { Sheet } from '@/components/ui/sheet';
import { pageActor } from '@/lib/access/actor';
import { loadSettingsForm } from '@/lib/shops/queries';

export const metadata: Metadata = { title: 'Shop' };

export default async function SettingsPage({ params }: { params: Promise<{ shop: string }> }) {
  const { shop } = await params;
  await pageActor(shop, 'settings:edit');
  return (
    <PageBody title="Shop" sub="What figures, papers and prices follow.">
      <Sheet className="max-w-3xl">
        <SettingsForm shopId={shop} values={await loadSettingsForm(shop)} />
      </Sheet>
    </PageBody>
  );
}
