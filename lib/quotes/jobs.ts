/** The quote's mails, rendered when they are sent: the link is worked out here and is stored nowhere. */
import { render } from '@react-email/render';
import { createElement, type ReactElement } from 'react';
import { type AcceptedMail, QuoteAcceptedForCustomer, QuoteAcceptedForShop } from '@/emails/quote-accepted';
import { QuoteDeclinedForShop } from '@/emails/quote-declined';
import { QuoteSentMail } from '@/emails/quote-sent';
import { eventsOf, getDocument, pdfOf } from '@/lib/documents/queries';
import type { EventRow } from '@/lib/documents/schema';
import { findLink, type LinkRow, linkUrl } from '@/lib/links/queries';
import { message } from '@/lib/messages';
import { select, withShop } from '@/lib/platform/db';
import { env } from '@/lib/platform/env';
import { notFound } from '@/lib/platform/http/errors';
import { type OutgoingMail, sendMail } from '@/lib/platform/mail';
import type { Handler, OutboxItem } from '@/lib/platform/queue/worker';
import { getFile } from '@/lib/platform/storage';
import { formatDateTime } from '@/lib/units';
import { acceptanceOf, type AcceptanceRow, contentOf } from './queries/sent';
import type { QuoteContent } from './schema/content';

interface Loaded {
  content: QuoteContent;
  jobId: string;
  events: EventRow[];
  acceptance: AcceptanceRow | null;
  link: LinkRow | null;
  /** Where the shop reads its mail: its own address, else its owners'. */
  shopMail: string[];
}

async function shopAddresses(content: QuoteContent): Promise<string[]> {
  if (content.shop.email) return [content.shop.email];
  const rows = await select<{ email: string }>(
    `select email from memberships where 'owner' = any (roles) and archived_at is null order by email`,
  );
  return rows.map((row) => row.email);
}

async function linkOf(item: OutboxItem, events: EventRow[]): Promise<LinkRow | null> {
  const last = events.findLast((event) => typeof event.detail['linkId'] === 'string');
  const id = item.payload['linkId'] ?? (last?.detail['linkId'] as string | undefined);
  return id === undefined ? null : findLink(id);
}

async function load(item: OutboxItem): Promise<Loaded> {
  const documentId = item.payload['documentId'] ?? '';
  return withShop(item.shopId, async () => {
    const content = await contentOf(documentId);
    const events = (await eventsOf([documentId])).get(documentId) ?? [];
    return {
      content,
      events,
      jobId: (await getDocument(documentId)).jobId,
      acceptance: await acceptanceOf(documentId),
      link: await linkOf(item, events),
      shopMail: await shopAddresses(content),
    };
  });
}

async function pdfAttachment(item: OutboxItem) {
  const pdf = await withShop(item.shopId, () => pdfOf(item.payload['documentId'] ?? ''));
  const content = Buffer.from(await getFile(item.shopId, pdf.sha256));
  return { filename: pdf.fileName, content, contentType: 'application/pdf' };
}

async function post(
  item: OutboxItem,
  loaded: Loaded,
  mail: Pick<OutgoingMail, 'to' | 'subject' | 'attachments'> & { body: ReactElement },
): Promise<void> {
  const { body, ...rest } = mail;
  const { shop } = loaded.content;
  await sendMail({
    id: item.id,
    fromName: shop.name,
    replyTo: loaded.shopMail[0],
    html: await render(body),
    text: await render(body, { plainText: true }),
    ...rest,
  });
}

const quoteSent: Handler = async (item) => {
  const loaded = await load(item);
  const { content, link, events } = loaded;
  if (!link) throw notFound('The link of this mail');
  const note = events.find((event) => event.kind === 'sent')?.detail['note'];
  await post(item, loaded, {
    to: link.contactEmail,
    subject: message('mail.quote-sent.subject', {
      number: content.number,
      shop: content.shop.name,
      title: content.title,
    }),
    body: createElement(QuoteSentMail, {
      content,
      link: linkUrl(link),
      note: typeof note === 'string' ? note : '',
    }),
    attachments: [await pdfAttachment(item)],
  });
};

const jobUrl = (item: OutboxItem, jobId: string) =>
  `${env().APP_URL.replace(/\/$/, '')}/s/${item.shopId}/jobs/${jobId}`;

function acceptedMail(loaded: Loaded, link: string): AcceptedMail {
  const { content, acceptance } = loaded;
  if (!acceptance) throw notFound('The acceptance of this quote');
  const { name, reference, shownText, sha256, at } = acceptance;
  return { content, name, reference, shownText, sha256, link, when: formatDateTime(at, content.settings) };
}

const acceptedSubject = ({ number, shop, title }: QuoteContent) =>
  message('mail.quote-accepted.subject', { number, shop: shop.name, title });

const acceptedForCustomer: Handler = async (item) => {
  const loaded = await load(item);
  const { content, link } = loaded;
  if (!link) throw notFound('The link of this mail');
  await post(item, loaded, {
    to: link.contactEmail,
    subject: acceptedSubject(content),
    body: createElement(QuoteAcceptedForCustomer, acceptedMail(loaded, linkUrl(link))),
    attachments: [await pdfAttachment(item)],
  });
};

const acceptedForShop: Handler = async (item) => {
  const loaded = await load(item);
  await post(item, loaded, {
    to: loaded.shopMail.join(', '),
    subject: acceptedSubject(loaded.content),
    body: createElement(QuoteAcceptedForShop, acceptedMail(loaded, jobUrl(item, loaded.jobId))),
  });
};

const declinedForShop: Handler = async (item) => {
  const loaded = await load(item);
  const { content, events } = loaded;
  const reason = events.findLast((event) => event.kind === 'declined')?.detail['reason'];
  await post(item, loaded, {
    to: loaded.shopMail.join(', '),
    subject: message('mail.quote-declined.subject', { number: content.number, title: content.title }),
    body: createElement(QuoteDeclinedForShop, {
      content,
      reason: typeof reason === 'string' ? reason : '',
      link: jobUrl(item, loaded.jobId),
    }),
  });
};

export const quoteHandlers: [string, Handler][] = [
  ['quote.sent', quoteSent],
  ['quote.accepted.customer', acceptedForCustomer],
  ['quote.accepted.shop', acceptedForShop],
  ['quote.declined.shop', declinedForShop],
];
