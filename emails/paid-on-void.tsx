import type { InvoiceContent } from '@/lib/invoices/schema';
import { message } from '@/lib/messages';
import { MailButton, MailFrame, MailText } from './frame';
import { footOf } from './parts';

/** To the office: money came for an invoice that was void by then. */
export function PaidOnVoidMail({
  content,
  amount,
  customer,
  link,
}: {
  content: InvoiceContent;
  amount: string;
  customer: string;
  link: string;
}) {
  const body = message('mail.paid-on-void.body', { customer, amount, number: content.number });
  return (
    <MailFrame preview={body} title={content.title} foot={footOf(content.shop)}>
      <MailText>{body}</MailText>
      <MailText>{message('mail.paid-on-void.next')}</MailText>
      <MailButton href={link}>{message('mail.paid-on-void.button')}</MailButton>
    </MailFrame>
  );
}
