'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { useHydrated } from '@/components/ui/form';
import { Notice } from '@/components/ui/sheet';
import type { ActionResult } from '@/lib/messages/result';
import { addSource, bringUpToDate, openDraft } from '@/lib/quotes/actions';
import { Changes } from './draft-lines';
import { useRun } from './use-run';

type Updated = Extract<Awaited<ReturnType<typeof bringUpToDate>>, { ok: true }>['data'];

export function OpenDraft({ shopId, jobId }: { shopId: string; jobId: string }) {
  const hydrated = useHydrated();
  const { running, failure, run } = useRun();
  return (
    <div className="flex flex-col items-start gap-3">
      {failure ? <Notice kind="danger" word="Not started" title={failure.message} role="alert" /> : null}
      <Button
        pending={running || !hydrated}
        onClick={() => void run((): Promise<ActionResult<unknown>> => openDraft(shopId, { jobId }))}
      >
        Start the draft
      </Button>
    </div>
  );
}

/** Takes over what the survey and parts and prices say now, and tells what that changed. */
export function BringUpToDate({ shopId, jobId, needed }: { shopId: string; jobId: string; needed: boolean }) {
  const { running, failure, run } = useRun();
  const [updated, setUpdated] = useState<Updated | null>(null);
  return (
    <div className="flex flex-col gap-3">
      {failure ? <Notice kind="danger" word="Not changed" title={failure.message} role="alert" /> : null}
      {updated ? (
        <Notice
          kind="done"
          role="status"
          title={
            updated.lines.length + updated.removed.length === 0
              ? 'Every line was up to date already.'
              : 'The draft follows the survey and today’s prices again.'
          }
        >
          {updated.lines.map((line) => (
            <div key={line.id} className="mt-1">
              <p className="font-bold">{line.description}</p>
              <Changes changes={line.changes} />
            </div>
          ))}
          {updated.removed.map((line) => (
            <p key={line} className="mt-1">
              Taken out, since it is no longer in the survey: {line}
            </p>
          ))}
        </Notice>
      ) : null}
      <div>
        <Button
          look={needed ? 'primary' : 'secondary'}
          pending={running}
          onClick={() => void run(() => bringUpToDate(shopId, { jobId }), setUpdated)}
        >
          Bring up to date
        </Button>
      </div>
    </div>
  );
}

/** Change lines and circuits that are not on the draft. */
export function UnusedSources({
  shopId,
  jobId,
  unused,
}: {
  shopId: string;
  jobId: string;
  unused: { id: string; label: string; openStops: number }[];
}) {
  const { running, failure, run } = useRun();
  if (unused.length === 0) return null;
  return (
    <section className="flex flex-col gap-2">
      <h3 className="font-sans text-lg font-bold">In the survey, not on this draft</h3>
      {failure ? <Notice kind="danger" word="Not added" title={failure.message} role="alert" /> : null}
      <ul>
        {unused.map((source) => (
          <li
            key={source.id}
            className="flex items-center justify-between gap-4 border-b border-rule py-2 last:border-b-0"
          >
            <span className="min-w-0">
              {source.label}
              {source.openStops > 0 ? <strong className="text-danger"> (open stop)</strong> : null}
            </span>
            <Button
              look="secondary"
              disabled={running}
              aria-label={`Add to the draft: ${source.label}`}
              onClick={() => void run(() => addSource(shopId, { jobId, sourceId: source.id }))}
            >
              Add
            </Button>
          </li>
        ))}
      </ul>
    </section>
  );
}
