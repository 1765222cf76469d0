'use client';
/** Fields that save while one types: text that can't be read yet stays as typed, with its error beside it. */
import { useId, useState } from 'react';
import { FigureInput, SelectInput, TextArea, TextInput } from '@/components/ui/field';
import {
  formatLength,
  illuminanceFigure,
  illuminanceUnit,
  plainNumber,
  lengthUnit,
  parseIlluminance,
  parseLength,
  parseNumber,
  parseTemperature,
} from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';

interface Draft {
  text: string;
  /** The value that the text stood for when it was typed. */
  of: string;
  /** Values that may still be shown on the way there: keys come faster than the store answers. */
  through: readonly string[];
}

/** What was typed is kept as long as it stands for the value, or the value is still on its way to it; a value from elsewhere replaces it. */
function useDraft(shown: string, value: unknown): [string, (text: string, next: unknown) => void] {
  const [draft, setDraft] = useState<Draft | null>(null);
  const key = JSON.stringify(value ?? null);
  // It has arrived: an older value that comes now comes from elsewhere.
  if (draft && draft.of === key && draft.through.length > 0) setDraft({ ...draft, through: [] });
  const text = draft && (draft.of === key || draft.through.includes(key)) ? draft.text : shown;
  const type = (typed: string, next: unknown) =>
    setDraft((before) => ({
      text: typed,
      of: JSON.stringify(next ?? null),
      through: before && before.of !== key ? [...before.through, before.of] : [key],
    }));
  return [text, type];
}

type Common = {
  label: string;
  hint?: string | undefined;
  error?: string | undefined;
  className?: string | undefined;
};

export function LineField({
  value,
  onSave,
  required,
  ...rest
}: Common & { value: string; onSave: (value: string) => void; required?: string | undefined }) {
  const id = useId();
  const [error, setError] = useState<string>();
  const [text, setText] = useDraft(value, value);
  return (
    <TextInput
      id={id}
      {...rest}
      error={error ?? rest.error}
      value={text}
      onChange={(event) => {
        const typed = event.target.value;
        const missing = required && typed.trim() === '' ? required : undefined;
        setError(missing);
        setText(typed, missing ? value : typed);
        if (!missing) onSave(typed);
      }}
    />
  );
}

export function NotesField({
  value,
  onSave,
  ...rest
}: Common & { value: string; onSave: (value: string) => void }) {
  const id = useId();
  const [text, setText] = useDraft(value, value);
  return (
    <TextArea
      id={id}
      {...rest}
      value={text}
      onChange={(event) => {
        setText(event.target.value, event.target.value);
        onSave(event.target.value);
      }}
    />
  );
}

type Parser = (text: string) => { ok: true; value: number } | { ok: false; message: string };

interface NumberLike extends Common {
  value: number | null;
  onSave: (value: number | null) => void;
  unit?: string | undefined;
  /** Without it, an empty field is an answer: not known. */
  required?: string | undefined;
}

function ParsedField({
  value,
  onSave,
  parse,
  show,
  required,
  ...rest
}: NumberLike & { parse: Parser; show: (value: number) => string }) {
  const id = useId();
  const [error, setError] = useState<string>();
  const [text, setText] = useDraft(value === null ? '' : show(value), value);
  const change = (typed: string) => {
    if (typed.trim() === '') {
      setError(required);
      setText(typed, required ? value : null);
      if (!required) onSave(null);
      return;
    }
    const parsed = parse(typed);
    setError(parsed.ok ? undefined : parsed.message);
    setText(typed, parsed.ok ? parsed.value : value);
    if (parsed.ok) onSave(parsed.value);
  };
  return (
    <FigureInput
      id={id}
      {...rest}
      error={error ?? rest.error}
      value={text}
      onChange={(event) => change(event.target.value)}
    />
  );
}

const plain = (value: number) => plainNumber(value);

export function NumberField({
  min,
  max,
  whole = false,
  ...rest
}: NumberLike & { min?: number; max?: number; whole?: boolean }) {
  const parse: Parser = (text) => {
    const parsed = parseNumber(text);
    if (!parsed.ok) return parsed;
    if (whole && !Number.isInteger(parsed.value)) return { ok: false, message: 'A whole number.' };
    if (min !== undefined && parsed.value < min) return { ok: false, message: `At least ${min}.` };
    if (max !== undefined && parsed.value > max) return { ok: false, message: `At most ${max}.` };
    return parsed;
  };
  return <ParsedField {...rest} parse={parse} show={plain} />;
}

export function LengthField({
  settings,
  min = 0,
  ...rest
}: NumberLike & { settings: ShopSettings; min?: number }) {
  const parse: Parser = (text) => {
    const parsed = parseLength(text, settings);
    if (parsed.ok && parsed.value <= 0 && min > 0) return { ok: false, message: 'Longer than nothing.' };
    return parsed;
  };
  const show = (value: number) => formatLength(value, settings).replace(/ m$/, '');
  return (
    <ParsedField
      {...rest}
      unit={settings.units === 'us' ? undefined : lengthUnit(settings)}
      parse={parse}
      show={show}
    />
  );
}

export function TemperatureField({ settings, ...rest }: NumberLike & { settings: ShopSettings }) {
  const us = settings.units === 'us';
  return (
    <ParsedField
      {...rest}
      unit={us ? '°F' : '°C'}
      parse={(text) => parseTemperature(text, settings)}
      show={(value) => plain(Math.round((us ? value * 1.8 + 32 : value) * 10) / 10)}
    />
  );
}

export function IlluminanceField({ settings, ...rest }: NumberLike & { settings: ShopSettings }) {
  return (
    <ParsedField
      {...rest}
      unit={illuminanceUnit(settings)}
      parse={(text) => parseIlluminance(text, settings)}
      show={(value) => illuminanceFigure(value, settings)}
    />
  );
}

/** A day; emptied, it is not known. */
export function DateField({
  value,
  onSave,
  ...rest
}: Common & { value: string | null; onSave: (value: string | null) => void }) {
  const id = useId();
  return (
    <TextInput
      id={id}
      {...rest}
      type="date"
      value={value ?? ''}
      onChange={(event) => onSave(event.target.value || null)}
    />
  );
}

/** A share of one, typed as a percentage. */
export function PercentField({ value, onSave, ...rest }: NumberLike) {
  return (
    <NumberField
      {...rest}
      unit="%"
      min={0}
      max={100}
      value={value === null ? null : Math.round(value * 1e4) / 100}
      onSave={(percent) => onSave(percent === null ? null : percent / 100)}
    />
  );
}

export function ChoiceField<V extends string>({
  value,
  options,
  onSave,
  ...rest
}: Common & { value: V; options: readonly { value: V; label: string }[]; onSave: (value: V) => void }) {
  const id = useId();
  return (
    <SelectInput id={id} {...rest} value={value} onChange={(event) => onSave(event.target.value as V)}>
      {options.map((option) => (
        <option key={option.value} value={option.value}>
          {option.label}
        </option>
      ))}
    </SelectInput>
  );
}
