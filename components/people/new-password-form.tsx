'use client';
import Link from 'next/link';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { Notice } from '@/components/ui/sheet';
import { setNewPassword } from '@/lib/people/actions';
import { type NewPasswordForm as Values, newPasswordForm } from '@/lib/people/schema';

export function NewPasswordForm({ token }: { token: string }) {
  const { form, submit, pending, failure, done } = useZodForm<Values, true>({
    schema: newPasswordForm,
    defaultValues: { token, password: '', again: '' },
    action: async (values) => {
      const result = await setNewPassword(values);
      return result.ok ? { ok: true, data: true } : result;
    },
  });
  if (done)
    return (
      <Notice kind="done" title="Your new password is set." role="status">
        <p>Every other sign-in of yours has been ended.</p>
        <p className="mt-3">
          <Link href="/sign-in">Sign in</Link>
        </p>
      </Notice>
    );
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      <FormFailure failure={failure}>
        {failure?.code === 'gone' ? <Link href="/forgotten">Ask for a new address</Link> : null}
      </FormFailure>
      <TextInput
        id="password"
        label="New password"
        hint="At least 10 characters."
        type="password"
        autoComplete="new-password"
        error={errorOf(form, 'password')}
        {...form.register('password')}
      />
      <TextInput
        id="again"
        label="The same again"
        type="password"
        autoComplete="new-password"
        error={errorOf(form, 'again')}
        {...form.register('again')}
      />
      <Button type="submit" pending={pending}>
        Set it
      </Button>
    </form>
  );
}
