/** Findings by their code: what happened, and what to do next. Every code has `.title` and `.body`. */
export const findings = {
  'finding.flexible-as-stranded.title': 'Flexible taken as stranded',
  'finding.flexible-as-stranded.body':
    'The US tables list no flexible conductor of {size}; the stranded row is used. Check the maker’s figure.',
  'finding.drop-exceeds-supply.title': 'More drop than supply',
  'finding.drop-exceeds-supply.body':
    'This current would lose {dropVolts:V} of {volts:V}: it can not flow. Use a larger cable or a shorter run.',
  'finding.far-end-too-low.title': 'Far end too low',
  'finding.far-end-too-low.body':
    'The lowest segment gets {minVolts:V}, {dropPct:%} down; the limit is {limitPct:%}. Feed both ends, use a larger feeder, or shorten the run.',
  'finding.dimmest-too-dim.title': 'Dimmest too dim',
  'finding.dimmest-too-dim.body':
    'The dimmest segment gives {dimmestPct:%} of the brightest; at least {limitPct:%} is wanted. Feed both ends or shorten the run.',
  'finding.driver-overloaded.title': 'Driver loaded too far',
  'finding.driver-overloaded.body':
    'The run takes {loadPct:%} of the driver’s {driverWatts:W}; at most {limitPct:%} is set. Use a larger driver or split the run.',
  'finding.class-two-exceeded.title': 'More than Class 2 gives',
  'finding.class-two-exceeded.body':
    '{amps:A} is asked of a Class 2 source that may give {limitAmps:A} at {volts:V}. Split the run over more outputs, or wire it as Class 1 or power wiring.',
  'finding.load-over-conductors.title': 'More than one cable carries',
  'finding.load-over-conductors.body':
    '{size}, the largest here, carries {ampacity:A} in these surroundings: too little for {amps:A} behind {overcurrentAmps:A}. Split the load over more circuits, each on a smaller {=breaker}.',
  'finding.ambient-too-hot.title': 'Too hot for this insulation',
  'finding.ambient-too-hot.body':
    'At {ambientCelsius:C} around the cable its insulation has nothing left to carry a current. Choose a hotter insulation, or another way for the cable.',
  'finding.no-standard-rating.title': 'No {=breaker} is large enough',
  'finding.no-standard-rating.body':
    'No standard rating is large enough for {amps:A}. Split the load over more circuits.',
  'finding.drop-over-limit.title': 'Too much drop',
  'finding.drop-over-limit.body':
    '{size} loses {dropPct:%} ({dropVolts:V}) over this run; the limit is {limitPct:%}. Use a shorter run or higher volts, or split the load.',
  'finding.disconnection-time.title': 'Does not trip in time',
  'finding.disconnection-time.body':
    'With {size} the fault loop has {zsOhms:ohm}; this {=breaker} trips at once up to {zsMaxOhms:ohm}. Use a smaller rating or a quicker curve, a shorter run, or protect by residual current.',
  'finding.class-two-source.title': 'For a Class 2 source only',
  'finding.class-two-source.body':
    'Sized for {amps:A} of the {limitAmps:A} that a Class 2 source may give at {volts:V}. Only a source marked Class 2 counts; behind any other, AWG 14 at least and an overcurrent device.',
  'finding.over-class-two.title': 'More than Class 2',
  'finding.over-class-two.body':
    '{amps:A} at {volts:V} is more than the {limitAmps:A} of a Class 2 source. Split it over outputs, or use a listed low-voltage lighting system (to {articleAmps:A}) or power wiring.',
  'finding.grouped-not-counted.title': 'Grouped circuits not counted',
  'finding.grouped-not-counted.body':
    'Only {loadedConductors} current-carrying conductors are counted, beside {groupedCircuits} circuits together. Give all that share the raceway.',
  'finding.insulation-below-terminals.title': 'Insulation cooler than the terminals',
  'finding.insulation-below-terminals.body':
    'The terminals take {terminalCelsius:C}, the insulation only {insulationCelsius:C}. Choose a conductor that stands what the terminals may reach.',
  'finding.rounded-up-overcurrent.title': 'Next rating up',
  'finding.rounded-up-overcurrent.body':
    '{overcurrentAmps:A} is the next standard rating above the {ampacity:A} that the conductor carries. Allowed for lighting; not where several receptacles hang on it.',
  'finding.terminals-below-insulation.title': 'Terminals cooler than the cable',
  'finding.terminals-below-insulation.body':
    'The conductor may reach {insulationCelsius:C}, the terminals are taken for {terminalCelsius:C}. See what {=breaker} and terminals take, or size it as 70 °C cable.',
  'finding.fault-loop-not-checked.title': 'Fault loop not checked',
  'finding.fault-loop-not-checked.body':
    'Whether the {=breaker} trips in time at the end of {metres:m} is not checked. Give the loop impedance at its origin and the curve.',
  'finding.solid-as-stranded.title': 'Solid taken as stranded',
  'finding.solid-as-stranded.body': '{size} is not made solid; the stranded row is used.',
  'finding.inputs-not-used.title': 'Not used here',
  'finding.inputs-not-used.body': 'These figures do not count in this answer: {keys}.',
  'finding.unit-over-breaker.title': 'One unit is too much',
  'finding.unit-over-breaker.body':
    'One {name} alone is too much for a {breakerAmps:A} {=breaker}. Use a larger rating or another curve, or a driver with less inrush.',
  'finding.rating-not-standard.title': 'Not a standard rating',
  'finding.rating-not-standard.body': '{breakerAmps:A} is no standard rating. Look at the {=breaker} again.',
  'finding.curve-taken-as-b.title': 'Curve taken as B',
  'finding.curve-taken-as-b.body':
    'The curve of the {breakerAmps:A} {=breaker} is not given. B is taken, which holds the fewest drivers.',
  'finding.units-over-control.title': 'Too many units on the control',
  'finding.units-over-control.body':
    '{units} units start at once through one {control:word.control} that holds {unitsByControl}: its contacts weld. Add a relay, or share the load.',
  'finding.conductor-under-breaker.title': 'Conductor too small for its {=breaker}',
  'finding.conductor-under-breaker.body':
    '{size} carries {ampacity:A} here: too little for {amps:A} behind {breakerAmps:A}. Fit a smaller {=breaker}, or rewire.',
  'finding.load-before-and-after.title': 'Load before and after',
  'finding.load-before-and-after.body': 'The circuit goes from {voltAmpsBefore:VA} to {voltAmpsAfter:VA}.',
  'finding.load-grows.title': 'The load grows',
  'finding.load-grows.body':
    'The circuit goes from {voltAmpsBefore:VA} to {voltAmpsAfter:VA}. Look at all that hangs on it before more is added.',
} as const;
