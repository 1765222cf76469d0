/**
 * Who worked here last, for each shop: with no server to ask, the device's own store is opened for that person. The id
 * alone is kept, and goes at sign-out.
 */
const PREFIX = 'lampwright-person-';
const LEAVING = 'lampwright-leaving';
const SIGNED_OUT = 'lampwright-signed-out';

export function rememberPerson(shopId: string, membershipId: string): void {
  try {
    localStorage.setItem(PREFIX + shopId, membershipId);
  } catch {
    // A browser that keeps nothing works with a signal alone.
  }
}

export function knownPerson(shopId: string): string | null {
  try {
    return localStorage.getItem(PREFIX + shopId);
  } catch {
    return null;
  }
}

/** With no signal nothing of anybody is opened any more, until somebody signs in. What was kept stays. */
export function forgetPersons(): void {
  try {
    for (const key of Object.keys(localStorage)) if (key.startsWith(PREFIX)) localStorage.removeItem(key);
  } catch {
    // Nothing was kept.
  }
}

/** Tells this browser's other tabs: they show what is being wiped. */
export function tellSignedOut(): void {
  try {
    localStorage.setItem(SIGNED_OUT, new Date().toISOString());
    localStorage.removeItem(SIGNED_OUT);
  } catch {
    // No other tab can hear it.
  }
}

export function onSignedOut(listener: () => void): () => void {
  const heard = ({ key, newValue }: StorageEvent) => {
    if (key === SIGNED_OUT && newValue !== null) listener();
  };
  window.addEventListener('storage', heard);
  return () => window.removeEventListener('storage', heard);
}

/** A sign-out that the server has not heard of yet. */
export function setLeaving(leaving: boolean): void {
  try {
    if (leaving) localStorage.setItem(LEAVING, '1');
    else localStorage.removeItem(LEAVING);
  } catch {
    // It is heard of at once, or not at all.
  }
}

export function isLeaving(): boolean {
  try {
    return localStorage.getItem(LEAVING) !== null;
  } catch {
    return false;
  }
}
