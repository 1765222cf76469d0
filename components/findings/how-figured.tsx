/** "How it was figured": the formula with the numbers in it, and what it rests on. */
import type { ReactNode } from 'react';
import type { WorkingStep } from '@/lib/engine/contract';
import { messageOr } from '@/lib/messages';
import { formatFigure } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';

function show(value: number | string | null, unit: string, settings: ShopSettings): string {
  if (value === null) return '–';
  if (typeof value === 'string') return value;
  const figure = formatFigure(value, unit, settings);
  return figure.unit ? `${figure.value} ${figure.unit}` : figure.value;
}

function Step({ step, settings }: { step: WorkingStep; settings: ShopSettings }) {
  return (
    <div className="border-t border-rule py-3 first:border-t-0">
      <p className="font-bold">{messageOr(`working.${step.key}`, step.name)}</p>
      <p className="mt-1 font-mono text-sm break-words">{step.formula}</p>
      <p className="mt-1 font-mono text-sm break-words">
        {step.inputs.map((input) => `${input.name} = ${show(input.value, input.unit, settings)}`).join(', ')}
      </p>
      <p className="mt-1">
        = <span className="font-mono font-bold">{show(step.value, step.unit, settings)}</span>
      </p>
      <p className="text-sm text-ink-2">Basis: {step.basis}</p>
    </div>
  );
}

export function HowFigured({
  steps,
  settings,
  label = 'How it was figured',
}: {
  steps: readonly WorkingStep[];
  settings: ShopSettings;
  label?: ReactNode;
}) {
  if (steps.length === 0) return null;
  return (
    <details>
      <summary className="min-h-touch py-2.5 underline decoration-dotted underline-offset-4">{label}</summary>
      <div className="mt-1">
        {steps.map((step, index) => (
          <Step key={`${step.key}-${index}`} step={step} settings={settings} />
        ))}
      </div>
    </details>
  );
}
