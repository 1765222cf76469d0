import { z } from 'zod';

export const releaseForm = z.object({ jobId: z.uuid() });
export type ReleaseInput = z.output<typeof releaseForm>;
