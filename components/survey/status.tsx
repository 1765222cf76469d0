'use client';
/** What is kept on this device and not sent yet, and what waits for a person's choice. */
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/sheet';
import { keepMine, takeTheirs } from '@/lib/offline/edits';
import type { QueuedEvent } from '@/lib/offline/store';
import type { OfflineScope } from '@/lib/offline/use-offline';

function statusText({ queue, outcome }: OfflineScope): string {
  const waiting = queue.filter((event) => event.state === 'pending' || event.state === 'sending').length;
  const toSend = waiting === 1 ? '1 change to send' : `${waiting} changes to send`;
  if (outcome === 'signed-out') return `You are signed out: sign in again. ${toSend}, kept on this device.`;
  if (outcome === 'outdated')
    return `This page is older than the server: reload it. ${toSend}, kept on this device.`;
  if (outcome === 'offline')
    return waiting > 0 ? `No signal. Kept on this device, ${toSend}.` : 'No signal. Nothing is unsent.';
  if (waiting > 0) return `Kept on this device, ${toSend}.`;
  const held = queue.length;
  if (held > 0) return held === 1 ? '1 change waits for you, below.' : `${held} changes wait for you, below.`;
  return outcome === 'starting' ? 'Opening what is kept on this device.' : 'All saved.';
}

const nameOf = (data: Record<string, unknown>) => {
  const name = data['name'] ?? data['luminaireType'] ?? data['newType'];
  return typeof name === 'string' && name !== '' ? name : 'this entry';
};

/** `weeklyHours` as "weekly hours": the fields' own labels stand on the screen below. */
const wordsOf = (key: string) => key.replace(/([A-Z])/g, ' $1').toLowerCase();

function shown(value: unknown): string {
  if (value === null || value === undefined || value === '') return 'not known';
  return typeof value === 'object' ? JSON.stringify(value) : `“${String(value)}”`;
}

function Conflict({ event, offline }: { event: QueuedEvent; offline: OfflineScope }) {
  const choose = (choice: typeof keepMine) => void choice(offline.store, event).then(offline.nudge);
  const fields = Object.keys(event.body).filter(
    (key) => JSON.stringify(event.body[key]) !== JSON.stringify(event.current?.data[key]),
  );
  return (
    <Notice
      kind="caution"
      word="Both changed"
      title={`Somebody else changed ${nameOf(event.body)} too.`}
      role="status"
    >
      <dl className="my-2 flex flex-col gap-1">
        {fields.slice(0, 8).map((key) => (
          <div key={key} className="flex flex-wrap gap-x-2">
            <dt className="font-bold">{wordsOf(key)}:</dt>
            <dd>
              mine {shown(event.body[key])}, theirs {shown(event.current?.data[key])}
            </dd>
          </div>
        ))}
      </dl>
      <div className="flex flex-wrap gap-3">
        <Button onClick={() => choose(keepMine)}>Keep mine</Button>
        <Button look="secondary" onClick={() => choose(takeTheirs)}>
          Take theirs
        </Button>
      </div>
    </Notice>
  );
}

export function SyncStatus({ offline, photos = 0 }: { offline: OfflineScope; photos?: number }) {
  const refused = offline.queue.filter((event) => event.state === 'refused');
  return (
    <div className="flex flex-col gap-3">
      <p role="status" className="text-sm text-ink-2">
        {statusText(offline)}
        {photos > 0 ? ` ${photos} ${photos === 1 ? 'photo' : 'photos'} to send.` : ''}
      </p>
      {offline.queue
        .filter((event) => event.state === 'conflict')
        .map((event) => (
          <Conflict key={event.id} event={event} offline={offline} />
        ))}
      {refused.map((event) => (
        <Notice
          key={event.id}
          kind="danger"
          word="Not taken"
          title={`${nameOf(event.body)}: ${event.message ?? ''}`}
          role="alert"
        >
          {event.issues?.map((issue) => (
            <p key={issue.path}>
              {issue.path}: {issue.message}
            </p>
          ))}
          <p>It is kept here. Change it, and it is sent again.</p>
        </Notice>
      ))}
    </div>
  );
}
