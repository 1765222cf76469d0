'use client';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { TextArea } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { Sheet } from '@/components/ui/sheet';
import { closeJob } from '@/lib/jobs/actions';
import { type CloseJobInput, closeJobForm } from '@/lib/jobs/schema';

export function CloseJob({ shopId, jobId }: { shopId: string; jobId: string }) {
  const router = useRouter();
  const { form, submit, pending, failure } = useZodForm<CloseJobInput, { id: string }>({
    schema: closeJobForm,
    defaultValues: { jobId, note: '' },
    action: (values, meta) => closeJob(shopId, values, meta),
    onDone: () => router.refresh(),
  });
  return (
    <Sheet title="Close the job">
      <form onSubmit={submit} noValidate className="flex max-w-2xl flex-col gap-4">
        <FormFailure failure={failure} />
        <p>The work is signed off and everything is paid. Closing keeps the record as it is.</p>
        <TextArea
          id="note"
          label="Note for the record"
          error={errorOf(form, 'note')}
          {...form.register('note')}
        />
        <Button type="submit" pending={pending}>
          Close this job
        </Button>
      </form>
    </Sheet>
  );
}
