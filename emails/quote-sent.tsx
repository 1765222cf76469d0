import { message } from '@/lib/messages';
import type { QuoteContent } from '@/lib/quotes/schema/content';
import { formatDate, formatMoney } from '@/lib/units';
import { MailButton, MailFrame, MailQuoted, MailText } from './frame';
import { footOf, greeting } from './parts';

/** The mail that brings a quote: what it is, the link, and what the shop wrote beside it. */
export function QuoteSentMail({
  content,
  link,
  note,
}: {
  content: QuoteContent;
  link: string;
  note: string;
}) {
  const { settings, totals } = content;
  const values = {
    title: content.title,
    site: content.site.name,
    total: formatMoney(totals.totalMinor, settings),
    until: formatDate(content.validUntil, settings),
  };
  return (
    <MailFrame
      preview={message('mail.quote-sent.body', values)}
      title={content.title}
      foot={footOf(content.shop)}
    >
      <MailText>{greeting(content.customer.contactName)}</MailText>
      <MailText>{message('mail.quote-sent.body', values)}</MailText>
      {note ? <MailQuoted>{note}</MailQuoted> : null}
      <MailButton href={link}>{message('mail.quote-sent.button')}</MailButton>
      <MailText>{message('mail.quote-sent.how')}</MailText>
      <MailText second>{message('mail.quote-sent.private')}</MailText>
    </MailFrame>
  );
}
