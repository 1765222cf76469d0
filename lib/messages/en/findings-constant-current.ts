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
  'finding.string-over-insulation.title': 'More volts than the insulation',
  'finding.string-over-insulation.body':
    'An open string of {sku} carries {openVolts:V}; modules and connectors are insulated for {insulationVolts:V}. Offer a driver of lower volts.',
  'finding.driver-over-module-amps.title': 'Driver gives too much current',
  'finding.driver-over-module-amps.body':
    '{sku} gives {amps:A}; the module takes {maxAmps:A}. Offer a driver of less current, or set it lower.',
  'finding.string-window-too-narrow.title': 'No string fits the driver’s window',
  'finding.string-window-too-narrow.body':
    '{sku} needs {fewest} modules in series to stay over {minVolts:V} when hot, and takes at most {most} to stay under {maxVolts:V} at a cold start. Offer a driver with a wider window.',
  'finding.string-over-watts.title': 'Shortest string is too much for the driver',
  'finding.string-over-watts.body':
    'The shortest string of {sku}, {fewest} modules, takes {watts:W}; it may be loaded with {limitWatts:W}, {loadPct:%} of its rating. Offer a larger driver.',
  'finding.too-few-modules.title': 'Too few modules for the driver',
  'finding.too-few-modules.body':
    '{count, plural, one {One module has} other {# modules have}} {hotVolts:V} when hot; {sku} needs {minVolts:V}, or it drops out or flickers: {fewest} modules at least. Offer a driver with a lower window.',
  'finding.count-does-not-split.title': 'Modules can not be split',
  'finding.count-does-not-split.body':
    '{count} modules can not be split over strings that fit these drivers; {countBelow} or {countAbove} can. Change the number, or offer another driver.',
  'finding.temperature-not-counted.title': 'Temperature not counted',
  'finding.temperature-not-counted.body':
    'How the forward volts change from {ambientMinCelsius:C} to {ambientMaxCelsius:C} is not given: hot strings may drop out, cold ones may not start. Give the volts per kelvin from the sheet.',
  'finding.rise-not-counted.title': 'Warming of the LEDs not counted',
  'finding.rise-not-counted.body':
    'The LEDs are taken no hotter than the air, {ambientMaxCelsius:C}. In use they are, and a hot string has fewer volts. Give how far they warm.',
  'finding.live-string.title': 'Open strings are live',
  'finding.live-string.body':
    'An open string carries up to {openVolts:V}, and a connector that is opened or closed under current arcs. Switch off, wait, and measure first.',
  'finding.string-over-class-two-volts.title': 'More volts than Class 2',
  'finding.string-over-class-two-volts.body':
    'The strings can carry {openVolts:V}, over the {limitVolts:V} at which Class 2 ends and bare parts may be touched. Enclose all connections, and use wiring methods for these volts.',
  'finding.string-over-selv-volts.title': 'More than extra-low voltage',
  'finding.string-over-selv-volts.body':
    'The strings can carry {openVolts:V}, over the {limitVolts:V} of extra-low voltage. Insulate, enclose and earth them as mains wiring.',
  'finding.cold-start-over-watts.title': 'Cold start over the driver’s watts',
  'finding.cold-start-over-watts.body':
    'At a cold start the strings of {sku} can take {watts:W}; it is rated {maxWatts:W}. See what its maker says of cold starts, or load it less.',
  'finding.strings-of-different-amps.title': 'Strings of different brightness',
  'finding.strings-of-different-amps.body':
    'Strings run at {lowestAmps:A} and at {highestAmps:A}: modules side by side will not look alike. Offer drivers of one current only.',
  'finding.spare-channels.title': 'Unused channels',
  'finding.spare-channels.body':
    '{spare, plural, one {One driver channel stays} other {# driver channels stay}} unused. Cap its terminals.',
  'finding.channel-over-volts.title': 'Supply too high for the channels',
  'finding.channel-over-volts.body':
    'A channel that is off sees up to {supplyVolts:V}; it stands {maxChannelVolts:V}. Use a lower supply with fewer LEDs in series.',
  'finding.channel-over-amps.title': 'More current than a channel gives',
  'finding.channel-over-amps.body':
    'A channel is set to {amps:A}; it gives {maxChannelAmps:A} at most. Set less, or join channels as its sheet says.',
  'finding.channel-tolerance-not-given.title': 'Spread of the channels not given',
  'finding.channel-tolerance-not-given.body':
    'All channels are taken to give just what is set. With their tolerance from the sheet the highest current shows.',
  'finding.one-string-too-hot.title': 'One string is too much heat',
  'finding.one-string-too-hot.body':
    'One string alone leaves {watts:W} in the package, which takes {limitWatts:W}. Put more LEDs in series, use a lower supply, or less current.',
  'finding.boards-by-heat.title': 'Heat decides the number of boards',
  'finding.boards-by-heat.body':
    'Each board has {channels} channels, but heat leaves room for fewer: {stringsPerBoard} on the fullest, {boards, plural, one {one board} other {# boards}} in all. More LEDs in series or a lower supply would save boards.',
  'finding.junction-not-checked.title': 'Chip temperature not checked',
  'finding.junction-not-checked.body':
    'Whether the chip takes {junctionCelsius:C} at its junction is not checked. Give its limit from the sheet.',
} as const;
