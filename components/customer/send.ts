/** A customer's answer on its way to the server; whatever happens, what was typed stays on the page. */
import type { FieldIssue } from '@/lib/messages/result';

export type Answer<T> =
  { ok: true; data: T } | { ok: false; code: string; message: string; issues: FieldIssue[] };

interface Problem {
  code?: string;
  title?: string;
  issues?: FieldIssue[];
}

const UNREACHABLE = 'The server could not be reached. What you typed is still here; try again in a minute.';

export async function postAnswer<T>(address: string, body: unknown): Promise<Answer<T>> {
  try {
    const response = await fetch(address, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    });
    if (response.ok) return { ok: true, data: (await response.json()) as T };
    const problem = (await response.json()) as Problem;
    return {
      ok: false,
      code: problem.code ?? 'unexpected',
      message: problem.title ?? UNREACHABLE,
      issues: problem.issues ?? [],
    };
  } catch {
    return { ok: false, code: 'unreachable', message: UNREACHABLE, issues: [] };
  }
}
