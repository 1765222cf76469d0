/** People as a shop sees them: by membership. */
import type { Actor, Role } from '@/lib/access/policy';
import { select, withShop } from '@/lib/platform/db';
import { shopIdsByPerson } from '@/lib/platform/db/definer';

export interface Member {
  id: string;
  name: string;
  email: string;
  roles: Role[];
  licenceNumber: string;
  mainsQualified: boolean;
  version: number;
}

const COLUMNS = `id, name, email, roles, licence_number as "licenceNumber", mains_qualified as "mainsQualified", version`;

/** Must run inside `withShop`. */
export async function listMembers(): Promise<Member[]> {
  return select<Member>(`select ${COLUMNS} from memberships where archived_at is null order by name`);
}

/** Must run inside `withShop`. */
export async function findMember(id: string): Promise<Member | null> {
  const rows = await select<Member>(
    `select ${COLUMNS} from memberships where id = $1 and archived_at is null`,
    [id],
  );
  return rows[0] ?? null;
}

/** The shops that a person may enter, with their names. */
export async function shopsOfPerson(personId: string): Promise<{ id: string; name: string }[]> {
  const shops: { id: string; name: string }[] = [];
  for (const id of await shopIdsByPerson(personId)) {
    const rows = await withShop(id, () => select<{ name: string }>('select name from shops'));
    shops.push({ id, name: rows[0]?.name ?? '' });
  }
  return shops.sort((a, b) => a.name.localeCompare(b.name));
}

export const isSelf = (actor: Actor, memberId: string): boolean => actor.membershipId === memberId;

export const loadMembers = (shopId: string) => withShop(shopId, listMembers);
