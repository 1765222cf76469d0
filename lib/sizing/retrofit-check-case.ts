/** One change line with its gaps filled: what is not given is not known. */
import type {
  Existing,
  Product,
  RetrofitAction,
  RetrofitCheckInput,
  RetrofitHazard,
} from './retrofit-check-input';

/**
 * How the lamp is fed once the work is done. `line` = supply at the lampholders, `ballast` = through the old
 * ballast, `driver` = from a driver beside them, `own` = a kit or luminaire that brings its own wiring.
 */
export type Feeding = 'line' | 'ballast' | 'driver' | 'own' | 'none';

export type TubeType = NonNullable<Product['tubeType']>;

/** The tube types that each way of feeding can run. */
export const TUBE_RUNS: Record<'line' | 'ballast' | 'driver', readonly TubeType[]> = {
  line: ['B', 'A-B'],
  ballast: ['A', 'A-B'],
  driver: ['C'],
};

export interface RetrofitCase {
  input: RetrofitCheckInput;
  existing: Existing;
  product: Product | null;
  feeding: Feeding;
  hazard: (name: RetrofitHazard) => 'yes' | 'no' | 'unknown';
}

const UNKNOWN_EXISTING: Existing = { ballast: 'unknown', lampholder: 'unknown', fedEnd: 'unknown' };

/** Actions that open an existing luminaire and change its wiring. */
const REWIRING: readonly RetrofitAction[] = ['bypass', 'external-driver', 'listed-kit'];
/** Actions that put a new product in. */
const PRODUCT: readonly RetrofitAction[] = [
  'relamp',
  'bypass',
  'external-driver',
  'listed-kit',
  'new-luminaire',
  'add',
];
/** Actions that take a lamp, ballast or luminaire away. */
const TAKING_OUT: readonly RetrofitAction[] = [
  'bypass',
  'external-driver',
  'listed-kit',
  'new-luminaire',
  'remove',
];

export const rewires = ({ input }: RetrofitCase) => REWIRING.includes(input.action);
export const takesProduct = ({ input }: RetrofitCase) => PRODUCT.includes(input.action);
export const takesBallastOut = ({ input }: RetrofitCase) => TAKING_OUT.includes(input.action);

function feedingOf({ action }: RetrofitCheckInput, existing: Existing): Feeding {
  switch (action) {
    case 'bypass':
      return 'line';
    case 'external-driver':
      return 'driver';
    case 'relamp':
      return existing.ballast === 'none' ? 'line' : 'ballast';
    case 'remove':
      return 'none';
    case 'leave':
    case 'relocate':
    case 'listed-kit':
    case 'new-luminaire':
    case 'add':
      return 'own';
  }
}

export function retrofitCase(input: RetrofitCheckInput): RetrofitCase {
  const existing = input.existing ?? UNKNOWN_EXISTING;
  return {
    input,
    existing,
    product: input.product ?? null,
    feeding: feedingOf(input, existing),
    hazard: (name) => input.hazards?.[name] ?? 'unknown',
  };
}

/** A tube that can't run on what feeds it has no wiring, no lampholders and no label to speak of. */
export function tubeIsWrong({ product, feeding }: RetrofitCase): boolean {
  if (!product?.tubeType || feeding === 'own' || feeding === 'none') return false;
  return !TUBE_RUNS[feeding].includes(product.tubeType);
}
