/** Who is asking: the session of this request, and through `loadActor` (given by the caller) the person in a shop. */
import { getServerSession } from 'next-auth';
import { cache } from 'react';
import { authOptions } from './options';
import { personOfSession } from './sessions';

export interface SignedIn {
  sessionId: string;
  personId: string;
}

/** The live session of this request, or null. Read once per request. */
export const currentSession = cache(async (): Promise<SignedIn | null> => {
  const session = await getServerSession(authOptions());
  const sessionId = session?.sessionId;
  const personId = await personOfSession(sessionId);
  return sessionId && personId ? { sessionId, personId } : null;
});

/** The session joined with whatever `loadActor` knows of the person in that shop; null when there is none. */
export async function actorOfRequest<A>(
  shopId: string,
  loadActor: (signedIn: SignedIn, shopId: string) => Promise<A | null>,
): Promise<{ signedIn: SignedIn | null; actor: A | null }> {
  const signedIn = await currentSession();
  return { signedIn, actor: signedIn ? await loadActor(signedIn, shopId) : null };
}
