/** 15. Retrofit check: one change line on an existing circuit. */
import { defineCalculation, type Finding, type Outcome, type WorkingStep } from '@/lib/engine/contract';
import { softStop } from '@/lib/engine/finding';
import { breakerFigures, type BreakerFigures, breakerFindings } from './retrofit-check-breaker';
import { type RetrofitCase, retrofitCase, takesProduct, tubeIsWrong } from './retrofit-check-case';
import { controlFindings } from './retrofit-check-control';
import { type RetrofitCheckInput, retrofitCheckSchema } from './retrofit-check-input';
import { type LabelLine, labelLines } from './retrofit-check-label';
import {
  disconnectFindings,
  egressFindings,
  emergencyFindings,
  hazardFindings,
  listingFindings,
  supplyFindings,
} from './retrofit-check-site';
import { tubeFindings } from './retrofit-check-tube';

export interface RetrofitCheck extends BreakerFigures {
  /** No stop, hard or soft. */
  ok: boolean;
  /** How the lamp is fed once the work is done; null while the product does not tell, or can not be fed so. */
  wiring:
    | 'unchanged'
    | 'on-ballast'
    | 'line-one-end'
    | 'line-both-ends'
    | 'external-driver'
    | 'kit'
    | 'luminaire'
    | 'removed'
    | null;
  /** What the lampholders must be; null where none is used or it is not known. */
  lampholders: 'keep' | 'non-shunted' | 'either' | null;
  ballast: 'stays' | 'out' | 'none' | null;
  label: { required: boolean; lines: LabelLine[] };
}

function wiringOf({ input, product, feeding }: RetrofitCase): RetrofitCheck['wiring'] {
  switch (input.action) {
    case 'leave':
    case 'relocate':
      return 'unchanged';
    case 'remove':
      return 'removed';
    case 'listed-kit':
      return 'kit';
    case 'new-luminaire':
    case 'add':
      return 'luminaire';
    case 'external-driver':
      return 'external-driver';
    case 'relamp':
      if (feeding === 'ballast') return 'on-ballast';
      if (product?.tubeType === null) return 'unchanged';
      break;
    case 'bypass':
  }
  if (!product?.fedEnd) return null;
  return product.fedEnd === 'single' ? 'line-one-end' : 'line-both-ends';
}

function lampholdersOf({ product, feeding }: RetrofitCase): RetrofitCheck['lampholders'] {
  if (!product?.tubeType) return null;
  if (feeding === 'ballast') return 'keep';
  if (feeding !== 'line' || product.fedEnd === null) return null;
  return product.fedEnd === 'single' || product.lampholders === 'non-shunted' ? 'non-shunted' : 'either';
}

function ballastOf({ existing, input, feeding }: RetrofitCase): RetrofitCheck['ballast'] {
  if (input.action === 'add') return null;
  if (existing.ballast === 'none') return 'none';
  const stays = feeding === 'ballast' || input.action === 'leave' || input.action === 'relocate';
  return stays ? 'stays' : 'out';
}

function productMissing(c: RetrofitCase): Finding[] {
  if (c.product || !takesProduct(c)) return [];
  return [
    softStop(
      'product-missing',
      'Nothing is chosen to go in yet: choose the lamp, kit or luminaire.',
      { action: c.input.action },
      'common practice',
    ),
  ];
}

function findingsOf(c: RetrofitCase, figures: BreakerFigures): Finding[] {
  return [
    ...productMissing(c),
    ...supplyFindings(c),
    ...tubeFindings(c),
    ...emergencyFindings(c),
    ...listingFindings(c),
    ...controlFindings(c),
    ...breakerFindings(c, figures),
    ...disconnectFindings(c),
    ...egressFindings(c),
    ...hazardFindings(c),
  ];
}

function working(c: RetrofitCase, figures: BreakerFigures): WorkingStep[] {
  const { existing, product, input } = c;
  const step = (
    key: string,
    name: string,
    formula: string,
    inputs: WorkingStep['inputs'],
    value: number | null,
    unit: string,
    basis: string,
  ): WorkingStep => ({ key, name, formula, inputs, value, unit, basis });
  return [
    step(
      'line-load-before',
      'Load of the line before',
      'S = n * VA',
      [
        { name: 'n', value: existing.quantity ?? null, unit: '' },
        { name: 'VA', value: existing.voltAmps ?? null, unit: 'VA' },
      ],
      figures.voltAmpsBefore,
      'VA',
      'survey',
    ),
    step(
      'line-load-after',
      'Load of the line after',
      'S = n * VA',
      [
        { name: 'n', value: input.quantity, unit: '' },
        { name: 'VA', value: product?.voltAmps ?? null, unit: 'VA' },
      ],
      figures.voltAmpsAfter,
      'VA',
      'datasheet',
    ),
    step(
      'breaker-current-after',
      'Current through the breaker after',
      'I = (S on the breaker + other) / U',
      [
        { name: 'units', value: input.breaker?.units ?? input.quantity, unit: '' },
        { name: 'other', value: input.breaker?.otherVoltAmps ?? 0, unit: 'VA' },
        { name: 'U', value: input.supplyVolts, unit: 'V' },
      ],
      figures.ampsAfter,
      'A',
      'common practice',
    ),
    step(
      'units-by-inrush',
      'Most units on the breaker by inrush',
      input.basis === 'us' ? 'maker’s count' : 'floor(N(B16) * In/16 * m/3) or floor(k * m * In / Ipk)',
      [
        { name: 'units per breaker', value: product?.unitsPerBreaker ?? null, unit: '' },
        { name: 'N(B16)', value: product?.unitsPerB16 ?? null, unit: '' },
        { name: 'In', value: input.breaker?.amps ?? null, unit: 'A' },
        { name: 'curve', value: input.breaker?.curve ?? null, unit: '' },
        { name: 'k', value: product?.pulseFactor ?? null, unit: '' },
        { name: 'Ipk', value: product?.inrushAmps ?? null, unit: 'A' },
      ],
      figures.unitsByInrush,
      '',
      'IEC 60898-1 trip bands, read in a summary; datasheet',
    ),
  ];
}

/**
 * Checks one change line on an existing circuit: supply volts (nominal, single-phase or line to line where it
 * connects), tube type against ballast, lampholder and fed end, emergency feed, listing, dimmer or driver method,
 * breaker and control under load and inrush, means to disconnect, hazards.
 * @returns `ok` false with a stop; volt-amps in VA, amps in A, null where a figure is missing
 * Source: NEC and UL clauses as read in extracts, makers' guides, common practice; each finding names its own.
 */
export function retrofitCheck(input: RetrofitCheckInput): Outcome<RetrofitCheck> {
  const c = retrofitCase(input);
  const figures = breakerFigures(c);
  const findings = findingsOf(c, figures);
  const wrong = tubeIsWrong(c);
  const lines = wrong ? [] : labelLines(c);
  return {
    result: {
      ok: findings.every((finding) => finding.severity !== 'stop'),
      wiring: wrong ? null : wiringOf(c),
      lampholders: wrong ? null : lampholdersOf(c),
      ballast: wrong ? null : ballastOf(c),
      label: { required: lines.length > 0, lines },
      ...figures,
    },
    findings,
    working: working(c, figures),
  };
}

export const retrofitCheckCalculation = defineCalculation({
  name: 'retrofit-check',
  summary: 'One change line on an existing circuit: what must not be, what to look at, what the label says',
  bench: false,
  schema: retrofitCheckSchema,
  calculate: (input) => retrofitCheck(input),
});
