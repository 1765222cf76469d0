'use client';
import { Segments } from '@/components/ui/field';
import type { TapeRun } from '@/lib/circuits/schema/electrical';
import type { DriverDatasheet, PartFigures, TapeDatasheet } from '@/lib/parts/schema';
import { METRIC_SIZES, US_SIZES } from '@/lib/sizing/tables/conductors';
import { formatWireSize } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';
import { ChoiceField, LengthField, NumberField, TemperatureField } from '../survey/fields';
import { type FormProps, PartChoice, type Roles } from './part-choice';

const FEEDS = [
  { value: 'start', label: 'start' },
  { value: 'end', label: 'end' },
  { value: 'both', label: 'both' },
  { value: 'middle', label: 'middle' },
] as const;

const sizes = (settings: ShopSettings, metric: string, us: string) => {
  const [own, other] = settings.basis === 'us' ? [US_SIZES, METRIC_SIZES] : [METRIC_SIZES, US_SIZES];
  const list = [...own, ...other].filter((size) => size !== metric && size !== us);
  return list.map((value) => ({ value, label: formatWireSize(value) }));
};

export function TapeForm({ value, roles, parts, settings, errors, onChange }: FormProps<TapeRun>) {
  const set = (change: Partial<TapeRun>, next = roles) => onChange({ ...value, ...change }, next);
  const takeDriver = (part: PartFigures | null, next: Roles) => {
    const sheet = part?.datasheet as unknown as DriverDatasheet | undefined;
    set(
      {
        driver: sheet
          ? { volts: sheet.outputVolts, watts: sheet.outputWatts, classTwo: sheet.classTwo }
          : null,
      },
      next,
    );
  };
  return (
    <div className="flex flex-col gap-3">
      <PartChoice
        label="Tape"
        kind="tape"
        role="tape"
        roles={roles}
        parts={parts}
        error={errors['tape']}
        onChoose={(part, next) => set({ tape: (part?.datasheet as unknown as TapeDatasheet) ?? null }, next)}
      />
      <div className="grid grid-cols-2 gap-3">
        <LengthField
          label="Run length"
          settings={settings}
          min={0.001}
          required="Type the length."
          error={errors['runMetres']}
          value={value.runMetres}
          onSave={(metres) => set({ runMetres: metres ?? 0 })}
        />
        <LengthField
          label="To the driver"
          settings={settings}
          required="Type the distance."
          error={errors['driverMetres']}
          value={value.driverMetres}
          onSave={(metres) => set({ driverMetres: metres ?? 0 })}
        />
      </div>
      <Segments
        name="feed"
        legend="Fed at"
        value={value.feed}
        options={FEEDS}
        onChange={(feed) => set({ feed })}
      />
      <div className="grid grid-cols-2 gap-3">
        <ChoiceField
          label="Feeder"
          value={value.feederSize}
          options={sizes(settings, '', '')}
          onSave={(feederSize) => set({ feederSize })}
        />
        <NumberField
          label="Limit of drop"
          unit="%"
          min={0.1}
          max={100}
          required="Type the limit."
          value={value.maxDropPct}
          onSave={(v) => set({ maxDropPct: v ?? 5 })}
        />
        <NumberField
          label="Dimmest at least"
          unit="%"
          min={1}
          max={100}
          required="Type the limit."
          value={value.minDimmestPct}
          onSave={(v) => set({ minDimmestPct: v ?? 90 })}
        />
        <NumberField
          label="Driver load at most"
          unit="%"
          min={1}
          max={100}
          required="Type the limit."
          value={value.loadFractionPct}
          onSave={(v) => set({ loadFractionPct: v ?? 80 })}
        />
      </div>
      <PartChoice
        label="Driver"
        kind="driver"
        role="driver"
        roles={roles}
        parts={parts}
        error={errors['driver']}
        onChoose={takeDriver}
      />
      <PartChoice
        label="Cable"
        kind="cable"
        role="cable"
        roles={roles}
        parts={parts}
        onChoose={(_part, next) => set({}, next)}
      />
      <TemperatureField
        label="Conductor temperature"
        settings={settings}
        required="Type a temperature."
        value={value.conductorCelsius}
        onSave={(v) => set({ conductorCelsius: v ?? 40 })}
      />
    </div>
  );
}
