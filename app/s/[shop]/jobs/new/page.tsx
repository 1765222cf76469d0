import type { Metadata } from 'next';
import { NewJobForm } from '@/components/jobs/new-job-form';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState, Sheet } from '@/components/ui/sheet';
import { pageActor } from '@/lib/access/actor';
import { loadCustomers } from '@/lib/customers/queries';

export const metadata: Metadata = { title: 'New job' };

export default async function NewJobPage({
  params,
  searchParams,
}: {
  params: Promise<{ shop: string }>;
  searchParams: Promise<{ customer?: string }>;
}) {
  const { shop } = await params;
  await pageActor(shop, 'job:open');
  const customers = await loadCustomers(shop);
  const { customer } = await searchParams;
  return (
    <PageBody title="New job">
      <Sheet className="max-w-2xl">
        {customers.length === 0 ? (
          <EmptyState action={<ButtonLink href={`/s/${shop}/customers/new`}>New customer</ButtonLink>}>
            A job is for a customer: add the first one.
          </EmptyState>
        ) : (
          <NewJobForm
            shopId={shop}
            customers={customers.map(({ id, name, address }) => ({ id, name, address }))}
            chosen={customers.some((one) => one.id === customer) ? (customer ?? '') : ''}
          />
        )}
      </Sheet>
    </PageBody>
  );
}
