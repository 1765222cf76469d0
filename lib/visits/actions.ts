'use server';
import { shopAction } from '@/lib/access/action';
import { cancelVisit as cancelVisitCommand, saveVisit as saveVisitCommand } from './commands';
import { type CancelVisitInput, cancelVisitForm, type VisitForm, visitForm } from './schema';

interface Meta {
  idempotencyKey?: string;
}

const save = shopAction({
  name: 'visits.saveVisit',
  permission: 'visit:edit',
  schema: visitForm,
  run: saveVisitCommand,
});
const cancel = shopAction({
  name: 'visits.cancelVisit',
  permission: 'visit:edit',
  schema: cancelVisitForm,
  run: cancelVisitCommand,
});

export async function saveVisit(shopId: string, input: VisitForm, meta?: Meta) {
  return save(shopId, input, meta);
}
export async function cancelVisit(shopId: string, input: CancelVisitInput, meta?: Meta) {
  return cancel(shopId, input, meta);
}
