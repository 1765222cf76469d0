import { z } from 'zod';

export { PHOTO_MAX_BYTES } from '@/lib/offline/photos';

/** What a photo shows, from the address of the upload: the body is the file itself. */
export const photoQuery = z.object({
  subjectType: z.enum(['area', 'existing-luminaire', 'circuit', 'sheet', 'job']),
  subjectId: z.uuid(),
  caption: z.string().trim().max(300).default(''),
});
export type PhotoQuery = z.output<typeof photoQuery>;
