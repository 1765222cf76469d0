/** What may happen on a sheet, what each event holds, and what follows from all of them. Phones load it (zod/mini). */
import * as z from 'zod/mini';
import type { Entity } from '@/lib/offline/protocol';
import { judge, type Verdict } from './bands';
import { type ExpectedReading, readingsOfSheet, stepsOfSheet, type WiringSheet } from './sheet';

const personName = z
  .string()
  .check(z.trim(), z.minLength(1, 'Give your name.'), z.maxLength(120, 'At most 120 characters.'));
const words = (empty: string) =>
  z.string().check(z.trim(), z.minLength(1, empty), z.maxLength(2_000, 'At most 2,000 characters.'));
const target = z.string().check(z.minLength(1), z.maxLength(120));
/** Beyond it no meter of this work reads. */
const MOST = 100_000;

export const EVENT_BODIES = {
  acknowledge: z.strictObject({ name: personName }),
  'dead-proved': z.strictObject({ name: personName, note: words('Say what is locked and tagged.') }),
  tick: z.strictObject({ target }),
  untick: z.strictObject({ target }),
  /** `value` null: not measured, with the reason in the note. */
  reading: z.strictObject({
    target,
    value: z.nullable(
      z.number().check(z.minimum(-MOST, 'is out of reach'), z.maximum(MOST, 'is out of reach')),
    ),
    note: z.string().check(z.maxLength(500, 'At most 500 characters.')),
  }),
  note: z.strictObject({ target: z.string().check(z.maxLength(120)), text: words('Write the note.') }),
  different: z.strictObject({
    target: z.string().check(z.maxLength(120)),
    text: words('Say what is different.'),
  }),
  'sign-off': z.strictObject({ name: personName }),
} as const;
export type SheetEventKind = keyof typeof EVENT_BODIES;
export type BodyOf<K extends SheetEventKind> = z.infer<(typeof EVENT_BODIES)[K]>;

export const isSheetEventKind = (kind: string): kind is SheetEventKind => Object.hasOwn(EVENT_BODIES, kind);

/** An event as kept on the device, sent or not. */
export interface Happening {
  id: string;
  kind: SheetEventKind;
  body: Record<string, unknown>;
  at: string;
  membershipId: string;
  personName: string;
}

export const happeningOf = (entity: Pick<Entity, 'data'>): Happening => entity.data as unknown as Happening;

export interface Measured {
  value: number | null;
  note: string;
  at: string;
  by: string;
}

export interface Said {
  id: string;
  kind: 'note' | 'different';
  target: string;
  text: string;
  at: string;
  by: string;
}

export interface Signed {
  name: string;
  at: string;
}

export interface Progress {
  /** By membership: everybody acknowledges for themselves. */
  acknowledged: Map<string, Signed>;
  deadProved: (Signed & { note: string }) | null;
  ticks: Map<string, Signed>;
  readings: Map<string, Measured>;
  said: Said[];
  signedOff: Signed | null;
}

const text = (value: unknown): string => (typeof value === 'string' ? value : '');

const inOrder = (a: Happening, b: Happening) => a.at.localeCompare(b.at) || a.id.localeCompare(b.id);

function take(progress: Progress, event: Happening): void {
  const { body, at, personName: by } = event;
  const of = text(body['target']);
  const name = text(body['name']) || by;
  switch (event.kind) {
    case 'acknowledge':
      if (!progress.acknowledged.has(event.membershipId))
        progress.acknowledged.set(event.membershipId, { name, at });
      break;
    case 'dead-proved':
      progress.deadProved = { name, at, note: text(body['note']) };
      break;
    case 'tick':
      progress.ticks.set(of, { name: by, at });
      break;
    case 'untick':
      progress.ticks.delete(of);
      break;
    case 'reading':
      progress.readings.set(of, { value: body['value'] as number | null, note: text(body['note']), at, by });
      break;
    case 'sign-off':
      progress.signedOff ??= { name, at };
      break;
    default:
      progress.said.push({ id: event.id, kind: event.kind, target: of, text: text(body['text']), at, by });
  }
}

/** What stands after all that happened, in the order of the clock: a later reading or untick replaces an earlier. */
export function progressOf(events: readonly Happening[]): Progress {
  const progress: Progress = {
    acknowledged: new Map(),
    deadProved: null,
    ticks: new Map(),
    readings: new Map(),
    said: [],
    signedOff: null,
  };
  for (const event of [...events].sort(inOrder)) take(progress, event);
  return progress;
}

/** Why this person can not sign off yet, in words; empty when they can. */
export function missingForSignOff(sheet: WiringSheet, progress: Progress, membershipId: string): string[] {
  const lacks: string[] = [];
  if (!progress.acknowledged.has(membershipId)) lacks.push('Acknowledge the cautions by your name.');
  if (!progress.deadProved) lacks.push('Prove it dead, and say so here.');
  const open = stepsOfSheet(sheet).filter((step) => !progress.ticks.has(step.id)).length;
  if (open > 0) lacks.push(open === 1 ? 'One step is not ticked.' : `${open} steps are not ticked.`);
  const unread = readingsOfSheet(sheet).filter((reading) => !progress.readings.has(reading.id)).length;
  if (unread > 0)
    lacks.push(
      unread === 1
        ? 'One reading has no entry: measure it, or say “not measured”.'
        : `${unread} readings have no entry: measure them, or say “not measured”.`,
    );
  return lacks;
}

export const verdictOf = (reading: ExpectedReading, measured: Measured | undefined): Verdict | null =>
  measured === undefined || measured.value === null ? null : judge(reading, measured.value);
