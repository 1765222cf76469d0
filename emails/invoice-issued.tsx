import type { InvoiceContent } from '@/lib/invoices/schema';
import { message } from '@/lib/messages';
import { formatDate, formatMoney } from '@/lib/units';
import { MailButton, MailFrame, MailText } from './frame';
import { footOf, greeting } from './parts';

export function InvoiceIssuedMail({ content, link }: { content: InvoiceContent; link: string }) {
  const { settings } = content;
  const nothing = content.totalMinor === 0;
  const body = message(nothing ? 'mail.invoice.nothing' : 'mail.invoice.body', {
    number: content.number,
    total: formatMoney(content.totalMinor, settings),
    due: formatDate(content.dueOn, settings),
  });
  return (
    <MailFrame preview={body} title={content.title} foot={footOf(content.shop)}>
      <MailText>{greeting(content.customer.contactName)}</MailText>
      <MailText>{body}</MailText>
      <MailButton href={link}>{message(nothing ? 'invoice.to-job' : 'mail.invoice.button')}</MailButton>
      <MailText second>{message('mail.quote-sent.private')}</MailText>
    </MailFrame>
  );
}
