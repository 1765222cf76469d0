'use client';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { TextArea, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { Notice } from '@/components/ui/sheet';
import { sendQuote } from '@/lib/quotes/actions';
import { type SendForm, sendForm } from '@/lib/quotes/schema/forms';

/** Sends what the sender looked at, and only that. */
export function SendPanel({
  shopId,
  jobId,
  bodySha256,
  revision,
  email,
  total,
}: {
  shopId: string;
  jobId: string;
  bodySha256: string;
  revision: number;
  email: string;
  total: string;
}) {
  const router = useRouter();
  const { form, submit, pending, failure, done } = useZodForm<SendForm, { revision: number }>({
    schema: sendForm,
    defaultValues: { jobId, bodySha256, email, note: '' },
    // The hash is of the page as it stands now, not as it stood when the form was first shown.
    action: (values, meta) => sendQuote(shopId, { ...values, bodySha256 }, meta),
    onDone: () => {
      form.resetField('note');
      router.refresh();
    },
  });
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      {done ? (
        <Notice kind="done" role="status" title={`Revision ${done.revision} is on its way.`}>
          It is frozen now; the mail carries the PDF and the customer’s private link.
        </Notice>
      ) : null}
      <FormFailure failure={failure}>
        {failure?.issues.length ? (
          <ul className="list-disc pl-5">
            {failure.issues.map((issue) => (
              <li key={issue.path + issue.message}>{issue.message}</li>
            ))}
          </ul>
        ) : null}
      </FormFailure>
      <TextInput
        id="send-email"
        label="To"
        type="email"
        autoComplete="off"
        error={errorOf(form, 'email')}
        {...form.register('email')}
      />
      <TextArea
        id="send-note"
        label="A few words of your own (may stay empty)"
        error={errorOf(form, 'note')}
        {...form.register('note')}
      />
      <p className="text-sm text-ink-2">
        This freezes revision {revision} at {total}. A sent revision never changes; editing the draft makes
        the next one.
      </p>
      <div>
        <Button type="submit" pending={pending}>
          Send revision {revision}
        </Button>
      </div>
    </form>
  );
}
