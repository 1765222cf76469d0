/** What a server action answers: the one shape that forms understand. */
export interface FieldIssue {
  path: string;
  message: string;
}

export type ActionResult<T> =
  | { ok: true; data: T }
  | { ok: false; code: string; message: string; issues: FieldIssue[]; current?: unknown };
