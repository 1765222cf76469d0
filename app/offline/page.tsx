import type { Metadata } from 'next';
import { OfflineShell } from '@/components/offline/offline-shell';

export const metadata: Metadata = { title: 'No signal', robots: { index: false } };

/** Holds nothing of anybody: the service worker keeps it, and answers with it where there is no server. */
export default function OfflinePage() {
  return <OfflineShell />;
}
