import { message } from '@/lib/messages';
import type { QuoteContent } from '@/lib/quotes/schema/content';
import { MailButton, MailFrame, MailPlate, MailQuoted, MailText } from './frame';
import { footOf, greeting } from './parts';

export interface AcceptedMail {
  content: QuoteContent;
  /** What was agreed, word for word. */
  shownText: string;
  name: string;
  reference: string;
  when: string;
  sha256: string;
  link: string;
}

function Record({ shownText, name, sha256 }: Pick<AcceptedMail, 'shownText' | 'name' | 'sha256'>) {
  return (
    <>
      <MailPlate>{message('mail.quote-accepted.words')}</MailPlate>
      <MailQuoted>{shownText}</MailQuoted>
      <MailText>{message('mail.quote-accepted.signed', { name })}</MailText>
      <MailText second>{message('mail.quote-accepted.hash', { hash: sha256 })}</MailText>
    </>
  );
}

/** The customer's own record of what they agreed to. */
export function QuoteAcceptedForCustomer(mail: AcceptedMail) {
  const { content, reference, when, link } = mail;
  const values = { number: content.number, revision: content.revision, when };
  const body = reference
    ? message('mail.quote-accepted.by-office', { ...values, reference })
    : message('mail.quote-accepted.customer', values);
  return (
    <MailFrame preview={body} title={content.title} foot={footOf(content.shop)}>
      <MailText>{greeting(content.customer.contactName)}</MailText>
      <MailText>{body}</MailText>
      <Record {...mail} />
      <MailButton href={link}>{message('mail.quote-accepted.see')}</MailButton>
    </MailFrame>
  );
}

export function QuoteAcceptedForShop(mail: AcceptedMail) {
  const { content, name, when, link } = mail;
  const body = message('mail.quote-accepted.shop', {
    name,
    number: content.number,
    revision: content.revision,
    when,
  });
  return (
    <MailFrame preview={body} title={content.title} foot={footOf(content.shop)}>
      <MailText>{body}</MailText>
      <Record {...mail} />
      <MailButton href={link}>{message('mail.quote-accepted.open-job')}</MailButton>
    </MailFrame>
  );
}
