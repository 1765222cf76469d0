/** `expand[]=payment_intent.latest_charge`: ids replaced by their objects, in a copy. */
import { badParam } from './errors';
import type { AccountState } from './store';

type Plain = Record<string, unknown>;

/** Which collection an expandable property points into. */
const POINTS_TO = {
  payment_intent: 'intents',
  latest_charge: 'charges',
  charge: 'charges',
} as const;

export function expanded(object: object, paths: string[], account: AccountState): object {
  const copy = structuredClone(object) as Plain;
  for (const path of paths) {
    let at: Plain | null = copy;
    for (const key of path.split('.')) {
      if (!Object.hasOwn(POINTS_TO, key) || (at !== null && !Object.hasOwn(at, key)))
        throw badParam('expand', `This property cannot be expanded (${path}).`);
      if (at === null) continue;
      const value: unknown = at[key];
      if (typeof value === 'string')
        at[key] = structuredClone(account[POINTS_TO[key as keyof typeof POINTS_TO]][value]);
      at = (at[key] as Plain | null) ?? null;
    }
  }
  return copy;
}
