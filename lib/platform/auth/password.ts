/** argon2id, by the OWASP password storage sheet's second setting (19 MiB, 2 passes, 1 lane). */
import { Algorithm, hash, verify } from '@node-rs/argon2';

// `Algorithm` is a const enum, which isolated modules can't inline: 2 is Argon2id.
const OPTIONS = { algorithm: 2 as Algorithm, memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const MIN_PASSWORD = 10;
export const MAX_PASSWORD = 200;

export function hashPassword(password: string): Promise<string> {
  return hash(password, OPTIONS);
}

let decoy: Promise<string> | undefined;

/** With no hash (unknown e-mail) a decoy is checked all the same, so that time tells nothing. */
export async function checkPassword(passwordHash: string | null, password: string): Promise<boolean> {
  decoy ??= hashPassword('a password that nobody has');
  const ok = await verify(passwordHash ?? (await decoy), password.slice(0, MAX_PASSWORD)).catch(() => false);
  return passwordHash !== null && ok;
}
