/**
 * next-auth, kept behind this folder. Its token holds a session id and nothing else: who the person is and what
 * they may do is read from the database at every request.
 */
import type { NextAuthOptions } from 'next-auth';
import Credentials from 'next-auth/providers/credentials';
import { env } from '@/lib/platform/env';
import { AppError } from '@/lib/platform/http/errors';
import { endSession, signInWithPassword } from './sessions';

declare module 'next-auth' {
  interface Session {
    sessionId?: string;
  }
}
declare module 'next-auth/jwt' {
  interface JWT {
    sessionId?: string;
  }
}

type HeaderBag = Record<string, string | string[] | undefined> | undefined;

function header(headers: HeaderBag, name: string): string {
  const value = headers?.[name];
  return (Array.isArray(value) ? value[0] : value) ?? '';
}

/** The nearest proxy's word for who is calling; on a bare loopback server there is none. */
export function callerAddress(forwardedFor: string): string {
  return forwardedFor.split(',')[0]?.trim() || 'direct';
}

export function authOptions(): NextAuthOptions {
  const { NEXTAUTH_SECRET } = env();
  return {
    ...(NEXTAUTH_SECRET ? { secret: NEXTAUTH_SECRET } : {}),
    session: { strategy: 'jwt', maxAge: 30 * 24 * 3600 },
    pages: { signIn: '/sign-in', error: '/sign-in' },
    providers: [
      Credentials({
        name: 'password',
        credentials: { email: { type: 'email' }, password: { type: 'password' } },
        async authorize(credentials, request) {
          const headers = request.headers as HeaderBag;
          try {
            const sessionId = await signInWithPassword(
              credentials?.email ?? '',
              credentials?.password ?? '',
              {
                address: callerAddress(header(headers, 'x-forwarded-for')),
                userAgent: header(headers, 'user-agent'),
              },
            );
            return sessionId ? { id: sessionId } : null;
          } catch (error) {
            // next-auth shows the message of what is thrown here: a limit is told, anything else is not.
            if (error instanceof AppError && error.code === 'too-many') throw new Error(error.message);
            throw new Error('unavailable');
          }
        },
      }),
    ],
    callbacks: {
      // `user` is there only when signing in. The client's `update` payload never reaches the token.
      jwt: ({ token, user }) =>
        user ? { sessionId: user.id } : { ...(token.sessionId ? { sessionId: token.sessionId } : {}) },
      session: ({ session, token }) => ({
        expires: session.expires,
        ...(token.sessionId ? { sessionId: token.sessionId } : {}),
      }),
    },
    events: {
      signOut: async ({ token }) => {
        if (token.sessionId) await endSession(token.sessionId);
      },
    },
  };
}
