'use client';
import { useRouter } from 'next/navigation';
import { useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { ConflictNotice, type Conflicting } from '@/components/ui/conflict';
import { CheckBox, FigureInput, TextArea, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { saveLine } from '@/lib/quotes/actions';
import type { DeskLine } from '@/lib/quotes/schema/desk';
import { type LineForm as Values, lineForm } from '@/lib/quotes/schema/forms';

export interface LineDefaults {
  labourRate: string;
  markupPct: string;
}

function valuesOf(jobId: string, line: DeskLine | null, defaults: LineDefaults): Values {
  const figures = line?.figures;
  return {
    jobId,
    ...(line ? { id: line.id, baseVersion: line.version } : {}),
    areaName: line?.areaName ?? '',
    description: line?.description ?? '',
    quantity: figures?.quantity ?? '1',
    unitCost: figures?.unitCost ?? '',
    unitLabourHours: figures?.unitLabourHours ?? '0',
    labourRate: figures?.labourRate ?? defaults.labourRate,
    markupPct: figures?.markupPct ?? defaults.markupPct,
    taxable: line?.taxable ?? true,
    optional: line?.optional ?? false,
    chosen: line?.chosen ?? true,
  };
}

const LABELS = {
  description: 'What the customer reads',
  areaName: 'Area',
  quantity: 'Quantity',
  unitCost: 'Parts, each',
  unitLabourHours: 'Hours, each',
  labourRate: 'Rate an hour',
  markupPct: 'Markup',
  taxable: 'Taxed',
  optional: 'An addition',
} satisfies Partial<Record<keyof Values, string>>;

/** The other's line as the form holds it. */
function theirsOf(theirs: Conflicting): Partial<Values> {
  const values = Object.fromEntries(Object.keys(LABELS).map((key) => [key, theirs[key]]));
  return { ...(values as Partial<Values>), chosen: theirs['chosen'] === true, baseVersion: theirs.version };
}

const FIGURES = ['quantity', 'unitCost', 'unitLabourHours', 'labourRate', 'markupPct'] as const;

/** Adds a typed line, or changes one. A line from the survey keeps its parts, hours and area. */
export function LineForm({
  shopId,
  jobId,
  line,
  defaults,
  areas,
  currency,
  onDone,
}: {
  shopId: string;
  jobId: string;
  line: DeskLine | null;
  defaults: LineDefaults;
  areas: readonly string[];
  currency: string;
  onDone?: () => void;
}) {
  const router = useRouter();
  const { form, submit, pending, failure, clearFailure } = useZodForm<Values, { id: string }>({
    schema: lineForm,
    defaultValues: valuesOf(jobId, line, defaults),
    action: (values, meta) => saveLine(shopId, values, meta),
    onDone: () => {
      if (!line) form.reset(valuesOf(jobId, null, defaults));
      router.refresh();
      onDone?.();
    },
  });
  const theirs = failure?.code === 'conflict' ? (failure.current as Conflicting | undefined) : undefined;
  const settle = (values: Values) => {
    form.reset(values, { keepDefaultValues: true });
    clearFailure();
  };
  const key = line?.id ?? 'new';
  const sourced = line !== null && line.source !== 'typed';
  const optional = useWatch({ control: form.control, name: 'optional' });
  const unitOf = (name: string) =>
    name === 'markupPct'
      ? '%'
      : name === 'unitLabourHours'
        ? 'h'
        : name === 'quantity'
          ? undefined
          : currency;
  const fixed = (name: string) =>
    sourced && (name === 'quantity' || name === 'unitCost' || name === 'unitLabourHours');
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      {theirs ? (
        <ConflictNotice
          mine={form.getValues()}
          theirs={theirs}
          labels={LABELS}
          onKeepMine={() => settle({ ...form.getValues(), baseVersion: theirs.version })}
          onTakeTheirs={() => settle({ ...form.getValues(), ...theirsOf(theirs) })}
        />
      ) : (
        <FormFailure failure={failure} />
      )}
      <TextArea
        id={`description-${key}`}
        label={LABELS.description}
        rows={2}
        error={errorOf(form, 'description')}
        {...form.register('description')}
      />
      <div className="grid grid-cols-2 gap-3 sm:grid-cols-3">
        <TextInput
          id={`area-${key}`}
          label={LABELS.areaName}
          list={`areas-${key}`}
          readOnly={sourced}
          autoComplete="off"
          className="col-span-2 sm:col-span-1"
          error={errorOf(form, 'areaName')}
          {...form.register('areaName')}
        />
        <datalist id={`areas-${key}`}>
          {areas.map((area) => (
            <option key={area} value={area} />
          ))}
        </datalist>
        {FIGURES.map((name) => (
          <FigureInput
            key={name}
            id={`${name}-${key}`}
            label={LABELS[name]}
            unit={unitOf(name)}
            readOnly={fixed(name)}
            hint={fixed(name) ? 'From the survey' : undefined}
            error={errorOf(form, name)}
            {...form.register(name)}
          />
        ))}
      </div>
      <div className="flex flex-col gap-1">
        <CheckBox id={`taxable-${key}`} label={LABELS.taxable} {...form.register('taxable')} />
        <CheckBox
          id={`optional-${key}`}
          label="An addition that the customer may take or leave"
          {...form.register('optional')}
        />
        {optional ? (
          <CheckBox
            id={`chosen-${key}`}
            label="Ticked when the customer opens the quote"
            {...form.register('chosen')}
          />
        ) : null}
      </div>
      <div>
        <Button type="submit" pending={pending}>
          {line ? 'Save the line' : 'Add the line'}
        </Button>
      </div>
    </form>
  );
}
