/** Making, revoking and renewing customer links. All must run inside a command's transaction. */
import { currentShopId, run, select } from '@/lib/platform/db';
import { notFound } from '@/lib/platform/http/errors';
import { randomUUID } from 'node:crypto';
import { findLink, type LinkRow } from './queries';
import { hashOfToken, tokenOf } from './token';

async function idForContact(jobId: string, email: string): Promise<string | null> {
  const rows = await select<{ id: string }>(
    'select id from customer_links where job_id = $1 and contact_email = $2',
    [jobId, email],
  );
  return rows[0]?.id ?? null;
}

/** A new key for a link: the old one stops opening anything. */
async function rekey(link: LinkRow): Promise<void> {
  const version = link.tokenVersion + 1;
  await run(
    `update customer_links set token_version = $2, token_sha256 = $3, revoked_at = null, expires_at = null where id = $1`,
    [link.id, version, hashOfToken(tokenOf(link.id, version))],
  );
}

const isDead = (link: LinkRow): boolean =>
  link.revokedAt !== null || (link.expiresAt !== null && link.expiresAt.getTime() <= Date.now());

/** The one link of a job and a contact. One that was revoked or has expired gets a new key. */
export async function linkForContact(jobId: string, email: string): Promise<LinkRow> {
  const contact = email.trim().toLowerCase();
  const id = randomUUID();
  await run(
    `insert into customer_links (shop_id, id, job_id, contact_email, token_sha256) values ($1, $2, $3, $4, $5)
     on conflict (shop_id, job_id, contact_email) do nothing`,
    [currentShopId(), id, jobId, contact, hashOfToken(tokenOf(id, 1))],
  );
  const linkId = await idForContact(jobId, contact);
  const link = linkId === null ? null : await findLink(linkId);
  if (!link) throw notFound('The link');
  if (!isDead(link)) return link;
  await rekey(link);
  return (await findLink(link.id)) ?? link;
}

/** The link stops opening anything, at once. @throws {AppError} `not-found` */
export async function revokeLink(id: string): Promise<void> {
  const link = await findLink(id);
  if (!link) throw notFound('This link');
  await run('update customer_links set revoked_at = now() where id = $1', [id]);
}
