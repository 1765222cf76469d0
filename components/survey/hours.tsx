'use client';
/** Hours by weekly pattern: one figure for the week, or day by day; and what that makes in a year. */
import { Button } from '@/components/ui/button';
import type { Area } from '@/lib/surveys/schema';
import { hoursPerYear, weekOf } from '@/lib/surveys/schema/details';
import { formatNumber } from '@/lib/units';
import { detailsOf } from './area-details';
import { NumberField } from './fields';

const DAYS = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'] as const;
const WORKDAYS = 5;

/** The week's hours on the five workdays: where most people begin. */
const spread = (weekly: number | null): number[] =>
  DAYS.map((_, day) => (day < WORKDAYS ? Math.min(24, Math.round(((weekly ?? 0) / WORKDAYS) * 10) / 10) : 0));

export function Hours({ area, set }: { area: Area; set: (change: Partial<Area>) => void }) {
  const details = detailsOf(area);
  const days = details.dayHours;
  const write = (dayHours: number[] | null, weeklyHours: number | null) =>
    set({ weeklyHours, details: { ...details, dayHours } });
  const yearly = hoursPerYear(area.weeklyHours, details.weeksPerYear);
  return (
    <section aria-label="Hours of use" className="flex flex-col gap-3">
      <div className="grid grid-cols-2 items-start gap-3 sm:grid-cols-4">
        {days ? (
          <p className="self-center font-mono text-lg font-bold">
            {formatNumber(weekOf(days))} <span className="font-sans text-base font-normal">h a week</span>
          </p>
        ) : (
          <NumberField
            label="Hours a week"
            unit="h"
            min={0}
            max={168}
            value={area.weeklyHours}
            onSave={(weeklyHours) => set({ weeklyHours })}
          />
        )}
        <NumberField
          label="Weeks a year"
          min={0}
          max={53}
          hint="Empty: all year."
          value={details.weeksPerYear}
          onSave={(weeksPerYear) => set({ details: { ...details, weeksPerYear } })}
        />
        <p className="self-center text-ink-2">
          {yearly === null ? 'Hours a year not known' : `${formatNumber(yearly, 0)} h a year`}
        </p>
        <Button
          look="secondary"
          className="self-center"
          onClick={() =>
            days
              ? write(null, weekOf(days))
              : write(spread(area.weeklyHours), weekOf(spread(area.weeklyHours)))
          }
        >
          {days ? 'One figure for the week' : 'Day by day'}
        </Button>
      </div>
      {days ? (
        <div role="group" aria-label="Hours each day" className="grid grid-cols-4 gap-2 sm:grid-cols-7">
          {DAYS.map((day, index) => (
            <NumberField
              key={day}
              label={day}
              min={0}
              max={24}
              value={days[index] ?? 0}
              onSave={(hours) => {
                const next = days.map((own, at) => (at === index ? (hours ?? 0) : own));
                write(next, weekOf(next));
              }}
            />
          ))}
        </div>
      ) : null}
    </section>
  );
}
