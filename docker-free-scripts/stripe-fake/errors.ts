/** Refusals in the service's documented shape: https://docs.stripe.com/api/errors */
export interface ErrorBody {
  type: 'invalid_request_error' | 'card_error' | 'idempotency_error' | 'api_error';
  message: string;
  code?: string;
  param?: string;
  decline_code?: string;
}

export class ApiError extends Error {
  constructor(
    readonly status: number,
    readonly body: ErrorBody,
  ) {
    super(body.message);
  }
}

const invalidRequest = (status: number, message: string, rest: Partial<ErrorBody> = {}) =>
  new ApiError(status, { type: 'invalid_request_error', message, ...rest });

export const badParam = (param: string, message: string, code = 'parameter_invalid') =>
  invalidRequest(400, message, { code, param });

export const missingParam = (param: string) =>
  badParam(param, `Missing required param: ${param}.`, 'parameter_missing');

export const unknownParam = (param: string) =>
  badParam(param, `Received unknown parameter: ${param}`, 'parameter_unknown');

export const noSuch = (what: string, id: string, param = 'id') =>
  invalidRequest(404, `No such ${what}: '${id}'`, { code: 'resource_missing', param });

export const badState = (message: string, code: string) => invalidRequest(400, message, { code });

export const unknownPath = (method: string, path: string) =>
  invalidRequest(
    404,
    `Unrecognized request URL (${method}: ${path}). The stand-in knows only the paths in use.`,
  );

export const badKey = (message: string) => invalidRequest(401, message);

export const badAccount = (account: string) =>
  invalidRequest(403, `The provided key does not have access to account '${account}'.`, {
    code: 'account_invalid',
  });

export const keyReused = (key: string) =>
  new ApiError(400, {
    type: 'idempotency_error',
    message:
      'Keys for idempotent requests can only be used with the same parameters they were first used with. ' +
      `Try using a key other than '${key}' if you meant to execute a different request.`,
  });

export const outage = () =>
  new ApiError(500, { type: 'api_error', message: 'The stand-in was told to be out of order.' });
