'use server';
import { shopAction } from '@/lib/access/action';
import { saveSaving as saveSavingCommand } from './commands';
import { type SavingForm, savingForm } from './schema';

const save = shopAction({
  name: 'savings.saveSaving',
  permission: 'work:edit',
  schema: savingForm,
  run: saveSavingCommand,
});

export async function saveSaving(shopId: string, input: SavingForm, meta?: { idempotencyKey?: string }) {
  return save(shopId, input, meta);
}
