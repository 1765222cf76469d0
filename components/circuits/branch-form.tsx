'use client';
import type { BranchCircuit } from '@/lib/circuits/schema/electrical';
import type { LuminaireDatasheet, PartFigures } from '@/lib/parts/schema';
import { ChoiceField, LengthField, LineField, NumberField } from '../survey/fields';
import { type FormProps, PartChoice, type Roles } from './part-choice';

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
