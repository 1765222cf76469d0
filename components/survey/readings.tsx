'use client';
/** Light that was measured at points, with the meter that read it. */
import { Button } from '@/components/ui/button';
import type { Reading } from '@/lib/surveys/schema/site';
import { formatDateTime } from '@/lib/units';
import { ChoiceField, DateField, IlluminanceField, LineField } from './fields';
import type { Kept, Survey } from './use-survey';

const TAKEN = [
  { value: 'before', label: 'Before the work' },
  { value: 'after', label: 'After the work' },
] as const;
const DAYLIGHT = [
  { value: 'unknown', label: 'Not known' },
  { value: 'none', label: 'None' },
  { value: 'some', label: 'Some' },
] as const;

function Entry({ one, survey }: { one: Kept<Reading>; survey: Survey }) {
  const set = (change: Partial<Reading>) => survey.edit('readings', one, change);
  return (
    <li className="flex flex-col gap-3 border-t border-rule py-4">
      <div className="grid grid-cols-2 items-start gap-3 sm:grid-cols-4">
        <LineField
          label="Where"
          required="Say where it was read."
          value={one.data.place}
          onSave={(place) => set({ place })}
        />
        <IlluminanceField
          label="Light"
          settings={survey.settings}
          value={one.data.lux}
          onSave={(lux) => set({ lux })}
        />
        <ChoiceField
          label="Taken"
          value={one.data.taken}
          options={TAKEN}
          onSave={(taken) => set({ taken })}
        />
        <ChoiceField
          label="Daylight"
          value={one.data.daylight}
          options={DAYLIGHT}
          onSave={(daylight) => set({ daylight })}
        />
        <LineField
          label="Meter"
          hint="Make, model, number."
          value={one.data.meter}
          onSave={(meter) => set({ meter })}
        />
        <DateField
          label="Meter calibrated"
          value={one.data.calibratedOn}
          onSave={(calibratedOn) => set({ calibratedOn })}
        />
      </div>
      <div className="flex flex-wrap items-center justify-between gap-3">
        <p className="text-sm text-ink-2">Read {formatDateTime(one.data.readAt, survey.settings)}</p>
        <Button look="danger" onClick={() => survey.archive('readings', one)}>
          Take out<span className="sr-only"> the reading at {one.data.place}</span>
        </Button>
      </div>
    </li>
  );
}

export function Readings({ areaId, survey }: { areaId: string; survey: Survey }) {
  const here = survey.readings.filter((one) => one.data.areaId === areaId);
  // One meter is carried around: the next point is read by the same.
  const last = survey.readings.reduce<Reading | null>(
    (newest, { data }) => (!newest || data.readAt > newest.readAt ? data : newest),
    null,
  );
  const add = () =>
    survey.add('readings', crypto.randomUUID(), {
      areaId,
      place: `Point ${here.length + 1}`,
      lux: null,
      taken: last?.taken ?? 'before',
      daylight: last?.daylight ?? 'unknown',
      meter: last?.meter ?? '',
      calibratedOn: last?.calibratedOn ?? null,
      readAt: new Date().toISOString(),
      notes: '',
    } satisfies Reading);
  return (
    <section aria-label="Light measured">
      <h3 className="mb-2 text-xl">Light measured</h3>
      <ul>
        {here.map((one) => (
          <Entry key={one.id} one={one} survey={survey} />
        ))}
      </ul>
      <Button look="secondary" onClick={add}>
        Add a reading
      </Button>
    </section>
  );
}
