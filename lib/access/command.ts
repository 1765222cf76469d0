/** Every command runs here: one transaction of the shop, with its audit event in it. */
import { type Fields, writeAudit } from '@/lib/platform/audit';
import { withShop } from '@/lib/platform/db';
import type { Actor } from './policy';

/** Someone who acts without a session: a customer by link, the worker, the card service, the first start. */
export interface SystemActor {
  shopId: string;
  membershipId: null;
  name: string;
}

export type AnyActor = Actor | SystemActor;

export const systemActor = (shopId: string, name: string): SystemActor => ({
  shopId,
  membershipId: null,
  name,
});

export interface CommandContext {
  shopId: string;
  actor: AnyActor;
  /** Writes the command's audit event; every command writes at least one. */
  audit: (
    action: string,
    subject: { type: string; id: string | null },
    change?: { before?: Fields | undefined; after?: Fields | undefined },
  ) => Promise<void>;
}

/**
 * @throws {Error} when the command changed things without writing its audit event: a mistake in our code, found
 * by the first test that runs it.
 */
export async function command<T>(actor: AnyActor, work: (context: CommandContext) => Promise<T>): Promise<T> {
  return withShop(actor.shopId, async () => {
    let written = 0;
    const result = await work({
      shopId: actor.shopId,
      actor,
      audit: async (action, subject, change = {}) => {
        written += 1;
        await writeAudit({
          membershipId: actor.membershipId,
          actor: actor.membershipId === null ? actor.name : 'member',
          action,
          subjectType: subject.type,
          subjectId: subject.id,
          before: change.before,
          after: change.after,
        });
      },
    });
    if (written === 0) throw new Error('A command must write its audit event.');
    return result;
  });
}
