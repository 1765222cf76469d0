/** Forgotten passwords: a single-use address by mail, good for an hour. It never tells whether an e-mail is known. */
import { randomUUID } from 'node:crypto';
import { run, withPerson, withShop } from '@/lib/platform/db';
import { personIdByEmail, personIdByReset, shopIdsByPerson } from '@/lib/platform/db/definer';
import { takeAttempt } from '@/lib/platform/auth/limits';
import { setPassword } from '@/lib/platform/auth/sessions';
import { AppError } from '@/lib/platform/http/errors';
import { hmacSha256, sha256 } from '@/lib/platform/http/hash';
import { required } from '@/lib/platform/env';
import { enqueue } from '@/lib/platform/queue/outbox';

/** The token is worked out again when the mail is rendered: it is stored nowhere but as its hash. */
export const resetToken = (resetId: string): string =>
  hmacSha256(required('LINK_SECRET'), `password-reset:${resetId}`).toString('base64url');

export async function requestReset(email: string, address: string): Promise<void> {
  await takeAttempt('reset-address', address);
  await takeAttempt('reset-email', email.trim().toLowerCase());
  const personId = await personIdByEmail(email);
  const [shopId] = personId ? await shopIdsByPerson(personId) : [];
  if (!personId || !shopId) return;
  const resetId = randomUUID();
  await withPerson(personId, () =>
    run(
      `insert into password_resets (id, person_id, token_sha256, expires_at)
       values ($1, $2, $3, now() + interval '1 hour')`,
      [resetId, personId, sha256(resetToken(resetId))],
    ),
  );
  await withShop(shopId, () =>
    enqueue('people.password-reset', { resetId, personId, email: email.trim().toLowerCase() }),
  );
}

/** Sets the new password, uses the address up, and ends every session of the person. */
export async function redeemReset(token: string, password: string): Promise<void> {
  const personId = await personIdByReset(sha256(token));
  const used = personId
    ? await withPerson(personId, () =>
        run(
          `update password_resets set used_at = now()
           where token_sha256 = $1 and used_at is null and expires_at > now() returning id`,
          [sha256(token)],
        ),
      )
    : [];
  if (!personId || used.length === 0)
    throw new AppError('gone', 'This address has been used or is over an hour old. Ask for a new one.');
  await setPassword(personId, password);
}
