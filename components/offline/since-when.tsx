'use client';
/** How old the oldest unsent edit is, and when this device and the server last had the same. */
import { Notice } from '@/components/ui/sheet';
import type { OfflineScope } from '@/lib/offline/use-offline';
import { message } from '@/lib/messages';
import { formatDateTime } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';

/** Not in the status itself: it would be read out at every exchange. */
export function SinceWhen({ offline, settings }: { offline: OfflineScope; settings: ShopSettings }) {
  const { queue, syncedAt } = offline;
  const oldest = queue.map(({ at }) => at).sort((a, b) => Date.parse(a) - Date.parse(b))[0];
  const time = (at: string) => formatDateTime(at, settings);
  return (
    <p>
      {oldest ? `${message('wiring.status.oldest', { time: time(oldest) })} ` : ''}
      {syncedAt
        ? message('wiring.status.synced', { time: time(syncedAt) })
        : message('wiring.status.never-synced')}
    </p>
  );
}

export function NotKept({ offline }: { offline: OfflineScope }) {
  if (!offline.troubled) return null;
  return (
    <Notice
      kind="danger"
      word={message('wiring.not-kept.word')}
      title={message('wiring.not-kept.title')}
      role="alert"
    >
      <p>{message('wiring.not-kept.what')}</p>
    </Notice>
  );
}
