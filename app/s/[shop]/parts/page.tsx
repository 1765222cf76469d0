import type { Metadata } from 'next';
import Link from 'next/link';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState, Sheet } from '@/components/ui/sheet';
import { pageActor } from '@/lib/access/actor';
import { loadParts } from '@/lib/parts/queries';

export const metadata: Metadata = { title: 'Parts and prices' };

export default async function PartsPage({ params }: { params: Promise<{ shop: string }> }) {
  const { shop } = await params;
  await pageActor(shop, 'parts:see');
  const parts = await loadParts(shop);
  return (
    <PageBody
      title="Parts and prices"
      actions={<ButtonLink href={`/s/${shop}/parts/new`}>New part</ButtonLink>}
    >
      <Sheet>
        {parts.length === 0 ? (
          <EmptyState>No part yet. Circuits and quotes take their figures and prices from here.</EmptyState>
        ) : (
          <table className="block w-full sm:table">
            <caption className="sr-only">Parts and what they cost</caption>
            <thead className="sr-only sm:not-sr-only sm:table-header-group">
              <tr className="border-b border-rule text-left">
                <th scope="col" className="py-2 pr-4">
                  Part
                </th>
                <th scope="col" className="py-2 pr-4">
                  Kind
                </th>
                <th scope="col" className="py-2 pr-4">
                  Labour
                </th>
                <th scope="col" className="py-2 text-right">
                  Cost
                </th>
              </tr>
            </thead>
            <tbody className="block sm:table-row-group">
              {parts.map((part) => (
                <tr key={part.id} className="block border-b border-rule py-2 last:border-b-0 sm:table-row">
                  <td className="block sm:table-cell sm:py-2 sm:pr-4">
                    <Link
                      href={`/s/${shop}/parts/${part.id}`}
                      className="inline-flex min-h-touch items-center font-bold"
                    >
                      {part.name}
                    </Link>
                    <span className="block font-mono text-sm text-ink-2">{part.sku}</span>
                  </td>
                  <td className="inline-block pr-4 sm:table-cell sm:pr-4">{part.kind}</td>
                  <td className="inline-block pr-4 font-mono sm:table-cell">{part.labourHours} h</td>
                  <td className="inline-block text-right font-mono sm:table-cell">
                    {part.cost} <span className="text-ink-2">/{part.unit === 'metre' ? 'm' : 'each'}</span>
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        )}
      </Sheet>
    </PageBody>
  );
}
