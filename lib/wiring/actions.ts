'use server';
import { shopAction } from '@/lib/access/action';
import { releaseSheet as releaseCommand } from './commands';
import { releaseForm, type ReleaseInput } from './schema/release';

const release = shopAction({
  name: 'wiring.releaseSheet',
  permission: 'sheet:release',
  schema: releaseForm,
  run: (actor, { jobId }) => releaseCommand(actor, jobId),
});

export async function releaseSheet(shopId: string, input: ReleaseInput, meta?: { idempotencyKey?: string }) {
  return release(shopId, input, meta);
}
