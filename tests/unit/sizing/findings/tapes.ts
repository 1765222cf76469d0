/** Findings of `tape-analysis` and `tape-plan`. */
import { EXAMPLES } from '../../../support/engine-examples';
import { randomJob } from '../../../support/tape-plan-jobs';
import { AT_LEAST, AT_MOST, type FindingRow, type Input, OVER, rowsOf, UNDER } from './row';

/** One segment of 1 A without rails to speak of; every feed has 1 ohm there and back. */
const feed = { at: 0, volts: 24, positiveOhms: 0.5, negativeOhms: 0.5 };
const tape = rowsOf('tape-analysis', {
  ...{ cuts: 1, cutMetres: 0, railOhmsPerMetre: { positive: 0, negative: 0 }, feeds: [feed] },
  load: { model: 'constant-current', amps: 1 },
});
const feeds = (volts: number, one?: string, other?: string) => ({
  feeds: [
    { ...feed, source: one },
    { ...feed, volts, source: other },
  ],
});

const driver = { sku: 'D', volts: 24, channels: 1, channelWatts: 60, classLimited: true, cost: 38 };
const unmarked = { ...driver, sku: 'U', classLimited: false };
const cable = { size: 'AWG 18', stranding: 'stranded', costPerMetre: 0.6, amps: 7 };
/** Carries what any output here can give, and is no smaller than Chapter 3 wiring may be. */
const thick = { size: 'AWG 10', stranding: 'stranded', costPerMetre: 3, amps: 30 };
/** Five segments of 1 m with 9.6 W each, 10 m from the driver; all the drop is in the feeder. */
const planCase = {
  basis: 'us',
  celsius: 75,
  tape: {
    ...{ volts: 24, cutMetres: 1, railOhmsPerMetre: { positive: 0, negative: 0 } },
    load: { model: 'constant-current', amps: 0.4 },
  },
  runs: [{ id: 'cove', metres: 5, places: [{ place: 'closet', startMetres: 10 }] }],
  drivers: [driver],
  conductors: [cable],
  labour: { ratePerHour: 75, hoursPerFeed: 0.25, hoursPerDriver: 0.5, hoursPerMetre: 0.02 },
  limits: { maxDropPct: 5, minDimmestPct: 85, loadFraction: 0.8, maxSections: 1 },
};
const plan = rowsOf('tape-plan', planCase);
/** 2 A over 10 m of AWG 18 with 26.1 ohm/km at 75 C. */
const DROP_PCT = ((2 * 2 * 10 * 0.0261) / 24) * 100;

/** Two segments of 60 ohm with 1 ohm of rails between them: the second has 60/61 of the first's current. */
const dimCase = {
  ...planCase,
  tape: {
    ...{ volts: 24, cutMetres: 1, railOhmsPerMetre: { positive: 0.5, negative: 0.5 } },
    load: { model: 'resistive', ohms: 60 },
  },
  runs: [{ ...planCase.runs[0], metres: 2, pinned: { feed: 'start' } }],
  limits: { ...planCase.limits, maxDropPct: 10 },
};

const volts = (own: number, more: object = {}) => ({ 'tape.volts': own, 'drivers.0.volts': own, ...more });
const iec = { basis: 'iec', 'drivers.0.selv': true };
const watts = (own: number) => ({ 'drivers.0.channelWatts': own });
const strong = (own: number) => ({ drivers: [{ ...unmarked, channelWatts: own }], conductors: [thick] });
const second = (change: object) => ({ drivers: [driver, { ...driver, sku: 'X', ...change }] });
const drop = (maxDropPct: number) => ({ 'limits.maxDropPct': maxDropPct });
const dropout = (own: number) => ({ 'tape.load.dropoutVolts': own, 'runs.0.pinned': { feed: 'start' } });
/** Fed at both ends over feeders of this length and 5 m more. */
const unlike = (metres: number) => ({
  'tape.maxRunMetres': 3,
  'runs.0.pinned': { feed: 'both' },
  'runs.0.places.0.startMetres': metres,
});
/** Fed at its end from a place at its start: the feeder runs along all five metres. */
const along = (maxDropPct: number) => ({
  ...drop(maxDropPct),
  'runs.0.places.0.startMetres': 0,
  'runs.0.pinned': { feed: 'end' },
});
const longest = (metres: number, maxSections: number) => ({
  'limits.longestRunMetres': metres,
  'limits.maxSections': maxSections,
});
const CLASS = /Table 11\(B\).*411/;
const SELV = /61140/;
const FEEDER = /310\.16.*B\.52\.2/;

export const tapeRows: FindingRow[] = [
  tape.hardStop('two-sources', /not joined/, feeds(24, 'A', 'B'), feeds(24, 'A', 'A')),
  // Feeds without a name stand behind one source where their volts are the same.
  tape.hardStop('two-sources', /not joined/, feeds(24 * OVER), feeds(24 * AT_MOST)),
  // The sources' negatives are joined: half of 1 A flows in either positive conductor, less half of what the volts
  // differ over 1 ohm in both.
  tape.softStop('backfeed', /common practice/, feeds(23.5 - 1e-6), feeds(23.5)),
  tape.softStop(
    'below-dropout',
    /datasheet/,
    { 'load.dropoutVolts': 23 * OVER },
    { 'load.dropoutVolts': 23 * AT_MOST },
  ),

  plan.hardStop('tape-volts-over-class', CLASS, volts(60 * OVER), volts(60 * AT_MOST)),
  plan.hardStop(
    'tape-volts-over-class',
    CLASS,
    volts(30 * OVER, { wet: true }),
    volts(30 * AT_MOST, { wet: true }),
  ),
  plan.hardStop('tape-volts-over-class', SELV, volts(60 * OVER, iec), volts(60 * AT_MOST, iec)),
  plan.hardStop(
    'tape-volts-over-class',
    SELV,
    volts(120 * OVER, { ...iec, insulated: true }),
    volts(120 * AT_MOST, { ...iec, insulated: true }),
  ),
  plan.softStop(
    'no-driver-of-these-volts',
    /datasheet/,
    { 'drivers.0.volts': 24 * OVER },
    { 'drivers.0.volts': 24 * AT_MOST },
  ),
  plan.hardStop('no-selv-driver', SELV, { basis: 'iec' }, iec),
  // 100 VA is the most that a source marked Class 2 gives.
  plan.hardStop('no-class-limited-driver', CLASS, watts(100 * OVER), watts(100 * AT_MOST)),
  plan.hardStop(
    'no-class-limited-driver',
    CLASS,
    { drivers: [unmarked], 'tape.classLimitedOnly': true },
    { drivers: [unmarked], 'tape.classLimitedOnly': false },
  ),
  plan.caution(
    'class-two-mark-contradicted',
    CLASS,
    second({ channelWatts: 100 * OVER }),
    second({ channelWatts: 100 * AT_MOST }),
  ),
  plan.note(
    'drivers-of-other-volts',
    /datasheet/,
    second({ volts: 24 * OVER }),
    second({ volts: 24 * AT_MOST }),
  ),
  plan.note(
    'drivers-outside-class',
    CLASS,
    { drivers: [driver, unmarked], 'tape.classLimitedOnly': true },
    { drivers: [driver, unmarked], 'tape.classLimitedOnly': false },
  ),
  // An output to 25 A is of Article 411.
  plan.note('plan-article-411', CLASS, strong(600 * AT_MOST), strong(600 * OVER)),
  plan.caution('plan-chapter-3', CLASS, strong(600 * OVER), strong(600 * AT_MOST)),

  plan.softStop(
    'plan-drop-too-high',
    /common practice/,
    { ...drop(DROP_PCT * UNDER), 'runs.0.pinned': { feed: 'start' } },
    { ...drop(DROP_PCT * AT_LEAST), 'runs.0.pinned': { feed: 'start' } },
  ),
  plan.softStop(
    'plan-drop-too-high',
    /common practice/,
    along((DROP_PCT / 2) * UNDER),
    along((DROP_PCT / 2) * AT_LEAST),
  ),
  // A constant current that needs 22.956 V is left just so much of 24 V.
  plan.softStop('plan-drop-too-high', /common practice/, dropout(22.956 * OVER), dropout(22.956 * AT_MOST)),
  plan.note(
    'plan-drop-governs',
    /common practice/,
    { conductors: [cable, thick], ...drop(DROP_PCT * UNDER) },
    { conductors: [cable, thick], ...drop(DROP_PCT * AT_LEAST) },
  ),
  plan.softStop(
    'plan-too-dim',
    /common practice/,
    { 'limits.minDimmestPct': (6000 / 61) * OVER },
    { 'limits.minDimmestPct': (6000 / 61) * AT_MOST },
    dimCase,
  ),
  plan.softStop('plan-longest-run', /datasheet/, longest(5 * UNDER, 1), longest(5 * AT_LEAST, 1)),
  // Over 10 m and 15 m the nearer end feeds 3 m of the 5 m, as the sheet allows; over shorter feeders more.
  plan.softStop('plan-longest-run', /datasheet/, unlike(10 * (1 - 1e-5)), unlike(10)),
  plan.caution('plan-separate-sections', /not joined/, longest(5 * UNDER, 2), longest(5 * AT_LEAST, 2)),
  // 48 W are four fifths of 60 W.
  plan.softStop('plan-no-driver-large-enough', /load <= fraction/, watts(60 * UNDER), watts(60 * AT_LEAST)),
  // Behind a Class 2 source a feeder carries its 2 A, behind any other the 2.5 A that the output can give.
  plan.hardStop(
    'plan-feeder-too-small',
    FEEDER,
    { 'conductors.0.amps': 2 * UNDER },
    { 'conductors.0.amps': 2 * AT_LEAST },
  ),
  plan.hardStop(
    'plan-feeder-too-small',
    FEEDER,
    { drivers: [unmarked], 'conductors.0.amps': 2.5 * UNDER },
    { drivers: [unmarked], 'conductors.0.amps': 2.5 * AT_LEAST },
  ),
  plan.note('plan-feeder-rating-from-table', FEEDER, { 'conductors.0.amps': undefined }, {}),
  plan.note(
    'plan-run-ends-short',
    /datasheet/,
    { 'runs.0.metres': 5 * OVER },
    { 'runs.0.metres': 5 * AT_MOST },
  ),
  // Forty runs are more than the search ends for; those of the example are searched to the end.
  plan.note(
    'plan-bound-open',
    /linear programming/,
    {},
    EXAMPLES['tape-plan'] ?? {},
    randomJob(5, { runs: 40 }) as unknown as Input,
  ),
];
