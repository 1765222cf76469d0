import type { Metadata } from 'next';
import type { ReactNode } from 'react';

export const metadata: Metadata = {
  title: { absolute: 'Your quote' },
  referrer: 'no-referrer',
  robots: { index: false, follow: false, noarchive: true },
};

export default function CustomerLayout({ children }: { children: ReactNode }) {
  return <div className="min-h-dvh bg-sheet">{children}</div>;
}
