import type { EventRow } from '@/lib/documents/schema';
import { formatDateTime } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';

const EVENT: Partial<Record<EventRow['kind'], string>> = {
  sent: 'Issued, mailed to',
  voided: 'Voided:',
  pdf: 'PDF made',
};

const said = ({ detail }: EventRow): string => {
  const note = detail['reason'] ?? detail['to'];
  return typeof note === 'string' ? note : '';
};

/** What happened to an invoice, oldest first. */
export function InvoiceEvents({ events, settings }: { events: EventRow[]; settings: ShopSettings }) {
  return (
    <ol className="mt-4 flex flex-col gap-1 text-[0.95rem]">
      {events.map((event) => (
        <li key={event.id} className="grid gap-x-3 sm:grid-cols-[auto_1fr]">
          <time dateTime={event.at.toISOString()} className="font-mono text-ink-2">
            {formatDateTime(event.at, settings)}
          </time>
          <span className="min-w-0 break-words">
            {EVENT[event.kind] ?? event.kind} {said(event)}
            {event.by ? <span className="text-ink-2"> · {event.by}</span> : null}
          </span>
        </li>
      ))}
    </ol>
  );
}
