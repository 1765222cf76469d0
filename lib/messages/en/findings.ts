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
} as const;
