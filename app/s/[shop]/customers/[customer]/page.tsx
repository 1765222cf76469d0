import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { CustomerForm } from '@/components/customers/customer-form';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { Sheet } from '@/components/ui/sheet';
import { isId, pageActor } from '@/lib/access/actor';
import { loadCustomer } from '@/lib/customers/queries';

export const metadata: Metadata = { title: 'Customer' };

export default async function CustomerPage({
  params,
}: {
  params: Promise<{ shop: string; customer: string }>;
}) {
  const { shop, customer: id } = await params;
  await pageActor(shop, 'customer:edit');
  const customer = isId(id) ? await loadCustomer(shop, id) : null;
  if (!customer) notFound();
  return (
    <PageBody
      title={customer.name}
      actions={<ButtonLink href={`/s/${shop}/jobs/new?customer=${customer.id}`}>New job for them</ButtonLink>}
    >
      <Sheet className="max-w-2xl">
        <CustomerForm shopId={shop} customer={customer} />
      </Sheet>
    </PageBody>
  );
}
