'use client';
import { signIn } from 'next-auth/react';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import type { ActionResult } from '@/lib/messages/result';
import { type SignInForm as Values, signInForm } from '@/lib/people/schema';

const WRONG = 'This e-mail and password do not belong together.';
const UNAVAILABLE = 'Signing in does not work just now. Try again in a minute.';

async function attempt(values: Values): Promise<ActionResult<null>> {
  const answer = await signIn('credentials', { ...values, redirect: false });
  if (answer?.ok && !answer.error) return { ok: true, data: null };
  const error = answer?.error ?? '';
  const message = error === 'CredentialsSignin' ? WRONG : error.startsWith('Too many') ? error : UNAVAILABLE;
  return { ok: false, code: 'sign-in', message, issues: [] };
}

export function SignInForm() {
  const { form, submit, pending, failure } = useZodForm<Values, null>({
    schema: signInForm,
    defaultValues: { email: '', password: '' },
    action: attempt,
    // A full load: nothing of an earlier person's pages may linger in the client's cache.
    onDone: () => window.location.reload(),
  });
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      <FormFailure failure={failure} word="Not signed in" />
      <TextInput
        id="email"
        label="E-mail"
        type="email"
        autoComplete="username"
        error={errorOf(form, 'email')}
        {...form.register('email')}
      />
      <TextInput
        id="password"
        label="Password"
        type="password"
        autoComplete="current-password"
        error={errorOf(form, 'password')}
        {...form.register('password')}
      />
      <Button type="submit" pending={pending}>
        Sign in
      </Button>
    </form>
  );
}
