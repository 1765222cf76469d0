/** Findings on constant-current circuits: what happened, and what to do next. */
export const constantCurrentFindings = {
  'finding.no-headroom.title': 'Not enough volts to hold the current',
  'finding.no-headroom.body':
    '{perString} in series need a supply of {neededVolts:V}; it falls to {minVolts:V}. Below that the current is not held and the figures do not hold. Use fewer in series, or a higher supply.',
  'finding.led-max-amps-not-given.title': 'Highest LED current not given',
  'finding.led-max-amps-not-given.body':
    'Whether the LED takes {ampsMax:A} is not checked. Give its highest current from the sheet.',
  'finding.source-over-led-amps.title': 'More current than the LED takes',
  'finding.source-over-led-amps.body':
    'The source can give {ampsMax:A}; the LED takes {maxAmps:A}. A set resistor of {saferOhms:ohm} keeps it within.',
  'finding.forward-volts-at-other-amps.title': 'LED volts given at another current',
  'finding.forward-volts-at-other-amps.body':
    'The forward volts are given at {ledAmps:A}, the source is set for {amps:A}. Read them off the curve at that current.',
  'finding.junction-too-hot.title': 'Chip gets too hot',
  'finding.junction-too-hot.body':
    '{watts:W} heat the junction to {junctionCelsius:C}; it takes {maxJunctionCelsius:C}. It needs {neededCelsiusPerWatt:K/W} or less to the air: a larger heat sink, a lower supply, or another way to feed the LEDs.',
  'finding.regulator-over-volts.title': 'Too many volts over the regulator',
  'finding.regulator-over-volts.body':
    'The regulator can see {differenceVolts:V} from input to output; it stands {maxDifferenceVolts:V}. Lower the supply, or put more LEDs in series.',
  'finding.under-min-load.title': 'Too little current to regulate',
  'finding.under-min-load.body':
    'The regulator needs {minLoadAmps:A} at least; it is set for {amps:A}. Use another regulator, or more current.',
  'finding.reference-spread-not-given.title': 'Spread of the reference not given',
  'finding.reference-spread-not-given.body':
    'The reference is taken as {referenceVolts:V} exactly. With its highest value from the sheet the highest current shows.',
  'finding.switching-wastes-less.title': 'A switching driver wastes less',
  'finding.switching-wastes-less.body':
    '{efficiencyPct:%} of the supply reaches the LEDs and {heatWatts:W} turn into heat. A switching driver at {switchingEfficiencyPct:%} would lose {switchingHeatWatts:W}.',
  'finding.switching-efficiency-assumed.title': 'Switching driver taken as typical',
  'finding.switching-efficiency-assumed.body':
    'The switching driver beside it is taken at {switchingEfficiencyPct:%}. Give the figure of the one you would use.',
  'finding.resistor-would-do.title': 'A resistor would do',
  'finding.resistor-would-do.body':
    'A resistor of {ohms:ohm} loses the same, and over this supply keeps the current between {ampsMin:A} and {ampsMax:A}.',
} as const;
