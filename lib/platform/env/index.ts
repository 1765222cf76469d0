/** The environment, read and checked once. Nothing else in the application reads `process.env`. */
import { z } from 'zod';

const schema = z.object({
  LAMPWRIGHT_PROCESS: z.enum(['web', 'worker', 'migrator']).default('web'),
  /** Set only by the loopback demo and the tests: stand-ins are in use and demo people may exist. */
  LAMPWRIGHT_DEMO: z
    .enum(['0', '1'])
    .default('0')
    .transform((value) => value === '1'),
  DATABASE_URL_WEB: z.string().min(1).optional(),
  DATABASE_URL_WORKER: z.string().min(1).optional(),
  DATABASE_URL_MIGRATOR: z.string().min(1).optional(),
  SMTP_URL: z.url().optional(),
  MAIL_FROM: z.string().default('Lampwright <post@lampwright.example.com>'),
  S3_ENDPOINT: z.url().optional(),
  S3_REGION: z.string().default('us-east-1'),
  S3_BUCKET: z.string().default('lampwright'),
  S3_ACCESS_KEY_ID: z.string().optional(),
  S3_SECRET_ACCESS_KEY: z.string().optional(),
  STRIPE_SECRET_KEY: z.string().optional(),
  STRIPE_WEBHOOK_SECRET: z.string().optional(),
  STRIPE_API_BASE: z.url().optional(),
  APP_URL: z.url().default('http://127.0.0.1:3000'),
  NEXTAUTH_SECRET: z.string().min(16).optional(),
  LINK_SECRET: z.string().min(16).optional(),
  AUDIT_SECRET: z.string().min(16).optional(),
  LOG_LEVEL: z.enum(['debug', 'info', 'warn', 'error', 'silent']).default('info'),
});

export type Env = z.output<typeof schema>;

let parsed: Env | undefined;

/** @throws {Error} naming each variable that is missing or malformed. */
export function env(): Env {
  if (!parsed) {
    const result = schema.safeParse(process.env);
    if (!result.success) {
      const names = result.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
      throw new Error(`The environment is not usable. ${names.join('; ')}`);
    }
    parsed = result.data;
  }
  return parsed;
}

/** A variable that this process can't do without. */
export function required<K extends keyof Env>(name: K): NonNullable<Env[K]> {
  const value = env()[name];
  if (value === undefined) throw new Error(`The environment lacks ${name}.`);
  return value as NonNullable<Env[K]>;
}

/** Names this build; set by next.config.mjs when it is made, and null while developing. */
export const BUILD: string | null = process.env.LAMPWRIGHT_BUILD ?? null;
