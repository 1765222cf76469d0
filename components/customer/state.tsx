import { Notice } from '@/components/ui/sheet';
import { message } from '@/lib/messages';
import type { QuoteContent } from '@/lib/quotes/schema/content';
import { formatDateTime, formatMoney } from '@/lib/units';
import { Band } from './section';

export type ClosedState = 'expired' | 'withdrawn' | 'declined' | 'superseded';

/** Why the quote can be read and no longer signed. */
export function ClosedNotice({ state }: { state: ClosedState }) {
  return (
    <Band>
      <Notice
        kind="caution"
        word={message(`customer.state.${state}`)}
        title={message(`customer.closed.${state}`)}
      />
    </Band>
  );
}

export function AcceptedNotice({
  acceptance,
  settings,
}: {
  acceptance: { name: string; at: Date; totalMinor: string; sha256: string; shownText: string };
  settings: QuoteContent['settings'];
}) {
  return (
    <Band>
      <Notice
        kind="done"
        word={message('customer.state.accepted')}
        title={message('customer.state.accepted-by', {
          name: acceptance.name,
          when: formatDateTime(acceptance.at, settings),
          total: formatMoney(Number(acceptance.totalMinor), settings),
        })}
      >
        <p>{acceptance.shownText}</p>
        <p className="mt-2 text-sm break-all text-ink-2">
          {message('customer.state.record', { hash: acceptance.sha256 })}
        </p>
      </Notice>
    </Band>
  );
}
