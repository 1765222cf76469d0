/** Published documents, what happened to them, and their PDFs. All must run inside `withShop`. */
import { select } from '@/lib/platform/db';
import { notFound } from '@/lib/platform/http/errors';
import type { DocumentKind, DocumentRow, EventRow } from './schema';

const COLUMNS = `
  id, job_id as "jobId", kind, number, revision, title, sha256, pdf_sha256 as "pdfSha256",
  amount_minor as "amountMinor", currency, due_on::text as "dueOn", valid_until::text as "validUntil",
  created_at as "createdAt"`;

/** The newest first. */
export async function documentsOfJob(jobId: string, kind: DocumentKind): Promise<DocumentRow[]> {
  return select<DocumentRow>(
    `select ${COLUMNS} from documents where job_id = $1 and kind = $2 order by revision desc, created_at desc`,
    [jobId, kind],
  );
}

export async function latestDocument(jobId: string, kind: DocumentKind): Promise<DocumentRow | null> {
  const rows = await select<DocumentRow>(
    `select ${COLUMNS} from documents where job_id = $1 and kind = $2 order by revision desc, created_at desc limit 1`,
    [jobId, kind],
  );
  return rows[0] ?? null;
}

/** @throws {AppError} `not-found` */
export async function getDocument(id: string): Promise<DocumentRow> {
  const rows = await select<DocumentRow>(`select ${COLUMNS} from documents where id = $1`, [id]);
  const row = rows[0];
  if (!row) throw notFound('This document');
  return row;
}

/** The frozen text, exactly as it was hashed. @throws {AppError} `not-found` */
export async function canonicalOf(id: string): Promise<string> {
  const rows = await select<{ canonical: string }>('select canonical from documents where id = $1', [id]);
  const row = rows[0];
  if (!row) throw notFound('This document');
  return row.canonical;
}

/** Oldest first. */
export async function eventsOf(documentIds: string[]): Promise<Map<string, EventRow[]>> {
  const byDocument = new Map<string, EventRow[]>(documentIds.map((id) => [id, []]));
  if (documentIds.length === 0) return byDocument;
  const rows = await select<EventRow & { documentId: string }>(
    `select e.id, e.document_id as "documentId", e.kind, e.at, m.name as by, e.detail
     from document_events e left join memberships m on m.shop_id = e.shop_id and m.id = e.membership_id
     where e.document_id = any ($1::uuid[]) order by e.at, e.id`,
    [documentIds],
  );
  for (const { documentId, ...event } of rows) byDocument.get(documentId)?.push(event);
  return byDocument;
}

async function pdfMadeLater(documentId: string): Promise<string | null> {
  const rows = await select<{ sha256: string }>(
    `select detail ->> 'sha256' as sha256 from document_events where document_id = $1 and kind = 'pdf' order by at limit 1`,
    [documentId],
  );
  return rows[0]?.sha256 ?? null;
}

/** What a request for a PDF needs to know before it is served. @throws {AppError} `not-found` */
export async function pdfOf(
  id: string,
): Promise<{ kind: DocumentKind; jobId: string; sha256: string; fileName: string }> {
  const document = await getDocument(id);
  const sha256 = document.pdfSha256 ?? (await pdfMadeLater(id));
  if (!sha256) throw notFound('The PDF of this document');
  const revision = document.revision > 1 ? `-${document.revision}` : '';
  return {
    kind: document.kind,
    jobId: document.jobId,
    sha256,
    fileName: `${document.kind}-${document.number}${revision}.pdf`.replace(/[^a-z0-9.-]+/gi, '-'),
  };
}
