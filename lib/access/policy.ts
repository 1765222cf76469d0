/** Who may: the one place. Questions read as sentences and fail closed. */
export const ROLES = ['owner', 'estimator', 'office', 'crew'] as const;
export type Role = (typeof ROLES)[number];

export interface Actor {
  sessionId: string;
  personId: string;
  shopId: string;
  membershipId: string;
  name: string;
  roles: Role[];
  licenceNumber: string;
  mainsQualified: boolean;
}

/** What a person may do in a shop, by role. A person with several roles may do what any of them may. */
const PERMISSIONS = {
  'shop:enter': ['owner', 'estimator', 'office', 'crew'],
  'cost:see': ['owner', 'estimator'],
  'price:see': ['owner', 'estimator', 'office'],
  'job:see': ['owner', 'estimator', 'office'],
  'job:open': ['owner', 'estimator', 'office'],
  'work:edit': ['owner', 'estimator'],
  'quote:send': ['owner', 'estimator'],
  'customer:edit': ['owner', 'office'],
  'visit:edit': ['owner', 'office'],
  'invoice:edit': ['owner', 'office'],
  'payment:record': ['owner', 'office'],
  'payment:refund': ['owner'],
  'people:edit': ['owner'],
  'settings:edit': ['owner'],
  'audit:see': ['owner'],
  'parts:see': ['owner', 'estimator'],
  'parts:edit': ['owner', 'estimator'],
  'sheet:write': ['owner', 'estimator', 'office', 'crew'],
  'sheet:release': ['owner', 'estimator'],
} satisfies Record<string, Role[]>;

export type Permission = keyof typeof PERMISSIONS;

export function may(actor: Pick<Actor, 'roles'>, permission: Permission): boolean {
  const allowed: readonly Role[] = PERMISSIONS[permission];
  return actor.roles.some((role) => allowed.includes(role));
}

export const canSeeCost = (actor: Actor) => may(actor, 'cost:see');
export const canSeePrices = (actor: Actor) => may(actor, 'price:see');
export const canEditWork = (actor: Actor) => may(actor, 'work:edit');
export const canSendQuote = (actor: Actor) => may(actor, 'quote:send');
/** A soft stop is overridden by a named person whose licence number is on file, whatever their role. */
export const canOverrideSoftStop = (actor: Actor) => actor.licenceNumber.trim() !== '';
/** Mains-side readings are asked only of crew marked qualified for them. */
export const canReadMains = (actor: Actor) => actor.mainsQualified;
/** Crew without another role see only the visits they are on. */
export const seesOnlyOwnVisits = (actor: Actor) => !may(actor, 'job:see');
