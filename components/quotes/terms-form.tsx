'use client';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { ConflictNotice, type Conflicting } from '@/components/ui/conflict';
import { FigureInput, TextArea, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { saveTerms } from '@/lib/quotes/actions';
import type { DeskTerms } from '@/lib/quotes/schema/desk';
import { type TermsForm as Values, termsForm } from '@/lib/quotes/schema/forms';

const LABELS = {
  depositPct: 'Deposit',
  discountPct: 'Discount',
  overheadPct: 'Overhead',
  contingencyPct: 'Contingency',
  taxName: 'Tax is called',
  taxRatePct: 'Tax rate',
  validDays: 'Good for',
  scopeNote: 'Said before the lines',
  exclusions: 'Not included',
} satisfies Partial<Record<keyof Values, string>>;

function valuesOf(jobId: string, terms: DeskTerms): Values {
  const { version, overheadPct, contingencyPct, validDays, ...rest } = terms;
  return {
    jobId,
    baseVersion: version,
    ...rest,
    overheadPct: overheadPct ?? '0',
    contingencyPct: contingencyPct ?? '0',
    validDays: String(validDays),
  };
}

export function TermsForm({
  shopId,
  jobId,
  terms,
  depositApplies,
}: {
  shopId: string;
  jobId: string;
  terms: DeskTerms;
  depositApplies: boolean;
}) {
  const router = useRouter();
  const { form, submit, pending, failure, clearFailure } = useZodForm<Values, { version: number }>({
    schema: termsForm,
    defaultValues: valuesOf(jobId, terms),
    action: (values, meta) => saveTerms(shopId, values, meta),
    onDone: ({ version }) => {
      form.reset({ ...form.getValues(), baseVersion: version });
      router.refresh();
    },
  });
  const theirs = failure?.code === 'conflict' ? (failure.current as Conflicting | undefined) : undefined;
  const settle = (values: Values) => {
    form.reset(values, { keepDefaultValues: true });
    clearFailure();
  };
  const figure = (name: 'depositPct' | 'discountPct' | 'overheadPct' | 'contingencyPct' | 'taxRatePct') => (
    <FigureInput
      id={name}
      label={LABELS[name]}
      unit="%"
      hint={name === 'depositPct' && !depositApplies ? 'This job asks for no deposit.' : undefined}
      error={errorOf(form, name)}
      {...form.register(name)}
    />
  );
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      {theirs ? (
        <ConflictNotice
          mine={form.getValues()}
          theirs={theirs}
          labels={LABELS}
          onKeepMine={() => settle({ ...form.getValues(), baseVersion: theirs.version })}
          onTakeTheirs={() => settle(valuesOf(jobId, theirs as unknown as DeskTerms))}
        />
      ) : (
        <FormFailure failure={failure} />
      )}
      <div className="grid grid-cols-2 gap-3">
        {figure('depositPct')}
        {figure('discountPct')}
        {figure('overheadPct')}
        {figure('contingencyPct')}
        <TextInput
          id="taxName"
          label={LABELS.taxName}
          error={errorOf(form, 'taxName')}
          {...form.register('taxName')}
        />
        {figure('taxRatePct')}
        <FigureInput
          id="validDays"
          label={LABELS.validDays}
          unit="days"
          error={errorOf(form, 'validDays')}
          {...form.register('validDays')}
        />
      </div>
      <TextArea
        id="scopeNote"
        label={LABELS.scopeNote}
        error={errorOf(form, 'scopeNote')}
        {...form.register('scopeNote')}
      />
      <TextArea
        id="exclusions"
        label={LABELS.exclusions}
        hint="One to a line."
        error={errorOf(form, 'exclusions')}
        {...form.register('exclusions')}
      />
      <div>
        <Button type="submit" look="secondary" pending={pending}>
          Save the terms
        </Button>
      </div>
    </form>
  );
}
