/** Freezing a document and telling what happens to it. Both must run inside a command's transaction. */
import { DocumentEvent, PublishedDocument } from '@/models';
import { currentShopId, run } from '@/lib/platform/db';
import { canonical, sha256 } from '@/lib/platform/http/hash';
import { putFile } from '@/lib/platform/storage';
import type { DocumentEventKind, DocumentKind } from './schema';

export interface StoredPdf {
  sha256: string;
  bytes: number;
}

/** Puts a PDF into the store. Talks to a service: call it before the transaction that freezes the document. */
export async function storePdf(shopId: string, bytes: Uint8Array): Promise<StoredPdf> {
  const stored = await putFile({ shopId, bytes, contentType: 'application/pdf' });
  return { sha256: stored.sha256, bytes: bytes.byteLength };
}

export interface Freezing {
  jobId: string;
  kind: DocumentKind;
  number: string;
  revision: number;
  title: string;
  /** An explicit list of fields: whatever is here is published. */
  content: unknown;
  pdf?: StoredPdf | undefined;
  amountMinor?: string | undefined;
  currency?: string | undefined;
  dueOn?: string | undefined;
  validUntil?: string | undefined;
  /** The membership of who does it. */
  createdBy: string | null;
}

async function registerFile(pdf: StoredPdf): Promise<void> {
  await run(
    `insert into files (shop_id, sha256, content_type, bytes) values ($1, $2, 'application/pdf', $3)
     on conflict (shop_id, sha256) do nothing`,
    [currentShopId(), pdf.sha256, pdf.bytes],
  );
}

/** Writes one row that never changes again: the RFC 8785 text, its SHA-256 and the hash of the PDF made then. */
export async function freezeDocument(freezing: Freezing): Promise<{ id: string; sha256: string }> {
  const { content, pdf, amountMinor, currency, dueOn, validUntil, ...plain } = freezing;
  if (pdf) await registerFile(pdf);
  const text = canonical(content);
  const row = await PublishedDocument.create({
    shopId: currentShopId(),
    ...plain,
    canonical: text,
    sha256: sha256(text),
    pdfSha256: pdf?.sha256 ?? null,
    amountMinor: amountMinor ?? null,
    currency: currency ?? null,
    dueOn: dueOn ?? null,
    validUntil: validUntil ?? null,
  });
  return { id: row.id, sha256: row.sha256 };
}

export async function recordDocumentEvent(
  documentId: string,
  kind: DocumentEventKind,
  detail: Record<string, unknown> = {},
  membershipId: string | null = null,
): Promise<void> {
  await DocumentEvent.create({ shopId: currentShopId(), documentId, kind, detail, membershipId });
}
