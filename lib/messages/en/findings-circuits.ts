/** Findings on tape, arrays and prices: what happened, and what to do next. */
export const circuitFindings = {
  'finding.field-built.title': 'Field-built',
  'finding.field-built.body':
    'Field-built; not a listed luminaire or kit. Not for building lighting: displays, vehicles, boats and sign repair only.',
  'finding.two-sources.title': 'Two sources on one tape',
  'finding.two-sources.body':
    '{sources} sources feed one unbroken tape. Separate the rails between sections, one source to each.',
  'finding.backfeed.title': 'One driver feeds another',
  'finding.backfeed.body':
    'Feed {feed} takes {amps:A} in instead of giving it. Use one supply, set both to the same volts, or separate the rails.',
  'finding.below-dropout.title': 'Not enough volts to regulate',
  'finding.below-dropout.body':
    '{segments, plural, one {One segment has} other {# segments have}} less than the {dropoutVolts:V} that the tape needs (lowest {minVolts:V}): the figures do not hold. Feed both ends, use a larger feeder, or shorten the run.',
  'finding.shared-resistor.title': 'One resistor for several strings',
  'finding.shared-resistor.body':
    '{strings} strings share {sharedOhms:ohm}: nothing makes them share the current. The one with the lowest volts takes the most: string {string}, {overShare} times an even share. It runs hottest, its volts fall further, and it ages first. Give each string its own resistor.',
  'finding.not-preferred-value.title': 'No standard value',
  'finding.not-preferred-value.body':
    '{ohms:ohm} is no standard value. Read the bands from the other end, or measure it.',
  'finding.saturation-temperature.title': 'LED figures at another temperature',
  'finding.saturation-temperature.body':
    'The saturation current of {leds} LEDs is given up to {kelvin} K away from their temperature. Give the gap volts too, or measure at the working temperature.',
  'finding.dark-string.title': 'Dark strings',
  'finding.dark-string.body':
    '{dark} of {strings} strings stay dark: the volts do not reach their LEDs. Use fewer LEDs in series, or more volts.',
  'finding.does-not-fit.title': 'Too many LEDs in series',
  'finding.does-not-fit.body':
    '{leds} in series need {forwardVolts:V} of a {volts:V} supply: nothing is left for the resistor. Use fewer in series.',
  'finding.over-max-amps.title': 'Too much current',
  'finding.over-max-amps.body':
    'A string of {leds} can reach {ampsMax:A}; the LED takes {maxAmps:A}. {saferOhms:ohm} keep it within.',
  'finding.no-rating.title': 'No resistor is large enough',
  'finding.no-rating.body':
    'The resistor may have to turn {ballastWattsMax:W} into heat; the largest offered is rated {largestRatedWatts:W}. Offer a larger one, or put more LEDs in series.',
  'finding.low-current.title': 'Dim at low supply',
  'finding.low-current.body':
    'At the lowest supply and the highest LED volts a string of {leds} gets {ampsMin:A}, under the {ampsWanted:A} that are wanted. Use fewer in series.',
  'finding.no-count-fits.title': 'No string fits this supply',
  'finding.no-count-fits.body':
    'No number of LEDs in series keeps the current under {maxAmps:A} and over {ampsWanted:A} from the lowest to the highest supply. Use a steadier supply, or a constant-current driver.',
  'finding.priced-below-cost.title': 'Priced below cost',
  'finding.priced-below-cost.body':
    'Before tax the price is {netMinor:minor}, and the work costs {costMinor:minor}. Lower the discount, or raise the markup.',
} as const;
