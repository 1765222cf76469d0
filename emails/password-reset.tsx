import { message } from '@/lib/messages';
import { MailButton, MailFrame, MailText } from './frame';

export function PasswordReset({ shopName, link }: { shopName: string; link: string }) {
  const title = message('mail.password-reset.subject');
  return (
    <MailFrame preview={title} title={title} foot={[shopName]}>
      <MailText>{message('mail.password-reset.text')}</MailText>
      <MailButton href={link}>{message('mail.password-reset.button')}</MailButton>
      <MailText second>{message('mail.password-reset.not-you')}</MailText>
    </MailFrame>
  );
}
