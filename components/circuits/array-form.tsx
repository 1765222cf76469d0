'use client';
import type { ResistorArray } from '@/lib/circuits/schema/electrical';
import type { PartFigures } from '@/lib/parts/schema';
import { ChoiceField, NumberField, TemperatureField } from '../survey/fields';
import { type FormProps, PartChoice, type Roles } from './part-choice';

const SERIES = ['E6', 'E12', 'E24', 'E96'].map((value) => ({
  value: value as ResistorArray['series'],
  label: value,
}));

export function ArrayForm({ value, roles, parts, settings, errors, onChange }: FormProps<ResistorArray>) {
  const set = (change: Partial<ResistorArray>, next = roles) => onChange({ ...value, ...change }, next);
  const number = (key: keyof ResistorArray, label: string, unit: string, scale = 1) => (
    <NumberField
      key={key}
      label={label}
      unit={unit}
      min={0}
      required="Type a figure."
      error={errors[key]}
      value={(value[key] as number) * scale}
      onSave={(v) => set({ [key]: (v ?? 0) / scale })}
    />
  );
  const takeLed = (part: PartFigures | null, next: Roles) =>
    set(part ? (part.datasheet as Partial<ResistorArray>) : {}, next);
  return (
    <div className="flex flex-col gap-3">
      <PartChoice label="LED" kind="led" role="led" roles={roles} parts={parts} onChoose={takeLed} />
      <div className="grid grid-cols-2 gap-3">
        {number('supplyVolts', 'Supply', 'V')}
        {number('supplyMinVolts', 'Lowest supply', 'V')}
        {number('supplyMaxVolts', 'Highest supply', 'V')}
        {number('forwardVolts', 'Forward volts', 'V')}
        {number('forwardVoltsMin', 'Lowest forward volts', 'V')}
        {number('forwardVoltsMax', 'Highest forward volts', 'V')}
        {number('amps', 'Current', 'mA', 1000)}
        {number('maxAmps', 'Highest current', 'mA', 1000)}
        <NumberField
          label="LEDs"
          min={1}
          max={10000}
          required="Type a count."
          error={errors['count']}
          value={value.count}
          onSave={(v) => set({ count: Math.round(v ?? 1) })}
        />
        <NumberField
          label="In series"
          hint="Empty: as many as fit."
          min={1}
          max={1000}
          value={value.perString}
          onSave={(v) => set({ perString: v === null ? null : Math.round(v) })}
        />
        <ChoiceField
          label="Values from"
          value={value.series}
          options={SERIES}
          onSave={(series) => set({ series })}
        />
        {number('tolerancePct', 'Tolerance', '%')}
        <TemperatureField
          label="Ambient"
          settings={settings}
          required="Type a temperature."
          value={value.ambientCelsius}
          onSave={(v) => set({ ambientCelsius: v ?? 40 })}
        />
      </div>
      <PartChoice
        label="Resistor"
        kind="resistor"
        role="resistor"
        roles={roles}
        parts={parts}
        onChoose={(_part, next) => set({}, next)}
      />
    </div>
  );
}
