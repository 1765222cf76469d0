'use client';
/** What the three circuit forms share: their props, and choosing a part for one place of the circuit. */
import type { CircuitChoices } from '@/lib/circuits/schema/electrical';
import type { PartFigures } from '@/lib/parts/schema';
import type { ShopSettings } from '@/lib/units/settings';
import { ChoiceField } from '../survey/fields';

export type Roles = CircuitChoices['roles'];

export interface FormProps<E> {
  value: E;
  roles: Roles;
  parts: readonly PartFigures[];
  settings: ShopSettings;
  errors: Record<string, string>;
  onChange: (value: E, roles: Roles) => void;
}

/** A part for one place of the circuit; choosing it also takes over its datasheet figures. */
export function PartChoice({
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
