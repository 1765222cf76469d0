'use client';
/** The input side of the circuit desk: one form per kind, each figure saved as it is typed. */
import { Segments } from '@/components/ui/field';
import type { BranchCircuit, ResistorArray, TapeRun } from '@/lib/circuits/schema/electrical';
import type { CircuitChoices } from '@/lib/circuits/schema/electrical';
import type { DriverDatasheet, LuminaireDatasheet, PartFigures, TapeDatasheet } from '@/lib/parts/schema';
import { METRIC_SIZES, US_SIZES } from '@/lib/sizing/tables/conductors';
import { formatWireSize } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';
import { ChoiceField, LengthField, LineField, NumberField, TemperatureField } from '../survey/fields';

type Roles = CircuitChoices['roles'];

export interface FormProps<E> {
  value: E;
  roles: Roles;
  parts: readonly PartFigures[];
  settings: ShopSettings;
  errors: Record<string, string>;
  onChange: (value: E, roles: Roles) => void;
}

/** A part for one place of the circuit; choosing it also takes over its datasheet figures. */
function PartChoice({
  label,
  kind,
  role,
  roles,
  parts,
  onChoose,
  error,
}: {
  label: string;
  kind: PartFigures['kind'];
  role: keyof Roles;
  roles: Roles;
  parts: readonly PartFigures[];
  onChoose: (part: PartFigures | null, roles: Roles) => void;
  error?: string | undefined;
}) {
  const options = parts.filter((part) => part.kind === kind);
  return (
    <ChoiceField
      label={label}
      error={error}
      value={roles[role] ?? ''}
      options={[
        { value: '', label: options.length === 0 ? 'None in parts and prices' : 'Choose' },
        ...options.map((part) => ({ value: part.id, label: part.name })),
      ]}
      onSave={(id) => {
        const { [role]: _old, ...others } = roles;
        onChoose(options.find((part) => part.id === id) ?? null, id ? { ...others, [role]: id } : others);
      }}
    />
  );
}

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

const SYSTEMS = [
  { value: 'single-phase', label: 'Single-phase' },
  { value: 'three-phase', label: 'Three-phase' },
] as const;
const YES_NO = [
  { value: 'yes', label: 'Yes, three hours or more' },
  { value: 'no', label: 'No' },
] as const;
const CURVES = [
  { value: '', label: 'Not applicable' },
  { value: 'B', label: 'B' },
  { value: 'C', label: 'C' },
  { value: 'D', label: 'D' },
] as const;

export function BranchForm({ value, roles, parts, settings, errors, onChange }: FormProps<BranchCircuit>) {
  const set = (change: Partial<BranchCircuit>, next = roles) => onChange({ ...value, ...change }, next);
  const takeLuminaire = (part: PartFigures | null, next: Roles) => {
    const sheet = part?.datasheet as unknown as LuminaireDatasheet | undefined;
    if (!part || !sheet) return set({}, next);
    return set(
      {
        luminaire: part.name,
        voltAmps: sheet.voltAmps,
        inrushAmps: sheet.inrushAmps,
        unitsPerB16: sheet.unitsPerB16,
        unitsPerBreaker: sheet.unitsPerBreaker,
      },
      next,
    );
  };
  return (
    <div className="flex flex-col gap-3">
      <PartChoice
        label="Luminaire"
        kind="luminaire"
        role="luminaire"
        roles={roles}
        parts={parts}
        onChoose={takeLuminaire}
      />
      <LineField
        label="Named on the drawing"
        value={value.luminaire}
        onSave={(luminaire) => set({ luminaire })}
      />
      <div className="grid grid-cols-2 gap-3">
        <NumberField
          label="How many"
          min={1}
          max={10000}
          required="Type a count."
          error={errors['quantity']}
          value={value.quantity}
          onSave={(v) => set({ quantity: Math.round(v ?? 1) })}
        />
        <NumberField
          label="Each"
          unit="VA"
          min={0.1}
          required="Type the volt-amperes."
          error={errors['voltAmps']}
          value={value.voltAmps}
          onSave={(v) => set({ voltAmps: v ?? 1 })}
        />
        <ChoiceField
          label="System"
          value={value.system}
          options={SYSTEMS}
          onSave={(system) => set({ system })}
        />
        <NumberField
          label="Supply"
          unit="V"
          min={1}
          required="Type the volts."
          value={value.volts}
          onSave={(v) => set({ volts: v ?? 1 })}
        />
        <NumberField
          label={settings.basis === 'us' ? 'Breaker' : 'MCB'}
          unit="A"
          min={1}
          required="Type the rating."
          error={errors['breakerAmps']}
          value={value.breakerAmps}
          onSave={(v) => set({ breakerAmps: v ?? 1 })}
        />
        <ChoiceField
          label="Curve"
          value={value.curve ?? ''}
          options={CURVES}
          onSave={(curve) => set({ curve: curve === '' ? null : curve })}
        />
        <LengthField
          label="To the first"
          settings={settings}
          required="Type the distance."
          value={value.metres}
          onSave={(v) => set({ metres: v ?? 0 })}
        />
        <LengthField
          label="Spacing"
          settings={settings}
          required="Type the spacing."
          value={value.spacingMetres}
          onSave={(v) => set({ spacingMetres: v ?? 0 })}
        />
        <NumberField
          label="Limit of drop"
          unit="%"
          min={0.1}
          max={100}
          required="Type the limit."
          value={value.maxDropPct}
          onSave={(v) => set({ maxDropPct: v ?? 3 })}
        />
        <ChoiceField
          label="Continuous"
          value={value.continuous ? 'yes' : 'no'}
          options={YES_NO}
          onSave={(v) => set({ continuous: v === 'yes' })}
        />
        <NumberField
          label="Inrush each"
          unit="A"
          min={0.1}
          value={value.inrushAmps}
          onSave={(inrushAmps) => set({ inrushAmps })}
        />
        <NumberField
          label="Maker’s units per breaker"
          min={1}
          value={value.unitsPerBreaker}
          onSave={(unitsPerBreaker) => set({ unitsPerBreaker })}
        />
      </div>
      <PartChoice
        label="Cable"
        kind="cable"
        role="cable"
        roles={roles}
        parts={parts}
        onChoose={(_part, next) => set({}, next)}
      />
    </div>
  );
}

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
