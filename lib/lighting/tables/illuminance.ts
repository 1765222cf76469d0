/**
 * Maintained illuminance by use. EN 12464-1 was not read itself: values are from memory, and those marked "Em read in a
 * table" were found in a public table of the 2011 edition. The licensed standard and local rules prevail.
 */

export interface IlluminanceTarget {
  use: string;
  /** Average maintained lux; null where the standard leaves it open. */
  lux: number | null;
  /** Upper value of the 2021 edition, for needs above the ordinary. */
  upperLux?: number;
  /** Least uniformity, highest glare rating, least colour rendering; null or absent where not given. */
  uniformity?: number | null;
  glare?: number | null;
  colourRendering?: number | null;
  source: string;
}

const row = (
  clause: string,
  use: string,
  lux: number | null,
  glare: number | null,
  uniformity: number | null,
  colourRendering: number,
  read: 'read' | 'memory',
): IlluminanceTarget => ({
  use,
  lux,
  uniformity,
  glare,
  colourRendering,
  source: `EN 12464-1:2011, ${clause}, from memory${read === 'read' ? '; Em read in a table' : ''}`,
});

/** EN 12464-1:2011, chapter 5: Em, UGR limit, U0, Ra. */
export const EN_12464_2011: readonly IlluminanceTarget[] = [
  row('5.1.1', 'Circulation areas and corridors', 100, 28, 0.4, 40, 'read'),
  row('5.1.2', 'Stairs, escalators, travolators', 100, 25, 0.4, 40, 'memory'),
  row('5.1.3', 'Elevators, lifts', 100, 25, 0.4, 40, 'memory'),
  row('5.1.4', 'Loading ramps/bays', 150, 25, 0.4, 40, 'read'),
  row('5.2.1', 'Canteens, pantries', 200, 22, 0.4, 80, 'read'),
  row('5.2.2', 'Rest rooms', 100, 22, 0.4, 80, 'read'),
  row('5.2.4', 'Cloakrooms, washrooms, toilets', 200, 25, 0.4, 80, 'read'),
  row('5.2.5', 'Sick bay', 500, 19, 0.6, 80, 'memory'),
  row('5.3.1', 'Plant rooms, switchgear rooms', 200, 25, 0.4, 60, 'read'),
  row('5.4.1', 'Store and stockrooms (200 lx if continuously occupied)', 100, 25, 0.4, 60, 'read'),
  row('5.4.2', 'Dispatch, packing, handling', 300, 25, 0.6, 60, 'read'),
  row('5.5.1', 'Storage rack gangways, unmanned', 20, null, 0.4, 40, 'memory'),
  row('5.5.2', 'Storage rack gangways, manned', 150, 22, 0.4, 60, 'memory'),
  row('5.26.1', 'Filing, copying', 300, 19, 0.4, 80, 'memory'),
  row('5.26.2', 'Writing, typing, reading, data processing', 500, 19, 0.6, 80, 'read'),
  row('5.26.3', 'Technical drawing', 750, 16, 0.7, 80, 'memory'),
  row('5.26.4', 'CAD work stations', 500, 19, 0.6, 80, 'memory'),
  row('5.26.5', 'Conference and meeting rooms', 500, 19, 0.6, 80, 'memory'),
  row('5.26.6', 'Reception desk', 300, 22, 0.6, 80, 'memory'),
  row('5.26.7', 'Archives', 200, 25, 0.4, 80, 'memory'),
  row('5.27.1', 'Retail sales area', 300, 22, 0.4, 80, 'memory'),
  row('5.27.2', 'Till area', 500, 19, 0.6, 80, 'memory'),
  row('5.27.3', 'Wrapper table', 500, 19, 0.6, 80, 'memory'),
  row('5.28.1', 'Public entrance halls', 100, 22, 0.4, 80, 'memory'),
  row('5.29.1', 'Hotel/restaurant reception, cashier', 300, 22, 0.6, 80, 'memory'),
  row('5.29.2', 'Kitchen', 500, 22, 0.6, 80, 'memory'),
  row('5.29.3', 'Restaurant, dining room (set by atmosphere)', null, null, null, 80, 'memory'),
  row('5.29.4', 'Self-service restaurant', 200, 22, 0.4, 80, 'memory'),
  row('5.29.5', 'Buffet', 300, 22, 0.6, 80, 'memory'),
  row('5.34.1', 'Car park ramps by day', 300, 25, 0.4, 40, 'memory'),
  row('5.34.2', 'Car park ramps at night', 75, 25, 0.4, 40, 'memory'),
  row('5.34.3', 'Car park traffic lanes', 75, 25, 0.4, 40, 'memory'),
  row('5.34.4', 'Car park parking areas', 75, null, 0.4, 40, 'memory'),
  row('5.34.5', 'Car park ticket office', 300, 19, 0.6, 80, 'memory'),
  row('5.36.1', 'Classrooms, tutorial rooms', 300, 19, 0.6, 80, 'memory'),
  row('5.36.2', 'Classrooms for evening classes/adults', 500, 19, 0.6, 80, 'memory'),
  row('5.36.3', 'Auditorium, lecture halls', 500, 19, 0.6, 80, 'memory'),
  row('5.36.4', 'Black, green and white boards', 500, 19, 0.7, 80, 'memory'),
  row('5.36.11', 'Practical rooms and laboratories', 500, 19, 0.6, 80, 'memory'),
  row('5.36.13', 'Teaching workshops', 500, 19, 0.6, 80, 'memory'),
  row('5.36.16', 'Computer practice rooms', 300, 19, 0.6, 80, 'memory'),
  row('5.36.20', 'School corridors', 100, 25, 0.4, 80, 'memory'),
  row('5.36.21', 'School stairs', 150, 25, 0.4, 80, 'memory'),
  row('5.36.25', 'Library reading areas', 500, 19, 0.6, 80, 'memory'),
  row('5.36.26', 'Sports halls, gymnasiums (general)', 300, 22, 0.6, 80, 'memory'),
  row('assembly', 'Rough assembly', 200, 25, 0.6, 80, 'read'),
  row('assembly', 'Medium assembly', 300, 25, 0.6, 80, 'read'),
  row('assembly', 'Fine assembly', 500, 22, 0.6, 80, 'read'),
  row('assembly', 'Precision assembly', 750, 19, 0.7, 80, 'read'),
  row('machining', 'Rough/average machining, tolerance >= 0.1 mm', 300, 22, 0.6, 80, 'read'),
  row('machining', 'Precision machining, grinding, tolerance < 0.1 mm', 500, 19, 0.7, 80, 'read'),
  row('vehicles', 'Vehicle service, repair and testing', 300, 22, 0.6, 80, 'memory'),
];

/** EN 12464-1:2021 gives a required and an upper value. */
export const EN_12464_2021: readonly IlluminanceTarget[] = [
  {
    use: 'Writing, typing, reading, data processing',
    lux: 500,
    upperLux: 1000,
    uniformity: 0.6,
    glare: 19,
    colourRendering: 80,
    source: 'EN 12464-1:2021, Table 34, from memory; 500 and 1000 lx read in an article on its draft',
  },
  {
    use: 'Classroom, general activities',
    lux: 500,
    upperLux: 1000,
    source: 'EN 12464-1:2021, from memory',
  },
];

export interface FootcandleTarget {
  use: string;
  /** Least, and most where the source gives a range. */
  footcandles: number;
  upToFootcandles: number | null;
  source: string;
}

const footcandles = (
  source: string,
  rows: readonly (readonly [use: string, least: number, most?: number])[],
): FootcandleTarget[] =>
  rows.map(([use, least, most]) => ({ use, footcandles: least, upToFootcandles: most ?? null, source }));

/** Legal minima and typical design values of the US. */
export const FOOTCANDLE_TARGETS: readonly FootcandleTarget[] = [
  ...footcandles('41 CFR 102-74.180 (federal facilities, minimum), read in a copy', [
    ['Work station surfaces at 30 in', 50],
    ['Work areas', 30],
    ['Non-work areas', 10],
    ['Elevator boarding areas', 5],
    ['Middle of corridors and stairwells', 1],
    ['Storage areas', 10],
  ]),
  ...footcandles('29 CFR 1926.56, Table D-3 (construction, minimum), read in a copy', [
    ['General construction area', 5],
    ['Concrete placement, waste areas, access ways, active storage, loading platforms, refuelling', 3],
    ['Indoors: warehouses, corridors, hallways, exitways', 5],
    [
      'Plant and shops, mechanical/electrical rooms, carpenter shops, active store rooms, mess halls, indoor toilets',
      10,
    ],
    ['First aid stations, infirmaries, offices', 30],
  ]),
  ...footcandles('34 Pa. Code 27.15, Table I (old state rule), read in a copy', [
    ['General office work', 56, 70],
    ['Accounting, drafting', 120, 150],
    ['Corridors, elevators, stairways', 16, 20],
    ['Lobbies, reception', 10, 30],
    ['Washrooms', 24, 30],
  ]),
  ...footcandles('typical design value after the IES handbook (10th edition era), from memory', [
    ['Open office, screen work', 30, 50],
    ['Corridor', 5, 10],
    ['Stair', 5, 10],
    ['Classroom', 30, 50],
    ['Warehouse bulky/inactive', 5, 10],
    ['Warehouse small items/picking', 30],
    ['Retail general', 30, 50],
    ['Commercial kitchen prep', 50],
    ['Parking garage (min 1 on floor, higher at ramps/entry by day)', 1, 5],
    ['Workshop medium bench', 50],
  ]),
];
