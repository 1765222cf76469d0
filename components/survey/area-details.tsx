'use client';
/** What else is known of an area: light on its surfaces, what is above the ceiling, how it is reached and switched. */
import type { Area } from '@/lib/surveys/schema';
import { type AreaDetails, NO_AREA_DETAILS } from '@/lib/surveys/schema/details';
import { term } from '@/lib/messages/terms';
import { ChoiceField, LengthField, LineField, PercentField } from './fields';
import type { Survey } from './use-survey';

export const YES_NO = [
  { value: 'unknown', label: 'Not known' },
  { value: 'no', label: 'No' },
  { value: 'yes', label: 'Yes' },
] as const;
const CEILING = [
  { value: 'unknown', label: 'Not known' },
  { value: 'grid', label: 'Grid with tiles' },
  { value: 'plaster', label: 'Plaster or board' },
  { value: 'concrete', label: 'Concrete' },
  { value: 'open', label: 'Open to the structure' },
  { value: 'metal', label: 'Metal deck' },
  { value: 'other', label: 'Other' },
] as const;
const CONTROLS = [
  { value: 'unknown', label: 'Not known' },
  { value: 'none', label: 'Switch alone' },
  { value: 'occupancy', label: 'Occupancy' },
  { value: 'daylight', label: 'Daylight' },
  { value: 'timer', label: 'Timer' },
  { value: 'dimming', label: 'Dimming' },
  { value: 'several', label: 'Several of these' },
] as const;

const accessChoices = (lift: string) =>
  [
    { value: 'unknown', label: 'Not known' },
    { value: 'floor', label: 'From the floor' },
    { value: 'ladder', label: 'Ladder' },
    { value: 'tower', label: 'Tower' },
    { value: 'lift', label: lift },
  ] as const;

const capital = (word: string) => word.charAt(0).toUpperCase() + word.slice(1);

/** A copy on the device may be older than the details. */
export const detailsOf = (area: Area): AreaDetails => ({ ...NO_AREA_DETAILS, ...area.details });

type Set = (change: Partial<AreaDetails>) => void;

function Surfaces({ details, survey, set }: { details: AreaDetails; survey: Survey; set: Set }) {
  const { settings } = survey;
  return (
    <div className="grid grid-cols-2 gap-3 sm:grid-cols-3">
      <LengthField
        label="Luminaires above the floor"
        settings={settings}
        value={details.mountingMetres}
        onSave={(mountingMetres) => set({ mountingMetres })}
      />
      <LengthField
        label="Work plane above the floor"
        settings={settings}
        value={details.workplaneMetres}
        onSave={(workplaneMetres) => set({ workplaneMetres })}
      />
      <ChoiceField
        label="Ceiling"
        value={details.ceiling}
        options={CEILING}
        onSave={(ceiling) => set({ ceiling })}
      />
      <PercentField
        label="Ceiling reflects"
        value={details.ceilingReflectance}
        onSave={(ceilingReflectance) => set({ ceilingReflectance })}
      />
      <PercentField
        label="Walls reflect"
        value={details.wallReflectance}
        onSave={(wallReflectance) => set({ wallReflectance })}
      />
      <PercentField
        label="Floor reflects"
        value={details.floorReflectance}
        onSave={(floorReflectance) => set({ floorReflectance })}
      />
    </div>
  );
}

function Place({ details, survey, set }: { details: AreaDetails; survey: Survey; set: Set }) {
  const { settings } = survey;
  return (
    <div className="grid grid-cols-2 gap-3 sm:grid-cols-3">
      <ChoiceField
        label="Plenum above (air returns there)"
        value={details.plenum}
        options={YES_NO}
        onSave={(plenum) => set({ plenum })}
      />
      <ChoiceField
        label="Insulation touches them"
        value={details.insulationContact}
        options={YES_NO}
        onSave={(insulationContact) => set({ insulationContact })}
      />
      <LineField label="IP rating" value={details.ipRating} onSave={(ipRating) => set({ ipRating })} />
      <ChoiceField
        label="Reached by"
        value={details.access}
        options={accessChoices(capital(term('lift', settings)))}
        onSave={(access) => set({ access })}
      />
      <LineField
        label={capital(term('panel', settings))}
        value={details.panel}
        onSave={(panel) => set({ panel })}
      />
      <LineField
        label="Circuit"
        value={details.circuitNumber}
        onSave={(circuitNumber) => set({ circuitNumber })}
      />
      <ChoiceField
        label="Controls today"
        value={details.controls}
        options={CONTROLS}
        onSave={(controls) => set({ controls })}
      />
      <LineField
        label="Switching zones"
        className="col-span-2"
        hint="Which switch lights what: door, window row, stage."
        value={details.switching}
        onSave={(switching) => set({ switching })}
      />
    </div>
  );
}

export function AreaDetailsFields({
  area,
  survey,
  set,
}: {
  area: Area;
  survey: Survey;
  set: (change: Partial<Area>) => void;
}) {
  const details = detailsOf(area);
  const change: Set = (part) => set({ details: { ...details, ...part } });
  return (
    <>
      <details>
        <summary className="min-h-touch py-2.5 text-lg font-bold">Heights and surfaces</summary>
        <Surfaces details={details} survey={survey} set={change} />
      </details>
      <details>
        <summary className="min-h-touch py-2.5 text-lg font-bold">Ceiling, access, circuit, controls</summary>
        <Place details={details} survey={survey} set={change} />
      </details>
    </>
  );
}
