/** What the site asks of a change line: supply, listing, emergency light, means to disconnect, hazards. */
import { atLeast, atMost, type Finding } from '@/lib/engine/contract';
import { caution, hardStop, note, softStop } from '@/lib/engine/finding';
import { rewires, type RetrofitCase, takesBallastOut, takesProduct } from './retrofit-check-case';

const PRACTICE = 'common practice';

/** The nominal volts where it connects against the maker's window, both ends included. */
export function supplyFindings(c: RetrofitCase): Finding[] {
  const { product } = c;
  const { supplyVolts } = c.input;
  if (!product || !takesProduct(c)) return [];
  if (product.ratedVoltsMin === null || product.ratedVoltsMax === null)
    return c.feeding === 'ballast'
      ? []
      : [
          softStop(
            'rated-volts-missing',
            'The supply volts that the product is rated for are not given: read them on its sheet.',
            {},
            'datasheet',
          ),
        ];
  const values = {
    supplyVolts,
    ratedVoltsMin: product.ratedVoltsMin,
    ratedVoltsMax: product.ratedVoltsMax,
  };
  if (supplyVolts === null)
    return [
      caution(
        'supply-unknown',
        'The supply volts are not known: measure before anything is ordered.',
        values,
        PRACTICE,
      ),
    ];
  if (atLeast(supplyVolts, product.ratedVoltsMin) && atMost(supplyVolts, product.ratedVoltsMax)) return [];
  return [
    hardStop(
      'supply-outside-rating',
      `${supplyVolts} V is outside the ${product.ratedVoltsMin} to ${product.ratedVoltsMax} V that the product is rated for.`,
      values,
      'datasheet',
    ),
  ];
}

const LISTING = {
  us: 'NEC 410.6 (luminaires and retrofit kits are listed) and UL 1598C scope, read in extracts',
  iec: 'common practice: product-safety conformity mark and declaration',
} as const;

/** Nothing unlisted is sold as building lighting. */
export function listingFindings(c: RetrofitCase): Finding[] {
  const { basis, action, buildingLighting = true } = c.input;
  if (!buildingLighting)
    return [note('field-built', 'field-built; not a listed luminaire or kit', {}, PRACTICE)];
  if (!c.product || !takesProduct(c)) return [];
  if (!c.product.listed)
    return [
      hardStop(
        'unlisted-kit',
        'This product is not listed: it can not be sold as building lighting.',
        { action },
        LISTING[basis],
      ),
    ];
  if (!rewires(c)) return [];
  return [
    caution(
      'kit-instructions',
      'Follow the instructions that come with the kit for this very luminaire; the listing holds only then.',
      { action },
      LISTING[basis],
    ),
  ];
}

const EMERGENCY = 'common practice; NFPA 101 7.9 and BS EN 50172 in summaries';

function emergencyFeed(c: RetrofitCase, kind: string): Finding[] {
  const feedAfter = c.input.emergency?.feedAfter ?? 'unknown';
  if (c.input.action === 'remove')
    return [
      softStop(
        'emergency-removed',
        'This takes an emergency unit away: say what gives the light on the way out instead.',
        { kind },
        EMERGENCY,
      ),
    ];
  if (feedAfter === 'switched')
    return [
      hardStop(
        'emergency-on-switched-feed',
        'The emergency unit would hang on a switched feed: it takes every switch-off for a power cut, or never charges.',
        { kind },
        EMERGENCY,
      ),
    ];
  if (feedAfter === 'unswitched') return [];
  return [
    softStop(
      'emergency-feed-unknown',
      'Say what feeds the emergency unit once the work is done: it must be the unswitched feed.',
      { kind },
      EMERGENCY,
    ),
  ];
}

function emergencyDriver(c: RetrofitCase): Finding[] {
  const { action, emergency } = c.input;
  if (emergency?.kind !== 'battery-pack' || !takesProduct(c) || action === 'add') return [];
  const driver = emergency.driverAfter ?? 'unknown';
  if (driver === 'listed-led') return [];
  if (driver === 'existing')
    return [
      softStop(
        'emergency-ballast-stays',
        'The old emergency ballast is made for fluorescent lamps: fit an emergency driver that is listed for this product.',
        {},
        EMERGENCY,
      ),
    ];
  return [
    caution(
      'emergency-driver-unknown',
      'Say what runs the lamp from the battery: an emergency driver that is listed for this product.',
      {},
      EMERGENCY,
    ),
  ];
}

export function emergencyFindings(c: RetrofitCase): Finding[] {
  const kind = c.input.emergency?.kind ?? 'unknown';
  const { action } = c.input;
  // A line that leaves things as they are, or hangs a luminaire where none was, moves no emergency feed.
  if (action === 'leave' || (action === 'add' && kind === 'unknown') || kind === 'none') return [];
  if (kind === 'unknown')
    return [
      caution(
        'emergency-unknown',
        'Not known whether there is an emergency pack or an unswitched night light here: look before the work is planned.',
        {},
        EMERGENCY,
      ),
    ];
  return [...emergencyFeed(c, kind), ...emergencyDriver(c)];
}

/** Fewer lamps or luminaires than before: the way out must stay lit. */
export function egressFindings(c: RetrofitCase): Finding[] {
  const before = c.existing.quantity;
  const after = c.input.action === 'remove' ? 0 : c.input.quantity;
  if (before === undefined || !takesBallastOut(c) || after >= before) return [];
  return [
    caution(
      'egress-light',
      'There are fewer luminaires than before: check the light on the way out against the local minimum.',
      { before, after },
      EMERGENCY,
    ),
  ];
}

const DISCONNECT = {
  us: 'NEC 410.130(G)(1), from memory: confirm in the edition in force',
  iec: PRACTICE,
} as const;

export function disconnectFindings(c: RetrofitCase): Finding[] {
  if (!rewires(c) || c.input.disconnectAdded === true || c.hazard('noIsolationPoint') === 'no') return [];
  const known = c.hazard('noIsolationPoint') === 'yes';
  return [
    caution(
      known ? 'disconnect-missing' : 'disconnect-unknown',
      known
        ? 'There is no means to disconnect at the luminaire: add one with this work and price it.'
        : 'Not known whether there is a means to disconnect at the luminaire: look, and price one where it is missing.',
      {},
      DISCONNECT[c.input.basis],
    ),
  ];
}

function hazardous(c: RetrofitCase): Finding[] {
  const found: Finding[] = [];
  const on = (applies: boolean, finding: Finding) => {
    if (applies) found.push(finding);
  };
  const opens = takesBallastOut(c) || c.input.action === 'relocate' || c.input.action === 'add';
  on(
    opens && c.hazard('sharedNeutral') !== 'no',
    caution(
      c.hazard('sharedNeutral') === 'yes' ? 'shared-neutral' : 'shared-neutral-unknown',
      'A shared neutral can be live with this breaker off: do not open it until every circuit on it is locked.',
      {},
      PRACTICE,
    ),
  );
  on(
    takesBallastOut(c) && c.hazard('suspectBallasts') === 'yes',
    caution(
      'suspect-ballast',
      'Ballasts without a "No PCBs" mark are taken to hold PCBs: keep them whole, apart, and with their papers.',
      {},
      'US EPA fact sheet 530-F-20-005, read',
    ),
  );
  on(
    opens && c.hazard('suspectCeiling') === 'yes',
    caution(
      'suspect-ceiling',
      'The ceiling may hold asbestos: no drilling or lifting until it has been cleared.',
      {},
      PRACTICE,
    ),
  );
  on(
    opens && c.hazard('noEquipmentGround') === 'yes',
    caution(
      'no-equipment-ground',
      'There is no equipment ground here: metal parts must be bonded before the luminaire goes back into service.',
      {},
      PRACTICE,
    ),
  );
  on(
    opens && c.hazard('aluminiumConductors') === 'yes',
    caution(
      'aluminium-conductors',
      'The branch conductors are aluminium: use connectors that are rated for aluminium to copper.',
      {},
      PRACTICE,
    ),
  );
  on(
    opens && c.hazard('oldWireAboveLuminaires') === 'yes',
    caution(
      'old-wire',
      'The wire above the luminaires is of an old 60 C kind: check what supply wire the new product asks for.',
      {},
      PRACTICE,
    ),
  );
  return found;
}

export const hazardFindings = (c: RetrofitCase): Finding[] =>
  c.input.action === 'leave' ? [] : hazardous(c);
