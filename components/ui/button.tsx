import Link from 'next/link';
import type { ButtonHTMLAttributes, ComponentProps } from 'react';
import { cx } from './cx';

const LOOK = {
  primary: 'bg-plate text-plate-ink border-plate',
  secondary: 'bg-sheet text-ink border-ink',
  danger: 'bg-sheet text-danger border-danger',
} as const;

export type ButtonLook = keyof typeof LOOK;

const buttonClass = (look: ButtonLook) =>
  cx(
    'inline-flex min-h-touch min-w-touch items-center justify-center gap-2 rounded-md border-2 px-4 py-2 text-center font-bold no-underline',
    'hover:opacity-85 disabled:cursor-not-allowed disabled:opacity-50',
    LOOK[look],
  );

export function Button({
  look = 'primary',
  pending = false,
  className,
  children,
  type = 'button',
  disabled,
  ...rest
}: ButtonHTMLAttributes<HTMLButtonElement> & { look?: ButtonLook; pending?: boolean | undefined }) {
  return (
    <button
      {...rest}
      type={type}
      disabled={disabled === true || pending}
      aria-busy={pending || undefined}
      className={cx(buttonClass(look), className)}
    >
      {children}
      {pending ? <span aria-hidden>…</span> : null}
    </button>
  );
}

export function ButtonLink({
  look = 'primary',
  className,
  ...rest
}: ComponentProps<typeof Link> & { look?: ButtonLook }) {
  return <Link {...rest} className={cx(buttonClass(look), className)} />;
}
