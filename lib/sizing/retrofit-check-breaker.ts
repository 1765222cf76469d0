/** The old breaker and control under the new load: steady current, and the inrush of many drivers at once. */
import { atMost, type Finding } from '@/lib/engine/contract';
import { caution, softStop } from '@/lib/engine/finding';
import { INRUSH_BASIS, unitsByInrush } from './inrush';
import { type RetrofitCase, takesProduct } from './retrofit-check-case';

/** Lighting runs for three hours and more. NEC 210.20(A), read in an extract. */
const CONTINUOUS = { us: 1.25, iec: 1 } as const;
const LOAD_BASIS = {
  us: 'NEC 210.20(A), continuous load at 125 %, read in an extract',
  iec: 'IEC 60364-4-43 433.1 (design current not above the rating), from memory',
} as const;
export interface BreakerFigures {
  voltAmpsBefore: number | null;
  voltAmpsAfter: number | null;
  ampsAfter: number | null;
  /** Most new units on the breaker by inrush; null where no maker's figure tells. */
  unitsByInrush: number | null;
  /** All drivers at once at the control; null where no figure tells. */
  inrushAmps: number | null;
}

const onBreaker = ({ input }: RetrofitCase) => input.breaker?.units ?? input.quantity;

/** null without a product, without a breaker, and where no maker's figure tells. */
function mostByInrush({ product, input }: RetrofitCase): number | null {
  return product && input.breaker ? unitsByInrush(input.basis, input.breaker, product) : null;
}

/** Volt-amps of the line before and after, and what flows through the breaker then. */
export function breakerFigures(c: RetrofitCase): BreakerFigures {
  const { existing, product, input } = c;
  const stays = input.action === 'leave' || input.action === 'relocate';
  const before =
    existing.voltAmps === undefined || existing.quantity === undefined
      ? null
      : existing.voltAmps * existing.quantity;
  const each = takesProduct(c) ? product?.voltAmps : undefined;
  const after = stays
    ? before
    : input.action === 'remove'
      ? 0
      : each === undefined
        ? null
        : each * input.quantity;
  const circuit =
    after === null || input.quantity === 0 || stays ? after : (after * onBreaker(c)) / input.quantity;
  const total = circuit === null ? null : circuit + (input.breaker?.otherVoltAmps ?? 0);
  const inrush = takesProduct(c) ? product?.inrushAmps : undefined;
  return {
    voltAmpsBefore: before,
    voltAmpsAfter: after,
    ampsAfter: total === null || input.supplyVolts === null ? null : total / input.supplyVolts,
    unitsByInrush: takesProduct(c) ? mostByInrush(c) : null,
    inrushAmps: inrush === undefined ? null : inrush * input.quantity,
  };
}

function loadFindings(c: RetrofitCase, { ampsAfter }: BreakerFigures): Finding[] {
  const { breaker, basis } = c.input;
  if (!breaker || ampsAfter === null) return [];
  if (atMost(ampsAfter * CONTINUOUS[basis], breaker.amps)) return [];
  return [
    softStop(
      'breaker-overloaded',
      `The line would draw ${ampsAfter} A through a ${breaker.amps} A breaker.`,
      { ampsAfter, breakerAmps: breaker.amps, factor: CONTINUOUS[basis] },
      LOAD_BASIS[basis],
    ),
  ];
}

function inrushFindings(c: RetrofitCase, figures: BreakerFigures): Finding[] {
  const { basis } = c.input;
  const units = onBreaker(c);
  if (figures.unitsByInrush === null)
    return [
      caution(
        'inrush-not-checked',
        'The inrush of the drivers on the breaker is not checked: ask the maker for the most units on this breaker.',
        { units, breakerAmps: c.input.breaker?.amps ?? null },
        INRUSH_BASIS[basis],
      ),
    ];
  if (units <= figures.unitsByInrush) return [];
  return [
    softStop(
      'inrush-over-breaker',
      `${units} units start at once on a breaker that holds ${figures.unitsByInrush}: it trips at switch-on.`,
      { units, unitsByInrush: figures.unitsByInrush, breakerAmps: c.input.breaker?.amps ?? null },
      INRUSH_BASIS[basis],
    ),
  ];
}

function controlInrush(c: RetrofitCase, { inrushAmps }: BreakerFigures): Finding[] {
  const control = c.input.control;
  if (!control || control.kind === 'none' || control.kind === 'unknown') return [];
  if (control.ratedInrushAmps === undefined || inrushAmps === null)
    return [
      caution(
        'control-inrush-not-checked',
        'The inrush of the drivers through the switch, sensor or relay is not checked: compare with its listed rating.',
        { control: control.kind },
        'datasheet (control)',
      ),
    ];
  if (atMost(inrushAmps, control.ratedInrushAmps)) return [];
  return [
    softStop(
      'inrush-over-control',
      `${inrushAmps} A of inrush through a control that is rated for ${control.ratedInrushAmps} A: its contacts weld.`,
      { inrushAmps, ratedInrushAmps: control.ratedInrushAmps, control: control.kind },
      'datasheet (control)',
    ),
  ];
}

export function breakerFindings(c: RetrofitCase, figures: BreakerFigures): Finding[] {
  // A lamp on the old ballast has no driver of its own that would load breaker and control.
  const ownDriver = c.product !== null && takesProduct(c) && c.feeding !== 'ballast' && c.input.quantity > 0;
  return [
    ...loadFindings(c, figures),
    ...(ownDriver ? [...inrushFindings(c, figures), ...controlInrush(c, figures)] : []),
  ];
}
