'use client';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { FigureInput, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { issueDeposit, issueFinal } from '@/lib/invoices/actions';
import { type IssueForm, issueForm } from '@/lib/invoices/schema';

const KINDS = {
  final: {
    action: issueFinal,
    dueInDays: 14,
    text: 'The accepted total, less what has been invoiced already. It gets its number and goes out by mail at once.',
    button: 'Send the final invoice',
  },
  deposit: {
    action: issueDeposit,
    dueInDays: 7,
    text: 'The deposit that was agreed, once more. It gets the next number and goes out by mail at once.',
    button: 'Send the deposit invoice again',
  },
} as const;

export function IssueInvoiceForm({
  kind,
  shopId,
  jobId,
  email,
}: {
  kind: keyof typeof KINDS;
  shopId: string;
  jobId: string;
  email: string;
}) {
  const router = useRouter();
  const { form, submit, pending, failure } = useZodForm<IssueForm, { id: string }>({
    schema: issueForm,
    defaultValues: { jobId, email, dueInDays: KINDS[kind].dueInDays },
    action: (values, meta) => KINDS[kind].action(shopId, values, meta),
    onDone: () => router.refresh(),
  });
  return (
    <form onSubmit={submit} noValidate className="flex max-w-xl flex-col gap-4">
      <FormFailure failure={failure} />
      <p>{KINDS[kind].text}</p>
      <TextInput
        id={`${kind}-email`}
        label="Mail it to"
        type="email"
        error={errorOf(form, 'email')}
        {...form.register('email')}
      />
      <FigureInput
        id={`${kind}-due`}
        label="Due in"
        unit="days"
        error={errorOf(form, 'dueInDays')}
        {...form.register('dueInDays')}
      />
      <div>
        <Button type="submit" pending={pending}>
          {KINDS[kind].button}
        </Button>
      </div>
    </form>
  );
}
