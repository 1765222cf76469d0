'use server';
/** Actions for people who are signed out: asking for a new password and setting it. */
import { headers } from 'next/headers';
import { unstable_rethrow } from 'next/navigation';
import { failure } from '@/lib/access/action';
import type { ActionResult } from '@/lib/messages/result';
import { callerAddress } from '@/lib/platform/auth/options';
import { toAppError } from '@/lib/platform/http/errors';
import { requestReset, redeemReset } from './resets';
import { type ForgottenForm, forgottenForm, type NewPasswordForm, newPasswordForm } from './schema';

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
