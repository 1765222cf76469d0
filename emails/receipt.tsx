import type { InvoiceContent } from '@/lib/invoices/schema';
import { message } from '@/lib/messages';
import { formatDate, formatMoney } from '@/lib/units';
import { MailButton, MailFrame, MailText } from './frame';
import { footOf, greeting } from './parts';

export interface Receipt {
  content: InvoiceContent;
  amountMinor: string;
  receivedOn: string;
  balanceMinor: string;
  link: string | null;
}

export function ReceiptMail({ content, amountMinor, receivedOn, balanceMinor, link }: Receipt) {
  const { settings, shop } = content;
  const body = message('mail.receipt.body', {
    shop: shop.name,
    amount: formatMoney(amountMinor, settings),
    date: formatDate(receivedOn, settings),
    number: content.number,
    title: content.title,
  });
  const open = BigInt(balanceMinor) > 0n;
  return (
    <MailFrame preview={body} title={content.title} foot={footOf(shop)}>
      <MailText>{greeting(content.customer.contactName)}</MailText>
      <MailText>{body}</MailText>
      <MailText>
        {open
          ? message('mail.receipt.open', { balance: formatMoney(balanceMinor, settings) })
          : message('mail.receipt.settled')}
      </MailText>
      {link ? <MailButton href={link}>{message('invoice.to-job')}</MailButton> : null}
    </MailFrame>
  );
}
