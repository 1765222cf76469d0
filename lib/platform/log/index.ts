/** One logger. Tokens of customer links, authorisation headers and passwords never reach it. */
import pino from 'pino';
import { env } from '@/lib/platform/env';

const LINK_TOKEN = /\/l\/[A-Za-z0-9_-]{20,}/g;

/** Cuts the token out of a customer link's address. */
export function redactLinks(text: string): string {
  return text.replace(LINK_TOKEN, '/l/[redacted]');
}

let logger: pino.Logger | undefined;

export function log(): pino.Logger {
  logger ??= pino({
    level: env().LOG_LEVEL,
    redact: ['password', '*.password', 'token', '*.token', 'headers.authorization', 'headers.cookie'],
    hooks: {
      logMethod(args, method) {
        const clean = args.map((arg) => (typeof arg === 'string' ? redactLinks(arg) : arg));
        method.apply(this, clean as Parameters<typeof method>);
      },
    },
  });
  return logger;
}
