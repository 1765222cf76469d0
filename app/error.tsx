'use client';
import { PlainPage } from '@/components/shell/plain-page';
import { Button } from '@/components/ui/button';

export default function ErrorPage({ reset }: { error: Error; reset: () => void }) {
  return (
    <PlainPage title="This page did not load">
      <p>
        Something went wrong on our side. Nothing you saved is lost. Try again; if it stays, tell the shop.
      </p>
      <Button onClick={reset}>Try again</Button>
    </PlainPage>
  );
}
