'use client';
/** What is kept on this device and not sent yet, and what waits for a person's choice. */
import { Choices } from '@/components/offline/choices';
import { NotKept, SinceWhen } from '@/components/offline/since-when';
import { ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/sheet';
import type { OfflineScope } from '@/lib/offline/use-offline';
import { DEFAULT_SETTINGS, type ShopSettings } from '@/lib/units/settings';

const many = (count: number, one: string, more: string) => `${count} ${count === 1 ? one : more}`;

const TROUBLE: Partial<Record<OfflineScope['outcome'], string>> = {
  'signed-out': 'You are signed out: sign in again.',
  'not-allowed': 'The server does not let you write here any more: ask the owner of the shop.',
  outdated: 'This page is older than the server: reload it.',
  failed: 'The server is in trouble.',
};

function statusText({ queue, outcome }: OfflineScope): string {
  const waiting = queue.filter((event) => event.state === 'pending' || event.state === 'sending').length;
  const toSend = many(waiting, 'change to send', 'changes to send');
  if (outcome === 'offline')
    return waiting > 0 ? `No signal. Kept on this device, ${toSend}.` : 'No signal. Nothing is unsent.';
  const trouble = TROUBLE[outcome];
  if (trouble)
    return waiting > 0 ? `${trouble} Kept on this device, ${toSend}.` : `${trouble} Nothing is unsent.`;
  if (waiting > 0) return `Kept on this device, ${toSend}.`;
  const held = queue.length;
  if (held > 0) return `${many(held, 'change waits', 'changes wait')} for you, below.`;
  return outcome === 'starting' ? 'Opening what is kept on this device.' : 'All saved.';
}

export function SyncStatus({ offline, photos = 0 }: { offline: OfflineScope; photos?: number }) {
  const known = offline.extra as { settings?: ShopSettings } | null | undefined;
  const settings = known?.settings ?? DEFAULT_SETTINGS;
  return (
    <div className="flex flex-col gap-3">
      <div className="text-sm text-ink-2">
        <p role="status">
          {statusText(offline)}
          {photos > 0 ? ` ${photos} ${photos === 1 ? 'photo' : 'photos'} to send.` : ''}
        </p>
        <SinceWhen offline={offline} settings={settings} />
      </div>
      {offline.outcome === 'signed-out' ? (
        <div>
          <ButtonLink href="/sign-in">Sign in again</ButtonLink>
        </div>
      ) : null}
      {offline.outcome === 'offline' && !offline.extra ? (
        <Notice kind="caution" title="This job was never opened on this device with a signal." role="status">
          <p>What was surveyed before is not shown here. What you add is kept, and sent.</p>
        </Notice>
      ) : null}
      <NotKept offline={offline} />
      <Choices offline={offline} settings={settings} />
    </div>
  );
}
