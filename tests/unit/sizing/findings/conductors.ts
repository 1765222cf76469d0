/** Findings of `conductor-resistance`, `voltage-drop` and `conductor-size`. */
import { AT_LEAST, AT_MOST, type FindingRow, OVER, rowsOf, UNDER } from './row';

const wire = rowsOf('conductor-resistance', { size: 'AWG 14', stranding: 'flexible', celsius: 75 });

/** AWG 14 stranded has 0.0103 ohm/m at 75 C: 10 A lose all of 12 V over this length. */
const ALL_LOST_METRES = 12 / (2 * 10 * 0.0103);
const drop = rowsOf('voltage-drop', {
  ...{ system: 'dc', volts: 12, amps: 10, metres: 5, size: 'AWG 14', stranding: 'stranded', celsius: 75 },
});

const usCase = {
  ...{ basis: 'us', system: 'single-phase', volts: 120, amps: 12, metres: 1, maxDropPct: 3 },
  ...{ continuous: false, ambientCelsius: 30, loadedConductors: 2, terminalCelsius: 60 },
};
const iecCase = {
  ...{ basis: 'iec', system: 'single-phase', volts: 230, amps: 10, metres: 0, maxDropPct: 5 },
  ...{ continuous: false, ambientCelsius: 30, loadedConductors: 2, zeOhms: 0.35, curve: 'B' },
};
const us = rowsOf('conductor-size', usCase);
const iec = rowsOf('conductor-size', iecCase);

/** Class 2 at 24 V DC: 100 / V. */
const CLASS_TWO_AMPS = 100 / 24;
const lowVoltage = { ...usCase, system: 'dc', volts: 24 };
/** 0.95 * U0 / (5 * In) with curve B. */
const LOOP_OHMS = (0.95 * 230) / (5 * 10);
/** 3 % of 120 V on the largest size, AWG 4/0 with 0.1996 ohm/km. */
const US_METRES = (0.03 * 120) / (2 * 12 * 0.0001996);
/** 5 % of 230 V on the largest size, 35 mm2 with 0.524 ohm/km at 20 C, at 70 C. */
const IEC_METRES = (0.05 * 230) / (2 * 10 * 0.000524 * (1 + 0.00393 * 50));

export const conductorRows: FindingRow[] = [
  wire.note('flexible-as-stranded', /Chapter 9 Table 8/, {}, { size: '2.5 mm2' }),

  // As large as the supply, or equal within the margin: nothing is left.
  drop.softStop(
    'drop-exceeds-supply',
    /60364-5-52 Annex G/,
    { metres: ALL_LOST_METRES * AT_LEAST },
    { metres: ALL_LOST_METRES * UNDER },
  ),

  // The last band of the 90 C column ends at 85 C, that of PVC at 60 C.
  us.hardStop('ambient-too-hot', /310\.16/, { ambientCelsius: 85 * OVER }, { ambientCelsius: 85 * AT_MOST }),
  iec.hardStop('ambient-too-hot', /433\.1/, { ambientCelsius: 60 * OVER }, { ambientCelsius: 60 * AT_MOST }),
  us.note(
    'class-two-source',
    /Table 11\(B\)/,
    { amps: CLASS_TWO_AMPS * AT_MOST },
    { amps: CLASS_TWO_AMPS * OVER },
    lowVoltage,
  ),
  us.caution(
    'over-class-two',
    /Table 11\(B\).*411\.6/,
    { amps: CLASS_TWO_AMPS * OVER },
    { amps: CLASS_TWO_AMPS * AT_MOST },
    lowVoltage,
  ),
  // To 20 V it is 5 A, to 60 V 100 / V.
  us.caution(
    'over-class-two',
    /Table 11\(B\)/,
    { volts: 20 * OVER, amps: 5 },
    { volts: 20 * AT_MOST, amps: 5 },
    lowVoltage,
  ),
  us.note(
    'class-two-source',
    /Table 11\(B\)/,
    { volts: 60 * AT_MOST, amps: 1 },
    { volts: 60 * OVER, amps: 1 },
    lowVoltage,
  ),
  iec.hardStop(
    'disconnection-time',
    /411\.4\.4/,
    { zeOhms: LOOP_OHMS * OVER },
    { zeOhms: LOOP_OHMS * AT_MOST },
  ),
  // No device is made for 126 A: it can't be too slow.
  iec.hardStop('disconnection-time', /411\.4\.4/, { amps: 125, zeOhms: 9 }, { amps: 126, zeOhms: 9 }),
  iec.note('fault-loop-not-checked', /411\.4\.4/, { zeOhms: undefined }, {}),
  us.softStop(
    'drop-over-limit',
    /NEC 2023 210\.19/,
    { metres: US_METRES * OVER },
    { metres: US_METRES * AT_MOST },
  ),
  iec.softStop(
    'drop-over-limit',
    /Table G\.52\.1/,
    { metres: IEC_METRES * OVER },
    { metres: IEC_METRES * AT_MOST },
  ),
  us.note('flexible-as-stranded', /Table 8/, { stranding: 'flexible' }, { stranding: 'stranded' }),
  us.caution(
    'grouped-not-counted',
    /310\.15\(C\)\(1\)|\(C\)\(1\)/,
    { groupedCircuits: 2, loadedConductors: 3 },
    { groupedCircuits: 2, loadedConductors: 4 },
  ),
  us.note('inputs-not-used', /common practice/, { curve: 'B' }, {}),
  iec.note('inputs-not-used', /common practice/, { insulationCelsius: 90 }, { insulation: 'XLPE90' }),
  us.caution(
    'insulation-below-terminals',
    /310\.16/,
    { terminalCelsius: 75, insulationCelsius: 60 },
    { terminalCelsius: 75, insulationCelsius: 75 },
  ),
  // AWG 4/0 carries 195 A at 60 C, and the next standard rating is 200 A.
  us.hardStop('load-over-conductors', /310\.16/, { amps: 195 * OVER }, { amps: 195 * AT_MOST }),
  // 35 mm2 carries 111 A: 100 A stand before it, the next rating of 125 A does not.
  iec.hardStop('load-over-conductors', /433\.1/, { amps: 100 * OVER }, { amps: 100 * AT_MOST }),
  us.hardStop('no-standard-rating', /240\.6\(A\)/, { amps: 6000 * OVER }, { amps: 6000 * AT_MOST }),
  iec.hardStop('no-standard-rating', /433\.1/, { amps: 125 * OVER }, { amps: 125 * AT_MOST }),
  // AWG 6 carries 55 A at 60 C: 50 A stand before it as they are, more only rounded up to 60 A.
  us.note('rounded-up-overcurrent', /240\.4\(B\)/, { amps: 50 * OVER }, { amps: 50 * AT_MOST }),
  // AWG 8 carries 40 A at 60 C and is the last that is made solid.
  us.note(
    'solid-as-stranded',
    /Table 8/,
    { stranding: 'solid', amps: 40 * OVER },
    { stranding: 'solid', amps: 40 * AT_MOST },
  ),
  iec.caution(
    'terminals-below-insulation',
    /523\.1/,
    { insulation: 'XLPE90', terminalCelsius: 90 * UNDER },
    { insulation: 'XLPE90', terminalCelsius: 90 * AT_LEAST },
  ),
];
