'use client';
/** What hangs in an area: type, count, watts and where the watts come from. */
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/field';
import { LEGACY_LUMINAIRES } from '@/lib/surveys/schema/legacy-luminaires';
import type { ExistingElectrical, Luminaire } from '@/lib/surveys/schema';
import { Counter } from './counter';
import { ChoiceField, LineField, NumberField } from './fields';
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

const NOTHING_KNOWN: ExistingElectrical = {
  lampType: '',
  ballast: 'unknown',
  lampholder: 'unknown',
  dimmer: 'unknown',
  emergency: 'unknown',
  breakerAmps: null,
};

function fresh(areaId: string, type: string, survey: Survey): Luminaire {
  const known = LEGACY_LUMINAIRES.find((one) => one.name === type);
  return {
    areaId,
    luminaireType: type,
    quantity: 1,
    countConfidence: 'counted',
    watts: known?.watts ?? 0,
    wattsSource: known && known.source !== 'typical' ? 'datasheet' : 'typical',
    supplyVolts: survey.settings.basis === 'us' ? 120 : 230,
    electrical: { ...NOTHING_KNOWN, ballast: known?.ballast ?? 'unknown' },
    notes: '',
  };
}

function Wiring({ value, set }: { value: Luminaire; set: (change: Partial<Luminaire>) => void }) {
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

function Entry({ one, survey }: { one: Kept<Luminaire>; survey: Survey }) {
  const set = (change: Partial<Luminaire>) => survey.edit('luminaires', one, change);
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
      <Wiring value={one.data} set={set} />
      <div>
        <Button look="danger" onClick={() => survey.archive('luminaires', one)}>
          Take out<span className="sr-only"> {one.data.luminaireType}</span>
        </Button>
      </div>
    </li>
  );
}

export function Luminaires({ areaId, survey }: { areaId: string; survey: Survey }) {
  const id = useId();
  const [type, setType] = useState('');
  const here = survey.luminaires.filter((one) => one.data.areaId === areaId);
  const add = () => {
    if (type.trim() === '') return;
    survey.add('luminaires', crypto.randomUUID(), fresh(areaId, type.trim(), survey));
    setType('');
  };
  return (
    <section aria-label="Existing luminaires">
      <h3 className="mb-2 text-xl">Existing luminaires</h3>
      <ul>
        {here.map((one) => (
          <Entry key={one.id} one={one} survey={survey} />
        ))}
      </ul>
      <div className="flex flex-wrap items-end gap-3 border-t border-rule pt-4">
        <TextInput
          id={id}
          label="Type to add"
          hint="Choose a known one for its typical watts, or type your own."
          list={`${id}-known`}
          value={type}
          className="grow basis-60"
          onChange={(event) => setType(event.target.value)}
          onKeyDown={(event) => {
            if (event.key === 'Enter') add();
          }}
        />
        <datalist id={`${id}-known`}>
          {LEGACY_LUMINAIRES.map((one) => (
            <option key={one.name} value={one.name}>
              {`${one.watts} W, ${one.source}`}
            </option>
          ))}
        </datalist>
        <Button look="secondary" onClick={add} disabled={type.trim() === ''}>
          Add this type
        </Button>
      </div>
    </section>
  );
}
