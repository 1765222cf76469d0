/** The one wrapper of route handlers under /api/v1: who is it, same origin, size, parse, may they, run, map errors. */
import { headers } from 'next/headers';
import { z } from 'zod';
import { currentSession } from '@/lib/platform/auth';
import { withShop } from '@/lib/platform/db';
import { env } from '@/lib/platform/env';
import { AppError, problemResponse, toAppError } from '@/lib/platform/http/errors';
import { sha256 } from '@/lib/platform/http/hash';
import { idempotent } from '@/lib/platform/http/idempotency';
import { log } from '@/lib/platform/log';
import { findActor } from './actor';
import { type Actor, type Permission, may } from './policy';

const DEFAULT_MAX_BYTES = 256 * 1024;

/** A browser names the origin of a write; another site's is refused. */
export async function assertSameOrigin(): Promise<void> {
  const bag = await headers();
  const origin = bag.get('origin');
  const site = bag.get('sec-fetch-site');
  if (
    origin !== null &&
    origin !== new URL(env().APP_URL).origin &&
    origin !== `http://${bag.get('host') ?? ''}`
  )
    throw new AppError('not-allowed', 'This request came from another site.');
  if (site !== null && site !== 'same-origin' && site !== 'none')
    throw new AppError('not-allowed', 'This request came from another site.');
}

/** Reads at most `maxBytes` of a body, whatever its headers claim. @throws {AppError} `too-large` */
export async function readBytes(request: Request, maxBytes: number): Promise<Uint8Array> {
  const reader = request.body?.getReader();
  if (!reader) return new Uint8Array();
  const chunks: Uint8Array[] = [];
  let size = 0;
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    size += value.byteLength;
    if (size > maxBytes) {
      await reader.cancel();
      throw new AppError('too-large', `The body is over ${Math.floor(maxBytes / 1024)} kB.`);
    }
    chunks.push(value);
  }
  return Buffer.concat(chunks);
}

export async function readJson(request: Request, maxBytes = DEFAULT_MAX_BYTES): Promise<unknown> {
  const text = Buffer.from(await readBytes(request, maxBytes)).toString('utf8');
  try {
    return JSON.parse(text);
  } catch {
    throw new AppError('invalid-input', 'The body is not JSON.', [{ path: '', message: 'is not JSON' }]);
  }
}

export function parseWith<S extends z.core.$ZodType>(schema: S, input: unknown): z.output<S> {
  const parsed = z.safeParse(schema, input);
  if (parsed.success) return parsed.data;
  const issues = parsed.error.issues.map((issue) => ({ path: issue.path.join('.'), message: issue.message }));
  throw new AppError('invalid-input', 'Some fields need another look.', issues);
}

/** Maps whatever a handler throws to problem+json. For routes that have no actor (webhooks, customer's pages). */
export async function answer(name: string, work: () => Promise<Response>): Promise<Response> {
  try {
    return await work();
  } catch (error) {
    const mapped = toAppError(error);
    if (mapped.code === 'unexpected') log().error({ route: name, error: String(error) }, 'route failed');
    return problemResponse(mapped);
  }
}

/** A snapshot that the caller has already is not sent again: `tagged` is what tells two of them apart. */
export function unlessKnown(request: Request, tagged: unknown, answer: () => Response): Response {
  const tag = `"${sha256(JSON.stringify(tagged))}"`;
  if (request.headers.get('if-none-match') === tag)
    return new Response(null, { status: 304, headers: { etag: tag, 'cache-control': 'no-store' } });
  const response = answer();
  response.headers.set('etag', tag);
  return response;
}

export interface RouteCall<P> {
  actor: Actor;
  params: P;
  request: Request;
  /** JSON with no-store: what is private is never kept by a cache. */
  json: (body: unknown, status?: number) => Response;
}

export interface RouteSpec<P> {
  name: string;
  permission: Permission;
  /** Writes must come from our own pages. */
  write?: boolean;
  run: (call: RouteCall<P>) => Promise<Response>;
}

const json = (body: unknown, status = 200) =>
  new Response(JSON.stringify(body), {
    status,
    headers: { 'content-type': 'application/json', 'cache-control': 'no-store' },
  });

export function shopRoute<P extends { shop: string }>(spec: RouteSpec<P>) {
  return (request: Request, context: { params: Promise<P> }): Promise<Response> =>
    answer(spec.name, async () => {
      const params = await context.params;
      const { signedIn, actor } = await findActor(params.shop);
      if (!signedIn) throw new AppError('not-signed-in', 'Sign in first.');
      if (!actor) throw new AppError('not-found', 'There is no such shop for you.');
      if (!may(actor, spec.permission)) throw new AppError('not-allowed', 'Your role does not allow this.');
      if (spec.write) await assertSameOrigin();
      return spec.run({ actor, params, request, json });
    });
}

/** Runs a write once per `Idempotency-Key`, in one transaction of the actor's shop. */
export function once<T>(
  call: { actor: Actor; request: Request },
  name: string,
  body: unknown,
  work: () => Promise<T>,
) {
  const key = call.request.headers.get('idempotency-key');
  return withShop(call.actor.shopId, () => idempotent(key, `${name}:${call.actor.membershipId}`, body, work));
}

export interface SignedInCall<P> {
  params: P;
  request: Request;
  json: (body: unknown, status?: number) => Response;
}

/** For what belongs to no shop: any signed-in person, from our own pages. */
export function signedInRoute<P>(spec: { name: string; run: (call: SignedInCall<P>) => Promise<Response> }) {
  return (request: Request, context: { params: Promise<P> }): Promise<Response> =>
    answer(spec.name, async () => {
      if (!(await currentSession())) throw new AppError('not-signed-in', 'Sign in first.');
      await assertSameOrigin();
      return spec.run({ params: await context.params, request, json });
    });
}
