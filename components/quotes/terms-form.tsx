'use client';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { FigureInput, TextArea, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { saveTerms } from '@/lib/quotes/actions';
import type { DeskTerms } from '@/lib/quotes/schema/desk';
import { type TermsForm as Values, termsForm } from '@/lib/quotes/schema/forms';

const LABELS: Partial<Record<keyof Values, string>> = {
  depositPct: 'Deposit',
  discountPct: 'Discount',
  overheadPct: 'Overhead',
  contingencyPct: 'Contingency',
  taxName: 'Tax is called',
  taxRatePct: 'Tax rate',
  validDays: 'Good for',
  scopeNote: 'Said before the lines',
  exclusions: 'Not included',
};

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

/** What somebody else saved meanwhile, beside what is typed here. */
function Theirs({ current, mine }: { current: unknown; mine: Values }) {
  if (typeof current !== 'object' || current === null) return null;
  const theirs = current as Record<string, unknown>;
  const differing = (Object.keys(LABELS) as (keyof Values)[]).filter(
    (key) => key in theirs && String(theirs[key]) !== String(mine[key]),
  );
  if (differing.length === 0) return null;
  return (
    <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1">
      {differing.map((key) => (
        <div key={key} className="contents">
          <dt className="text-ink-2">{LABELS[key]}, saved by somebody else</dt>
          <dd>{String(theirs[key])}</dd>
        </div>
      ))}
    </dl>
  );
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
  const { form, submit, pending, failure } = useZodForm<Values, { version: number }>({
    schema: termsForm,
    defaultValues: valuesOf(jobId, terms),
    action: (values, meta) => saveTerms(shopId, values, meta),
    onDone: ({ version }) => {
      form.reset({ ...form.getValues(), baseVersion: version });
      router.refresh();
    },
  });
  const current = failure?.code === 'conflict' ? failure.current : null;
  const takeVersion = () => {
    const version = (current as { version?: number } | null)?.version;
    if (version !== undefined) form.setValue('baseVersion', version);
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
      <FormFailure failure={failure}>
        {current ? (
          <>
            <Theirs current={current} mine={form.getValues()} />
            <Button look="secondary" className="mt-2" onClick={takeVersion}>
              Keep mine: save again after this
            </Button>
          </>
        ) : null}
      </FormFailure>
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
