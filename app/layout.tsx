import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Lampwright', template: '%s · Lampwright' },
  description: 'From site survey to paid invoice, with the circuit arithmetic done on the way.',
  referrer: 'same-origin',
  formatDetection: { telephone: false, email: false, address: false },
};

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#f5f8f5' },
    { media: '(prefers-color-scheme: dark)', color: '#121c17' },
  ],
};

/** The theme comes from a cookie, so that the first paint is right. */
export default async function RootLayout({ children }: { children: ReactNode }) {
  const chosen = (await cookies()).get('theme')?.value;
  const theme = chosen === 'light' || chosen === 'dark' ? chosen : undefined;
  return (
    <html lang="en" data-theme={theme}>
      <body className="min-h-dvh">
        <a
          href="#main"
          className="absolute -top-20 left-2 z-50 rounded-md bg-plate px-4 py-3 font-bold text-plate-ink focus:top-2"
        >
          Skip to the content
        </a>
        {children}
      </body>
    </html>
  );
}
