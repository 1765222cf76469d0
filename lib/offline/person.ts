/**
 * Who worked here last, for each shop: with no server to ask, the device's own store is opened for that person. The id
 * alone is kept, and goes at sign-out.
 */
const PREFIX = 'lampwright-person-';

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

export function forgetPersons(): void {
  try {
    for (const key of Object.keys(localStorage)) if (key.startsWith(PREFIX)) localStorage.removeItem(key);
  } catch {
    // Nothing was kept.
  }
}
