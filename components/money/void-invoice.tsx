'use client';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { voidOne } from '@/lib/invoices/actions';
import { voidForm, type VoidInput } from '@/lib/invoices/schema';

export function VoidInvoice({
  shopId,
  invoiceId,
  number,
}: {
  shopId: string;
  invoiceId: string;
  number: string;
}) {
  const router = useRouter();
  const { form, submit, pending, failure } = useZodForm<VoidInput, { id: string }>({
    schema: voidForm,
    defaultValues: { invoiceId, reason: '' },
    action: (values, meta) => voidOne(shopId, values, meta),
    onDone: () => router.refresh(),
  });
  return (
    <details>
      <summary className="min-h-touch py-2.5">Void invoice {number}</summary>
      <form onSubmit={submit} noValidate className="mt-2 flex max-w-xl flex-col gap-3">
        <FormFailure failure={failure} />
        <p className="text-ink-2">
          The number stays in the sequence, marked void. Nothing is asked for it any more.
        </p>
        <TextInput
          id={`void-${invoiceId}`}
          label="Why"
          error={errorOf(form, 'reason')}
          {...form.register('reason')}
        />
        <div>
          <Button type="submit" look="danger" pending={pending}>
            Void it
          </Button>
        </div>
      </form>
    </details>
  );
}
