'use client';
/** What is kept on this phone and not sent yet, and what the server did not take. */
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/sheet';
import type { OfflineScope } from '@/lib/offline/use-offline';
import { message } from '@/lib/messages';

function connection({ outcome }: OfflineScope): string {
  if (outcome === 'offline') return message('wiring.status.no-signal');
  if (outcome === 'signed-out') return message('wiring.status.signed-out');
  if (outcome === 'outdated') return message('wiring.status.outdated');
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
  const drop = async (seq: number | undefined) => {
    if (seq !== undefined) await offline.store.queue.delete(seq);
  };
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
        <Button look="secondary" className="mt-2" onClick={() => void drop(event.seq)}>
          {message('wiring.refused.drop')}
        </Button>
      </Notice>
    ));
}
