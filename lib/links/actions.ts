'use server';
import { shopAction } from '@/lib/access/action';
import { closeLink as closeLinkCommand } from './commands';
import { type CloseLinkInput, closeLinkForm } from './schema';

const close = shopAction({
  name: 'links.closeLink',
  permission: 'job:open',
  schema: closeLinkForm,
  run: closeLinkCommand,
});

export async function closeLink(shopId: string, input: CloseLinkInput, meta?: { idempotencyKey?: string }) {
  return close(shopId, input, meta);
}
