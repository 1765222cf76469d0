'use client';
/** Where tape can go: its length and how far a driver would be. */
import { Button } from '@/components/ui/button';
import type { Cove } from '@/lib/surveys/schema';
import { LengthField, LineField } from './fields';
import type { Survey } from './use-survey';

export function Coves({ areaId, survey }: { areaId: string; survey: Survey }) {
  const here = survey.coves.filter((one) => one.data.areaId === areaId);
  const add = () =>
    survey.add('coves', crypto.randomUUID(), {
      areaId,
      name: `Cove ${here.length + 1}`,
      tapeMetres: 3,
      driverMetres: 2,
      notes: '',
    } satisfies Cove);
  return (
    <section aria-label="Coves and tape lengths">
      <h3 className="mb-2 text-xl">Coves and tape lengths</h3>
      <ul>
        {here.map((one) => {
          const set = (change: Partial<Cove>) => survey.edit('coves', one, change);
          return (
            <li
              key={one.id}
              className="grid items-start gap-3 border-t border-rule py-4 sm:grid-cols-[2fr_1fr_1fr_auto]"
            >
              <LineField
                label="Name"
                required="Name the cove."
                value={one.data.name}
                onSave={(name) => set({ name })}
              />
              <LengthField
                label="Tape length"
                settings={survey.settings}
                min={0.001}
                required="Type the length."
                value={one.data.tapeMetres}
                onSave={(tapeMetres) => set({ tapeMetres: tapeMetres ?? 0 })}
              />
              <LengthField
                label="To the driver"
                settings={survey.settings}
                required="Type the distance."
                value={one.data.driverMetres}
                onSave={(driverMetres) => set({ driverMetres: driverMetres ?? 0 })}
              />
              <Button look="danger" className="self-end" onClick={() => survey.archive('coves', one)}>
                Take out<span className="sr-only"> {one.data.name}</span>
              </Button>
            </li>
          );
        })}
      </ul>
      <Button look="secondary" onClick={add}>
        Add a cove
      </Button>
    </section>
  );
}
