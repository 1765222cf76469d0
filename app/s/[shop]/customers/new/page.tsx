import type { Metadata } from 'next';
import { CustomerForm } from '@/components/customers/customer-form';
import { PageBody } from '@/components/shell/header';
import { Sheet } from '@/components/ui/sheet';
import { pageActor } from '@/lib/access/actor';

export const metadata: Metadata = { title: 'New customer' };

export default async function NewCustomerPage({ params }: { params: Promise<{ shop: string }> }) {
  const { shop } = await params;
  await pageActor(shop, 'customer:edit');
  return (
    <PageBody title="New customer">
      <Sheet className="max-w-2xl">
        <CustomerForm shopId={shop} customer={null} />
      </Sheet>
    </PageBody>
  );
}
