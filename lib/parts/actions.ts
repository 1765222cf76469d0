'use server';
import { shopAction } from '@/lib/access/action';
import { savePart as savePartCommand } from './commands';
import { type PartForm, partForm } from './schema';

const save = shopAction({
  name: 'parts.savePart',
  permission: 'parts:edit',
  schema: partForm,
  run: savePartCommand,
});

export async function savePart(shopId: string, input: PartForm, meta?: { idempotencyKey?: string }) {
  return save(shopId, input, meta);
}
