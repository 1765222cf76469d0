import { z } from 'zod';

export const PHOTO_MAX_BYTES = 20 * 1024 * 1024;

/** What a photo shows, from the address of the upload: the body is the file itself. */
export const photoQuery = z.object({
  subjectType: z.enum(['area', 'existing-luminaire', 'circuit', 'sheet', 'job']),
  subjectId: z.uuid(),
  caption: z.string().trim().max(300).default(''),
});
export type PhotoQuery = z.output<typeof photoQuery>;
