/**
 * Retrofit tubes against what they go into: type against ballast, lampholder and fed end.
 * Types as the trade uses them (UL 1993 / UL 1598C, read in maker guides): A runs on the ballast, B on the supply
 * with the ballast bypassed, A-B on either, one at a time, C on a driver beside the lamps.
 */
import { caution, hardStop, note, softStop } from '@/lib/engine/finding';
import type { Finding } from '@/lib/engine/contract';
import { type RetrofitCase, TUBE_RUNS, type TubeType } from './retrofit-check-case';
import type { Product } from './retrofit-check-input';

const TYPES =
  'UL 1993 and UL 1598C tube types, read in maker guides; the maker’s instruction for the tube governs';
const PRACTICE = 'common practice';

const WHY: Record<'line' | 'ballast' | 'driver', string> = {
  line: 'The lampholders carry the supply: only a Type B or A-B tube can stand it.',
  ballast: 'The ballast stays: only a Type A or A-B tube runs on it.',
  driver: 'A driver feeds the lamps: only a Type C tube is made for it.',
};

function typeAgainstFeeding(
  c: RetrofitCase,
  feeding: 'line' | 'ballast' | 'driver',
  type: TubeType,
): Finding[] {
  if (TUBE_RUNS[feeding].includes(type)) return [];
  return [
    hardStop(
      'tube-type-against-ballast',
      `Type ${type} does not go here. ${WHY[feeding]}`,
      { tubeType: type, action: c.input.action, ballast: c.existing.ballast, feeding },
      TYPES,
    ),
  ];
}

/** A tube that runs on the ballast: kind and list. */
function onBallast({ existing }: RetrofitCase, product: Product): Finding[] {
  const { ballast } = existing;
  const listed = product.ballastListed ?? 'unknown';
  if (ballast === 'unknown')
    return [
      softStop(
        'ballast-unknown',
        'The ballast is not known: open one luminaire of the type and read it.',
        {},
        PRACTICE,
      ),
    ];
  const allowed = product.ballastKinds;
  // Tubes for electronic ballasts fail on magnetic ones; only a maker that names them is believed.
  const kindRefused = allowed ? !allowed.includes(ballast) : ballast === 'magnetic' && listed !== 'yes';
  if (listed === 'no' || kindRefused)
    return [
      hardStop(
        'ballast-not-listed',
        'The maker of the tube does not name this ballast: it dims, flickers or fails.',
        { ballast, tubeType: product.tubeType },
        'datasheet (ballast list of the tube’s maker)',
      ),
    ];
  return [
    ...(listed === 'unknown'
      ? [
          caution(
            'ballast-list-not-checked',
            'Compare the ballast with the list of the tube’s maker; one ceiling may hold several makes.',
            { ballast },
            'datasheet (ballast list of the tube’s maker)',
          ),
        ]
      : []),
    ...(ballast === 'magnetic'
      ? [
          note(
            'starter-to-replace',
            'On a ballast with a starter, fit the starter that comes with the tube.',
            {},
            'datasheet',
          ),
        ]
      : []),
  ];
}

function shunted(c: RetrofitCase, product: Product): Finding[] {
  const needed = product.fedEnd === 'single' || product.lampholders === 'non-shunted';
  if (!needed || c.input.lampholdersReplaced === true) return [];
  const values = { lampholder: c.existing.lampholder, fedEnd: product.fedEnd };
  if (c.existing.lampholder === 'shunted')
    return [
      hardStop(
        'lampholder-shunted',
        'This tube needs non-shunted lampholders: in a shunted one line and neutral meet in a dead short.',
        values,
        TYPES,
      ),
    ];
  if (c.existing.lampholder === 'non-shunted') return [];
  return [
    softStop(
      'lampholder-unknown',
      'Not known whether the lampholders are shunted: test for continuity across the two contacts, or price new ones.',
      values,
      TYPES,
    ),
  ];
}

/** A tube on the supply: lampholders, the end that is fed, and what stays live at them. */
function onLine(c: RetrofitCase, product: Product): Finding[] {
  const wired = c.existing.fedEnd ?? 'unknown';
  const keepsWiring = c.input.action === 'relamp';
  if (product.fedEnd === null)
    return [
      softStop(
        'fed-end-missing',
        'Not known whether the tube is fed at one end or at both: the wiring follows from it.',
        {},
        'datasheet',
      ),
    ];
  if (keepsWiring && wired !== product.fedEnd)
    return [
      wired === 'unknown'
        ? softStop(
            'fed-end-unknown',
            'Not known which end the lampholders are fed at: read the label, open one and look.',
            { fedEnd: product.fedEnd },
            PRACTICE,
          )
        : hardStop(
            'fed-end-mismatch',
            'The lampholders are wired for the other way of feeding a tube.',
            { fedEnd: product.fedEnd, wired },
            TYPES,
          ),
    ];
  return [
    ...shunted(c, product),
    caution(
      'line-volts-at-lampholders',
      'The lampholders carry the supply from now on: fit the label, and prove dead before a lamp is changed.',
      { supplyVolts: c.input.supplyVolts },
      TYPES,
    ),
    ...(product.tubeType === 'A-B'
      ? [
          note(
            'one-mode-at-a-time',
            'This tube runs on a ballast or on the supply, one at a time: wire it as its sheet shows for the supply.',
            {},
            TYPES,
          ),
        ]
      : []),
  ];
}

/** A relamp that is no tube (a screw-in lamp, say) and meets no ballast has nothing to be held against. */
function typeMissing(c: RetrofitCase): Finding[] {
  if (c.input.action === 'relamp' && c.existing.ballast === 'none') return [];
  if (c.feeding === 'driver') return [];
  return [
    softStop(
      'tube-type-missing',
      'The type of the lamp (A, B, A-B or C) is not given: without it the wiring can not be said.',
      { ballast: c.existing.ballast },
      'datasheet',
    ),
  ];
}

/** @returns findings on tube type, ballast, lampholders and fed end; none where no tube is fitted */
export function tubeFindings(c: RetrofitCase): Finding[] {
  const { product, feeding } = c;
  if (!product || feeding === 'own' || feeding === 'none') return [];
  if (product.tubeType === null) return typeMissing(c);
  const wrong = typeAgainstFeeding(c, feeding, product.tubeType);
  if (wrong.length > 0) return wrong;
  if (feeding === 'ballast') return onBallast(c, product);
  return feeding === 'line' ? onLine(c, product) : [];
}
