import { describe, expect, it } from 'vitest';
import { message, type MessageKey } from '@/lib/messages';
import { quotes } from '@/lib/messages/en/quotes';
import { type QuoteKey, quoteMessage } from '@/lib/messages/quotes';

describe('the quote’s texts', () => {
  it('read the same by the small catalogue of the customer’s page and by the whole one', () => {
    for (const key of Object.keys(quotes) as QuoteKey[]) {
      const names = [...quotes[key].matchAll(/\{(\w+)\}/g)].map((match) => match[1] ?? '');
      const values = Object.fromEntries(names.map((name, index) => [name, `<${index}>`]));
      expect(quoteMessage(key, values)).toBe(message(key as MessageKey, values));
      expect(quoteMessage(key, values)).not.toMatch(/[{}]/);
    }
  });

  it('show a dash for what is missing', () => expect(quoteMessage('customer.page-of')).toBe('page – of –'));
});
