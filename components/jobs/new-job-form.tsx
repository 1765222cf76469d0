'use client';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { SelectInput, TextArea, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { createJob } from '@/lib/jobs/actions';
import { type NewJobForm as Values, newJobForm } from '@/lib/jobs/schema';

export function NewJobForm({
  shopId,
  customers,
  chosen,
}: {
  shopId: string;
  customers: { id: string; name: string; address: string }[];
  chosen: string;
}) {
  const router = useRouter();
  const first = customers.find((one) => one.id === chosen);
  const { form, submit, pending, failure } = useZodForm<Values, { id: string }>({
    schema: newJobForm,
    defaultValues: {
      customerId: chosen,
      siteName: first?.name ?? '',
      siteAddress: first?.address ?? '',
      title: '',
    },
    action: (values, meta) => createJob(shopId, values, meta),
    onDone: ({ id }) => router.push(`/s/${shopId}/jobs/${id}`),
  });
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      <FormFailure failure={failure} />
      <SelectInput
        id="customerId"
        label="Customer"
        error={errorOf(form, 'customerId')}
        {...form.register('customerId')}
      >
        <option value="">Choose</option>
        {customers.map((one) => (
          <option key={one.id} value={one.id}>
            {one.name}
          </option>
        ))}
      </SelectInput>
      <TextInput
        id="siteName"
        label="Site"
        error={errorOf(form, 'siteName')}
        {...form.register('siteName')}
      />
      <TextArea
        id="siteAddress"
        label="Address of the site"
        error={errorOf(form, 'siteAddress')}
        {...form.register('siteAddress')}
      />
      <TextInput
        id="title"
        label="What the job is"
        hint="As the customer would say it: new lighting for the counter"
        error={errorOf(form, 'title')}
        {...form.register('title')}
      />
      <Button type="submit" pending={pending}>
        Open the job
      </Button>
    </form>
  );
}
