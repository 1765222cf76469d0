'use client';
import { PhotoStrip } from '@/components/photos/photo-strip';
import { Button } from '@/components/ui/button';
import { Sheet } from '@/components/ui/sheet';
import type { Area } from '@/lib/surveys/schema';
import { NO_LUMINAIRE_DETAILS } from '@/lib/surveys/schema/details';
import { formatLength, formatNumber } from '@/lib/units';
import { AreaDetailsFields } from './area-details';
import { ChangeLines } from './change-lines';
import { Coves } from './coves';
import { ChoiceField, LengthField, LineField, NotesField, TemperatureField } from './fields';
import { Hazards } from './hazards';
import { Hours } from './hours';
import { Light } from './light';
import { Luminaires } from './luminaires';
import { Readings } from './readings';
import type { Kept, Survey } from './use-survey';

const ENVIRONMENTS = [
  { value: 'dry', label: 'Dry' },
  { value: 'damp', label: 'Damp' },
  { value: 'wet', label: 'Wet' },
] as const;

function summary(area: Area, survey: Survey, id: string): string {
  const size =
    area.lengthMetres !== null && area.widthMetres !== null
      ? `${formatLength(area.lengthMetres, survey.settings)} × ${formatLength(area.widthMetres, survey.settings)}`
      : 'size not measured';
  const luminaires = survey.luminaires.filter((one) => one.data.areaId === id);
  const count = luminaires.reduce((sum, one) => sum + one.data.quantity, 0);
  const watts = luminaires.reduce((sum, one) => sum + one.data.quantity * one.data.watts, 0);
  const hours = area.weeklyHours === null ? 'hours not known' : `${formatNumber(area.weeklyHours)} h a week`;
  return `${size}; ${count} luminaires, ${formatNumber(watts, 0)} W; ${hours}`;
}

/** An area again, with what hangs in it: for rooms that are alike. */
function duplicate(area: Kept<Area>, survey: Survey): void {
  const id = crypto.randomUUID();
  survey.add('areas', id, {
    ...area.data,
    name: `${area.data.name} (again)`,
    position: area.data.position + 1,
  });
  for (const one of survey.luminaires.filter((luminaire) => luminaire.data.areaId === area.id))
    survey.add('luminaires', crypto.randomUUID(), {
      ...one.data,
      areaId: id,
      countConfidence: 'estimated',
      details: { ...NO_LUMINAIRE_DETAILS, ...one.data.details, recounts: [] },
    });
  for (const one of survey.coves.filter((cove) => cove.data.areaId === area.id))
    survey.add('coves', crypto.randomUUID(), { ...one.data, areaId: id });
}

function Sizes({ area, survey, set }: { area: Area; survey: Survey; set: (change: Partial<Area>) => void }) {
  const { settings } = survey;
  return (
    <div className="grid grid-cols-2 gap-3 sm:grid-cols-4">
      <LengthField
        label="Length"
        settings={settings}
        value={area.lengthMetres}
        onSave={(lengthMetres) => set({ lengthMetres })}
      />
      <LengthField
        label="Width"
        settings={settings}
        value={area.widthMetres}
        onSave={(widthMetres) => set({ widthMetres })}
      />
      <LengthField
        label="Height"
        settings={settings}
        value={area.heightMetres}
        onSave={(heightMetres) => set({ heightMetres })}
      />
      <TemperatureField
        label="Ambient"
        settings={settings}
        value={area.ambientCelsius}
        onSave={(ambientCelsius) => set({ ambientCelsius })}
      />
      <ChoiceField
        label="Environment"
        value={area.environment}
        options={ENVIRONMENTS}
        onSave={(environment) => set({ environment })}
      />
    </div>
  );
}

export function AreaCard({
  area,
  survey,
  open,
  onToggle,
}: {
  area: Kept<Area>;
  survey: Survey;
  open: boolean;
  onToggle: () => void;
}) {
  const set = (change: Partial<Area>) => survey.edit('areas', area, change);
  return (
    <Sheet>
      <div className="flex flex-wrap items-center justify-between gap-3">
        <div className="min-w-0">
          <h2 className="text-2xl">{area.data.name}</h2>
          <p className="text-ink-2">{summary(area.data, survey, area.id)}</p>
        </div>
        <Button look="secondary" aria-expanded={open} onClick={onToggle}>
          {open ? 'Fold up' : 'Open'}
          <span className="sr-only"> {area.data.name}</span>
        </Button>
      </div>
      {open ? (
        <div className="mt-5 flex flex-col gap-6">
          <div className="grid gap-3 sm:grid-cols-2">
            <LineField
              label="Name"
              required="Give the area a name."
              value={area.data.name}
              onSave={(name) => set({ name })}
            />
            <LineField label="Used for" value={area.data.use} onSave={(use) => set({ use })} />
          </div>
          <Sizes area={area.data} survey={survey} set={set} />
          <Hours area={area.data} set={set} />
          <Luminaires areaId={area.id} survey={survey} />
          <Coves areaId={area.id} survey={survey} />
          <ChangeLines areaId={area.id} survey={survey} />
          <AreaDetailsFields area={area.data} survey={survey} set={set} />
          <Readings areaId={area.id} survey={survey} />
          <Light area={area} survey={survey} set={set} />
          <Hazards area={area.data} set={set} />
          <PhotoStrip
            base={survey.photosUrl}
            store={survey.offline.store}
            scope={survey.offline.scope}
            subject={{ type: 'area', id: area.id }}
            name={area.data.name}
            settings={survey.settings}
          />
          <NotesField label="Notes" value={area.data.notes} onSave={(notes) => set({ notes })} />
          <div className="flex flex-wrap gap-3">
            <Button look="secondary" onClick={() => duplicate(area, survey)}>
              Duplicate this area
            </Button>
            <Button look="danger" onClick={() => survey.archive('areas', area)}>
              Take this area out
            </Button>
          </div>
        </div>
      ) : null}
    </Sheet>
  );
}
