/**
 * Limits of control signals for dimming. Read in third-party copies and makers' manuals; the licensed standards
 * prevail.
 */
/**
 * 0-10 V and 1-10 V, IEC 60929 Annex E (quoted in a forum's copy): drivers source, controls sink, 2 mA a driver at
 * most; full at 10 V, lowest at 1 V. Field units have been measured from 0.5 to 4 mA (a maker's FAQ, 2016).
 */
export const ANALOGUE = { driverAmps: 0.002, fullVolts: 10 } as const;
export const ANALOGUE_BASIS = 'IEC 60929 Annex E, read in a copy';

/** Common practice: a maker's table counts with 0.1 V of drop, 1 % of the full level. */
export const ANALOGUE_ERROR_PCT = 1;
/** Common practice: no standard limits the length; makers name 15 m to 50 m because of interference. */
export const ANALOGUE_LONG_METRES = 50;

/**
 * IEC 62386-101 and the makers' association's notes on cable length (300 m between any two devices, 2 V, 250 mA), read
 * in copies. A sender gives 11.5 V at least, a receiver wants 9.5 V: that is where the 2 V come from. 64 addresses for
 * gear; input devices count their own 64 (IEC 62386-103, from memory).
 */
export const DALI = {
  addresses: 64,
  supplyAmps: 0.25,
  deviceAmps: 0.002,
  dropVolts: 2,
  metres: 300,
  groups: 16,
  scenes: 16,
  leastReceivedVolts: 9.5,
} as const;
export const DALI_BASIS = 'IEC 62386-101, read in a copy';
export const DALI_INSULATION_BASIS = 'IEC 62386-101 (basic insulation), from memory';
export const DALI_CABLE_BASIS = 'DALI cable length technical note (300 m, 2 V at 250 mA)';

/** Sections that are looked at where none is given (common practice for control pairs). */
export const CONTROL_SIZES = {
  us: ['AWG 22', 'AWG 20', 'AWG 18', 'AWG 16', 'AWG 14', 'AWG 12'],
  iec: ['0.5 mm2', '0.75 mm2', '1 mm2', '1.5 mm2', '2.5 mm2'],
} as const;

/** Where the colours of control conductors and their keeping apart are ruled; read in a course's summary. */
export const COLOURS_BASIS = 'NEC 2020 410.69 (from 2022), read in a summary; older stock: common practice';
export const SEPARATION_BASIS =
  'NEC Article 725 (separation of Class 2 circuits), from memory: see the edition in force';
