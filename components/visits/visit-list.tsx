'use client';
/** The visits of a job at the desk, each of which opens to be changed or taken off the plan. */
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/sheet';
import { cancelVisit } from '@/lib/visits/actions';
import type { CrewChoice, VisitRow } from '@/lib/visits/schema';
import type { ShopSettings } from '@/lib/units/settings';
import { VisitForm } from './visit-form';
import { visitTimes } from './visit-times';

function Cancel({ shopId, visit }: { shopId: string; visit: VisitRow }) {
  const router = useRouter();
  const [pending, setPending] = useState(false);
  const [said, setSaid] = useState('');
  const cancel = async () => {
    setPending(true);
    const result = await cancelVisit(shopId, { id: visit.id, baseVersion: visit.version }).catch(() => null);
    setPending(false);
    if (result?.ok) router.refresh();
    else setSaid(result ? result.message : 'The server could not be reached. Try again.');
  };
  return (
    <div className="mt-4 border-t border-rule pt-4">
      <Button look="danger" pending={pending} onClick={() => void cancel()}>
        Take this visit off the plan
      </Button>
      {said ? (
        <p role="alert" className="mt-2 font-bold text-danger">
          {said}
        </p>
      ) : null}
    </div>
  );
}

export function VisitList({
  shopId,
  jobId,
  visits,
  crew,
  settings,
  editable,
}: {
  shopId: string;
  jobId: string;
  visits: VisitRow[];
  crew: CrewChoice[];
  settings: ShopSettings;
  editable: boolean;
}) {
  return (
    <div className="flex flex-col gap-4">
      {visits.length === 0 ? (
        <EmptyState>
          No visit is planned yet. Say when, and who goes: they find it on their phones.
        </EmptyState>
      ) : null}
      <ul className="flex flex-col">
        {visits.map((visit) => (
          <li key={visit.id} className="border-t border-rule py-3 first:border-t-0 first:pt-0">
            <p className="font-bold">{visitTimes(visit, settings)}</p>
            <p>{visit.crew.map((one) => one.name).join(', ')}</p>
            {visit.notes ? <p className="whitespace-pre-line text-ink-2">{visit.notes}</p> : null}
            {editable ? (
              <details className="mt-1">
                <summary className="inline-flex min-h-touch items-center underline">Change</summary>
                <div className="pt-2">
                  <VisitForm
                    key={visit.version}
                    shopId={shopId}
                    jobId={jobId}
                    visit={visit}
                    crew={crew}
                    timeZone={visit.timeZone}
                  />
                  <Cancel shopId={shopId} visit={visit} />
                </div>
              </details>
            ) : null}
          </li>
        ))}
      </ul>
      {editable ? (
        <details className="border-t border-rule pt-3" open={visits.length === 0}>
          <summary className="inline-flex min-h-touch items-center rounded-md border-2 border-ink px-4 font-bold">
            Plan a visit
          </summary>
          <div className="pt-4">
            <VisitForm shopId={shopId} jobId={jobId} visit={null} crew={crew} timeZone={settings.timeZone} />
          </div>
        </details>
      ) : null}
    </div>
  );
}
