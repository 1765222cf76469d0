'use client';
import { useEffect } from 'react';

/** Tells that somebody sees the page: mail scanners fetch links, but show them to nobody. */
export function OpenedBeacon({ link, documentId }: { link: string; documentId: string }) {
  useEffect(() => {
    let told = false;
    const tell = () => {
      if (told || document.visibilityState !== 'visible') return;
      told = true;
      void fetch(`/l/${link}/opened`, {
        method: 'POST',
        keepalive: true,
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify({ documentId }),
      }).catch(() => undefined);
    };
    tell();
    document.addEventListener('visibilitychange', tell);
    return () => document.removeEventListener('visibilitychange', tell);
  }, [link, documentId]);
  return null;
}
