/** An unexpected console error fails a browser test. */
import { expect, type Page } from '@playwright/test';

export function quiet(page: Page, expected: RegExp[] = []): void {
  const note = (text: string) => {
    if (!expected.some((pattern) => pattern.test(text))) expect.soft(text, 'console').toBe('');
  };
  page.on('console', (message) => {
    if (message.type() === 'error') note(`${message.text()} ${message.location().url}`);
  });
  page.on('pageerror', (error) => note(error.message));
}
