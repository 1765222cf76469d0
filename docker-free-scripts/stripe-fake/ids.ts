/** Ids with the prefixes that the SDK's documentation shows. */
import { randomBytes } from 'node:crypto';

const LETTERS = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz';

export function newId(prefix: string, length = 24): string {
  return `${prefix}_${Array.from(randomBytes(length), (byte) => LETTERS[byte % LETTERS.length]).join('')}`;
}

/** The service counts whole seconds. */
export const nowSeconds = () => Math.floor(Date.now() / 1_000);
