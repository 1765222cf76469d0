/** Who stands behind a customer's link, and the address a mail carries. */
import { select, withShop } from '@/lib/platform/db';
import { linkIdByToken, shopIdByLink } from '@/lib/platform/db/definer';
import { env } from '@/lib/platform/env';
import { hashOfToken, looksLikeToken, tokenOf } from './token';

export interface LinkRow {
  id: string;
  jobId: string;
  contactEmail: string;
  tokenVersion: number;
  createdAt: Date;
  revokedAt: Date | null;
  expiresAt: Date | null;
}

const COLUMNS = `
  id, job_id as "jobId", contact_email as "contactEmail", token_version as "tokenVersion",
  created_at as "createdAt", revoked_at as "revokedAt", expires_at as "expiresAt"`;

/** Must run inside `withShop`. */
export async function findLink(id: string): Promise<LinkRow | null> {
  const rows = await select<LinkRow>(`select ${COLUMNS} from customer_links where id = $1`, [id]);
  return rows[0] ?? null;
}

/** Must run inside `withShop`. */
export async function linksOfJob(jobId: string): Promise<LinkRow[]> {
  return select<LinkRow>(`select ${COLUMNS} from customer_links where job_id = $1 order by created_at`, [
    jobId,
  ]);
}

/** The one secret a mail carries. Opening it trades the token for a cookie and an address without it. */
export function linkUrl(link: Pick<LinkRow, 'id' | 'tokenVersion'>): string {
  return `${env().APP_URL.replace(/\/$/, '')}/l/open/${tokenOf(link.id, link.tokenVersion)}`;
}

export interface Visitor {
  shopId: string;
  link: LinkRow;
}

/** The link that a live token opens, or null: unknown, revoked and expired look alike. */
export async function visitorByToken(token: string): Promise<Visitor | null> {
  if (!looksLikeToken(token)) return null;
  const hash = hashOfToken(token);
  const shopId = await shopIdByLink(hash);
  const linkId = shopId === null ? null : await linkIdByToken(hash);
  if (shopId === null || linkId === null) return null;
  const link = await withShop(shopId, () => findLink(linkId));
  return link ? { shopId, link } : null;
}

/** A customer who came in by a link: it opens one job. */
export interface CustomerVisit {
  shopId: string;
  linkId: string;
  jobId: string;
  /** Where the request came from, kept with what is signed. */
  address: string;
  userAgent: string;
}

/** The address that a link was made for. */
export async function findContact(shopId: string, linkId: string): Promise<string> {
  return (await withShop(shopId, () => findLink(linkId)))?.contactEmail ?? '';
}
