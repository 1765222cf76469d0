/** Coded errors: the one way in which commands say no. */
export type ErrorCode =
  | 'invalid-input'
  | 'not-signed-in'
  | 'not-allowed'
  | 'not-found'
  | 'conflict'
  | 'gone'
  | 'too-many'
  | 'too-large'
  | 'unavailable'
  | 'unexpected';

export interface Issue {
  path: string;
  message: string;
}

const STATUS: Record<ErrorCode, number> = {
  'invalid-input': 422,
  'not-signed-in': 401,
  'not-allowed': 403,
  'not-found': 404,
  conflict: 409,
  gone: 410,
  'too-many': 429,
  'too-large': 413,
  unavailable: 503,
  unexpected: 500,
};

/** An answer that the reader can act on. `current` travels with a conflict so that nothing typed is lost. */
export class AppError extends Error {
  override readonly name = 'AppError';
  readonly status: number;
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly issues: Issue[] = [],
    readonly current?: unknown,
  ) {
    super(message);
    this.status = STATUS[code];
  }
}

export const notFound = (what: string) => new AppError('not-found', `${what} was not found in this shop.`);
export const notAllowed = (what: string) =>
  new AppError('not-allowed', `Your role does not allow this: ${what}.`);
export const invalid = (path: string, message: string) =>
  new AppError('invalid-input', message, [{ path, message }]);
export const conflict = (message: string, current?: unknown) =>
  new AppError('conflict', message, [], current);

interface DatabaseError {
  name?: string;
  original?: { code?: string; constraint?: string };
}

/** Maps whatever was thrown to an AppError; an unexpected message never reaches the reader. */
export function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  const code = (error as DatabaseError | null)?.original?.code;
  if (code === '23505') return new AppError('conflict', 'This was already saved, here or in another window.');
  if (code === '23503') return new AppError('not-found', 'Something this refers to is not in this shop.');
  if (code === '23514' || code === '22003' || code === '22001')
    return new AppError('invalid-input', 'A value is outside what can be stored.');
  if (code === '22P02') return new AppError('not-found', 'The address is not complete.');
  const name = (error as DatabaseError | null)?.name ?? '';
  if (name.startsWith('SequelizeConnection') || name === 'SequelizeHostNotReachableError')
    return new AppError(
      'unavailable',
      'The database can not be reached. Nothing was saved; try again in a minute.',
    );
  return new AppError(
    'unexpected',
    'Something went wrong here. Nothing was saved; try again, and tell us if it stays.',
  );
}

/** RFC 9457 problem+json with our code and issues. */
export function problemResponse(error: AppError): Response {
  const body = {
    type: 'about:blank',
    title: error.message,
    status: error.status,
    code: error.code,
    issues: error.issues,
    ...(error.current === undefined ? {} : { current: error.current }),
  };
  return new Response(JSON.stringify(body), {
    status: error.status,
    headers: { 'content-type': 'application/problem+json', 'cache-control': 'no-store' },
  });
}
