/** One visit as the person who goes reads it: when, where, with whom, and its wiring sheet. */
import Link from 'next/link';
import { ButtonLink } from '@/components/ui/button';
import type { VisitRow } from '@/lib/visits/schema';
import type { ShopSettings } from '@/lib/units/settings';
import { visitTimes } from './visit-times';

interface Sheets {
  sheets: { id: string; number: string; revision: number; signedOff: boolean }[];
}

export function VisitCard({
  shopId,
  visit,
  settings,
  desk,
}: {
  shopId: string;
  visit: VisitRow & Sheets;
  settings: ShopSettings;
  /** People at the desk get to the job; crew have no business there. */
  desk: boolean;
}) {
  return (
    <li className="flex flex-col gap-2 border-t border-rule pt-4 first:border-t-0 first:pt-0">
      <p className="font-bold">{visitTimes(visit, settings)}</p>
      <h2 className="text-2xl">{visit.siteName}</h2>
      <p>{visit.siteAddress}</p>
      <p className="text-ink-2">
        {desk ? (
          <Link href={`/s/${shopId}/jobs/${visit.jobId}/install`}>{`Job ${visit.jobNumber}`}</Link>
        ) : (
          `Job ${visit.jobNumber}`
        )}
        , {visit.jobTitle}. {visit.crew.map((one) => one.name).join(', ')}
      </p>
      {visit.notes ? <p className="whitespace-pre-line">{visit.notes}</p> : null}
      <div className="flex flex-wrap items-center gap-3">
        {visit.sheets.map((sheet) => (
          <span key={sheet.id} className="flex flex-wrap items-center gap-3">
            <ButtonLink href={`/s/${shopId}/sheets/${sheet.id}`}>
              {`Wiring sheet ${sheet.number}, copy ${sheet.revision}`}
            </ButtonLink>
            {sheet.signedOff ? <span>✓ signed off</span> : null}
          </span>
        ))}
        {visit.sheets.length === 0 ? (
          <p className="text-ink-2">The wiring sheet is not released yet: wire nothing from memory.</p>
        ) : null}
      </div>
    </li>
  );
}
