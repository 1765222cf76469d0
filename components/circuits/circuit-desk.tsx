'use client';
/** The circuit desk: figures on one side; on the other how it would be wired, what comes out, what stands against it. */
import { useMemo } from 'react';
import { FindingList } from '@/components/findings/finding-list';
import { HowFigured } from '@/components/findings/how-figured';
import { OverrideStop } from '@/components/findings/override-stop';
import { SyncStatus } from '@/components/survey/status';
import { type Kept, type Survey, useSurvey } from '@/components/survey/use-survey';
import { Button, ButtonLink } from '@/components/ui/button';
import { Notice, Sheet } from '@/components/ui/sheet';
import type { BranchCircuit, CircuitChoices, ResistorArray, TapeRun } from '@/lib/circuits/schema/electrical';
import { type Figured, figureCircuit } from '@/lib/circuits/schema/figure';
import type { Finding } from '@/lib/engine/contract';
import type { CircuitBody } from '@/lib/surveys/schema';
import { LineField } from '../survey/fields';
import { CircuitDrawing, CircuitFigures } from './figures';
import { ArrayForm } from './array-form';
import { BranchForm } from './branch-form';
import type { FormProps } from './part-choice';
import { TapeForm } from './tape-form';

type Roles = CircuitChoices['roles'];

function Inputs({
  circuit,
  survey,
  figured,
  onChange,
}: {
  circuit: CircuitBody;
  survey: Survey;
  figured: Figured;
  onChange: (electrical: object, roles: Roles) => void;
}) {
  const errors = figured.ok
    ? {}
    : Object.fromEntries(figured.issues.map((issue) => [issue.path.split('.')[0], issue.message]));
  const props = {
    roles: circuit.choices.roles,
    parts: survey.extra?.parts ?? [],
    settings: survey.settings,
    errors,
    value: circuit.electrical as unknown,
    onChange,
  };
  if (circuit.kind === 'tape-run') return <TapeForm {...(props as unknown as FormProps<TapeRun>)} />;
  if (circuit.kind === 'branch-circuit')
    return <BranchForm {...(props as unknown as FormProps<BranchCircuit>)} />;
  return <ArrayForm {...(props as unknown as FormProps<ResistorArray>)} />;
}

/** What can be done about a finding with one press. */
function quickFix(finding: Finding, circuit: CircuitBody, set: (change: object) => void) {
  const far = finding.code === 'far-end-too-low' || finding.code === 'dimmest-too-dim';
  if (!far || circuit.kind !== 'tape-run' || circuit.electrical['feed'] === 'both') return null;
  return (
    <Button look="secondary" className="mt-2 mr-2" onClick={() => set({ feed: 'both' })}>
      Feed both ends
    </Button>
  );
}

function Output({
  one,
  survey,
  figured,
  set,
}: {
  one: Kept<CircuitBody>;
  survey: Survey;
  figured: Figured;
  set: (change: object) => void;
}) {
  if (!figured.ok)
    return (
      <Notice kind="danger" word="Not figured" title={figured.message} role="status">
        {figured.issues
          .filter((issue) => issue.path !== '')
          .map((issue) => (
            <p key={issue.path}>
              {issue.path}: {issue.message}
            </p>
          ))}
      </Notice>
    );
  const { kind, electrical } = one.data;
  return (
    <div className="grid min-w-0 items-start gap-5 xl:grid-cols-[2fr_1fr]">
      <Sheet
        title="As it would be wired"
        aside={survey.settings.basis === 'us' ? 'symbols: IEEE 315' : 'symbols: IEC 60617'}
      >
        <CircuitDrawing
          kind={kind}
          electrical={electrical}
          answer={figured.answer}
          settings={survey.settings}
          plot
        />
      </Sheet>
      <div className="flex min-w-0 flex-col gap-5">
        <Sheet title="Figures">
          <CircuitFigures
            kind={kind}
            electrical={electrical}
            answer={figured.answer}
            settings={survey.settings}
          />
          <HowFigured steps={figured.answer.working} settings={survey.settings} />
        </Sheet>
        <Sheet title="Findings">
          <FindingList
            findings={figured.answer.findings}
            settings={survey.settings}
            actions={(finding) => (
              <>
                {quickFix(finding, one.data, set)}
                <OverrideStop
                  finding={finding}
                  offline={survey.offline}
                  subject={{ type: 'circuit', id: one.id }}
                  dirty={one.dirty}
                />
              </>
            )}
          />
        </Sheet>
      </div>
    </div>
  );
}

function Desk({ one, survey, back }: { one: Kept<CircuitBody>; survey: Survey; back: string }) {
  const { data } = one;
  const figured = useMemo(
    () => figureCircuit(data.kind, data.electrical, survey.settings),
    [data.kind, data.electrical, survey.settings],
  );
  const area = survey.areas.find((each) => each.id === data.areaId);
  const save = (change: Partial<CircuitBody>) => survey.edit('circuits', one, change);
  return (
    <div className="grid items-start gap-5 lg:grid-cols-[22rem_1fr]">
      <Sheet title={data.name}>
        <p className="mb-3 text-ink-2">{area?.data.name}</p>
        <div className="flex flex-col gap-3">
          <LineField
            label="Name"
            required="Name the circuit."
            value={data.name}
            onSave={(name) => save({ name })}
          />
          <Inputs
            circuit={data}
            survey={survey}
            figured={figured}
            onChange={(electrical, roles) =>
              save({ electrical: electrical as Record<string, unknown>, choices: { ...data.choices, roles } })
            }
          />
          <ButtonLink look="secondary" href={back}>
            All circuits
          </ButtonLink>
        </div>
      </Sheet>
      <Output
        one={one}
        survey={survey}
        figured={figured}
        set={(change) => save({ electrical: { ...data.electrical, ...change } })}
      />
    </div>
  );
}

export function CircuitDesk({
  shopId,
  membershipId,
  jobId,
  circuitId,
}: {
  shopId: string;
  membershipId: string;
  jobId: string;
  circuitId: string;
}) {
  const survey = useSurvey({ shopId, membershipId, jobId });
  const one = survey.circuits.find((circuit) => circuit.id === circuitId);
  const back = `/s/${shopId}/jobs/${jobId}/circuits`;
  return (
    <div className="flex flex-col gap-5">
      <SyncStatus offline={survey.offline} />
      {one ? (
        <Desk one={one} survey={survey} back={back} />
      ) : survey.ready && survey.extra ? (
        <Notice kind="caution" title="This circuit is not in the job.">
          <ButtonLink href={back}>All circuits</ButtonLink>
        </Notice>
      ) : (
        <p role="status">Opening what is kept on this device.</p>
      )}
    </div>
  );
}
