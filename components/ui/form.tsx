'use client';
/**
 * The one form pattern: react-hook-form with the domain's zod schema, a server action that answers an
 * ActionResult, issues mapped to their fields, nothing typed lost, submit held until the page is alive.
 */
import { zodResolver } from '@hookform/resolvers/zod';
import { type ReactNode, useCallback, useEffect, useRef, useState, useSyncExternalStore } from 'react';
import {
  type DefaultValues,
  type FieldPath,
  type FieldValues,
  type Resolver,
  useForm,
  type UseFormReturn,
} from 'react-hook-form';
import type { z } from 'zod';
import type { ActionResult } from '@/lib/messages/result';
import { Notice } from './sheet';

type FailedResult = Extract<ActionResult<unknown>, { ok: false }>;

export interface FormMeta {
  idempotencyKey: string;
}

const never = () => () => undefined;

/** False in the server's markup and until React has taken over: a press before that would reload the page. */
export function useHydrated(): boolean {
  return useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
}

export interface ZodForm<I extends FieldValues, T> {
  form: UseFormReturn<I>;
  submit: (event?: React.BaseSyntheticEvent) => Promise<void>;
  pending: boolean;
  failure: FailedResult | null;
  done: T | null;
  clearFailure: () => void;
}

export function useZodForm<I extends FieldValues, T>(options: {
  schema: z.core.$ZodType<unknown, I>;
  defaultValues: DefaultValues<NoInfer<I>>;
  action: (values: I, meta: FormMeta) => Promise<ActionResult<T>>;
  onDone?: (data: T) => void;
}): ZodForm<I, T> {
  const { schema, defaultValues, action, onDone } = options;
  const hydrated = useHydrated();
  const [failure, setFailure] = useState<FailedResult | null>(null);
  const [done, setDone] = useState<T | null>(null);
  const key = useRef<string | null>(null);
  // `raw`: the action gets what was typed and parses it again itself.
  const resolver = zodResolver(schema as never, undefined, { raw: true }) as unknown as Resolver<
    I,
    unknown,
    I
  >;
  const form = useForm<I, unknown, I>({ resolver, defaultValues });

  const send = async (values: I) => {
    // The same press repeated (double click, retry after a dropped answer) carries the same key.
    key.current ??= crypto.randomUUID();
    setFailure(null);
    const result = await action(values, { idempotencyKey: key.current }).catch((): ActionResult<T> => ({
      ok: false,
      code: 'unreachable',
      message: 'The server could not be reached. What you typed is still here; try again.',
      issues: [],
    }));
    if (result.ok) {
      key.current = null;
      setDone(result.data);
      onDone?.(result.data);
      return;
    }
    if (result.code !== 'unreachable') key.current = null;
    setFailure(result);
    result.issues.forEach((issue, index) =>
      form.setError(issue.path as FieldPath<I>, { message: issue.message }, { shouldFocus: index === 0 }),
    );
  };
  const submit = (event?: React.BaseSyntheticEvent) => form.handleSubmit(send)(event);
  const clearFailure = useCallback(() => setFailure(null), []);
  return { form, submit, pending: !hydrated || form.formState.isSubmitting, failure, done, clearFailure };
}

/** What went wrong with the whole form; takes the focus so that it is read out. */
export function FormFailure({
  failure,
  word = 'Not saved',
  children,
}: {
  failure: FailedResult | null;
  word?: string | undefined;
  children?: ReactNode;
}) {
  const ref = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (failure && failure.issues.length === 0) ref.current?.focus();
  }, [failure]);
  if (!failure) return null;
  return (
    <div ref={ref} tabIndex={-1}>
      <Notice kind="danger" word={word} title={failure.message} role="alert">
        {children}
      </Notice>
    </div>
  );
}

/** The message of a field, however deep its path. */
export function errorOf<I extends FieldValues>(
  form: UseFormReturn<I>,
  path: FieldPath<I>,
): string | undefined {
  return form.getFieldState(path, form.formState).error?.message;
}
