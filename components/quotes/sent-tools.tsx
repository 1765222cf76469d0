'use client';
import { useRouter } from 'next/navigation';
import { useMemo, useState } from 'react';
import { Button } from '@/components/ui/button';
import { CheckBox, TextArea, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { Notice } from '@/components/ui/sheet';
import { recordAcceptance, resendQuote, withdrawQuote } from '@/lib/quotes/actions';
import type { DeskSent } from '@/lib/quotes/schema/desk';
import {
  type OfficeAcceptanceForm,
  officeAcceptanceForm,
  type ResendForm,
  resendForm,
  type WithdrawForm,
  withdrawForm,
} from '@/lib/quotes/schema/forms';

interface Of {
  shopId: string;
  jobId: string;
  sent: DeskSent;
}

const TOOL = 'rounded-md border border-rule px-3';
const SUMMARY = 'flex min-h-touch items-center justify-between gap-3 font-bold after:content-["+"]';

export function ResendTool({ shopId, jobId, sent }: Of) {
  const router = useRouter();
  const { documentId } = sent;
  const { form, submit, pending, failure, done } = useZodForm<ResendForm, { id: string }>({
    schema: resendForm,
    defaultValues: { jobId, documentId, email: sent.sentTo },
    action: (values, meta) => resendQuote(shopId, values, meta),
    onDone: () => router.refresh(),
  });
  return (
    <details className={TOOL}>
      <summary className={SUMMARY}>Send again</summary>
      <form onSubmit={submit} noValidate className="flex flex-col gap-3 pb-3">
        {done ? <Notice kind="done" role="status" title="The same revision is on its way again." /> : null}
        <FormFailure failure={failure} />
        <TextInput
          id={`resend-${documentId}`}
          label="To"
          type="email"
          error={errorOf(form, 'email')}
          {...form.register('email')}
        />
        <div>
          <Button type="submit" look="secondary" pending={pending}>
            Send revision {sent.revision} again
          </Button>
        </div>
      </form>
    </details>
  );
}

export function WithdrawTool({ shopId, jobId, sent }: Of) {
  const router = useRouter();
  const { documentId } = sent;
  const { form, submit, pending, failure } = useZodForm<WithdrawForm, { id: string }>({
    schema: withdrawForm,
    defaultValues: { jobId, documentId, reason: '' },
    action: (values, meta) => withdrawQuote(shopId, values, meta),
    onDone: () => router.refresh(),
  });
  return (
    <details className={TOOL}>
      <summary className={SUMMARY}>Take back</summary>
      <form onSubmit={submit} noValidate className="flex flex-col gap-3 pb-3">
        <FormFailure failure={failure} />
        <TextArea
          id={`withdraw-${documentId}`}
          label="Why"
          hint="The customer can still read it, and can no longer sign it. They do not see this reason."
          error={errorOf(form, 'reason')}
          {...form.register('reason')}
        />
        <div>
          <Button type="submit" look="danger" pending={pending}>
            Take revision {sent.revision} back
          </Button>
        </div>
      </form>
    </details>
  );
}

export function RecordAcceptanceTool({ shopId, jobId, sent }: Of) {
  const router = useRouter();
  const { documentId, options } = sent;
  const [choices, setChoices] = useState(() =>
    options.filter((option) => option.chosen).map((option) => option.id),
  );
  const chosen = useMemo(() => new Set(choices), [choices]);
  const { form, submit, pending, failure } = useZodForm<OfficeAcceptanceForm, { acceptanceId: string }>({
    schema: officeAcceptanceForm,
    defaultValues: { jobId, documentId, name: '', reference: '', choices: [] },
    action: (values, meta) => recordAcceptance(shopId, { ...values, choices }, meta),
    onDone: () => router.refresh(),
  });
  const toggle = (id: string) =>
    setChoices((now) => (now.includes(id) ? now.filter((other) => other !== id) : [...now, id]));
  return (
    <details className={TOOL}>
      <summary className={SUMMARY}>Record an acceptance</summary>
      <form onSubmit={submit} noValidate className="flex flex-col gap-3 pb-3">
        <p className="text-sm text-ink-2">
          For an answer that came on paper or by telephone. The customer gets a mail that says what was
          recorded.
        </p>
        <FormFailure failure={failure} />
        <TextInput
          id={`acceptor-${documentId}`}
          label="Who accepted"
          error={errorOf(form, 'name')}
          {...form.register('name')}
        />
        <TextInput
          id={`reference-${documentId}`}
          label="Purchase order number, or how they answered"
          error={errorOf(form, 'reference')}
          {...form.register('reference')}
        />
        {options.map((option) => (
          <CheckBox
            key={option.id}
            id={`choice-${documentId}-${option.id}`}
            label={`With the addition: ${option.text}`}
            checked={chosen.has(option.id)}
            onChange={() => toggle(option.id)}
          />
        ))}
        <div>
          <Button type="submit" pending={pending}>
            Record that revision {sent.revision} was accepted
          </Button>
        </div>
      </form>
    </details>
  );
}
