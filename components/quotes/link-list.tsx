'use client';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/sheet';
import { closeLink } from '@/lib/links/actions';
import type { DeskQuote } from '@/lib/quotes/schema/desk';
import { useRun } from './use-run';

/** Who can open the customer's page, and closing it to them. */
export function LinkList({
  shopId,
  jobId,
  links,
}: {
  shopId: string;
  jobId: string;
  links: DeskQuote['links'];
}) {
  const { running, failure, run } = useRun();
  return (
    <section className="mt-5 border-t border-rule pt-4">
      <h3 className="font-sans text-lg font-bold">Who can open the customer’s page</h3>
      {failure ? <Notice kind="danger" word="Not closed" title={failure.message} role="alert" /> : null}
      <ul>
        {links.map((link) => (
          <li
            key={link.id}
            className="flex flex-wrap items-center justify-between gap-3 border-b border-rule py-2 last:border-b-0"
          >
            <span className="min-w-0 break-words">
              {link.email}
              {link.open ? '' : ': closed. Sending again gives them a new link.'}
            </span>
            {link.open ? (
              <Button
                look="danger"
                disabled={running}
                aria-label={`Close the link of ${link.email}`}
                onClick={() => void run(() => closeLink(shopId, { jobId, id: link.id }))}
              >
                Close the link
              </Button>
            ) : null}
          </li>
        ))}
      </ul>
    </section>
  );
}
