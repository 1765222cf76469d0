'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { SeverityTag } from '@/components/findings/finding-list';
import { SyncStatus } from '@/components/survey/status';
import { type Kept, type Survey, useSurvey } from '@/components/survey/use-survey';
import { Button, ButtonLink } from '@/components/ui/button';
import { EmptyState, Sheet } from '@/components/ui/sheet';
import { type CircuitKind, startingPoint, type TapeRun } from '@/lib/circuits/schema/electrical';
import { figureCircuit } from '@/lib/circuits/schema/figure';
import type { CircuitBody } from '@/lib/surveys/schema';
import { ChoiceField } from '../survey/fields';

const KINDS: Record<CircuitKind, string> = {
  'branch-circuit': 'Branch circuit',
  'tape-run': 'Tape run',
  'resistor-array': 'LED array with resistors (bench work)',
};

/** A new circuit in an area; a tape run takes the lengths of the cove it is for. */
function newCircuit(survey: Survey, areaId: string, kind: CircuitKind): CircuitBody {
  const electrical = startingPoint(kind, survey.settings.basis);
  const used = new Set(survey.circuits.map((one) => one.data.coveId));
  const cove =
    kind === 'tape-run'
      ? survey.coves.find((one) => one.data.areaId === areaId && !used.has(one.id))
      : undefined;
  const count = survey.circuits.filter((one) => one.data.kind === kind).length + 1;
  if (cove)
    Object.assign(electrical as TapeRun, {
      runMetres: cove.data.tapeMetres,
      driverMetres: cove.data.driverMetres,
    });
  return {
    areaId,
    coveId: cove?.id ?? null,
    kind,
    name: cove ? `${cove.data.name}, tape run` : `${KINDS[kind].split(' (')[0] ?? kind} ${count}`,
    electrical: electrical as unknown as Record<string, unknown>,
    choices: { roles: {} },
  };
}

function Row({ one, survey, href }: { one: Kept<CircuitBody>; survey: Survey; href: string }) {
  const figured = figureCircuit(one.data.kind, one.data.electrical, survey.settings);
  const stops = figured.ok
    ? figured.answer.findings.filter((finding) => finding.severity === 'stop').length
    : 1;
  const area = survey.areas.find((each) => each.id === one.data.areaId)?.data.name ?? '';
  return (
    <li className="flex flex-wrap items-center justify-between gap-3 border-t border-rule py-3">
      <div className="min-w-0">
        <p className="font-bold">{one.data.name}</p>
        <p className="text-ink-2">
          {KINDS[one.data.kind]}, {area}
        </p>
        {stops > 0 ? (
          <p className="mt-1">
            <SeverityTag severity="stop" />{' '}
            {figured.ok ? `${stops} to clear before it can be quoted` : figured.message}
          </p>
        ) : (
          <p className="mt-1">✓ Figured, nothing stops it</p>
        )}
      </div>
      <div className="flex flex-wrap gap-3">
        <ButtonLink look="secondary" href={href}>
          Open<span className="sr-only"> {one.data.name}</span>
        </ButtonLink>
        <Button look="danger" onClick={() => survey.archive('circuits', one)}>
          Take out<span className="sr-only"> {one.data.name}</span>
        </Button>
      </div>
    </li>
  );
}

export function CircuitList(props: { shopId: string; membershipId: string; jobId: string }) {
  const survey = useSurvey(props);
  const router = useRouter();
  const [areaId, setAreaId] = useState('');
  const [kind, setKind] = useState<CircuitKind>('branch-circuit');
  const base = `/s/${props.shopId}/jobs/${props.jobId}/circuits`;
  const area = survey.areas.find((one) => one.id === areaId) ?? survey.areas[0];
  const kinds = (Object.keys(KINDS) as CircuitKind[]).filter(
    (one) => one !== 'resistor-array' || survey.extra?.benchWork,
  );
  const add = () => {
    if (!area) return;
    const id = crypto.randomUUID();
    survey.add('circuits', id, newCircuit(survey, area.id, kind));
    router.push(`${base}/${id}`);
  };
  return (
    <div className="flex flex-col gap-5">
      <SyncStatus offline={survey.offline} />
      <Sheet title="Circuits">
        {survey.circuits.length === 0 ? (
          <EmptyState>
            No circuit yet. A circuit that is new, extended or low-voltage is sized and drawn here.
          </EmptyState>
        ) : (
          <ul>
            {survey.circuits.map((one) => (
              <Row key={one.id} one={one} survey={survey} href={`${base}/${one.id}`} />
            ))}
          </ul>
        )}
      </Sheet>
      <Sheet title="New circuit">
        {area ? (
          <div className="flex flex-wrap items-end gap-3">
            <ChoiceField
              label="Area"
              value={area.id}
              options={survey.areas.map((one) => ({ value: one.id, label: one.data.name }))}
              onSave={setAreaId}
            />
            <ChoiceField
              label="Kind"
              value={kind}
              options={kinds.map((value) => ({ value, label: KINDS[value] }))}
              onSave={setKind}
            />
            <Button onClick={add}>Start it</Button>
          </div>
        ) : (
          <EmptyState
            action={
              <ButtonLink href={`/s/${props.shopId}/jobs/${props.jobId}/survey`}>To the survey</ButtonLink>
            }
          >
            A circuit belongs to an area: survey one first.
          </EmptyState>
        )}
      </Sheet>
    </div>
  );
}
