'use server';
import { shopAction } from '@/lib/access/action';
import { addMember, changeMember, removeMember } from './commands';
import { type MemberEditForm, type MemberForm, memberEditForm, memberForm, removeMemberForm } from './schema';

interface Meta {
  idempotencyKey?: string;
}

const add = shopAction({
  name: 'people.addPerson',
  permission: 'people:edit',
  schema: memberForm,
  run: addMember,
});
const change = shopAction({
  name: 'people.changePerson',
  permission: 'people:edit',
  schema: memberEditForm,
  run: changeMember,
});
const remove = shopAction({
  name: 'people.removePerson',
  permission: 'people:edit',
  schema: removeMemberForm,
  run: removeMember,
});

export async function addPerson(shopId: string, input: MemberForm, meta?: Meta) {
  return add(shopId, input, meta);
}
export async function changePerson(shopId: string, input: MemberEditForm, meta?: Meta) {
  return change(shopId, input, meta);
}
export async function removePerson(shopId: string, input: { id: string }, meta?: Meta) {
  return remove(shopId, input, meta);
}
