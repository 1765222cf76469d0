'use client';
/** Plans a visit or changes one: times on the shop's clock, and who goes. */
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { ConflictNotice } from '@/components/ui/conflict';
import { CheckBox, TextArea, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { saveVisit } from '@/lib/visits/actions';
import { type CrewChoice, type VisitForm as Values, visitForm, type VisitRow } from '@/lib/visits/schema';

const LABELS = { startsAt: 'Starts', endsAt: 'Ends', crew: 'Who goes', notes: 'Notes' };

function valuesOf(jobId: string, visit: VisitRow | null): Values {
  if (!visit) return { jobId, startsAt: '', endsAt: '', crew: [], notes: '' };
  const { id, version, startsAt, endsAt, crew, notes } = visit;
  return { id, baseVersion: version, jobId, startsAt, endsAt, crew: crew.map((one) => one.id), notes };
}

const withNames = (ids: readonly string[], crew: readonly CrewChoice[]) =>
  ids.map((id) => crew.find((one) => one.id === id)?.name ?? 'somebody').join(', ');

export function VisitForm({
  shopId,
  jobId,
  visit,
  crew,
  timeZone,
}: {
  shopId: string;
  jobId: string;
  visit: VisitRow | null;
  crew: CrewChoice[];
  timeZone: string;
}) {
  const router = useRouter();
  const key = visit?.id ?? 'new';
  const { form, submit, pending, failure, clearFailure } = useZodForm<
    Values,
    { id: string; version: number }
  >({
    schema: visitForm,
    defaultValues: valuesOf(jobId, visit),
    action: (values, meta) => saveVisit(shopId, values, meta),
    onDone: ({ version }) => {
      form.reset(visit ? { ...form.getValues(), baseVersion: version } : valuesOf(jobId, null));
      router.refresh();
    },
  });
  const theirs = failure?.code === 'conflict' ? (failure.current as VisitRow | undefined) : undefined;
  const settle = (values: Values) => {
    form.reset(values, { keepDefaultValues: true });
    clearFailure();
  };
  const mine = form.getValues();
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      {theirs ? (
        <ConflictNotice
          mine={{ ...mine, crew: withNames(mine.crew, crew) }}
          theirs={{ ...theirs, crew: theirs.crew.map((one) => one.name).join(', ') }}
          labels={LABELS}
          onKeepMine={() => settle({ ...form.getValues(), baseVersion: theirs.version })}
          onTakeTheirs={() => settle(valuesOf(jobId, theirs))}
        />
      ) : (
        <FormFailure failure={failure} />
      )}
      <div className="grid gap-4 sm:grid-cols-2">
        <TextInput
          id={`${key}-starts`}
          type="datetime-local"
          label={LABELS.startsAt}
          hint={`On the clock of ${timeZone.replaceAll('_', ' ')}`}
          error={errorOf(form, 'startsAt')}
          {...form.register('startsAt')}
        />
        <TextInput
          id={`${key}-ends`}
          type="datetime-local"
          label={LABELS.endsAt}
          error={errorOf(form, 'endsAt')}
          {...form.register('endsAt')}
        />
      </div>
      <fieldset className="min-w-0">
        <legend className="text-[0.95rem]">{LABELS.crew}</legend>
        <div className="grid gap-x-6 sm:grid-cols-2">
          {crew.map((one) => (
            <CheckBox
              key={one.id}
              id={`${key}-${one.id}`}
              value={one.id}
              label={`${one.name}${one.mainsQualified ? ', qualified for mains' : ''}`}
              {...form.register('crew')}
            />
          ))}
        </div>
        {errorOf(form, 'crew') ? (
          <p role="alert" className="text-sm font-bold text-danger">
            {errorOf(form, 'crew')}
          </p>
        ) : null}
      </fieldset>
      <TextArea
        id={`${key}-notes`}
        label={LABELS.notes}
        hint="Access, keys, where to park"
        error={errorOf(form, 'notes')}
        {...form.register('notes')}
      />
      <Button type="submit" pending={pending} className="self-start">
        {visit ? 'Save the visit' : 'Plan the visit'}
      </Button>
    </form>
  );
}
