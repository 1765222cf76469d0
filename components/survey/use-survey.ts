'use client';
/** The survey of one job on this device: typed entities, edits, and what came with the last snapshot. */
import { useCallback, useMemo } from 'react';
import { putEntity } from '@/lib/offline/edits';
import { type OfflineScope, useOffline } from '@/lib/offline/use-offline';
import type { PartFigures } from '@/lib/parts/schema';
import type { Answer } from '@/lib/engine/contract';
import type { Area, ChangeLine, CircuitBody, Collection, Cove, Luminaire } from '@/lib/surveys/schema';
import type { OwnType, Reading, UtilityAccount } from '@/lib/surveys/schema/site';
import { DEFAULT_SETTINGS, type ShopSettings } from '@/lib/units/settings';

export interface Kept<T> {
  id: string;
  dirty: boolean;
  data: T;
}

interface Extra {
  settings: ShopSettings;
  benchWork: boolean;
  parts: PartFigures[];
  takenAt: string;
  job: { id: string; number: string; title: string; siteName: string; surveyDone: boolean };
}

type Figured = { answer: Answer | null; openStops: number };

export interface Survey {
  offline: OfflineScope;
  ready: boolean;
  photosUrl: string;
  extra: Extra | null;
  settings: ShopSettings;
  areas: Kept<Area>[];
  luminaires: Kept<Luminaire>[];
  coves: Kept<Cove>[];
  circuits: Kept<CircuitBody & Figured>[];
  changeLines: Kept<ChangeLine & Figured>[];
  readings: Kept<Reading>[];
  accounts: Kept<UtilityAccount>[];
  /** Types that the shop keeps, from any of its jobs. */
  ownTypes: Kept<OwnType>[];
  /** A new entry. */
  add: (collection: Collection, id: string, data: object) => void;
  /** An edit of what is shown: only what it changed is written. */
  edit: <T extends object>(collection: Collection, one: Kept<T>, change: Partial<T>) => void;
  archive: <T extends object>(collection: Collection, one: Kept<T>) => void;
}

const SERVER_ONLY = new Set(['answer', 'openStops']);
/** A body holds what the person may write; the server's own figures are not sent back to it. */
const bodyOf = (data: object) =>
  Object.fromEntries(Object.entries(data).filter(([key]) => !SERVER_ONLY.has(key)));

export function useSurvey(options: { shopId: string; membershipId: string; jobId: string }): Survey {
  const { shopId, membershipId, jobId } = options;
  const base = `/api/v1/shops/${shopId}/jobs/${jobId}`;
  const offline = useOffline({
    shopId,
    personId: membershipId,
    scope: jobId,
    snapshotUrl: `${base}/survey`,
    eventsUrl: `${base}/events`,
  });
  const { store, entities, nudge } = offline;
  const extra = (offline.extra ?? null) as Extra | null;

  const of = useMemo(() => {
    const pick = <T>(collection: Collection): Kept<T>[] =>
      (entities ?? [])
        .filter((one) => one.collection === collection && !one.archived)
        .map((one) => ({ id: one.id, dirty: one.dirty === 1, data: one.data as T }));
    return {
      areas: pick<Area>('areas').sort((a, b) => a.data.position - b.data.position),
      luminaires: pick<Luminaire>('luminaires'),
      coves: pick<Cove>('coves'),
      circuits: pick<CircuitBody & Figured>('circuits'),
      changeLines: pick<ChangeLine & Figured>('change-lines').sort(
        (a, b) => a.data.position - b.data.position,
      ),
      readings: pick<Reading>('readings').sort((a, b) => a.data.readAt.localeCompare(b.data.readAt)),
      accounts: pick<UtilityAccount>('utility-accounts'),
      ownTypes: pick<OwnType>('luminaire-types'),
    };
  }, [entities]);

  const put = useCallback(
    (collection: Collection, id: string, data: object, base?: object, archived = false) =>
      void putEntity(store, {
        scope: jobId,
        collection,
        id,
        data: bodyOf(data),
        archived,
        ...(base ? { base: bodyOf(base) } : {}),
      }).then(nudge),
    [store, jobId, nudge],
  );
  const add = useCallback(
    (collection: Collection, id: string, data: object) => put(collection, id, data),
    [put],
  );
  const edit = useCallback(
    <T extends object>(collection: Collection, one: Kept<T>, change: Partial<T>) =>
      put(collection, one.id, { ...one.data, ...change }, one.data),
    [put],
  );
  const archive = useCallback(
    <T extends object>(collection: Collection, one: Kept<T>) =>
      put(collection, one.id, one.data, one.data, true),
    [put],
  );

  return {
    offline,
    ready: entities !== undefined,
    photosUrl: `${base}/photos`,
    extra,
    settings: extra?.settings ?? DEFAULT_SETTINGS,
    ...of,
    add,
    edit,
    archive,
  };
}
