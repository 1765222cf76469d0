/** What phone and server say to each other about edits, for survey and wiring sheet alike. */
import * as z from 'zod/mini';
import type { FieldIssue } from '@/lib/messages/result';

/** Raised when older phones could no longer be understood. */
export const PROTOCOL = 1;
export const MAX_EVENTS = 50;

const kind = z.string().check(z.regex(/^[a-z-]+(\.[a-z-]+)?$/, 'is not a kind of event'), z.maxLength(60));

export const clientEvent = z.strictObject({
  id: z.uuid(),
  kind,
  entityId: z.uuid(),
  baseVersion: z.nullable(z.number().check(z.int())),
  body: z.record(z.string(), z.unknown()),
  at: z.iso.datetime({ offset: true }),
});
export type ClientEvent = z.infer<typeof clientEvent>;

export const eventBatch = z.strictObject({
  protocol: z.literal(PROTOCOL, 'This page is older than the server: reload it; what you typed is kept.'),
  events: z.array(clientEvent).check(z.minLength(1), z.maxLength(MAX_EVENTS)),
});

/** An entity as the server knows it. */
export interface Entity {
  collection: string;
  id: string;
  version: number;
  archived: boolean;
  data: Record<string, unknown>;
}

export interface EventAnswer {
  id: string;
  status: 200 | 403 | 404 | 409 | 422;
  code?: string;
  message?: string;
  issues?: FieldIssue[];
  /** The entity after the event. */
  entity?: Entity;
  /** What stands on the server instead, on a conflict. */
  current?: Entity;
}
