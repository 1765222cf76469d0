'use client';
/** What waits for a person: a choice where two changed one entry, and what the server did not take. */
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/sheet';
import { dropMine, keepMine, takeTheirs, tryAgain } from '@/lib/offline/decide';
import { asAWhole, clashesOf } from '@/lib/offline/merge';
import type { QueuedEvent } from '@/lib/offline/store';
import type { OfflineScope } from '@/lib/offline/use-offline';
import type { ShopSettings } from '@/lib/units/settings';
import { fieldWords, nameOf, valueWords, type Words } from './words';

const wordsFor = (offline: OfflineScope, settings: ShopSettings): Words => ({
  settings,
  nameById: (id) => {
    const found = (offline.entities ?? []).find((one) => one.id === id);
    return found ? nameOf(found.data) : null;
  },
});

type Choice = (store: OfflineScope['store'], event: QueuedEvent) => Promise<void>;

function happened(event: QueuedEvent, name: string): string {
  if (event.current?.archived) return `Somebody else took ${name} out; you changed it.`;
  if (event.kind.endsWith('.archive')) return `You took ${name} out; somebody else changed it.`;
  return `Somebody else changed ${name} too.`;
}

function Conflict({
  event,
  offline,
  settings,
}: {
  event: QueuedEvent;
  offline: OfflineScope;
  settings: ShopSettings;
}) {
  const { current } = event;
  if (!current) return null;
  const choose = (choice: Choice) => void choice(offline.store, event).then(offline.nudge);
  const words = wordsFor(offline, settings);
  const clashes = clashesOf(event, current).filter(({ path }) => path !== 'position');
  const gone = current.archived || event.kind.endsWith('.archive');
  return (
    <Notice kind="caution" word="Both changed" title={happened(event, nameOf(event.body))} role="status">
      <dl className="my-2 flex flex-col gap-1">
        {clashes.map(({ path, mine, theirs }) => (
          <div key={path} className="flex flex-wrap gap-x-2">
            <dt className="font-bold">{fieldWords(path)}:</dt>
            <dd className="min-w-0 break-words">
              mine {valueWords(path, mine, words)}, theirs {valueWords(path, theirs, words)}
            </dd>
          </div>
        ))}
      </dl>
      {asAWhole(event, current) ? null : (
        <p className="mb-2">What only one of you changed stands either way.</p>
      )}
      <div className="flex flex-wrap gap-3">
        <Button onClick={() => choose(keepMine)}>
          {gone ? (current.archived ? 'Keep mine: it stays' : 'Keep mine: it goes') : 'Keep mine'}
        </Button>
        <Button look="secondary" onClick={() => choose(takeTheirs)}>
          {gone ? (current.archived ? 'Take theirs: it goes' : 'Take theirs: it stays') : 'Take theirs'}
        </Button>
      </div>
    </Notice>
  );
}

function Refused({ event, offline }: { event: QueuedEvent; offline: OfflineScope }) {
  const choose = (choice: Choice) => void choice(offline.store, event).then(offline.nudge);
  return (
    <Notice
      kind="danger"
      word="Not taken"
      title={`${nameOf(event.body)}: ${event.message ?? ''}`}
      role="alert"
    >
      {event.issues?.map((issue) => (
        <p key={issue.path}>
          <strong>{fieldWords(issue.path)}:</strong> {issue.message}
        </p>
      ))}
      <p className="mb-2">It is kept here. Change it, and it is sent again.</p>
      <div className="flex flex-wrap gap-3">
        <Button look="secondary" onClick={() => choose(tryAgain)}>
          Try again
        </Button>
        <Button look="danger" onClick={() => choose(dropMine)}>
          Drop my change
        </Button>
      </div>
    </Notice>
  );
}

export function Choices({ offline, settings }: { offline: OfflineScope; settings: ShopSettings }) {
  return offline.queue.map((event) =>
    event.state === 'conflict' ? (
      <Conflict key={event.id} event={event} offline={offline} settings={settings} />
    ) : event.state === 'refused' ? (
      <Refused key={event.id} event={event} offline={offline} />
    ) : null,
  );
}
