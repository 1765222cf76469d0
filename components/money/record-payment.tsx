'use client';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { FigureInput, SelectInput, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { recordPayment } from '@/lib/payments/actions';
import { type RecordPaymentForm, recordPaymentForm } from '@/lib/payments/schema';

export function RecordPayment({
  shopId,
  invoiceId,
  number,
  today,
  open,
}: {
  shopId: string;
  invoiceId: string;
  number: string;
  today: string;
  open: string;
}) {
  const router = useRouter();
  const { form, submit, pending, failure } = useZodForm<RecordPaymentForm, { id: string }>({
    schema: recordPaymentForm,
    defaultValues: { invoiceId, method: 'transfer', amount: open, receivedOn: today, reference: '' },
    action: (values, meta) => recordPayment(shopId, values, meta),
    onDone: () => router.refresh(),
  });
  const id = (name: string) => `${name}-${invoiceId}`;
  return (
    <details>
      <summary className="min-h-touch py-2.5 font-bold">Record a payment for invoice {number}</summary>
      <form onSubmit={submit} noValidate className="mt-2 grid max-w-3xl gap-4 sm:grid-cols-2">
        <div className="sm:col-span-2">
          <FormFailure failure={failure} />
        </div>
        <SelectInput
          id={id('method')}
          label="How it came"
          error={errorOf(form, 'method')}
          {...form.register('method')}
        >
          <option value="transfer">Transfer</option>
          <option value="cheque">Cheque</option>
          <option value="cash">Cash</option>
        </SelectInput>
        <FigureInput
          id={id('amount')}
          label="Amount"
          error={errorOf(form, 'amount')}
          {...form.register('amount')}
        />
        <TextInput
          id={id('receivedOn')}
          label="Received on"
          type="date"
          error={errorOf(form, 'receivedOn')}
          {...form.register('receivedOn')}
        />
        <TextInput
          id={id('reference')}
          label="Reference"
          error={errorOf(form, 'reference')}
          {...form.register('reference')}
        />
        <div>
          <Button type="submit" pending={pending}>
            Record it
          </Button>
        </div>
      </form>
    </details>
  );
}
