/** A customer's request: the link's cookie, checked against the database every time. */
import { cookies, headers } from 'next/headers';
import { cache } from 'react';
import { isId } from '@/lib/access/actor';
import { answer, assertSameOrigin } from '@/lib/access/route';
import { takeAttempt } from '@/lib/platform/auth/limits';
import { callerAddress } from '@/lib/platform/auth/options';
import { env } from '@/lib/platform/env';
import { AppError, toAppError } from '@/lib/platform/http/errors';
import { log } from '@/lib/platform/log';
import { type CustomerVisit, type Visitor, visitorByToken } from './queries';

export const LINK_COOKIE = 'lampwright-link';

/** What every answer to a customer's request carries: the address is a secret's twin. */
export const PRIVATE_HEADERS = {
  'cache-control': 'no-store',
  'referrer-policy': 'no-referrer',
  'x-robots-tag': 'noindex, nofollow',
} as const;

async function caller(): Promise<{ address: string; userAgent: string }> {
  const bag = await headers();
  return {
    address: callerAddress(bag.get('x-forwarded-for') ?? ''),
    userAgent: bag.get('user-agent') ?? '',
  };
}

/**
 * The visitor whose cookie opens this link, or null. Misses are counted by address, so that keys can't be tried
 * by the thousand; those who hold a key are never slowed.
 * @throws {AppError} `too-many`
 */
export const visitorOfRequest = cache(async (linkId: string): Promise<Visitor | null> => {
  const token = (await cookies()).get(LINK_COOKIE)?.value ?? '';
  const visitor = isId(linkId) && token !== '' ? await visitorByToken(token) : null;
  if (visitor?.link.id === linkId) return visitor;
  if (token !== '') await takeAttempt('link-address', (await caller()).address);
  return null;
});

async function visitorWithin(token: string): Promise<Visitor | 'closed' | 'wait'> {
  try {
    await takeAttempt('link-address', (await caller()).address);
    return (await visitorByToken(token)) ?? 'closed';
  } catch (error) {
    log().warn({ error: toAppError(error).code }, 'a customer link could not be opened');
    return 'wait';
  }
}

/**
 * Trades a token for a cookie and an address without it. A person stands before this answer: a token that opens
 * nothing, too many tries and a database that is away each lead to a page that says what to do.
 */
export async function openLink(token: string): Promise<Response> {
  const found = await visitorWithin(token);
  const visitor = typeof found === 'string' ? null : found;
  const to = `/l/${typeof found === 'string' ? found : found.link.id}`;
  const response = new Response(null, { status: 303, headers: { ...PRIVATE_HEADERS, location: to } });
  if (visitor) {
    const secure = env().APP_URL.startsWith('https:') ? '; Secure' : '';
    const cookie = `${LINK_COOKIE}=${token}; Path=${to}; HttpOnly; SameSite=Lax; Max-Age=34560000${secure}`;
    response.headers.append('set-cookie', cookie);
  }
  return response;
}

export interface CustomerCall<P> {
  visit: CustomerVisit;
  params: P;
  request: Request;
}

export interface CustomerRouteSpec<P> {
  name: string;
  write?: boolean;
  run: (call: CustomerCall<P>) => Promise<Response>;
}

const CLOSED =
  'This link no longer opens anything. Open the newest mail from the shop, or ask them for a new link.';

/** The one wrapper of the customer's route handlers. */
export function customerRoute<P extends { link: string }>(spec: CustomerRouteSpec<P>) {
  return (request: Request, context: { params: Promise<P> }): Promise<Response> =>
    answer(spec.name, async () => {
      const params = await context.params;
      if (spec.write) await assertSameOrigin();
      const visitor = await visitorOfRequest(params.link);
      if (!visitor) throw new AppError('gone', CLOSED);
      const { shopId, link } = visitor;
      const visit = { shopId, linkId: link.id, jobId: link.jobId, ...(await caller()) };
      const response = await spec.run({ visit, params, request });
      for (const [name, value] of Object.entries(PRIVATE_HEADERS)) response.headers.set(name, value);
      return response;
    });
}
