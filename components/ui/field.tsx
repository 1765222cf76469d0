import type {
  InputHTMLAttributes,
  ReactNode,
  Ref,
  SelectHTMLAttributes,
  TextareaHTMLAttributes,
} from 'react';
import { cx } from './cx';

interface Wiring {
  id: string;
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  className?: string | undefined;
}

const CONTROL =
  'bg-sheet border-rule-strong min-h-touch w-full min-w-0 rounded-md border-2 px-3 py-2 text-base aria-invalid:border-danger disabled:opacity-60';

const described = ({ id, hint, error }: Pick<Wiring, 'id' | 'hint' | 'error'>) =>
  [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ') || undefined;

/** Label, hint and error around one control, wired for assistive technology. */
export function Field({ id, label, hint, error, className, children }: Wiring & { children: ReactNode }) {
  return (
    <div className={cx('flex min-w-0 flex-col gap-1', className)}>
      <label htmlFor={id} className="text-[0.95rem]">
        {label}
      </label>
      {children}
      {hint ? (
        <p id={`${id}-hint`} className="text-sm text-ink-2">
          {hint}
        </p>
      ) : null}
      {error ? (
        <p id={`${id}-error`} className="text-sm font-bold text-danger">
          {error}
        </p>
      ) : null}
    </div>
  );
}

type InputProps = Omit<InputHTMLAttributes<HTMLInputElement>, 'id'> &
  Wiring & { ref?: Ref<HTMLInputElement> | undefined };

export function TextInput({ id, label, hint, error, className, ref, ...rest }: InputProps) {
  return (
    <Field id={id} label={label} hint={hint} error={error} className={className}>
      <input
        {...rest}
        ref={ref}
        id={id}
        aria-invalid={error ? true : undefined}
        aria-describedby={described({ id, hint, error })}
        className={CONTROL}
      />
    </Field>
  );
}

/** A figure with its unit beside it. It stays text: what was typed is kept as it was typed. */
export function FigureInput({
  unit,
  id,
  label,
  hint,
  error,
  className,
  ref,
  ...rest
}: InputProps & { unit?: string | undefined }) {
  return (
    <Field id={id} label={label} hint={hint} error={error} className={className}>
      <span className="relative block">
        <input
          inputMode="decimal"
          autoComplete="off"
          {...rest}
          ref={ref}
          id={id}
          aria-invalid={error ? true : undefined}
          aria-describedby={described({ id, hint, error })}
          className={cx(CONTROL, 'font-mono', unit ? 'pr-14' : undefined)}
        />
        {unit ? (
          <span className="pointer-events-none absolute inset-y-0 right-3 flex items-center text-sm text-ink-2">
            <span aria-hidden>{unit}</span>
          </span>
        ) : null}
      </span>
    </Field>
  );
}

export function SelectInput({
  id,
  label,
  hint,
  error,
  className,
  ref,
  children,
  ...rest
}: Omit<SelectHTMLAttributes<HTMLSelectElement>, 'id'> &
  Wiring & { ref?: Ref<HTMLSelectElement> | undefined }) {
  return (
    <Field id={id} label={label} hint={hint} error={error} className={className}>
      <select
        {...rest}
        ref={ref}
        id={id}
        aria-invalid={error ? true : undefined}
        aria-describedby={described({ id, hint, error })}
        className={CONTROL}
      >
        {children}
      </select>
    </Field>
  );
}

export function TextArea({
  id,
  label,
  hint,
  error,
  className,
  ref,
  ...rest
}: Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'id'> &
  Wiring & { ref?: Ref<HTMLTextAreaElement> | undefined }) {
  return (
    <Field id={id} label={label} hint={hint} error={error} className={className}>
      <textarea
        rows={3}
        {...rest}
        ref={ref}
        id={id}
        aria-invalid={error ? true : undefined}
        aria-describedby={described({ id, hint, error })}
        className={CONTROL}
      />
    </Field>
  );
}

/** A tick box that a gloved finger finds. */
export function CheckBox({ id, label, hint, error, className, ref, ...rest }: InputProps) {
  return (
    <div className={cx('flex flex-col gap-1', className)}>
      <label htmlFor={id} className="flex min-h-touch items-center gap-3">
        <input
          {...rest}
          ref={ref}
          id={id}
          type="checkbox"
          aria-invalid={error ? true : undefined}
          aria-describedby={described({ id, hint, error })}
          className="size-7 shrink-0 border-ink accent-plate"
        />
        <span>{label}</span>
      </label>
      {hint ? (
        <p id={`${id}-hint`} className="pl-10 text-sm text-ink-2">
          {hint}
        </p>
      ) : null}
      {error ? (
        <p id={`${id}-error`} className="pl-10 text-sm font-bold text-danger">
          {error}
        </p>
      ) : null}
    </div>
  );
}

/** A choice of a few, side by side, with radio semantics. */
export function Segments<V extends string>({
  name,
  legend,
  value,
  options,
  onChange,
}: {
  name: string;
  legend: ReactNode;
  value: V;
  options: readonly { value: V; label: string }[];
  onChange: (value: V) => void;
}) {
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-[0.95rem]">{legend}</legend>
      <div className="flex flex-wrap overflow-hidden rounded-md border-2 border-ink">
        {options.map((option) => (
          <label
            key={option.value}
            className={cx(
              'flex min-h-touch grow items-center justify-center px-3 py-2 text-center has-focus-visible:outline-3 has-focus-visible:-outline-offset-3 has-focus-visible:outline-measured',
              option.value === value ? 'bg-plate font-bold text-plate-ink' : 'bg-sheet',
            )}
          >
            <input
              type="radio"
              name={name}
              value={option.value}
              checked={option.value === value}
              onChange={() => onChange(option.value)}
              className="sr-only"
            />
            {option.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
