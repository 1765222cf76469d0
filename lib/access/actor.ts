/** The person behind a request in one shop: session and membership, read at every request. */
import { notFound, redirect } from 'next/navigation';
import { cache } from 'react';
import { type SignedIn, actorOfRequest } from '@/lib/platform/auth';
import { select, withShop } from '@/lib/platform/db';
import { type Actor, type Permission, type Role, may } from './policy';

const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i;

export const isId = (text: string): boolean => UUID.test(text);

interface MembershipRow {
  id: string;
  name: string;
  roles: Role[];
  licence_number: string;
  mains_qualified: boolean;
}

export async function loadActor(signedIn: SignedIn, shopId: string): Promise<Actor | null> {
  if (!isId(shopId)) return null;
  const rows = await withShop(shopId, () =>
    select<MembershipRow>(
      `select id, name, roles, licence_number, mains_qualified from memberships
       where person_id = $1 and archived_at is null`,
      [signedIn.personId],
    ),
  );
  const row = rows[0];
  if (!row) return null;
  return {
    ...signedIn,
    shopId,
    membershipId: row.id,
    name: row.name,
    roles: row.roles,
    licenceNumber: row.licence_number,
    mainsQualified: row.mains_qualified,
  };
}

export const findActor = cache((shopId: string) => actorOfRequest<Actor>(shopId, loadActor));

/**
 * For pages: signed out goes to the sign-in page; a shop one is not in, and a page one's role does not open,
 * look the same as one that does not exist.
 */
export async function pageActor(shopId: string, permission: Permission): Promise<Actor> {
  const { signedIn, actor } = await findActor(shopId);
  if (!signedIn) redirect('/sign-in');
  if (!actor || !may(actor, permission)) notFound();
  return actor;
}
