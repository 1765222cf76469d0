'use client';
/** What hangs in an area: types that were met already one tap away, known and own ones by search. */
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/field';
import type { ExistingElectrical, Luminaire } from '@/lib/surveys/schema';
import { NO_LUMINAIRE_DETAILS } from '@/lib/surveys/schema/details';
import { knownTypes } from './known-types';
import { LuminaireEntry } from './luminaire-entry';
import type { Survey } from './use-survey';

const NOTHING_KNOWN: ExistingElectrical = {
  lampType: '',
  ballast: 'unknown',
  lampholder: 'unknown',
  dimmer: 'unknown',
  emergency: 'unknown',
  breakerAmps: null,
};

function fresh(areaId: string, type: string, survey: Survey): Luminaire {
  // A type that hangs elsewhere on this job hangs here as it does there.
  const met = survey.luminaires.find((one) => one.data.luminaireType === type)?.data;
  const known = knownTypes(survey).find((one) => one.name === type);
  return {
    areaId,
    luminaireType: type,
    quantity: 1,
    countConfidence: 'counted',
    watts: met?.watts ?? known?.watts ?? 0,
    wattsSource: met?.wattsSource ?? known?.wattsSource ?? 'typical',
    supplyVolts: met?.supplyVolts ?? (survey.settings.basis === 'us' ? 120 : 230),
    electrical: met?.electrical ?? { ...NOTHING_KNOWN, ballast: known?.ballast ?? 'unknown' },
    details: { ...NO_LUMINAIRE_DETAILS, mounting: met?.details.mounting ?? 'unknown' },
    notes: '',
  };
}

const MOST_OFFERED = 6;

export function Luminaires({ areaId, survey }: { areaId: string; survey: Survey }) {
  const id = useId();
  const [type, setType] = useState('');
  const here = survey.luminaires.filter((one) => one.data.areaId === areaId);
  const addType = (name: string) =>
    survey.add('luminaires', crypto.randomUUID(), fresh(areaId, name, survey));
  const add = () => {
    if (type.trim() === '') return;
    addType(type.trim());
    setType('');
  };
  const met = [...new Set(survey.luminaires.map((one) => one.data.luminaireType))]
    .filter((name) => !here.some((one) => one.data.luminaireType === name))
    .slice(-MOST_OFFERED);
  return (
    <section aria-label="Existing luminaires">
      <h3 className="mb-2 text-xl">Existing luminaires</h3>
      <ul>
        {here.map((one) => (
          <LuminaireEntry key={one.id} one={one} survey={survey} />
        ))}
      </ul>
      {met.length > 0 ? (
        <ul aria-label="Types met on this job" className="flex flex-wrap gap-2 border-t border-rule py-4">
          {met.map((name) => (
            <li key={name}>
              <Button look="secondary" onClick={() => addType(name)}>
                <span className="sr-only">Add </span>+ {name}
              </Button>
            </li>
          ))}
        </ul>
      ) : null}
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
          {knownTypes(survey).map((one) => (
            <option key={one.name} value={one.name}>
              {`${one.watts} W, ${one.from}`}
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
