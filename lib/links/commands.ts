/** Making, closing and renewing customer links. */
import { randomUUID } from 'node:crypto';
import { type AnyActor, command } from '@/lib/access/command';
import { currentShopId, run, select } from '@/lib/platform/db';
import { notFound } from '@/lib/platform/http/errors';
import { findLink, type LinkRow } from './queries';
import type { CloseLinkInput } from './schema';
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

/** The one link of a job and a contact; one that was closed or has expired gets a new key. Inside a command. */
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

/** The link stops opening anything, at once. A new mail to the same contact makes a new key. */
export async function closeLink(actor: AnyActor, input: CloseLinkInput): Promise<{ id: string }> {
  return command(actor, async ({ audit }) => {
    const link = await findLink(input.id);
    if (link?.jobId !== input.jobId) throw notFound('This link');
    await run('update customer_links set revoked_at = coalesce(revoked_at, now()) where id = $1', [link.id]);
    await audit('link.closed', { type: 'link', id: link.id }, { after: { contactEmail: link.contactEmail } });
    return { id: link.id };
  });
}

/** A closed job's papers stay readable for two years. Called where the job is closed. */
export async function expireLinksOfJob(jobId: string): Promise<void> {
  await run(`update customer_links set expires_at = now() + interval '24 months' where job_id = $1`, [jobId]);
}
