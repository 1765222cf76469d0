/** Findings of `branch-circuit`. */
import { AT_LEAST, AT_MOST, type FindingRow, OVER, rowsOf, UNDER } from './row';

const load = { name: 'downlight', quantity: 12, voltAmps: 40, unitsPerBreaker: 30 };
const usCase = {
  ...{ basis: 'us', volts: 120, system: 'single-phase', loads: [load], breakerAmps: 20 },
  ...{ continuous: true, metres: 15, maxDropPct: 3 },
};
const iecCase = { ...usCase, basis: 'iec', volts: 230, breakerAmps: 16, zeOhms: 0.3, curve: 'B' };
const us = rowsOf('branch-circuit', usCase);
const iec = rowsOf('branch-circuit', iecCase);
const old = rowsOf('branch-circuit', { ...usCase, existing: { voltAmps: 3000 } });
const oldIec = rowsOf('branch-circuit', { ...iecCase, existing: { voltAmps: 3000 } });

/** 20 A at 120 V, less the fifth that a continuous load leaves free. */
const FULL_VOLT_AMPS = (20 * 120) / 1.25;
/** 0.95 * U0 / (5 * In) with curve B. */
const LOOP_OHMS = (0.95 * 230) / (5 * 16);
/** 12 * 40 VA are 4 A; AWG 12 stranded has 6.5 ohm/km. */
const METRES = (0.03 * 120) / (2 * 4 * 0.0065);
/** One load on 24 V DC: Class 2 gives 100 VA. */
const lowVoltage = (voltAmps: number) => ({
  ...{ system: 'dc', volts: 24, metres: 1 },
  loads: [{ ...load, quantity: 1, voltAmps }],
});
const each = (change: object) => ({ loads: [{ ...load, ...change }] });

export const branchCircuitRows: FindingRow[] = [
  old.softStop(
    'breaker-overloaded',
    /210\.20\(A\)/,
    each({ voltAmps: (FULL_VOLT_AMPS / 12) * OVER }),
    each({ voltAmps: (FULL_VOLT_AMPS / 12) * AT_MOST }),
  ),
  oldIec.softStop(
    'breaker-overloaded',
    /433\.1/,
    each({ voltAmps: ((16 * 230) / 12) * OVER }),
    each({ voltAmps: ((16 * 230) / 12) * AT_MOST }),
  ),
  old.hardStop(
    'conductor-under-breaker',
    /310\.16/,
    { 'existing.size': 'AWG 14' },
    { 'existing.size': 'AWG 12' },
  ),
  // 1.5 mm2 carries 16.5 A by method B2.
  oldIec.hardStop(
    'conductor-under-breaker',
    /433\.1/,
    { 'existing.size': '1.5 mm2', breakerAmps: 16.5 * OVER },
    { 'existing.size': '1.5 mm2', breakerAmps: 16.5 * AT_MOST },
  ),
  us.caution(
    'control-inrush-not-checked',
    /datasheet \(control\)/,
    { control: { ratedInrushAmps: 100 } },
    { control: { ratedInrushAmps: 100 }, ...each({ inrushAmps: 5 }) },
  ),
  iec.note(
    'curve-taken-as-b',
    /60898-1/,
    { zeOhms: undefined, curve: undefined, ...each({ unitsPerBreaker: undefined, unitsPerB16: 30 }) },
    { zeOhms: undefined, ...each({ unitsPerBreaker: undefined, unitsPerB16: 30 }) },
  ),
  iec.hardStop(
    'disconnection-time',
    /411\.4\.4/,
    { metres: 0, zeOhms: LOOP_OHMS * OVER },
    { metres: 0, zeOhms: LOOP_OHMS * AT_MOST },
  ),
  old.softStop(
    'drop-over-limit',
    /NEC 2023 210\.19/,
    { 'existing.size': 'AWG 12', metres: METRES * OVER },
    { 'existing.size': 'AWG 12', metres: METRES * AT_MOST },
  ),
  iec.note('fault-loop-not-checked', /411\.4\.4/, { zeOhms: undefined }, {}),
  us.note('flexible-as-stranded', /Table 8/, { stranding: 'flexible' }, { stranding: 'stranded' }),
  us.caution(
    'grouped-not-counted',
    /\(C\)\(1\)/,
    { groupedCircuits: 2 },
    { groupedCircuits: 2, loadedConductors: 4 },
  ),
  us.note('inputs-not-used', /common practice/, { zeOhms: 0.3 }, {}),
  us.caution(
    'insulation-below-terminals',
    /310\.16/,
    { terminalCelsius: 75, insulationCelsius: 60 },
    { terminalCelsius: 75, insulationCelsius: 75 },
  ),
  us.hardStop('ambient-too-hot', /310\.16/, { ambientCelsius: 85 * OVER }, { ambientCelsius: 85 * AT_MOST }),
  us.caution('inrush-not-checked', /datasheet/, each({ unitsPerBreaker: undefined }), {}),
  // An IEC curve tells more than the maker's count alone, but not without a figure of the driver's.
  iec.caution(
    'inrush-not-checked',
    /60898-1/,
    each({ unitsPerBreaker: undefined }),
    each({ unitsPerBreaker: undefined, unitsPerB16: 30 }),
  ),
  old.softStop(
    'inrush-over-breaker',
    /datasheet/,
    each({ unitsPerBreaker: 12 * UNDER }),
    each({ unitsPerBreaker: 12 * AT_LEAST }),
  ),
  old.softStop(
    'units-over-control',
    /datasheet \(control\)/,
    { control: { maxUnits: 12 * UNDER } },
    { control: { maxUnits: 12 * AT_LEAST } },
  ),
  // 12 * 40 VA take the place of what was there.
  old.note(
    'load-before-and-after',
    /common practice/,
    { 'existing.voltAmps': 480 * AT_LEAST },
    { 'existing.voltAmps': 480 * UNDER },
  ),
  old.caution(
    'load-grows',
    /common practice/,
    { 'existing.voltAmps': 480 * UNDER },
    { 'existing.voltAmps': 480 * AT_LEAST },
  ),
  // AWG 4/0 carries 230 A at 75 C, and the next standard rating is 250 A; 35 mm2 carries 111 A.
  us.hardStop('load-over-conductors', /310\.16/, { breakerAmps: 250 * OVER }, { breakerAmps: 250 * AT_MOST }),
  iec.hardStop(
    'load-over-conductors',
    /433\.1/,
    { zeOhms: undefined, breakerAmps: 111 * OVER },
    { zeOhms: undefined, breakerAmps: 111 * AT_MOST },
  ),
  us.caution('over-class-two', /Table 11\(B\)/, lowVoltage(100 * OVER), lowVoltage(100 * AT_MOST)),
  us.caution('rating-not-standard', /240\.6\(A\)/, { breakerAmps: 20 * OVER }, { breakerAmps: 20 * AT_MOST }),
  iec.caution('rating-not-standard', /60898-1/, { breakerAmps: 15 }, { breakerAmps: 13 * AT_LEAST }),
  // AWG 6 carries 55 A at 60 C.
  us.note('rounded-up-overcurrent', /240\.4\(B\)/, { breakerAmps: 55 * OVER }, { breakerAmps: 55 * AT_MOST }),
  us.hardStop(
    'supply-outside-rating',
    /datasheet/,
    each({ ratedVoltsMin: 120 * OVER }),
    each({ ratedVoltsMin: 120 * AT_MOST }),
  ),
  us.hardStop(
    'supply-outside-rating',
    /datasheet/,
    each({ ratedVoltsMax: 120 * UNDER }),
    each({ ratedVoltsMax: 120 * AT_LEAST }),
  ),
  // 400 V between lines are 230.94 V to neutral.
  iec.hardStop(
    'supply-outside-rating',
    /datasheet/,
    { volts: 400, system: 'single-phase', ...each({ ratedVoltsMin: 220, ratedVoltsMax: 240 }) },
    { volts: 400, system: 'three-phase', ...each({ ratedVoltsMin: 220, ratedVoltsMax: 240 }) },
  ),
  us.softStop(
    'unit-over-breaker',
    /210\.20\(A\)/,
    each({ quantity: 1, voltAmps: FULL_VOLT_AMPS * OVER }),
    each({ quantity: 1, voltAmps: FULL_VOLT_AMPS * AT_MOST }),
  ),
  us.softStop(
    'unit-over-breaker',
    /datasheet/,
    each({ unitsPerBreaker: UNDER }),
    each({ unitsPerBreaker: AT_LEAST }),
  ),
];
