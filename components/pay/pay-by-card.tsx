'use client';
/** Asks our server for the card page and goes there. A second press while the first is under way does nothing. */
import { useEffect, useState } from 'react';
import { Button } from '@/components/ui/button';
import { useHydrated } from '@/components/ui/form';

export function PayByCard({
  address,
  label,
  otherwise,
}: {
  address: string;
  label: string;
  otherwise: string;
}) {
  const hydrated = useHydrated();
  const [pending, setPending] = useState(false);
  const [said, setSaid] = useState('');
  // Back from the card page, the browser may show this page as it was left: the button must work again.
  useEffect(() => {
    const shown = (event: PageTransitionEvent) => event.persisted && setPending(false);
    window.addEventListener('pageshow', shown);
    return () => window.removeEventListener('pageshow', shown);
  }, []);
  const pay = async () => {
    setPending(true);
    setSaid('');
    try {
      const response = await fetch(address, { method: 'POST' });
      const body = (await response.json()) as { url?: string; title?: string };
      if (response.ok && body.url) {
        window.location.assign(body.url);
        return;
      }
      setSaid(body.title ?? 'The card page could not be opened. Try again.');
    } catch {
      setSaid('The server could not be reached. Nothing was taken; try again.');
    }
    setPending(false);
  };
  return (
    <div className="flex flex-col items-start gap-3">
      <Button onClick={() => void pay()} pending={pending || !hydrated}>
        {label}
      </Button>
      {said ? (
        <p role="alert" className="font-bold text-danger">
          {said}
        </p>
      ) : null}
      <p className="text-ink-2">{otherwise}</p>
    </div>
  );
}
