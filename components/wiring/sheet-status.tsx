'use client';
/** What is kept on this phone and not sent yet, and what the server did not take. */
import { NotKept, SinceWhen } from '@/components/offline/since-when';
import { Button, ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/sheet';
import { dropMine, tryAgain } from '@/lib/offline/decide';
import type { QueuedEvent } from '@/lib/offline/store';
import type { OfflineScope } from '@/lib/offline/use-offline';
import { message } from '@/lib/messages';
import type { ShopSettings } from '@/lib/units/settings';

function connection({ outcome }: OfflineScope): string {
  if (outcome === 'offline') return message('wiring.status.no-signal');
  if (outcome === 'signed-out') return message('wiring.status.signed-out');
  if (outcome === 'outdated') return message('wiring.status.outdated');
  if (outcome === 'not-allowed') return message('wiring.status.not-allowed');
  if (outcome === 'failed') return message('wiring.status.failed');
  return '';
}

export function SheetStatus({ offline }: { offline: OfflineScope }) {
  const count = offline.queue.filter((event) => event.state !== 'refused').length;
  const said =
    count > 0
      ? message('wiring.status.to-send', { count })
      : message(offline.outcome === 'starting' ? 'wiring.status.starting' : 'wiring.status.sent');
  const state = connection(offline);
  return (
    <p role="status" className="text-sm">
      {state ? `${state}, ` : ''}
      <strong>{said}</strong>
    </p>
  );
}

/** Refused events stay until somebody has read why. */
export function Refused({ offline }: { offline: OfflineScope }) {
  const choose = (choice: typeof dropMine, event: QueuedEvent) =>
    void choice(offline.store, event).then(offline.nudge);
  return offline.queue
    .filter((event) => event.state === 'refused')
    .map((event) => (
      <Notice
        key={event.id}
        kind="danger"
        word={message('wiring.refused.word')}
        title={event.message ?? ''}
        role="alert"
      >
        {typeof event.body['text'] === 'string' ? <p>{event.body['text']}</p> : null}
        {event.issues?.map((issue) => (
          <p key={issue.path}>
            {issue.path}: {issue.message}
          </p>
        ))}
        <div className="mt-2 flex flex-wrap gap-3">
          <Button look="secondary" onClick={() => choose(tryAgain, event)}>
            {message('wiring.refused.again')}
          </Button>
          <Button look="secondary" onClick={() => choose(dropMine, event)}>
            {message('wiring.refused.drop')}
          </Button>
        </div>
      </Notice>
    ));
}

/** Since when, under the head: the head itself stays short. */
export function SheetSync({ offline, settings }: { offline: OfflineScope; settings: ShopSettings }) {
  return (
    <div className="flex flex-col gap-3 text-sm text-ink-2">
      <SinceWhen offline={offline} settings={settings} />
      {offline.outcome === 'signed-out' ? (
        <div>
          <ButtonLink href="/sign-in">{message('wiring.status.sign-in')}</ButtonLink>
        </div>
      ) : null}
      <NotKept offline={offline} />
    </div>
  );
}
