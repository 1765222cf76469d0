/** Adding, changing and removing people of a shop. */
import { Membership } from '@/models';
import { type AnyActor, command } from '@/lib/access/command';
import type { Actor, Role } from '@/lib/access/policy';
import { select } from '@/lib/platform/db';
import { personIdForNewEmail } from '@/lib/platform/db/definer';
import { conflict, invalid, notFound } from '@/lib/platform/http/errors';
import { findMember } from './queries';
import type { MemberEditInput, MemberInput } from './schema';

/** A person new to every shop gets a row; one who works for another shop keeps theirs. */
export async function addMember(
  actor: AnyActor,
  input: MemberInput,
): Promise<{ id: string; personId: string }> {
  return command(actor, async ({ audit, shopId }) => {
    const email = input.email.toLowerCase();
    const personId = await personIdForNewEmail(email);
    if (!personId) throw invalid('email', 'This address could not be taken.');
    const existing = await Membership.findOne({ where: { personId } });
    if (existing && existing.archivedAt === null)
      throw invalid('email', 'This person is in the shop already.');
    const values = {
      name: input.name,
      roles: input.roles,
      licenceNumber: input.licenceNumber,
      mainsQualified: input.mainsQualified,
    };
    const row = existing
      ? await existing.update({ ...values, archivedAt: null, version: existing.version + 1 })
      : await Membership.create({ shopId, personId, email, ...values });
    await audit('person.added', { type: 'membership', id: row.id }, { after: { ...values, email } });
    return { id: row.id, personId };
  });
}

async function ownersBeside(id: string): Promise<number> {
  const rows = await select<{ count: string }>(
    `select count(*) from memberships where 'owner' = any (roles) and archived_at is null and id <> $1`,
    [id],
  );
  return Number(rows[0]?.count ?? 0);
}

async function refuseLastOwner(id: string, roles: readonly Role[] | null): Promise<void> {
  if (roles?.includes('owner')) return;
  if ((await ownersBeside(id)) === 0) throw invalid('roles', 'A shop keeps at least one owner.');
}

export async function changeMember(actor: Actor, input: MemberEditInput): Promise<{ version: number }> {
  return command(actor, async ({ audit }) => {
    const { id, baseVersion, ...after } = input;
    const before = await findMember(id);
    if (!before) throw notFound('This person');
    if (before.roles.includes('owner')) await refuseLastOwner(id, input.roles);
    const [changed] = await Membership.update(
      { ...after, version: baseVersion + 1 },
      { where: { id, version: baseVersion, archivedAt: null } },
    );
    if (changed !== 1) throw conflict('Somebody else changed this person meanwhile. Both are shown.', before);
    await audit('person.changed', { type: 'membership', id }, { before: { ...before }, after });
    return { version: baseVersion + 1 };
  });
}

/** The membership is archived, not deleted: what the person signed still refers to it. It acts at once. */
export async function removeMember(actor: Actor, input: { id: string }): Promise<{ id: string }> {
  return command(actor, async ({ audit }) => {
    const before = await findMember(input.id);
    if (!before) throw notFound('This person');
    if (before.roles.includes('owner')) await refuseLastOwner(input.id, null);
    await Membership.update({ archivedAt: new Date() }, { where: { id: input.id } });
    await audit('person.removed', { type: 'membership', id: input.id }, { before: { ...before } });
    return { id: input.id };
  });
}
