'use client';
/** One wiring sheet on this device: what was released, what has happened on it, sent or not, and what one may do. */
import { useCallback, useMemo } from 'react';
import { addHappening } from '@/lib/offline/edits';
import { type OfflineScope, useOffline } from '@/lib/offline/use-offline';
import {
  type BodyOf,
  type Happening,
  happeningOf,
  type Progress,
  progressOf,
  type SheetEventKind,
} from '@/lib/wiring/schema/events';
import type { WiringSheet } from '@/lib/wiring/schema/sheet';
import { message, type MessageKey, type MessageValues } from '@/lib/messages';
import { formatTime } from '@/lib/units';
import { DEFAULT_SETTINGS, type ShopSettings } from '@/lib/units/settings';

interface Extra {
  sheet: WiringSheet;
  newer: { id: string; revision: number } | null;
  me: { membershipId: string; name: string; mainsQualified: boolean };
}

export interface SheetOnPhone extends Extra {
  offline: OfflineScope;
  progress: Progress;
  settings: ShopSettings;
  /** Acknowledged by this person. */
  acknowledged: boolean;
  /** Steps may be ticked. */
  open: boolean;
  happened: <K extends SheetEventKind>(kind: K, body: BodyOf<K>) => void;
  t: (key: MessageKey, values?: MessageValues) => string;
  time: (at: string) => string;
}

/** What waits on this device counts as done here; what the server refused does not. */
function waiting({ queue }: OfflineScope, me: Extra['me']): Happening[] {
  return queue
    .filter((event) => event.collection === 'happening' && event.state !== 'refused')
    .map(({ id, kind, body, at }) => ({
      id,
      kind: kind as SheetEventKind,
      body,
      at,
      membershipId: me.membershipId,
      personName: me.name,
    }));
}

/** Null in `sheet` until it is on the device. */
export function useSheet(ids: { shopId: string; membershipId: string; sheetId: string }): {
  ready: boolean;
  offline: OfflineScope;
  sheet: SheetOnPhone | null;
} {
  const { shopId, membershipId, sheetId } = ids;
  const base = `/api/v1/shops/${shopId}/sheets/${sheetId}`;
  const offline = useOffline({
    shopId,
    personId: membershipId,
    scope: sheetId,
    snapshotUrl: `${base}/sheet`,
    eventsUrl: `${base}/events`,
  });
  const { store, nudge, entities, queue } = offline;
  const extra = (offline.extra ?? null) as Extra | null;

  const progress = useMemo(() => {
    const sent = (entities ?? []).map(happeningOf);
    return progressOf(extra ? [...sent, ...waiting({ queue } as OfflineScope, extra.me)] : sent);
  }, [entities, queue, extra]);

  const happened = useCallback(
    (kind: SheetEventKind, body: object) =>
      void addHappening(store, { scope: sheetId, kind, body: { ...body } }).then(nudge),
    [store, sheetId, nudge],
  );

  if (!extra) return { ready: entities !== undefined, offline, sheet: null };
  const settings: ShopSettings = { ...DEFAULT_SETTINGS, ...extra.sheet.settings };
  const acknowledged = progress.acknowledged.has(extra.me.membershipId);
  return {
    ready: true,
    offline,
    sheet: {
      ...extra,
      offline,
      progress,
      settings,
      acknowledged,
      open: acknowledged && progress.deadProved !== null && progress.signedOff === null,
      happened,
      t: (key, values) => message(key, values, settings),
      time: (at) => formatTime(at, settings),
    },
  };
}
