/** Session rows: read at every request, so that sign-out, password change and removal act at once. */
import { run, select, withPerson } from '@/lib/platform/db';
import { personIdByEmail, personIdBySession } from '@/lib/platform/db/definer';
import { clearAttempts, takeAttempt } from './limits';
import { checkPassword, hashPassword } from './password';

const DAYS = 30;
const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i;

export async function startSession(personId: string, userAgent: string): Promise<string> {
  const rows = await withPerson(personId, () =>
    run<{ id: string }>(
      `insert into sessions (person_id, expires_at, user_agent)
       values ($1, now() + make_interval(days => $2), $3) returning id`,
      [personId, DAYS, userAgent.slice(0, 300)],
    ),
  );
  const row = rows[0];
  if (!row) throw new Error('The session row was not written.');
  return row.id;
}

/** The person behind a live session, or null. */
export async function personOfSession(sessionId: string | undefined): Promise<string | null> {
  if (!sessionId || !UUID.test(sessionId)) return null;
  return personIdBySession(sessionId);
}

export async function endSession(sessionId: string): Promise<void> {
  const personId = await personOfSession(sessionId);
  if (!personId) return;
  await withPerson(personId, () => run('update sessions set ended_at = now() where id = $1', [sessionId]));
}

async function passwordHashOf(personId: string): Promise<string | null> {
  const rows = await withPerson(personId, () =>
    select<{ password_hash: string }>('select password_hash from credentials where person_id = $1', [
      personId,
    ]),
  );
  return rows[0]?.password_hash ?? null;
}

/**
 * Checks an e-mail and password and starts a session.
 * @returns the session's id, or null when the two do not belong together.
 * @throws {AppError} `too-many`
 */
export async function signInWithPassword(
  email: string,
  password: string,
  from: { address: string; userAgent: string },
): Promise<string | null> {
  const key = email.trim().toLowerCase();
  await takeAttempt('sign-in-address', from.address);
  await takeAttempt('sign-in-email', key);
  const personId = await personIdByEmail(key);
  const ok = await checkPassword(personId ? await passwordHashOf(personId) : null, password);
  if (!ok || !personId) return null;
  await clearAttempts('sign-in-email', key);
  return startSession(personId, from.userAgent);
}

/** Sets a password and ends every session of the person. */
export async function setPassword(personId: string, password: string): Promise<void> {
  const passwordHash = await hashPassword(password);
  await withPerson(personId, async () => {
    await run(
      `insert into credentials (person_id, password_hash) values ($1, $2)
       on conflict (person_id) do update set password_hash = excluded.password_hash, changed_at = now()`,
      [personId, passwordHash],
    );
    await run('update sessions set ended_at = now() where person_id = $1 and ended_at is null', [personId]);
  });
}
