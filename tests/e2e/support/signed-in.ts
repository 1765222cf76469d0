/** A shop of a test's own, and browsers that are signed in without the screen. */
import { encode } from 'next-auth/jwt';
import type { BrowserContext } from '@playwright/test';
import type { Role } from '@/lib/access/policy';
import { startSession } from '@/lib/platform/auth/sessions';
import type { TestShop } from '../../support/shop';

const baseURL = process.env.APP_URL ?? 'http://127.0.0.1:3000';

export async function sessionCookie(personId: string): Promise<string> {
  const sessionId = await startSession(personId, 'playwright');
  const secret = process.env.NEXTAUTH_SECRET;
  if (!secret) throw new Error('NEXTAUTH_SECRET is not set: run this by npm test.');
  return encode({ token: { sessionId }, secret });
}

export async function signIn(context: BrowserContext, shop: TestShop, role: Role): Promise<void> {
  const value = await sessionCookie(shop.actors[role].personId);
  await context.addCookies([{ name: 'next-auth.session-token', value, url: baseURL, httpOnly: true }]);
}
