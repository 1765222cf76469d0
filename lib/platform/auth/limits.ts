/** Attempts are limited by e-mail and by address, in the database, so that every web server counts together. */
import { RateLimiterPostgres, type RateLimiterRes } from 'rate-limiter-flexible';
import { sequelize } from '@/lib/platform/db';
import { AppError } from '@/lib/platform/http/errors';

interface Rule {
  points: number;
  seconds: number;
}

const RULES = {
  'sign-in-email': { points: 8, seconds: 15 * 60 },
  'sign-in-address': { points: 60, seconds: 15 * 60 },
  'reset-email': { points: 4, seconds: 60 * 60 },
  'reset-address': { points: 30, seconds: 60 * 60 },
  'link-address': { points: 300, seconds: 10 * 60 },
} satisfies Record<string, Rule>;

export type LimitName = keyof typeof RULES;

const limiters = new Map<LimitName, RateLimiterPostgres>();

function limiter(name: LimitName): RateLimiterPostgres {
  let found = limiters.get(name);
  if (!found) {
    const rule = RULES[name];
    found = new RateLimiterPostgres({
      storeClient: sequelize(),
      tableName: 'rate_limits',
      tableCreated: true,
      keyPrefix: name,
      points: rule.points,
      duration: rule.seconds,
      clearExpiredByTimeout: false,
    });
    limiters.set(name, found);
  }
  return found;
}

function refusal(result: RateLimiterRes): AppError {
  const minutes = Math.max(1, Math.ceil(result.msBeforeNext / 60_000));
  return new AppError(
    'too-many',
    `Too many attempts. Try again in ${minutes} ${minutes === 1 ? 'minute' : 'minutes'}.`,
  );
}

/** Takes one attempt. @throws {AppError} `too-many` with the minutes to wait. */
export async function takeAttempt(name: LimitName, key: string): Promise<void> {
  try {
    await limiter(name).consume(key.slice(0, 200));
  } catch (result) {
    if (result instanceof Error) throw result;
    throw refusal(result as RateLimiterRes);
  }
}

export async function clearAttempts(name: LimitName, key: string): Promise<void> {
  await limiter(name).delete(key.slice(0, 200));
}
