'use client';
/** The light that an area wants and gets: target by use, luminaires from parts and prices, the lumen method at once. */
import { useMemo } from 'react';
import { FindingList } from '@/components/findings/finding-list';
import { HowFigured } from '@/components/findings/how-figured';
import { KeyFigure } from '@/components/ui/sheet';
import { type Answer, EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { type LumenMethod, lumenMethodCalculation } from '@/lib/lighting/lumen-method';
import { EN_12464_2011 } from '@/lib/lighting/tables/illuminance';
import type { Area } from '@/lib/surveys/schema';
import type { AreaDetails } from '@/lib/surveys/schema/details';
import { lightOf } from '@/lib/surveys/schema/light';
import { formatFigure, formatIlluminance, formatNumber } from '@/lib/units';
import { detailsOf } from './area-details';
import { ChoiceField, IlluminanceField, NumberField, PercentField } from './fields';
import type { Kept, Survey } from './use-survey';

const TARGETS = EN_12464_2011.filter((target) => target.lux !== null);
const LIGHTS = new Set(['luminaire', 'lamp', 'kit']);

function figured(area: Area, details: AreaDetails, survey: Survey) {
  const part = survey.extra?.parts.find((one) => one.id === details.light.partId) ?? null;
  const sheet = part?.datasheet as { lumens?: number | null; watts?: number | null } | undefined;
  const light = lightOf(
    area,
    details,
    sheet ? { lumens: sheet.lumens ?? null, watts: sheet.watts ?? null } : null,
  );
  if ('missing' in light) return light;
  try {
    const answer: Answer<LumenMethod> = runCalculation(lumenMethodCalculation, light.input);
    return { answer, source: light.utilisationSource };
  } catch (error) {
    if (error instanceof EngineError) return { missing: [error.message] };
    throw error;
  }
}

function Result({ answer, source, survey }: { answer: Answer<LumenMethod>; source: string; survey: Survey }) {
  const { settings } = survey;
  const { result } = answer;
  const density =
    result.wattsPerSquareMetre === null ? null : formatFigure(result.wattsPerSquareMetre, 'W/m2', settings);
  return (
    <>
      <dl>
        <KeyFigure label="Luminaires" value={result.quantity === null ? '–' : String(result.quantity)} />
        <KeyFigure
          label="Maintained light"
          value={result.lux === null ? '–' : formatIlluminance(result.lux, settings)}
        />
        {density ? <KeyFigure label="Power density" value={density.value} unit={density.unit} /> : null}
        <KeyFigure
          label="Utilisation factor"
          value={result.utilisationFactor === null ? '–' : formatNumber(result.utilisationFactor, 2)}
        />
      </dl>
      <p className="mt-1 text-sm text-ink-2">Utilisation: {source}.</p>
      <FindingList findings={answer.findings} settings={settings} />
      <HowFigured steps={answer.working} settings={settings} />
    </>
  );
}

export function Light({
  area,
  survey,
  set,
}: {
  area: Kept<Area>;
  survey: Survey;
  set: (change: Partial<Area>) => void;
}) {
  const details = detailsOf(area.data);
  const { light } = details;
  const change = (part: Partial<AreaDetails['light']>) =>
    set({ details: { ...details, light: { ...light, ...part } } });
  const lights = (survey.extra?.parts ?? []).filter((part) => LIGHTS.has(part.kind));
  const shown = useMemo(() => figured(area.data, detailsOf(area.data), survey), [area.data, survey]);
  const read = survey.readings.filter(
    ({ data }) => data.areaId === area.id && data.taken === 'before' && data.lux !== null,
  );
  const before = read.reduce((sum, { data }) => sum + (data.lux ?? 0), 0) / read.length;
  const chooseUse = (use: string) => {
    const target = TARGETS.find((one) => one.use === use);
    change(target ? { use, targetLux: target.lux } : { use });
  };
  return (
    <details>
      <summary className="min-h-touch py-2.5 text-lg font-bold">Light</summary>
      <div className="grid grid-cols-2 items-start gap-3 sm:grid-cols-3">
        <ChoiceField
          label="Lit for"
          value={light.use}
          options={[
            { value: '', label: 'Not chosen' },
            ...TARGETS.map(({ use }) => ({ value: use, label: use })),
          ]}
          onSave={chooseUse}
        />
        <IlluminanceField
          label="Target"
          settings={survey.settings}
          hint="EN 12464-1, from memory where it was not read; or your own."
          value={light.targetLux}
          onSave={(targetLux) => change({ targetLux })}
        />
        <ChoiceField
          label="Lit with"
          value={light.partId ?? ''}
          options={[
            { value: '', label: 'Not chosen' },
            ...lights.map((part) => ({ value: part.id, label: part.name })),
          ]}
          onSave={(partId) => change({ partId: partId || null })}
        />
        <NumberField
          label="How many"
          hint="Empty: as many as the target asks for."
          whole
          min={1}
          max={100000}
          value={light.quantity}
          onSave={(quantity) => change({ quantity })}
        />
        <PercentField
          label="Light that is left in use"
          value={light.lossFactor}
          required="Type a percentage."
          onSave={(lossFactor) => lossFactor && change({ lossFactor })}
        />
        <PercentField
          label="Utilisation factor"
          hint="Empty: a generic one."
          value={light.utilisationFactor}
          onSave={(utilisationFactor) => change({ utilisationFactor: utilisationFactor || null })}
        />
      </div>
      <div className="mt-4">
        {read.length > 0 ? (
          <p className="mb-2">
            Measured before: {formatIlluminance(before, survey.settings)}, mean of {read.length}{' '}
            {read.length === 1 ? 'point' : 'points'}.
          </p>
        ) : null}
        {'missing' in shown ? (
          <p className="text-ink-2">Still needed: {shown.missing.join('; ')}.</p>
        ) : (
          <Result answer={shown.answer} source={shown.source} survey={survey} />
        )}
      </div>
    </details>
  );
}
