'use client';
/** One type that hangs in an area: its count, its watts, how it is mounted and wired. */
import { PhotoStrip } from '@/components/photos/photo-strip';
import { Button } from '@/components/ui/button';
import { term } from '@/lib/messages/terms';
import type { ExistingElectrical, Luminaire } from '@/lib/surveys/schema';
import type { OwnType } from '@/lib/surveys/schema/site';
import { type LuminaireDetails, NO_LUMINAIRE_DETAILS } from '@/lib/surveys/schema/details';
import { Counter } from './counter';
import { ChoiceField, LineField, NumberField } from './fields';
import { isKnownType } from './known-types';
import { Recount } from './recount';
import type { Kept, Survey } from './use-survey';

const SOURCES = [
  { value: 'nameplate', label: 'Nameplate' },
  { value: 'measured', label: 'Measured' },
  { value: 'datasheet', label: 'Table or datasheet' },
  { value: 'typical', label: 'Typical' },
] as const;
const CONFIDENCE = [
  { value: 'counted', label: 'Counted' },
  { value: 'estimated', label: 'Estimated' },
] as const;
const BALLASTS = [
  { value: 'unknown', label: 'Not known' },
  { value: 'magnetic', label: 'Magnetic' },
  { value: 'instant-start', label: 'Instant start' },
  { value: 'rapid-start', label: 'Rapid start' },
  { value: 'programmed-start', label: 'Programmed start' },
  { value: 'none', label: 'None' },
] as const;
const LAMPHOLDERS = [
  { value: 'unknown', label: 'Not known' },
  { value: 'shunted', label: 'Shunted' },
  { value: 'non-shunted', label: 'Not shunted' },
] as const;
const DIMMERS = [
  { value: 'unknown', label: 'Not known' },
  { value: 'none', label: 'None' },
  { value: 'phase-forward', label: 'Phase, leading edge' },
  { value: 'phase-reverse', label: 'Phase, trailing edge' },
  { value: '0-10v', label: '0–10 V' },
  { value: 'dali', label: 'DALI' },
] as const;
const EMERGENCY = [
  { value: 'unknown', label: 'Not known' },
  { value: 'none', label: 'None' },
  { value: 'unswitched', label: 'Unswitched feed (night light)' },
  { value: 'battery-pack', label: 'Battery pack' },
] as const;

const MOUNTING = [
  { value: 'unknown', label: 'Not known' },
  { value: 'recessed', label: 'Recessed' },
  { value: 'surface', label: 'On the surface' },
  { value: 'pendant', label: 'Suspended' },
  { value: 'high-bay', label: 'High bay' },
  { value: 'wall', label: 'On the wall' },
  { value: 'track', label: 'On track' },
  { value: 'pole', label: 'On a pole' },
] as const;

const capital = (word: string) => word.charAt(0).toUpperCase() + word.slice(1);
const detailsOf = (one: Luminaire): LuminaireDetails => ({ ...NO_LUMINAIRE_DETAILS, ...one.details });

type Set = (change: Partial<Luminaire>) => void;

/** Where it hangs and what feeds it. */
function Place({ value, survey, set }: { value: Luminaire; survey: Survey; set: Set }) {
  const details = detailsOf(value);
  const change = (part: Partial<LuminaireDetails>) => set({ details: { ...details, ...part } });
  return (
    <details>
      <summary className="min-h-touch py-2.5">Where it hangs</summary>
      <div className="grid grid-cols-2 gap-3 sm:grid-cols-3">
        <ChoiceField
          label="Mounted"
          value={details.mounting}
          options={MOUNTING}
          onSave={(mounting) => change({ mounting })}
        />
        <NumberField
          label="Lamps out"
          min={0}
          max={1000000}
          whole
          value={details.lampsOut}
          onSave={(lampsOut) => change({ lampsOut: lampsOut ?? 0 })}
        />
        <LineField label="Switching zone" value={details.zone} onSave={(zone) => change({ zone })} />
        <LineField
          label={capital(term('panel', survey.settings))}
          value={details.panel}
          onSave={(panel) => change({ panel })}
        />
        <LineField
          label="Circuit"
          value={details.circuitNumber}
          onSave={(circuitNumber) => change({ circuitNumber })}
        />
        <LineField
          label="Dimmer, as marked"
          value={details.dimmerModel}
          onSave={(dimmerModel) => change({ dimmerModel })}
        />
      </div>
    </details>
  );
}

function Wiring({ value, set }: { value: Luminaire; set: Set }) {
  const electrical = (change: Partial<ExistingElectrical>) =>
    set({ electrical: { ...value.electrical, ...change } });
  return (
    <details>
      <summary className="min-h-touch py-2.5">How it is wired</summary>
      <div className="grid gap-3 sm:grid-cols-2">
        <NumberField
          label="Supply"
          unit="V"
          min={1}
          max={1000}
          value={value.supplyVolts}
          onSave={(supplyVolts) => set({ supplyVolts })}
        />
        <ChoiceField
          label="Ballast"
          value={value.electrical.ballast}
          options={BALLASTS}
          onSave={(ballast) => electrical({ ballast })}
        />
        <ChoiceField
          label="Lampholders"
          value={value.electrical.lampholder}
          options={LAMPHOLDERS}
          onSave={(lampholder) => electrical({ lampholder })}
        />
        <ChoiceField
          label="Dimmer"
          value={value.electrical.dimmer}
          options={DIMMERS}
          onSave={(dimmer) => electrical({ dimmer })}
        />
        <ChoiceField
          label="Emergency feed"
          value={value.electrical.emergency}
          options={EMERGENCY}
          onSave={(emergency) => electrical({ emergency })}
        />
        <NumberField
          label="Breaker"
          unit="A"
          min={1}
          max={200}
          value={value.electrical.breakerAmps}
          onSave={(breakerAmps) => electrical({ breakerAmps })}
        />
      </div>
    </details>
  );
}

function keepType({ luminaireType, watts, wattsSource, electrical }: Luminaire, survey: Survey): void {
  survey.add('luminaire-types', crypto.randomUUID(), {
    name: luminaireType,
    watts,
    wattsSource,
    ballast: electrical.ballast,
  } satisfies OwnType);
}

export function LuminaireEntry({ one, survey }: { one: Kept<Luminaire>; survey: Survey }) {
  const set = (change: Partial<Luminaire>) => survey.edit('luminaires', one, change);
  const known = isKnownType(one.data.luminaireType, survey);
  return (
    <li className="flex flex-col gap-3 border-t border-rule py-4">
      <div className="grid items-start gap-3 sm:grid-cols-[2fr_auto_1fr_1fr_1fr]">
        <LineField
          label="Type"
          required="Name the type."
          value={one.data.luminaireType}
          onSave={(luminaireType) => set({ luminaireType })}
        />
        <Counter label="Count" value={one.data.quantity} onSave={(quantity) => set({ quantity })} />
        <ChoiceField
          label="Count is"
          value={one.data.countConfidence}
          options={CONFIDENCE}
          onSave={(countConfidence) => set({ countConfidence })}
        />
        <NumberField
          label="Input watts each"
          unit="W"
          min={0}
          max={100000}
          required="Type the watts."
          value={one.data.watts}
          onSave={(watts) => set({ watts: watts ?? 0 })}
        />
        <ChoiceField
          label="Watts from"
          value={one.data.wattsSource}
          options={SOURCES}
          onSave={(wattsSource) => set({ wattsSource })}
        />
      </div>
      <Recount
        name={one.data.luminaireType}
        quantity={one.data.quantity}
        recounts={detailsOf(one.data).recounts}
        onDone={(quantity, recounts) =>
          set({ quantity, countConfidence: 'counted', details: { ...detailsOf(one.data), recounts } })
        }
      />
      <Place value={one.data} survey={survey} set={set} />
      <Wiring value={one.data} set={set} />
      <details>
        <summary className="min-h-touch py-2.5">One opened, photographed</summary>
        <PhotoStrip
          base={survey.photosUrl}
          store={survey.offline.store}
          scope={survey.offline.scope}
          subject={{ type: 'existing-luminaire', id: one.id }}
          name={one.data.luminaireType}
          settings={survey.settings}
        />
      </details>
      <div className="flex flex-wrap gap-3">
        {known ? null : (
          <Button look="secondary" onClick={() => keepType(one.data, survey)}>
            Keep as a type of the shop<span className="sr-only">: {one.data.luminaireType}</span>
          </Button>
        )}
        <Button look="danger" onClick={() => survey.archive('luminaires', one)}>
          Take out<span className="sr-only"> {one.data.luminaireType}</span>
        </Button>
      </div>
    </li>
  );
}
