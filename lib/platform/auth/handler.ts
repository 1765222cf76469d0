/** next-auth's own endpoints. Options are made per request: the environment is not there at build time. */
import NextAuth from 'next-auth';
import type { NextRequest } from 'next/server';
import { authOptions } from './options';

interface Context {
  params: Promise<{ nextauth: string[] }>;
}

const nextAuth = NextAuth as unknown as (
  request: NextRequest,
  context: Context,
  options: ReturnType<typeof authOptions>,
) => Promise<Response>;

export function handleAuth(request: NextRequest, context: Context): Promise<Response> {
  return nextAuth(request, context, authOptions());
}
