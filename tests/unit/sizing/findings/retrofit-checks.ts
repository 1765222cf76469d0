/** Findings of `retrofit-check`. */
import { AT_LEAST, AT_MOST, type FindingRow, OVER, rowsOf, UNDER } from './row';

const product = {
  ...{ listed: true, ratedVoltsMin: 120, ratedVoltsMax: 277, tubeType: 'B', fedEnd: 'double' },
  ...{ voltAmps: 30, watts: 29, unitsPerBreaker: 40, inrushAmps: 5, dimming: 'none' },
};
/** Twelve lines of tubes on the supply, all that can be known known, and nothing wrong. */
const bypassCase = {
  ...{ basis: 'us', action: 'bypass', quantity: 12, supplyVolts: 277, product },
  existing: { ballast: 'instant-start', lampholder: 'non-shunted', quantity: 12, voltAmps: 62 },
  control: { kind: 'sensor', ratedInrushAmps: 100 },
  emergency: { kind: 'battery-pack', feedAfter: 'unswitched', driverAfter: 'listed-led' },
  breaker: { amps: 20 },
  hazards: {
    ...{ sharedNeutral: 'no', noIsolationPoint: 'no', suspectBallasts: 'no', suspectCeiling: 'no' },
    ...{ noEquipmentGround: 'no', aluminiumConductors: 'no', oldWireAboveLuminaires: 'no' },
  },
};
const { hardStop, softStop, caution, note } = rowsOf('retrofit-check', bypassCase);

/** A tube on the ballast that stays, and one into lampholders that the supply feeds already. */
const onBallast = rowsOf('retrofit-check', {
  ...bypassCase,
  action: 'relamp',
  product: {
    ...{ ...product, ratedVoltsMin: null, ratedVoltsMax: null, tubeType: 'A', fedEnd: null },
    ...{ ballastListed: 'yes', ballastKinds: ['instant-start', 'magnetic'] },
  },
});
const onSupply = rowsOf('retrofit-check', {
  ...bypassCase,
  action: 'relamp',
  existing: { ...bypassCase.existing, ballast: 'none', fedEnd: 'double' },
});

const FEED = /common practice; NFPA 101/;
const TYPES = /UL 1993/;
const control = (kind: string, dimming: string | null) => ({
  control: { kind },
  'product.dimming': dimming,
});
const hazard = (name: string, said: string) => ({ [`hazards.${name}`]: said });
const hazardRow = (code: string, name: string, basis = /common practice/) =>
  caution(code, basis, hazard(name, 'yes'), hazard(name, 'no'));

export const retrofitCheckRows: FindingRow[] = [
  softStop('product-missing', /common practice/, { product: undefined }, {}),
  softStop(
    'rated-volts-missing',
    /datasheet/,
    { 'product.ratedVoltsMin': null, 'product.ratedVoltsMax': null },
    {},
  ),
  caution('supply-unknown', /common practice/, { supplyVolts: null }, {}),
  hardStop('supply-outside-rating', /datasheet/, { supplyVolts: 277 * OVER }, { supplyVolts: 277 * AT_MOST }),
  hardStop(
    'supply-outside-rating',
    /datasheet/,
    { supplyVolts: 120 * UNDER },
    { supplyVolts: 120 * AT_LEAST },
  ),

  hardStop('tube-type-against-ballast', TYPES, { 'product.tubeType': 'A' }, { 'product.tubeType': 'A-B' }),
  onBallast.hardStop(
    'tube-type-against-ballast',
    TYPES,
    { 'product.tubeType': 'B' },
    { 'product.tubeType': 'A-B' },
  ),
  hardStop(
    'tube-type-against-ballast',
    TYPES,
    { action: 'external-driver' },
    { action: 'external-driver', 'product.tubeType': 'C' },
  ),
  softStop('tube-type-missing', /datasheet/, { 'product.tubeType': null }, { 'product.tubeType': 'B' }),
  onBallast.softStop(
    'ballast-unknown',
    /common practice/,
    { 'existing.ballast': 'unknown' },
    { 'existing.ballast': 'instant-start' },
  ),
  onBallast.hardStop(
    'ballast-not-listed',
    /ballast list/,
    { 'product.ballastListed': 'no' },
    { 'product.ballastListed': 'unknown' },
  ),
  onBallast.hardStop(
    'ballast-not-listed',
    /ballast list/,
    { 'existing.ballast': 'rapid-start' },
    { 'existing.ballast': 'magnetic' },
  ),
  onBallast.caution(
    'ballast-list-not-checked',
    /ballast list/,
    { 'product.ballastListed': 'unknown' },
    { 'product.ballastListed': 'yes' },
  ),
  onBallast.note(
    'starter-to-replace',
    /datasheet/,
    { 'existing.ballast': 'magnetic' },
    { 'existing.ballast': 'instant-start' },
  ),
  softStop('fed-end-missing', /datasheet/, { 'product.fedEnd': null }, {}),
  onSupply.softStop('fed-end-unknown', /common practice/, { 'existing.fedEnd': 'unknown' }, {}),
  onSupply.hardStop('fed-end-mismatch', TYPES, { 'existing.fedEnd': 'single' }, {}),
  hardStop(
    'lampholder-shunted',
    TYPES,
    { 'existing.lampholder': 'shunted', 'product.fedEnd': 'single' },
    { 'existing.lampholder': 'shunted', 'product.fedEnd': 'double' },
  ),
  hardStop(
    'lampholder-shunted',
    TYPES,
    { 'existing.lampholder': 'shunted', 'product.fedEnd': 'single' },
    { 'existing.lampholder': 'shunted', 'product.fedEnd': 'single', lampholdersReplaced: true },
  ),
  softStop(
    'lampholder-unknown',
    TYPES,
    { 'existing.lampholder': 'unknown', 'product.fedEnd': 'single' },
    { 'existing.lampholder': 'non-shunted', 'product.fedEnd': 'single' },
  ),
  caution('line-volts-at-lampholders', TYPES, {}, { action: 'new-luminaire' }),
  note('one-mode-at-a-time', TYPES, { 'product.tubeType': 'A-B' }, { 'product.tubeType': 'B' }),

  caution('emergency-unknown', FEED, { 'emergency.kind': 'unknown' }, { 'emergency.kind': 'none' }),
  softStop('emergency-removed', FEED, { action: 'remove' }, { action: 'remove', 'emergency.kind': 'none' }),
  hardStop(
    'emergency-on-switched-feed',
    FEED,
    { 'emergency.feedAfter': 'switched' },
    { 'emergency.feedAfter': 'unswitched' },
  ),
  softStop(
    'emergency-feed-unknown',
    FEED,
    { 'emergency.feedAfter': 'unknown' },
    { 'emergency.feedAfter': 'unswitched' },
  ),
  softStop(
    'emergency-ballast-stays',
    FEED,
    { 'emergency.driverAfter': 'existing' },
    { 'emergency.driverAfter': 'listed-led' },
  ),
  caution(
    'emergency-driver-unknown',
    FEED,
    { 'emergency.driverAfter': 'unknown' },
    { 'emergency.driverAfter': 'listed-led' },
  ),
  caution('egress-light', FEED, { quantity: 11 }, { quantity: 12 }),

  hardStop('unlisted-kit', /410\.6/, { 'product.listed': false }, {}),
  hardStop('unlisted-kit', /conformity/, { basis: 'iec', 'product.listed': false }, { basis: 'iec' }),
  caution('kit-instructions', /410\.6/, {}, { action: 'new-luminaire' }),
  // A sign or a display is no building lighting.
  note('field-built', /common practice/, { buildingLighting: false }, { buildingLighting: true }),

  caution('control-unknown', /common practice/, { 'control.kind': 'unknown' }, { 'control.kind': 'none' }),
  caution('step-switching', /common practice/, { 'control.kind': 'step' }, { 'control.kind': 'switch' }),
  softStop('dimming-unknown', /datasheet/, control('dali', null), control('dali', 'dali')),
  caution('dimming-lost', /common practice/, control('0-10v', 'dali'), control('0-10v', '0-10v')),
  softStop(
    'dimmer-not-matched',
    /dimmer list/,
    control('phase-forward', 'phase-reverse'),
    control('phase-forward', 'phase'),
  ),
  caution('control-pair-colours', /common practice/, control('0-10v', '0-10v'), control('dali', 'dali')),
  caution(
    'dimmer-list-not-checked',
    /dimmer list/,
    control('phase-forward', 'phase'),
    control('switch', 'phase'),
  ),
  // 12 * 29 W.
  caution(
    'dimmer-minimum-load',
    /datasheet \(control\)/,
    { 'control.minimumLoadWatts': 348 * OVER },
    { 'control.minimumLoadWatts': 348 * AT_MOST },
  ),

  // 12 * VA at 277 V with the 125 % of a continuous load.
  softStop(
    'breaker-overloaded',
    /210\.20\(A\)/,
    { 'product.voltAmps': ((16 * 277) / 12) * OVER },
    { 'product.voltAmps': ((16 * 277) / 12) * AT_MOST },
  ),
  softStop(
    'breaker-overloaded',
    /433\.1/,
    { basis: 'iec', 'product.voltAmps': ((20 * 277) / 12) * OVER },
    { basis: 'iec', 'product.voltAmps': ((20 * 277) / 12) * AT_MOST },
  ),
  caution('inrush-not-checked', /datasheet/, { 'product.unitsPerBreaker': undefined }, {}),
  softStop(
    'inrush-over-breaker',
    /datasheet/,
    { 'product.unitsPerBreaker': 12 * UNDER },
    { 'product.unitsPerBreaker': 12 * AT_LEAST },
  ),
  caution('control-inrush-not-checked', /datasheet \(control\)/, { 'product.inrushAmps': undefined }, {}),
  // 12 * 5 A.
  softStop(
    'inrush-over-control',
    /datasheet \(control\)/,
    { 'control.ratedInrushAmps': 60 * UNDER },
    { 'control.ratedInrushAmps': 60 * AT_LEAST },
  ),

  caution('disconnect-missing', /410\.130\(G\)\(1\)/, hazard('noIsolationPoint', 'yes'), {
    ...hazard('noIsolationPoint', 'yes'),
    disconnectAdded: true,
  }),
  caution(
    'disconnect-unknown',
    /410\.130\(G\)\(1\)/,
    hazard('noIsolationPoint', 'unknown'),
    hazard('noIsolationPoint', 'no'),
  ),
  hazardRow('shared-neutral', 'sharedNeutral'),
  caution(
    'shared-neutral-unknown',
    /common practice/,
    hazard('sharedNeutral', 'unknown'),
    hazard('sharedNeutral', 'no'),
  ),
  hazardRow('suspect-ballast', 'suspectBallasts', /530-F-20-005/),
  hazardRow('suspect-ceiling', 'suspectCeiling'),
  hazardRow('no-equipment-ground', 'noEquipmentGround'),
  hazardRow('aluminium-conductors', 'aluminiumConductors'),
  hazardRow('old-wire', 'oldWireAboveLuminaires'),
];
