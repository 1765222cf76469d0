/** Phones on a server of the test's own: signed in, with the service worker ready, and what is done on them. */
import type { Browser, BrowserContext, Page } from '@playwright/test';
import type { Role } from '@/lib/access/policy';
import type { TestShop } from '../../support/shop';
import type { OwnServer } from './own-server';
import { sessionCookie } from './signed-in';

export async function signInOn(context: BrowserContext, shop: TestShop, role: Role, server: OwnServer) {
  const value = await sessionCookie(shop.actors[role].personId);
  await context.addCookies([{ name: 'next-auth.session-token', value, url: server.url, httpOnly: true }]);
}

export async function phone(
  browser: Browser,
  shop: TestShop,
  role: Role,
  server: OwnServer,
): Promise<BrowserContext> {
  const context = await browser.newContext({
    viewport: { width: 360, height: 780 },
    hasTouch: true,
    baseURL: server.url,
  });
  await signInOn(context, shop, role, server);
  return context;
}

/** The worker has kept what it needs and answers for this page. */
export async function ready(page: Page): Promise<void> {
  await page.evaluate(async () => {
    await navigator.serviceWorker.ready;
    if (!navigator.serviceWorker.controller)
      await new Promise((resolve) =>
        navigator.serviceWorker.addEventListener('controllerchange', resolve, { once: true }),
      );
  });
}

/** Somebody takes the phone out of the pocket: the screen asks for what others did. */
export const lookAgain = (page: Page) => page.evaluate(() => window.dispatchEvent(new Event('focus')));

export async function newArea(page: Page, name: string, width: string): Promise<void> {
  await page.getByRole('button', { name: 'Add an area' }).click();
  await page.getByLabel('Name', { exact: true }).first().fill(name);
  await page.getByLabel('Width', { exact: true }).fill(width);
  await page.getByRole('button', { name: /^Fold up/ }).click();
}
