/**
 * The audit trail: who, what, before and after, written in the command's own transaction. Personal fields are
 * kept by name and keyed hash, so that the trail outlives a person's erasure.
 */
import { currentShopId, run } from '@/lib/platform/db';
import { required } from '@/lib/platform/env';
import { hmacSha256 } from '@/lib/platform/http/hash';

const PERSONAL = new Set(['name', 'contactName', 'email', 'contactEmail', 'phone', 'address', 'userAgent']);

export type Fields = Record<string, unknown>;

export interface AuditRecord {
  membershipId: string | null;
  actor: string;
  action: string;
  subjectType: string;
  subjectId: string | null;
  before?: Fields | undefined;
  after?: Fields | undefined;
}

function conceal(fields: Fields | undefined): Fields | undefined {
  if (!fields) return undefined;
  return Object.fromEntries(
    Object.entries(fields).map(([key, value]) =>
      PERSONAL.has(key) && typeof value === 'string' && value !== ''
        ? [key, `hmac:${hmacSha256(required('AUDIT_SECRET'), value).toString('hex').slice(0, 16)}`]
        : [key, value],
    ),
  );
}

/** Only what changed is kept of a before-and-after pair. */
function difference(
  before: Fields | undefined,
  after: Fields | undefined,
): { before?: Fields; after?: Fields } {
  const left = conceal(before);
  const right = conceal(after);
  if (!left || !right) return { ...(left ? { before: left } : {}), ...(right ? { after: right } : {}) };
  const changed = Object.keys(right).filter(
    (key) => JSON.stringify(left[key]) !== JSON.stringify(right[key]),
  );
  const pick = (fields: Fields) => Object.fromEntries(changed.map((key) => [key, fields[key]]));
  return { before: pick(left), after: pick(right) };
}

export async function writeAudit(record: AuditRecord): Promise<void> {
  await run(
    `insert into audit_events (shop_id, membership_id, actor, action, subject_type, subject_id, change)
     values ($1, $2, $3, $4, $5, $6, $7)`,
    [
      currentShopId(),
      record.membershipId,
      record.actor,
      record.action,
      record.subjectType,
      record.subjectId,
      JSON.stringify(difference(record.before, record.after)),
    ],
  );
}
