'use client';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { CheckBox, FigureInput, SelectInput, TextArea, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { savePart } from '@/lib/parts/actions';
import { PART_KINDS, type PartForm, partForm } from '@/lib/parts/schema';

const EMPTY: PartForm = {
  sku: '',
  kind: 'luminaire',
  name: '',
  unit: 'each',
  listed: true,
  packSize: '1',
  labourHours: '0',
  unitCost: '',
  datasheet: '{}',
};

export function PartEditor({ shopId, part }: { shopId: string; part: PartForm | null }) {
  const router = useRouter();
  const { form, submit, pending, failure } = useZodForm<PartForm, { id: string }>({
    schema: partForm,
    defaultValues: part ?? EMPTY,
    action: (values, meta) => savePart(shopId, values, meta),
    onDone: () => {
      router.push(`/s/${shopId}/parts`);
      router.refresh();
    },
  });
  const common = (name: keyof PartForm, label: string) => ({
    id: name,
    label,
    error: errorOf(form, name),
    ...form.register(name),
  });
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      <FormFailure failure={failure}>
        {failure?.code === 'conflict' ? (
          <p>Open the part again in another window to compare; what you typed is still here.</p>
        ) : null}
      </FormFailure>
      <TextInput {...common('name', 'Name')} />
      <div className="grid gap-4 sm:grid-cols-2">
        <TextInput {...common('sku', 'Part number')} />
        <SelectInput {...common('kind', 'Kind')}>
          {PART_KINDS.map((kind) => (
            <option key={kind} value={kind}>
              {kind}
            </option>
          ))}
        </SelectInput>
        <FigureInput {...common('unitCost', 'Cost')} />
        <SelectInput {...common('unit', 'Bought by')}>
          <option value="each">each</option>
          <option value="metre">metre</option>
        </SelectInput>
        <FigureInput {...common('labourHours', 'Labour for one')} unit="h" />
        <FigureInput {...common('packSize', 'Pack of')} />
      </div>
      <CheckBox id="listed" label="Listed for building lighting" {...form.register('listed')} />
      <TextArea
        {...common('datasheet', 'Datasheet figures')}
        hint="As the engine takes them, in SI units. The fields depend on the kind; what is missing is named when you save."
        rows={12}
        className="font-mono"
      />
      <Button type="submit" pending={pending}>
        Save
      </Button>
    </form>
  );
}
