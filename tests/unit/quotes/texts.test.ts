import { describe, expect, it } from 'vitest';
import { message } from '@/lib/messages';
import { quotes } from '@/lib/messages/en/quotes';
import { type CustomerKey, customerMessage } from '@/lib/messages/quotes';

describe('the customer’s texts', () => {
  it('read the same by the small catalogue of the customer’s page and by the whole one', () => {
    const keys = Object.keys(quotes).filter((key) => key.startsWith('customer.')) as CustomerKey[];
    expect(keys.length).toBeGreaterThan(50);
    for (const key of keys) {
      const names = [...quotes[key].matchAll(/\{(\w+)\}/g)].map((match) => match[1] ?? '');
      const values = Object.fromEntries(names.map((name, index) => [name, `<${index}>`]));
      expect(customerMessage(key, values)).toBe(message(key, values));
      expect(customerMessage(key, values)).not.toMatch(/[{}]/);
    }
  });

  it('show a dash for what is missing', () =>
    expect(customerMessage('customer.page-of')).toBe('page – of –'));
});
