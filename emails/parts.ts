/** Sentences that several mails share. */
import { message } from '@/lib/messages';
import type { MailShop } from './frame';

export const greeting = (name: string): string =>
  name ? message('mail.quote-sent.greeting', { name }) : message('mail.quote-sent.greeting-plain');

/** Who writes: name and licence on one line, then how to reach them. */
export function footOf(shop: MailShop): string[] {
  const licence = shop.licenceNumber
    ? `, ${message('customer.licence', { licence: shop.licenceNumber })}`
    : '';
  return [
    `${shop.name}${licence}`,
    shop.address,
    [shop.phone, shop.email].filter(Boolean).join(' · '),
  ].filter(Boolean);
}
