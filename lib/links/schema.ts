import { z } from 'zod';

export const closeLinkForm = z.object({ jobId: z.uuid(), id: z.uuid() });
export type CloseLinkInput = z.output<typeof closeLinkForm>;
