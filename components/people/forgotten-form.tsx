'use client';
import Link from 'next/link';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { Notice } from '@/components/ui/sheet';
import { askForNewPassword } from '@/lib/people/actions';
import { type ForgottenForm as Values, forgottenForm } from '@/lib/people/schema';

export function ForgottenForm() {
  const { form, submit, pending, failure, done } = useZodForm<Values, { email: string }>({
    schema: forgottenForm,
    defaultValues: { email: '' },
    action: async (values) => {
      const result = await askForNewPassword(values);
      return result.ok ? { ok: true, data: { email: values.email } } : result;
    },
  });
  if (done)
    return (
      <Notice kind="done" title="Look into your mail." role="status">
        <p>
          If {done.email} is known here, a mail with an address to set a new password is on its way. It works
          for an hour.
        </p>
        <p className="mt-3">
          <Link href="/sign-in">To the sign-in</Link>
        </p>
      </Notice>
    );
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      <FormFailure failure={failure} />
      <TextInput
        id="email"
        label="E-mail"
        type="email"
        autoComplete="username"
        error={errorOf(form, 'email')}
        {...form.register('email')}
      />
      <Button type="submit" pending={pending}>
        Send me an address
      </Button>
    </form>
  );
}
