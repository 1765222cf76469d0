'use client';
/** The site survey on a phone: areas, what hangs in them, coves, and what is to change. Works with no signal. */
import { useState } from 'react';
import { Button, ButtonLink } from '@/components/ui/button';
import { EmptyState, Sheet } from '@/components/ui/sheet';
import { finishSurvey } from '@/lib/jobs/actions';
import { usePhotoSender } from '@/lib/offline/use-photos';
import { NO_AREA_DETAILS } from '@/lib/surveys/schema/details';
import { AreaCard } from './area-card';
import { SyncStatus } from './status';
import { Utility } from './utility';
import { type Survey, useSurvey } from './use-survey';

function addArea(survey: Survey): string {
  const id = crypto.randomUUID();
  const position =
    survey.areas.length > 0 ? Math.max(...survey.areas.map((area) => area.data.position)) + 1 : 0;
  survey.add('areas', id, {
    position,
    name: `Area ${survey.areas.length + 1}`,
    use: '',
    lengthMetres: null,
    widthMetres: null,
    heightMetres: null,
    weeklyHours: null,
    ambientCelsius: null,
    environment: 'dry',
    hazards: {},
    details: NO_AREA_DETAILS,
    notes: '',
  });
  return id;
}

/** What the survey still lacks, in words: shown beside the button that finishes it. */
function missing(survey: Survey): string[] {
  const lacks: string[] = [];
  if (survey.areas.length === 0) lacks.push('No area yet.');
  for (const { data } of survey.areas) {
    if (data.lengthMetres === null || data.widthMetres === null)
      lacks.push(`${data.name}: size not measured.`);
    if (data.weeklyHours === null) lacks.push(`${data.name}: weekly hours not known.`);
  }
  const estimated = survey.luminaires.filter((one) => one.data.countConfidence === 'estimated').length;
  if (estimated > 0)
    lacks.push(
      `${estimated} ${estimated === 1 ? 'count is' : 'counts are'} estimated: recount, or the quote says so.`,
    );
  return lacks;
}

function Finish({ survey, shopId, jobId }: { survey: Survey; shopId: string; jobId: string }) {
  const [said, setSaid] = useState('');
  const [pending, setPending] = useState(false);
  const [finished, setFinished] = useState(false);
  const unsent = survey.offline.queue.length;
  const lacks = missing(survey);
  const done = finished || (survey.extra?.job.surveyDone ?? false);
  const finish = async () => {
    setPending(true);
    const result = await finishSurvey(shopId, { jobId, done: true }).catch(() => null);
    setPending(false);
    setFinished(result?.ok ?? false);
    setSaid(
      result === null ? 'No signal: finish the survey when there is one.' : result.ok ? '' : result.message,
    );
  };
  return (
    <Sheet title="Finish">
      {lacks.length > 0 ? (
        <ul className="mb-4 list-disc pl-5 text-ink-2">
          {lacks.map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
      ) : null}
      {done ? (
        <p className="mb-3">✓ Survey finished. You can still change it.</p>
      ) : (
        <Button
          onClick={() => void finish()}
          pending={pending}
          disabled={unsent > 0 || survey.areas.length === 0}
        >
          Survey is finished
        </Button>
      )}
      {unsent > 0 && !done ? <p className="mt-2 text-sm text-ink-2">Changes are still being sent.</p> : null}
      {said ? (
        <p role="alert" className="mt-2 font-bold text-danger">
          {said}
        </p>
      ) : null}
      <div className="mt-4 flex flex-wrap gap-3">
        <ButtonLink look="secondary" href={`/s/${shopId}/jobs/${jobId}/circuits`}>
          To the circuits
        </ButtonLink>
        <ButtonLink look="secondary" href={`/s/${shopId}/jobs/${jobId}/quote`}>
          To the quote
        </ButtonLink>
      </div>
    </Sheet>
  );
}

export function SurveyScreen(props: { shopId: string; membershipId: string; jobId: string }) {
  const survey = useSurvey(props);
  const [open, setOpen] = useState<string | null>(null);
  const photos = usePhotoSender(survey.offline.store, survey.offline.scope, survey.photosUrl);
  if (!survey.ready) return <p role="status">Opening what is kept on this device.</p>;
  return (
    <div className="flex flex-col gap-5">
      <SyncStatus offline={survey.offline} photos={photos} />
      {survey.areas.length === 0 ? (
        <Sheet title="Areas">
          <EmptyState>
            Start with the first area: a room, a corridor, a bay. Its size, its hours, and what hangs in it.
          </EmptyState>
        </Sheet>
      ) : null}
      {survey.areas.map((area) => (
        <AreaCard
          key={area.id}
          area={area}
          survey={survey}
          open={open === area.id}
          onToggle={() => setOpen(open === area.id ? null : area.id)}
        />
      ))}
      <div>
        <Button onClick={() => setOpen(addArea(survey))}>Add an area</Button>
      </div>
      <Utility survey={survey} />
      <Finish survey={survey} shopId={props.shopId} jobId={props.jobId} />
    </div>
  );
}
