'use server';
import { headers } from 'next/headers';
import { unstable_rethrow } from 'next/navigation';
import { failure } from '@/lib/access/action';
import type { ActionResult } from '@/lib/messages/result';
import { callerAddress } from '@/lib/platform/auth/options';
import { toAppError } from '@/lib/platform/http/errors';
import { redeemReset, requestReset } from './resets';
import { type ForgottenForm, forgottenForm, type NewPasswordForm, newPasswordForm } from './schema';
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

// For people who are signed out: asking for a new password, and setting it.

const invalid = (issues: { path: PropertyKey[]; message: string }[]): ActionResult<never> => ({
  ok: false,
  code: 'invalid-input',
  message: 'Some fields need another look.',
  issues: issues.map((issue) => ({ path: issue.path.map(String).join('.'), message: issue.message })),
});

async function attempt<T>(work: () => Promise<T>): Promise<ActionResult<T>> {
  try {
    return { ok: true, data: await work() };
  } catch (error) {
    unstable_rethrow(error);
    return failure(toAppError(error));
  }
}

/** Answers the same whether the e-mail is known or not. */
export async function askForNewPassword(input: ForgottenForm): Promise<ActionResult<null>> {
  const parsed = forgottenForm.safeParse(input);
  if (!parsed.success) return invalid(parsed.error.issues);
  const address = callerAddress((await headers()).get('x-forwarded-for') ?? '');
  return attempt(async () => {
    await requestReset(parsed.data.email, address);
    return null;
  });
}

export async function setNewPassword(input: NewPasswordForm): Promise<ActionResult<null>> {
  const parsed = newPasswordForm.safeParse(input);
  if (!parsed.success) return invalid(parsed.error.issues);
  return attempt(async () => {
    await redeemReset(parsed.data.token, parsed.data.password);
    return null;
  });
}
