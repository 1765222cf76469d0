/** What a customer's page is made of. */
import type { DocumentState } from '@/lib/documents/schema';
import type { MessageKey } from '@/lib/messages';
import type { QuoteContent } from './content';

export interface CustomerStep {
  key: 'survey' | 'quote' | 'deposit' | 'install' | 'closeout' | 'paid';
  state: 'reached' | 'open' | 'beyond';
}

export interface CustomerView {
  documentId: string;
  sha256: string;
  hasPdf: boolean;
  state: DocumentState;
  content: QuoteContent;
  acceptance: {
    name: string;
    at: Date;
    totalMinor: string;
    sha256: string;
    shownText: string;
    choices: string[];
  } | null;
  steps: CustomerStep[];
  /** A key of the message catalogue: what the job waits for. */
  waitsFor: Extract<MessageKey, `customer.wait.${string}`>;
}
