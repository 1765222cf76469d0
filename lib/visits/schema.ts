/** A visit as the desk plans it: local wall-clock times of the shop, and who goes. */
import { z } from 'zod';

const LOCAL = /^\d{4}-\d{2}-\d{2}T([01]\d|2[0-3]):[0-5]\d(:[0-5]\d)?$/;
const isDay = (text: string) => {
  const at = new Date(`${text.slice(0, 10)}T00:00:00Z`);
  return !Number.isNaN(at.getTime()) && at.toISOString().slice(0, 10) === text.slice(0, 10);
};

const localTime = z
  .string()
  .trim()
  .refine((text) => LOCAL.test(text) && isDay(text), 'Give a day and a time, such as 2026-12-01 08:30.');

export const visitForm = z
  .object({
    id: z.uuid().optional(),
    baseVersion: z.number().int().positive().optional(),
    jobId: z.uuid(),
    startsAt: localTime,
    endsAt: localTime,
    crew: z
      .array(z.uuid(), 'Choose who goes.')
      .min(1, 'Choose who goes.')
      .max(50, 'At most 50 people.')
      .refine((ids) => new Set(ids).size === ids.length, 'Each person once.'),
    notes: z.string().trim().max(2000, 'At most 2,000 characters.'),
  })
  .refine((visit) => visit.endsAt > visit.startsAt, {
    path: ['endsAt'],
    message: 'The visit must end after it starts.',
  });
export type VisitForm = z.input<typeof visitForm>;
export type VisitInput = z.output<typeof visitForm>;

export const cancelVisitForm = z.object({ id: z.uuid(), baseVersion: z.number().int().positive() });
export type CancelVisitInput = z.output<typeof cancelVisitForm>;

export interface VisitRow {
  id: string;
  jobId: string;
  jobNumber: string;
  jobTitle: string;
  siteName: string;
  siteAddress: string;
  /** Local wall-clock, `2026-12-01T08:30`. */
  startsAt: string;
  endsAt: string;
  timeZone: string;
  notes: string;
  version: number;
  crew: { id: string; name: string }[];
}

export interface CrewChoice {
  id: string;
  name: string;
  mainsQualified: boolean;
}
