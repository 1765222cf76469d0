/** Mail by SMTP. One Message-ID per outbox row: a copy sent again after a crash is recognised as the same mail. */
import { createTransport, type Transporter } from 'nodemailer';
import { env, required } from '@/lib/platform/env';
import { insideTransaction } from '@/lib/platform/db';

export interface OutgoingMail {
  /** The outbox row's id: becomes the Message-ID. */
  id: string;
  to: string;
  fromName: string;
  replyTo?: string | undefined;
  subject: string;
  html: string;
  text: string;
  attachments?: { filename: string; content: Buffer; contentType: string }[];
}

/** A header holds one line: whatever else was typed into a name is dropped. */
function oneLine(text: string): string {
  return text.replace(/[\r\n\u2028\u2029\0]+/g, ' ').trim();
}

let transport: Transporter | undefined;

function transporter(): Transporter {
  transport ??= createTransport({
    url: required('SMTP_URL'),
    ignoreTLS: env().LAMPWRIGHT_DEMO,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return transport;
}

/** @throws when SMTP does not accept the mail; the queue tries again. */
export async function sendMail(mail: OutgoingMail): Promise<void> {
  if (insideTransaction()) throw new Error('Mail is never sent inside a transaction.');
  const address = /<([^>]+)>/.exec(env().MAIL_FROM)?.[1] ?? env().MAIL_FROM;
  await transporter().sendMail({
    messageId: `<${mail.id}@${address.split('@')[1] ?? 'lampwright.example.com'}>`,
    from: { name: oneLine(mail.fromName), address },
    to: oneLine(mail.to),
    ...(mail.replyTo ? { replyTo: oneLine(mail.replyTo) } : {}),
    subject: oneLine(mail.subject),
    html: mail.html,
    text: mail.text,
    attachments: mail.attachments ?? [],
  });
}
