'use server';
import { shopAction } from '@/lib/access/action';
import { overrideFinding as overrideFindingCommand } from './commands';
import { overrideForm, type OverrideInput } from './schema';

const override = shopAction({
  name: 'surveys.overrideFinding',
  permission: 'work:edit',
  schema: overrideForm,
  run: overrideFindingCommand,
});

export async function overrideFinding(
  shopId: string,
  input: OverrideInput,
  meta?: { idempotencyKey?: string },
) {
  return override(shopId, input, meta);
}
