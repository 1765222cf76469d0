import type { Metadata } from 'next';
import Link from 'next/link';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState, Sheet } from '@/components/ui/sheet';
import { pageActor } from '@/lib/access/actor';
import { may } from '@/lib/access/policy';
import { loadCustomers } from '@/lib/customers/queries';

export const metadata: Metadata = { title: 'Customers' };

export default async function CustomersPage({ params }: { params: Promise<{ shop: string }> }) {
  const { shop } = await params;
  const actor = await pageActor(shop, 'job:see');
  const customers = await loadCustomers(shop);
  const edit = may(actor, 'customer:edit');
  const add = edit ? <ButtonLink href={`/s/${shop}/customers/new`}>New customer</ButtonLink> : null;
  return (
    <PageBody title="Customers" actions={add}>
      <Sheet>
        {customers.length === 0 ? (
          <EmptyState>No customer yet. Add the first one, and open a job for them.</EmptyState>
        ) : (
          <ul>
            {customers.map((customer) => (
              <li
                key={customer.id}
                className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-b border-rule py-3 last:border-b-0"
              >
                <span className="min-w-0">
                  {edit ? (
                    <Link
                      href={`/s/${shop}/customers/${customer.id}`}
                      className="inline-flex min-h-touch items-center font-bold"
                    >
                      {customer.name}
                    </Link>
                  ) : (
                    <span className="font-bold">{customer.name}</span>
                  )}
                  <span className="block text-ink-2">
                    {[customer.contactName, customer.email, customer.phone].filter(Boolean).join(', ')}
                  </span>
                </span>
                <span className="text-ink-2">
                  {customer.jobs} {customer.jobs === 1 ? 'job' : 'jobs'}
                </span>
              </li>
            ))}
          </ul>
        )}
      </Sheet>
    </PageBody>
  );
}
