/** The one wrapper of server actions: who is it, parse, may they, run, map errors. */
import { unstable_rethrow } from 'next/navigation';
import { z } from 'zod';
import { withShop } from '@/lib/platform/db';
import { type AppError, toAppError } from '@/lib/platform/http/errors';
import { idempotent } from '@/lib/platform/http/idempotency';
import { log } from '@/lib/platform/log';
import type { ActionResult } from '@/lib/messages/result';
import { findActor } from './actor';
import { type Actor, type Permission, may } from './policy';

export interface ActionSpec<S extends z.core.$ZodType, T> {
  /** `domain.action`, as the permission table names it. */
  name: string;
  permission: Permission;
  schema: S;
  /** Work that talks to other services runs outside a transaction and opens its own. */
  outsideTransaction?: boolean;
  run: (actor: Actor, input: z.output<S>) => Promise<T>;
}

export interface ActionMeta {
  idempotencyKey?: string | undefined;
}

export type ShopAction<S extends z.core.$ZodType, T> = (
  shopId: string,
  input: z.input<S>,
  meta?: ActionMeta,
) => Promise<ActionResult<T>>;

export function failure(error: AppError): ActionResult<never> {
  return {
    ok: false,
    code: error.code,
    message: error.message,
    issues: error.issues,
    ...(error.current === undefined ? {} : { current: error.current }),
  };
}

const refusal = (code: 'not-signed-in' | 'not-allowed', message: string): ActionResult<never> => ({
  ok: false,
  code,
  message,
  issues: [],
});

/** Builds the action's body; `actions.ts` files export `async` functions that call it. */
export function shopAction<S extends z.core.$ZodType, T>(spec: ActionSpec<S, T>): ShopAction<S, T> {
  return async (shopId, input, meta) => {
    try {
      const { signedIn, actor } = await findActor(shopId);
      if (!signedIn)
        return refusal('not-signed-in', 'You are signed out. Sign in again; what you typed is still here.');
      if (!actor || !may(actor, spec.permission))
        return refusal('not-allowed', 'Your role in this shop does not allow this.');
      const parsed = z.safeParse(spec.schema, input);
      if (!parsed.success) {
        const issues = parsed.error.issues.map((i) => ({ path: i.path.join('.'), message: i.message }));
        return { ok: false, code: 'invalid-input', message: 'Some fields need another look.', issues };
      }
      if (spec.outsideTransaction) return { ok: true, data: await spec.run(actor, parsed.data) };
      const data = await withShop(actor.shopId, () =>
        idempotent(meta?.idempotencyKey, `${spec.name}:${actor.membershipId}`, input, () =>
          spec.run(actor, parsed.data),
        ),
      );
      return { ok: true, data };
    } catch (error) {
      unstable_rethrow(error);
      const mapped = toAppError(error);
      if (mapped.code === 'unexpected')
        log().error({ action: spec.name, error: String(error) }, 'action failed');
      return failure(mapped);
    }
  };
}
