'use client';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { ConflictNotice, type Conflicting } from '@/components/ui/conflict';
import { CheckBox, TextArea, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { saveCustomer } from '@/lib/customers/actions';
import { type CustomerForm as Values, customerForm } from '@/lib/customers/schema';

const LABELS = {
  name: 'Name',
  contactName: 'Contact',
  email: 'E-mail',
  phone: 'Phone',
  address: 'Address',
  consumer: 'Private person',
  notes: 'Notes',
};

type Customer = Omit<Values, 'id' | 'baseVersion'> & { id: string; version: number };

const EMPTY = { name: '', contactName: '', email: '', phone: '', address: '', consumer: false, notes: '' };

function valuesOf(customer: Customer | null): Values {
  if (!customer) return EMPTY;
  const { id, version, name, contactName, email, phone, address, consumer, notes } = customer;
  return { id, baseVersion: version, name, contactName, email, phone, address, consumer, notes };
}

export function CustomerForm({ shopId, customer }: { shopId: string; customer: Customer | null }) {
  const router = useRouter();
  const { form, submit, pending, failure, clearFailure } = useZodForm<
    Values,
    { id: string; version: number }
  >({
    schema: customerForm,
    defaultValues: valuesOf(customer),
    action: (values, meta) => saveCustomer(shopId, values, meta),
    onDone: () => {
      router.push(`/s/${shopId}/customers`);
      router.refresh();
    },
  });
  const theirs = failure?.code === 'conflict' ? (failure.current as Conflicting | undefined) : undefined;
  const settle = (values: Values) => {
    form.reset(values, { keepDefaultValues: true });
    clearFailure();
  };
  const field = (name: 'name' | 'contactName' | 'email' | 'phone') => ({
    id: name,
    label: LABELS[name],
    error: errorOf(form, name),
    ...form.register(name),
  });
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      {theirs ? (
        <ConflictNotice
          mine={form.getValues()}
          theirs={theirs}
          labels={LABELS}
          onKeepMine={() => settle({ ...form.getValues(), baseVersion: theirs.version })}
          onTakeTheirs={() => settle(valuesOf(theirs as unknown as Customer))}
        />
      ) : (
        <FormFailure failure={failure} />
      )}
      <TextInput {...field('name')} autoComplete="off" />
      <TextInput {...field('contactName')} autoComplete="off" />
      <TextInput {...field('email')} type="email" autoComplete="off" />
      <TextInput {...field('phone')} type="tel" autoComplete="off" />
      <TextArea
        id="address"
        label={LABELS.address}
        error={errorOf(form, 'address')}
        {...form.register('address')}
      />
      <CheckBox id="consumer" label="A private person, not a business" {...form.register('consumer')} />
      <TextArea id="notes" label={LABELS.notes} error={errorOf(form, 'notes')} {...form.register('notes')} />
      <Button type="submit" pending={pending}>
        Save
      </Button>
    </form>
  );
}
