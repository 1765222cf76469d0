'use client';
import { useRouter } from 'next/navigation';
import type { FieldPath } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { ConflictNotice, type Conflicting } from '@/components/ui/conflict';
import { CheckBox, FigureInput, SelectInput, TextArea, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { Notice } from '@/components/ui/sheet';
import { saveSettings } from '@/lib/shops/actions';
import { CURRENCIES, type ShopSettingsForm as Values, shopSettingsForm } from '@/lib/shops/schema';

const LABELS: Partial<Record<keyof Values, string>> = {
  name: 'Name of the shop',
  licenceNumber: 'Licence number',
  email: 'E-mail',
  phone: 'Phone',
  address: 'Address',
  basis: 'Standards',
  basisEdition: 'Edition',
  units: 'Lengths and temperatures',
  currency: 'Currency',
  locale: 'Dates and numbers',
  timeZone: 'Time zone',
  paper: 'Paper',
  taxName: 'Name of the tax',
  taxRatePct: 'Tax rate',
  taxRounding: 'Tax is rounded',
  depositPct: 'Deposit',
  markupPct: 'Markup',
  labourRate: 'Labour, an hour',
  quoteValidDays: 'A quote is good for',
};

const CHOICES: Partial<Record<keyof Values, [string, string][]>> = {
  basis: [
    ['us', 'US (NEC)'],
    ['iec', 'IEC / BS'],
  ],
  units: [
    ['us', 'Feet and inches, °F'],
    ['metric', 'Metres, °C'],
  ],
  currency: CURRENCIES.map((code) => [code, code]),
  locale: [
    ['en-US', 'Dec 1, 2026; 1:30 PM'],
    ['en-GB', '1 Dec 2026; 13:30'],
  ],
  paper: [
    ['letter', 'Letter'],
    ['a4', 'A4'],
  ],
  taxRounding: [
    ['document', 'per document'],
    ['line', 'per line'],
  ],
};

const UNITS: Partial<Record<keyof Values, string>> = {
  taxRatePct: '%',
  depositPct: '%',
  markupPct: '%',
  quoteValidDays: 'days',
};

export function SettingsForm({ shopId, values }: { shopId: string; values: Values }) {
  const router = useRouter();
  const { form, submit, pending, failure, done, clearFailure } = useZodForm<Values, { version: number }>({
    schema: shopSettingsForm,
    defaultValues: values,
    action: (typed, meta) => saveSettings(shopId, typed, meta),
    onDone: ({ version }) => {
      form.setValue('baseVersion', version);
      router.refresh();
    },
  });
  const theirs = failure?.code === 'conflict' ? (failure.current as Conflicting | undefined) : undefined;
  const keepMine = () => {
    if (theirs) form.setValue('baseVersion', theirs.version);
    clearFailure();
  };
  const takeTheirs = () => {
    for (const key of Object.keys(values) as (keyof Values)[])
      if (theirs && key in theirs) form.setValue(key as FieldPath<Values>, theirs[key] as never);
    keepMine();
  };
  const common = (name: keyof Values) => ({
    id: name,
    label: LABELS[name],
    error: errorOf(form, name),
    ...form.register(name),
  });
  const text = (name: keyof Values) => <TextInput {...common(name)} />;
  const figure = (name: keyof Values) => <FigureInput {...common(name)} unit={UNITS[name]} />;
  const choice = (name: keyof Values) => (
    <SelectInput {...common(name)}>
      {(CHOICES[name] ?? []).map(([value, label]) => (
        <option key={value} value={value}>
          {label}
        </option>
      ))}
    </SelectInput>
  );
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-5">
      {theirs ? (
        <ConflictNotice
          mine={form.getValues()}
          theirs={theirs}
          labels={LABELS as Record<string, string>}
          onKeepMine={keepMine}
          onTakeTheirs={takeTheirs}
        />
      ) : (
        <FormFailure failure={failure} />
      )}
      {done && !failure ? <Notice kind="done" title="Saved." role="status" /> : null}
      <div className="grid gap-4 sm:grid-cols-2">
        {text('name')}
        {text('licenceNumber')}
        {text('email')}
        {text('phone')}
      </div>
      <TextArea {...common('address')} />
      <div className="grid gap-4 sm:grid-cols-2">
        {choice('basis')}
        {text('basisEdition')}
        {choice('units')}
        {choice('locale')}
        {text('timeZone')}
        {choice('paper')}
        {choice('currency')}
        {choice('taxRounding')}
        {text('taxName')}
        {figure('taxRatePct')}
        {figure('markupPct')}
        {figure('labourRate')}
        {figure('depositPct')}
        {figure('quoteValidDays')}
      </div>
      <CheckBox
        id="benchWork"
        label="Bench work is offered"
        hint="Field-built resistor arrays for displays, vehicles, boats and sign repair. Never a listed luminaire or kit."
        {...form.register('benchWork')}
      />
      <Button type="submit" pending={pending}>
        Save
      </Button>
    </form>
  );
}
