import Link from 'next/link';
import type { DeskSent } from '@/lib/quotes/schema/desk';
import { formatDate, formatDateTime, formatMoney } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';
import { RecordAcceptanceTool, ResendTool, WithdrawTool } from './sent-tools';

const STATE: Record<DeskSent['state'], string> = {
  draft: 'Not sent',
  sent: 'Sent, not opened yet',
  opened: 'Opened, waits for an answer',
  accepted: 'Accepted',
  declined: 'Declined',
  superseded: 'Replaced by a newer revision',
  withdrawn: 'Taken back',
  expired: 'Past its date',
};

const EVENT: Record<string, string> = {
  sent: 'Sent to',
  resent: 'Sent again to',
  opened: 'Opened by the customer',
  accepted: 'Accepted',
  declined: 'Declined:',
  superseded: 'Replaced by a newer revision',
  withdrawn: 'Taken back:',
};

function Events({ sent, settings }: { sent: DeskSent; settings: ShopSettings }) {
  return (
    <ol className="mt-2 flex flex-col gap-1 text-[0.95rem]">
      {sent.events.map((event) => (
        <li key={event.id} className="grid gap-x-3 sm:grid-cols-[auto_1fr]">
          <time dateTime={event.at.toISOString()} className="font-mono text-ink-2">
            {formatDateTime(event.at, settings)}
          </time>
          <span className="min-w-0 break-words">
            {EVENT[event.kind] ?? event.kind} {event.note}
            {event.by ? <span className="text-ink-2"> · {event.by}</span> : null}
          </span>
        </li>
      ))}
    </ol>
  );
}

function Acceptance({ sent, settings }: { sent: DeskSent; settings: ShopSettings }) {
  const { acceptance } = sent;
  if (!acceptance) return null;
  return (
    <p className="mt-2">
      <strong>
        ✓ {acceptance.name}, {formatMoney(acceptance.totalMinor, settings)}
      </strong>
      {acceptance.reference ? `, ${acceptance.reference}` : ''}
      <span className="block font-mono text-sm break-all text-ink-2">{acceptance.sha256}</span>
    </p>
  );
}

const OPEN: DeskSent['state'][] = ['sent', 'opened', 'declined', 'expired'];

/** Every revision that went out, the newest first: what it is, what happened to it, and what can be done. */
export function SentList({
  shopId,
  jobId,
  sent,
  settings,
  canSend,
}: {
  shopId: string;
  jobId: string;
  sent: DeskSent[];
  settings: ShopSettings;
  canSend: boolean;
}) {
  return (
    <ul className="flex flex-col">
      {sent.map((revision) => (
        <li
          key={revision.documentId}
          className="border-b border-rule py-4 first:pt-0 last:border-b-0 last:pb-0"
        >
          <div className="flex flex-wrap items-baseline justify-between gap-x-4">
            <p>
              <strong>Revision {revision.revision}</strong>: {STATE[revision.state]}
            </p>
            <p className="font-mono text-lg">{formatMoney(revision.amountMinor, settings)}</p>
          </div>
          {revision.validUntil ? (
            <p className="text-sm text-ink-2">Good until {formatDate(revision.validUntil, settings)}</p>
          ) : null}
          <Acceptance sent={revision} settings={settings} />
          <Events sent={revision} settings={settings} />
          <p className="mt-1 flex flex-wrap gap-x-5">
            <Link
              href={`/s/${shopId}/jobs/${jobId}/quote/${revision.documentId}`}
              className="inline-flex min-h-touch items-center underline"
            >
              As the customer sees it
            </Link>
            {revision.hasPdf ? (
              <a
                href={`/api/v1/shops/${shopId}/documents/${revision.documentId}/pdf`}
                target="_blank"
                rel="noreferrer"
                className="inline-flex min-h-touch items-center underline"
              >
                PDF
              </a>
            ) : null}
          </p>
          {OPEN.includes(revision.state) ? (
            <div className="mt-2 grid items-start gap-2 sm:grid-cols-3">
              {canSend && revision.state !== 'expired' ? (
                <ResendTool shopId={shopId} jobId={jobId} sent={revision} />
              ) : null}
              <RecordAcceptanceTool shopId={shopId} jobId={jobId} sent={revision} />
              {canSend ? <WithdrawTool shopId={shopId} jobId={jobId} sent={revision} /> : null}
            </div>
          ) : null}
        </li>
      ))}
    </ul>
  );
}
