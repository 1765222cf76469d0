/** A mail as it arrived in the catcher, found by the Message-ID that its outbox row gives it. */

export interface Mail {
  headers: Record<string, string>;
  subject: string;
  html: string;
  text: string;
  from: { address: string; name: string }[];
  to: { address: string }[];
  attachments?: { generatedFileName: string; filename: string; contentType: string }[];
  id: string;
}

export const catcher = () => process.env.MAIL_CATCHER_URL ?? '';

export async function arrived(outboxId: string): Promise<Mail> {
  const all = (await (await fetch(`${catcher()}/api/email`)).json()) as Mail[];
  const found = all.find((mail) => mail.headers['message-id']?.startsWith(`<${outboxId}@`));
  if (!found) throw new Error(`No mail with the Message-ID of ${outboxId}.`);
  return (await (await fetch(`${catcher()}/api/email/${found.id}`)).json()) as Mail;
}
