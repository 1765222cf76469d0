'use client';
/** What is to change in an area, checked against the existing circuit while one chooses. */
import { useMemo } from 'react';
import { FindingList } from '@/components/findings/finding-list';
import { HowFigured } from '@/components/findings/how-figured';
import { OverrideStop } from '@/components/findings/override-stop';
import { Button } from '@/components/ui/button';
import { type Answer, EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { ACTIONS, type ChangeElectrical, type ChangeLine } from '@/lib/surveys/schema';
import { retrofitCheckCalculation } from '@/lib/sizing/retrofit-check';
import { retrofitInput } from '@/lib/surveys/schema/retrofit-input';
import { Counter } from './counter';
import { ChoiceField } from './fields';
import type { Kept, Survey } from './use-survey';

const ACTION_LABELS: Record<(typeof ACTIONS)[number], string> = {
  leave: 'Leave as it is',
  relamp: 'Relamp on the ballast (type A)',
  bypass: 'Bypass the ballast (type B)',
  'external-driver': 'External driver (type C)',
  'listed-kit': 'Listed retrofit kit',
  'new-luminaire': 'New luminaire',
  add: 'Add',
  remove: 'Take away',
  relocate: 'Move',
};
const YES_NO = [
  { value: 'no', label: 'No' },
  { value: 'yes', label: 'Yes' },
] as const;
const FEED = [
  { value: 'unknown', label: 'Not known' },
  { value: 'unswitched', label: 'Unswitched feed' },
  { value: 'switched', label: 'Switched feed' },
] as const;

const UNDECIDED: ChangeElectrical = {
  lampholdersReplaced: false,
  disconnectAdded: false,
  emergencyFeedAfter: 'unknown',
  emergencyDriverAfter: 'unknown',
};

function check(line: ChangeLine, survey: Survey): Answer | null {
  if (line.circuitId !== null) return null;
  const existing = survey.luminaires.find((one) => one.id === line.existingLuminaireId)?.data ?? null;
  const part = survey.extra?.parts.find((one) => one.id === line.newPartId) ?? null;
  const hazards = survey.areas.find((one) => one.id === line.areaId)?.data.hazards ?? {};
  try {
    const input = retrofitInput(line, { existing, part, hazards }, survey.settings);
    return runCalculation(retrofitCheckCalculation, input);
  } catch (error) {
    if (error instanceof EngineError) return null;
    throw error;
  }
}

function Entry({ one, survey }: { one: Kept<ChangeLine>; survey: Survey }) {
  const set = (change: Partial<ChangeLine>) => survey.edit('change-lines', one, change);
  const wiring = (change: Partial<ChangeElectrical>) =>
    set({ electrical: { ...one.data.electrical, ...change } });
  const answer = useMemo(() => check(one.data, survey), [one.data, survey]);
  const here = survey.luminaires.filter((luminaire) => luminaire.data.areaId === one.data.areaId);
  const existing = here.find((luminaire) => luminaire.id === one.data.existingLuminaireId);
  const lights = (survey.extra?.parts ?? []).filter((part) =>
    ['luminaire', 'lamp', 'kit'].includes(part.kind),
  );
  const chosen = lights.find((part) => part.id === one.data.newPartId);
  const name = `${existing?.data.luminaireType ?? 'new'} → ${chosen?.name ?? '?'}`;
  return (
    <li className="flex flex-col gap-3 border-t border-rule py-4">
      <div className="grid items-start gap-3 sm:grid-cols-[2fr_2fr_2fr_auto]">
        <ChoiceField
          label="Existing"
          value={one.data.existingLuminaireId ?? ''}
          options={[
            { value: '', label: 'Nothing yet' },
            ...here.map((l) => ({ value: l.id, label: l.data.luminaireType })),
          ]}
          onSave={(id) => {
            const quantity = here.find((l) => l.id === id)?.data.quantity ?? 0;
            set({
              existingLuminaireId: id || null,
              oldQuantity: quantity,
              newQuantity: one.data.newQuantity || quantity,
            });
          }}
        />
        <ChoiceField
          label="Do"
          value={one.data.action}
          options={ACTIONS.map((value) => ({ value, label: ACTION_LABELS[value] }))}
          onSave={(action) => set({ action })}
        />
        <ChoiceField
          label="New"
          value={one.data.newPartId ?? ''}
          options={[
            { value: '', label: 'Not chosen' },
            ...lights.map((part) => ({ value: part.id, label: part.name })),
          ]}
          onSave={(id) =>
            set({
              newPartId: id || null,
              newWatts: Number(lights.find((p) => p.id === id)?.datasheet['watts'] ?? 0) || null,
            })
          }
        />
        <Counter
          label="New count"
          value={one.data.newQuantity}
          onSave={(newQuantity) => set({ newQuantity })}
        />
      </div>
      <details>
        <summary className="min-h-touch py-2.5">What the change settles</summary>
        <div className="grid gap-3 sm:grid-cols-3">
          <ChoiceField
            label="New lampholders"
            value={one.data.electrical.lampholdersReplaced ? 'yes' : 'no'}
            options={YES_NO}
            onSave={(v) => wiring({ lampholdersReplaced: v === 'yes' })}
          />
          <ChoiceField
            label="Disconnect added"
            value={one.data.electrical.disconnectAdded ? 'yes' : 'no'}
            options={YES_NO}
            onSave={(v) => wiring({ disconnectAdded: v === 'yes' })}
          />
          <ChoiceField
            label="Emergency unit on"
            value={one.data.electrical.emergencyFeedAfter}
            options={FEED}
            onSave={(emergencyFeedAfter) => wiring({ emergencyFeedAfter })}
          />
        </div>
      </details>
      {answer ? (
        <div aria-label={`Checked: ${name}`} role="group">
          <FindingList
            findings={answer.findings}
            settings={survey.settings}
            actions={(finding) => (
              <OverrideStop
                finding={finding}
                offline={survey.offline}
                subject={{ type: 'change-line', id: one.id }}
                dirty={one.dirty}
              />
            )}
          />
          <HowFigured steps={answer.working} settings={survey.settings} />
        </div>
      ) : null}
      <div>
        <Button look="danger" onClick={() => survey.archive('change-lines', one)}>
          Take out<span className="sr-only"> {name}</span>
        </Button>
      </div>
    </li>
  );
}

export function ChangeLines({ areaId, survey }: { areaId: string; survey: Survey }) {
  const here = survey.changeLines.filter((one) => one.data.areaId === areaId && one.data.circuitId === null);
  const add = () => {
    const used = new Set(here.map((one) => one.data.existingLuminaireId));
    const next = survey.luminaires.find((one) => one.data.areaId === areaId && !used.has(one.id));
    survey.add('change-lines', crypto.randomUUID(), {
      areaId,
      existingLuminaireId: next?.id ?? null,
      circuitId: null,
      position: here.length,
      action: next ? 'new-luminaire' : 'add',
      oldQuantity: next?.data.quantity ?? 0,
      newPartId: null,
      newType: '',
      newQuantity: next?.data.quantity ?? 1,
      newWatts: null,
      electrical: UNDECIDED,
      notes: '',
    } satisfies ChangeLine);
  };
  return (
    <section aria-label="Changes">
      <h3 className="mb-2 text-xl">Changes</h3>
      <ul>
        {here.map((one) => (
          <Entry key={one.id} one={one} survey={survey} />
        ))}
      </ul>
      <Button look="secondary" onClick={add}>
        Add a change
      </Button>
    </section>
  );
}
