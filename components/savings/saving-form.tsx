'use client';
/** Every figure that a saving is worked out with, its source beside it, for the estimator to change. */
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { ConflictNotice } from '@/components/ui/conflict';
import { CheckBox, FigureInput, TextInput } from '@/components/ui/field';
import { FormFailure, useZodForm } from '@/components/ui/form';
import { Notice } from '@/components/ui/sheet';
import { saveSaving } from '@/lib/savings/actions';
import {
  ASSUMPTION_KEYS,
  type AssumptionKey,
  ASSUMPTIONS,
  type Assumptions,
  type SavingForm,
  savingForm,
} from '@/lib/savings/schema';
import { plainNumber } from '@/lib/units';

const LABELS = Object.fromEntries(ASSUMPTION_KEYS.map((key) => [key, ASSUMPTIONS[key].label]));

type Figures = Record<AssumptionKey, { value: string; source: string }>;

const typed = (assumptions: Assumptions): Figures =>
  Object.fromEntries(
    ASSUMPTION_KEYS.map((key) => {
      const { value, source } = assumptions[key];
      return [key, { value: value === null ? '' : plainNumber(value), source }];
    }),
  ) as Figures;

/** One line for each figure, as the notice of a conflict shows them. */
const inWords = (figures: Figures) =>
  Object.fromEntries(ASSUMPTION_KEYS.map((key) => [key, `${figures[key].value} (${figures[key].source})`]));

export function SavingFormFields({
  shopId,
  jobId,
  version,
  assumptions,
  currency,
}: {
  shopId: string;
  jobId: string;
  version: number | null;
  assumptions: Assumptions;
  currency: string;
}) {
  const router = useRouter();
  const { form, submit, pending, failure, done, clearFailure } = useZodForm<SavingForm, { version: number }>({
    schema: savingForm,
    defaultValues: {
      jobId,
      baseVersion: version,
      rateIsBlended: assumptions.rateIsBlended,
      ...typed(assumptions),
    },
    action: (values, meta) => saveSaving(shopId, values, meta),
    onDone: (saved) => {
      form.setValue('baseVersion', saved.version);
      router.refresh();
    },
  });
  const theirs =
    failure?.code === 'conflict'
      ? (failure.current as { version: number; assumptions: Assumptions } | undefined)
      : undefined;
  const keepMine = () => {
    if (theirs) form.setValue('baseVersion', theirs.version);
    clearFailure();
  };
  const takeTheirs = () => {
    if (theirs) {
      const figures = typed(theirs.assumptions);
      for (const key of ASSUMPTION_KEYS) form.setValue(key, figures[key]);
      form.setValue('rateIsBlended', theirs.assumptions.rateIsBlended);
    }
    keepMine();
  };
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      {theirs ? (
        <ConflictNotice
          mine={inWords(form.getValues() as unknown as Figures)}
          theirs={{ version: theirs.version, ...inWords(typed(theirs.assumptions)) }}
          labels={LABELS}
          onKeepMine={keepMine}
          onTakeTheirs={takeTheirs}
        />
      ) : (
        <FormFailure failure={failure} />
      )}
      {done && !failure ? <Notice kind="done" title="Saved, and figured again." role="status" /> : null}
      {ASSUMPTION_KEYS.map((key) => {
        const ask: { label: string; unit: string; hint?: string } = ASSUMPTIONS[key];
        return (
          <div key={key} className="grid items-start gap-2 sm:grid-cols-2">
            <FigureInput
              id={`${key}-value`}
              label={ask.label}
              unit={ask.unit === 'money' ? currency : ask.unit || undefined}
              hint={ask.hint}
              error={form.formState.errors[key]?.value?.message}
              {...form.register(`${key}.value`)}
            />
            <TextInput
              id={`${key}-source`}
              label={
                <span>
                  Source<span className="sr-only"> of: {ask.label}</span>
                </span>
              }
              error={form.formState.errors[key]?.source?.message}
              {...form.register(`${key}.source`)}
            />
          </div>
        );
      })}
      <CheckBox
        id="rateIsBlended"
        label="The energy rate is blended: a bill’s total over its kWh"
        {...form.register('rateIsBlended')}
      />
      <div>
        <Button type="submit" pending={pending}>
          Save and figure again
        </Button>
      </div>
    </form>
  );
}
