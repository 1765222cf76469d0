import { message } from '@/lib/messages';
import type { QuoteContent } from '@/lib/quotes/schema/content';
import { MailButton, MailFrame, MailQuoted, MailText } from './frame';
import { footOf } from './parts';

export function QuoteDeclinedForShop({
  content,
  reason,
  link,
}: {
  content: QuoteContent;
  reason: string;
  link: string;
}) {
  const body = message('mail.quote-declined.shop', {
    customer: content.customer.name,
    number: content.number,
    revision: content.revision,
  });
  return (
    <MailFrame preview={body} title={content.title} foot={footOf(content.shop)}>
      <MailText>{body}</MailText>
      <MailQuoted>{reason}</MailQuoted>
      <MailButton href={link}>{message('mail.quote-accepted.open-job')}</MailButton>
    </MailFrame>
  );
}
