'use client';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { FigureInput, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { issueFinal } from '@/lib/invoices/actions';
import { type IssueFinalForm, issueFinalForm } from '@/lib/invoices/schema';

export function FinalInvoiceForm({ shopId, jobId, email }: { shopId: string; jobId: string; email: string }) {
  const router = useRouter();
  const { form, submit, pending, failure } = useZodForm<IssueFinalForm, { id: string }>({
    schema: issueFinalForm,
    defaultValues: { jobId, email, dueInDays: 14 },
    action: (values, meta) => issueFinal(shopId, values, meta),
    onDone: () => router.refresh(),
  });
  return (
    <form onSubmit={submit} noValidate className="flex max-w-xl flex-col gap-4">
      <FormFailure failure={failure} />
      <p>
        The accepted total, less what has been invoiced already. It gets its number and goes out by mail at
        once.
      </p>
      <TextInput
        id="final-email"
        label="Mail it to"
        type="email"
        error={errorOf(form, 'email')}
        {...form.register('email')}
      />
      <FigureInput
        id="final-due"
        label="Due in"
        unit="days"
        error={errorOf(form, 'dueInDays')}
        {...form.register('dueInDays')}
      />
      <div>
        <Button type="submit" pending={pending}>
          Send the final invoice
        </Button>
      </div>
    </form>
  );
}
