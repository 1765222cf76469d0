/** Findings on plans of tape runs: what happened, and what to do next. */
export const tapePlanFindings = {
  'finding.no-driver-of-these-volts.title': 'No driver of these volts',
  'finding.no-driver-of-these-volts.body': 'No driver offered gives {volts:V}. Offer one that does.',
  'finding.no-selv-driver.title': 'No SELV driver',
  'finding.no-selv-driver.body':
    'None of the drivers at {volts:V} is marked SELV ({skus}). Without SELV the tape may not be touched: offer a SELV driver.',
  'finding.no-class-limited-driver.title': 'No driver of the class this tape needs',
  'finding.no-class-limited-driver.body':
    'None of the drivers at {volts:V} keeps within the class that this tape needs ({skus}). Read the mark on the driver and on the tape again, or offer another.',
  'finding.tape-volts-over-class.title': 'Too many volts here',
  'finding.tape-volts-over-class.body':
    'The tape runs on {volts:V}; with live parts in reach this {place} place takes {limitVolts:V}. Use a tape of lower volts, or one whose live parts can not be touched.',
  'finding.plan-longest-run.title': 'Longer than the longest run',
  'finding.plan-longest-run.body':
    'Even in {sections} sections, {metres:m} each, {run} is longer than the {limitMetres:m} that are allowed in one piece. Allow more sections.',
  'finding.plan-no-driver-large-enough.title': 'No driver is large enough',
  'finding.plan-no-driver-large-enough.body':
    'A section of {run} draws {watts:W} ({metres:m}); the largest output may be loaded with {limitWatts:W}. Offer a larger driver, or allow more sections.',
  'finding.plan-drop-too-high.title': 'Too much drop on every way',
  'finding.plan-drop-too-high.body':
    'The best that the sizes offered make of {run} is a drop of {dropPct:%}; the limit is {limitPct:%}. Offer a larger size or a nearer place for the driver, or allow more sections.',
  'finding.plan-too-dim.title': 'Too dim on every way',
  'finding.plan-too-dim.body':
    'The dimmest segment of {run} gets {dimmestPct:%} of the brightest; the limit is {limitPct:%}. Allow more sections, or offer larger sizes.',
  'finding.plan-feeder-too-small.title': 'No feeder carries enough',
  'finding.plan-feeder-too-small.body':
    'A section of {run} draws {amps:A}, and behind a driver that is not limited the feeder must carry all that its output gives. Offer a larger size, or a limited driver.',
  'finding.class-two-mark-contradicted.title': 'Class 2 mark and rating do not agree',
  'finding.class-two-mark-contradicted.body':
    '{skus}: marked Class 2, but rated for more than Class 2 allows at {volts:V}. Not used. Read the label again.',
  'finding.drivers-of-other-volts.title': 'Drivers of other volts',
  'finding.drivers-of-other-volts.body': '{skus}: not {volts:V}, so not used.',
  'finding.drivers-outside-class.title': 'Drivers outside the class',
  'finding.drivers-outside-class.body': '{skus}: not of the class that this tape needs here, so not used.',
  'finding.plan-chapter-3.title': 'Wire it by Chapter 3',
  'finding.plan-chapter-3.body':
    '{skus} at {volts:V}: neither Class 2 nor a lighting system of Article 411. Its circuits are wired by the methods of Chapter 3, by a licensed electrician.',
  'finding.plan-article-411.title': 'Not Class 2',
  'finding.plan-article-411.body':
    '{skus} at {volts:V}: not Class 2, so driver, tape and fittings must be listed as one low-voltage lighting system (Article 411).',
  'finding.plan-feeder-rating-from-table.title': 'Rating of the cable from a table',
  'finding.plan-feeder-rating-from-table.body':
    '{sizes}: the cable’s own rating is not given, the table’s is used. Compare with the cable, and allow for heat and bundling.',
  'finding.plan-separate-sections.title': 'Separate the sections',
  'finding.plan-separate-sections.body':
    '{runs, plural, one {One run is} other {# runs are}} cut into sections. Separate both rails between them: each section is fed by one output alone.',
  'finding.plan-drop-governs.title': 'Drop decides the feeder',
  'finding.plan-drop-governs.body':
    '{sections, plural, one {One section has} other {# sections have}} a larger feeder than the current asks for, because of drop or dimming.',
  'finding.plan-run-ends-short.title': 'Not a whole number of segments',
  'finding.plan-run-ends-short.body':
    '{runs}: the length is no whole number of segments of {cutMetres:m}. The tape ends a little short.',
  'finding.plan-bound-open.title': 'Maybe not the cheapest',
  'finding.plan-bound-open.body': 'A cheaper plan may exist: at most {boundPct:%} cheaper.',
} as const;
