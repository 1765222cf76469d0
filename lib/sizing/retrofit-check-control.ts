/** Dimmer or driver method, and what the old control makes of the new load. */
import { atLeast, type Finding } from '@/lib/engine/contract';
import { caution, softStop } from '@/lib/engine/finding';
import { type RetrofitCase, takesProduct } from './retrofit-check-case';
import type { Product } from './retrofit-check-input';

const PRACTICE = 'common practice';
const DIMMER_LIST = 'datasheet (dimmer list of the maker)';

type Kind = NonNullable<RetrofitCase['input']['control']>['kind'];
type Dimming = NonNullable<Product['dimming']>;

const PHASE: readonly Kind[] = ['phase-forward', 'phase-reverse'];

/** The ways of dimming that a product of one kind answers to. */
const ANSWERS: Record<Dimming, readonly Kind[]> = {
  none: [],
  phase: PHASE,
  'phase-forward': ['phase-forward'],
  'phase-reverse': ['phase-reverse'],
  '0-10v': ['0-10v'],
  dali: ['dali'],
};

function mismatch(kind: Kind, dimming: Dimming): Finding {
  const values = { control: kind, dimming };
  // A signal pair that nothing answers to leaves full light; a chopped supply does harm.
  if (!PHASE.includes(kind))
    return caution(
      'dimming-lost',
      'The control that stays does not speak to the new driver: it will only switch. Match the two, or say so in the quote.',
      values,
      PRACTICE,
    );
  return softStop(
    'dimmer-not-matched',
    'The dimmer that stays chops the supply of a driver that is not made for it: change the dimmer or the driver.',
    values,
    DIMMER_LIST,
  );
}

function matched(kind: Kind): Finding[] {
  if (kind === '0-10v')
    return [
      caution(
        'control-pair-colours',
        'The negative of a 0-10 V pair is gray in old stock and pink in new, and gray can be a 277 V neutral: test, do not guess.',
        {},
        PRACTICE,
      ),
    ];
  if (!PHASE.includes(kind)) return [];
  return [
    caution(
      'dimmer-list-not-checked',
      'Compare the dimmer with the list of the product’s maker: an old dimmer on LED is the leading call-back.',
      { control: kind },
      DIMMER_LIST,
    ),
  ];
}

function method(kind: Kind, dimming: Dimming | null | undefined): Finding[] {
  if (kind === 'step')
    return [
      caution(
        'step-switching',
        'Two switches light this room in steps: spread the new luminaires over both legs, or say that the steps are lost.',
        {},
        PRACTICE,
      ),
    ];
  const dims = PHASE.includes(kind) || kind === '0-10v' || kind === 'dali';
  if (!dims) return [];
  if (dimming === undefined || dimming === null)
    return [
      softStop(
        'dimming-unknown',
        'There is a dimmer, and the product’s way of dimming is not given: read it on its sheet.',
        { control: kind },
        'datasheet',
      ),
    ];
  return ANSWERS[dimming].includes(kind) ? matched(kind) : [mismatch(kind, dimming)];
}

function minimumLoad(c: RetrofitCase): Finding[] {
  const least = c.input.control?.minimumLoadWatts;
  const watts = c.product?.watts;
  if (least === undefined || watts === undefined) return [];
  const load = watts * c.input.quantity;
  if (atLeast(load, least)) return [];
  return [
    caution(
      'dimmer-minimum-load',
      'The new load is under the least that the control needs: it flickers, or glows when it is off.',
      { watts: load, minimumWatts: least },
      'datasheet (control)',
    ),
  ];
}

export function controlFindings(c: RetrofitCase): Finding[] {
  if (!c.product || !takesProduct(c)) return [];
  const kind = c.input.control?.kind ?? 'unknown';
  if (kind === 'unknown')
    return [
      caution(
        'control-unknown',
        'Not known what switches or dims this: look, an old dimmer on LED is the leading call-back.',
        {},
        PRACTICE,
      ),
    ];
  return [...method(kind, c.product.dimming), ...minimumLoad(c)];
}
