/** Mails as they arrived in the catcher. */
import { expect } from '@playwright/test';

const catcher = process.env.MAIL_CATCHER_URL ?? '';

export interface CaughtMail {
  id: string;
  subject: string;
  html: string;
  text: string;
  attachments?: { fileName?: string; generatedFileName?: string; contentType: string }[];
  to: { address: string }[];
}

async function mails(): Promise<CaughtMail[]> {
  const response = await fetch(`${catcher}/api/email`);
  const body = (await response.json()) as CaughtMail[] | { emails?: CaughtMail[]; data?: CaughtMail[] };
  return Array.isArray(body) ? body : (body.emails ?? body.data ?? []);
}

/** Waits for the newest mail to `to` whose subject fits. */
export async function mailTo(to: string, subject: RegExp): Promise<CaughtMail> {
  let found: CaughtMail | undefined;
  await expect
    .poll(
      async () => {
        found = (await mails()).findLast(
          (mail) => subject.test(mail.subject) && mail.to.some((one) => one.address === to),
        );
        return found !== undefined;
      },
      { message: `a mail to ${to} with subject ${subject}`, timeout: 20_000 },
    )
    .toBe(true);
  if (!found) throw new Error('no mail');
  return found;
}

/** The private link in a mail. */
export function linkIn(mail: CaughtMail): string {
  const match = /https?:\/\/[^\s"'<>]+\/(?:l\/open|new-password)\/[A-Za-z0-9_-]+/.exec(mail.html);
  if (!match) throw new Error(`No link in the mail "${mail.subject}".`);
  return match[0];
}
