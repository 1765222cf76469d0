'use client';
import type { Area } from '@/lib/surveys/schema';
import { HAZARDS } from '@/lib/surveys/schema';
import { ChoiceField } from './fields';

const LABELS: Record<(typeof HAZARDS)[number], string> = {
  suspectBallasts: 'Suspect ballasts (no “No PCBs” mark)',
  suspectCeiling: 'Suspect ceiling (asbestos)',
  sharedNeutral: 'Shared neutral',
  aluminiumConductors: 'Aluminium conductors',
  noEquipmentGround: 'No equipment ground',
  oldWireAboveLuminaires: 'Old 60 °C wire above luminaires',
  noIsolationPoint: 'No isolation point',
};

const ANSWERS = [
  { value: 'unknown', label: 'Not known' },
  { value: 'no', label: 'No' },
  { value: 'yes', label: 'Yes' },
] as const;

export function Hazards({ area, set }: { area: Area; set: (change: Partial<Area>) => void }) {
  const yes = HAZARDS.filter((key) => area.hazards[key] === 'yes').length;
  return (
    <details>
      <summary className="min-h-touch py-2.5 text-lg font-bold">
        Hazards {yes > 0 ? <span className="text-danger">({yes} found)</span> : null}
      </summary>
      <div className="mt-2 grid gap-3 sm:grid-cols-2">
        {HAZARDS.map((key) => (
          <ChoiceField
            key={key}
            label={LABELS[key]}
            value={area.hazards[key] ?? 'unknown'}
            options={ANSWERS}
            onSave={(answer) => set({ hazards: { ...area.hazards, [key]: answer } })}
          />
        ))}
      </div>
    </details>
  );
}
