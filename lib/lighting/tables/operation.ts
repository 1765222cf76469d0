/** How long lights burn, how much of them falls into the billed peak, and what controls leave: defaults to change. */

export interface Default {
  use: string;
  value: number;
  source: string;
}

const TYPICAL = 'typical of utility programmes, from memory';
const BLOG = 'an energy fund’s guide, 2024, read in a copy';

/** Hours a year. */
export const ANNUAL_HOURS: readonly Default[] = [
  { use: 'Office', value: 3000, source: TYPICAL },
  { use: 'Retail', value: 4000, source: TYPICAL },
  { use: 'Warehouse, one shift', value: 2600, source: TYPICAL },
  { use: 'School', value: 2200, source: TYPICAL },
  { use: 'Restaurant', value: 4400, source: TYPICAL },
  { use: 'Exterior, dusk to dawn', value: 4400, source: BLOG },
  { use: 'Exit sign', value: 8760, source: TYPICAL },
  { use: 'Parking garage', value: 8760, source: TYPICAL },
];

/** Lowest share of the connected kW that falls into the billed peak: the prudent end of what programmes use. */
export const COINCIDENCE: readonly Default[] = [
  { use: 'Office', value: 0.6, source: TYPICAL },
  { use: 'Retail', value: 0.7, source: TYPICAL },
  { use: 'Warehouse', value: 0.6, source: TYPICAL },
  { use: 'School in summer', value: 0.3, source: TYPICAL },
  { use: 'Exterior', value: 0, source: TYPICAL },
];

const FEMP = 'Wireless Occupancy Sensors for Lighting Controls, US DOE FEMP/PNNL, 2016, p. 1, read in a copy';
const FEMP_MEMORY =
  'Wireless Occupancy Sensors for Lighting Controls, US DOE FEMP/PNNL, 2016, p. 1, from memory';
const CFR = '10 CFR 434.514, Table 514.1, read in a copy';

/** Control factor: 1 less the saving; where the source gives a range, its lower saving. */
export const CONTROL_FACTORS: readonly Default[] = [
  { use: 'Occupancy sensor, breakroom', value: 0.71, source: FEMP },
  { use: 'Occupancy sensor, classroom', value: 0.6, source: FEMP },
  { use: 'Occupancy sensor, conference room', value: 0.55, source: FEMP },
  { use: 'Occupancy sensor, corridor', value: 0.7, source: FEMP },
  { use: 'Occupancy sensor, private office', value: 0.87, source: FEMP_MEMORY },
  { use: 'Occupancy sensor, open office', value: 0.9, source: FEMP_MEMORY },
  { use: 'Occupancy sensor, restroom', value: 0.7, source: FEMP_MEMORY },
  { use: 'Occupancy sensor, storage', value: 0.55, source: FEMP_MEMORY },
  { use: 'Occupancy sensor, warehouse', value: 0.65, source: FEMP_MEMORY },
  { use: 'Occupancy sensor, any room', value: 0.7, source: CFR },
  { use: 'Daylight, continuous dimming', value: 0.7, source: CFR },
  { use: 'Daylight, several steps', value: 0.8, source: CFR },
  { use: 'Daylight, on and off', value: 0.9, source: CFR },
  { use: 'Lumen maintenance', value: 0.9, source: CFR },
];
