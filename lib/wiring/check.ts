/** What an event on a sheet must be, and when it may happen. Pure: commands.ts gives it the state. */
import * as z from 'zod/mini';
import { toIssues } from '@/lib/engine/run';
import type { ClientEvent } from '@/lib/offline/protocol';
import { AppError, conflict, invalid, notAllowed } from '@/lib/platform/http/errors';
import {
  EVENT_BODIES,
  isSheetEventKind,
  missingForSignOff,
  type Progress,
  type SheetEventKind,
} from './schema/events';
import { readingsOfSheet, stepsOfSheet, type WiringSheet } from './schema/sheet';

export interface ParsedEvent {
  kind: SheetEventKind;
  body: Record<string, unknown>;
}

/** @throws {AppError} `invalid-input` naming the field */
export function parseEvent(event: ClientEvent): ParsedEvent {
  if (!isSheetEventKind(event.kind)) throw invalid('kind', 'This kind of event is not known here.');
  const parsed = z.safeParse(EVENT_BODIES[event.kind] as z.ZodMiniType, event.body);
  if (!parsed.success)
    throw new AppError('invalid-input', 'Some fields need another look.', toIssues(parsed.error));
  return { kind: event.kind, body: parsed.data as Record<string, unknown> };
}

export interface SheetState {
  sheet: WiringSheet;
  progress: Progress;
  superseded: boolean;
  membershipId: string;
  mainsQualified: boolean;
}

function checkWork(state: SheetState): void {
  if (!state.progress.acknowledged.has(state.membershipId))
    throw conflict('Acknowledge the cautions by your name first.');
}

function checkStep(target: string, state: SheetState): void {
  checkWork(state);
  if (!state.progress.deadProved) throw conflict('Prove it dead first, and say so on the sheet.');
  if (!stepsOfSheet(state.sheet).some((step) => step.id === target))
    throw invalid('target', 'This step is not on the sheet.');
}

function checkReading(target: string, value: unknown, state: SheetState): void {
  checkWork(state);
  const reading = readingsOfSheet(state.sheet).find((one) => one.id === target);
  if (!reading) throw invalid('target', 'This reading is not on the sheet.');
  if (reading.mains && value !== null && !state.mainsQualified)
    throw notAllowed('readings on the mains side are for people marked qualified; record “not measured”');
}

function checkSignOff(state: SheetState): void {
  if (state.superseded) throw conflict('A newer copy of this sheet has been released: sign off that one.');
  if (state.progress.signedOff) throw conflict('This sheet is signed off already.');
  const [first] = missingForSignOff(state.sheet, state.progress, state.membershipId);
  if (first !== undefined) throw conflict(first);
}

/**
 * Work on a superseded copy is a fact and is kept; only its sign-off is refused.
 * @throws {AppError} `conflict` when it is too early or too late for the event, `invalid-input` for an unknown target
 */
export function checkEvent(event: ParsedEvent, state: SheetState): void {
  const target = String(event.body['target'] ?? '');
  switch (event.kind) {
    case 'dead-proved':
      return checkWork(state);
    case 'tick':
      return checkStep(target, state);
    case 'untick':
      if (state.progress.signedOff)
        throw conflict('This sheet is signed off: say what is different instead.');
      return checkStep(target, state);
    case 'reading':
      return checkReading(target, event.body['value'], state);
    case 'sign-off':
      return checkSignOff(state);
    default:
  }
}
