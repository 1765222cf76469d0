/** Findings and working steps of the bench's curve fit and of dimming buses: what happened, and what to do next. */
export const benchAndBusFindings = {
  'finding.not-an-led-curve.title': 'No LED’s curve',
  'finding.not-an-led-curve.body':
    'No LED’s curve fits these readings: the volts must rise with the logarithm of the current. Look for swapped columns, a wrong unit or a resistor in the way, and measure again.',
  'finding.fit-ill-conditioned.title': 'Readings leave the figures open',
  'finding.fit-ill-conditioned.body':
    '{points} readings hardly tell the emission coefficient and the series resistance apart (condition number {conditionNumber}). The volts between the readings hold; the single figures may not. Add readings in the gaps and over more of the range.',
  'finding.fit-no-series-ohms.title': 'No series resistance found',
  'finding.fit-no-series-ohms.body':
    'The best fit has no series resistance. Either the LED warmed at the higher currents, or they are too low to show it. Measure in short pulses, or go up to the working current.',
  'finding.fit-unusual-emission.title': 'Unusual emission coefficient',
  'finding.fit-unusual-emission.body':
    'The emission coefficient is {emissionCoefficient}; LEDs with {junctions, plural, one {one junction} other {# junctions in series}} fit at {least} to {most}. The LED warmed while it was measured, or the package holds another number of junctions.',
  'finding.fit-residual-large.title': 'Readings miss the curve',
  'finding.fit-residual-large.body':
    'The readings miss the curve by {residualVolts:V}, at worst {residualMaxVolts:V}: more than a meter’s {meterPct:%}. Look for a wrong reading, a warm LED, or samples that differ.',
  'finding.fit-working-amps-not-given.title': 'Working current not given',
  'finding.fit-working-amps-not-given.body':
    'The spread of {samples} samples is told at the working current. Give the current that the LEDs will work at.',
  'finding.fit-beyond-readings.title': 'Working current outside the readings',
  'finding.fit-beyond-readings.body':
    'The working current is {workingAmps:A}; the readings go from {minAmps:A} to {maxAmps:A}. Measure up to the working current.',
  'finding.bus-current-assumed.title': 'Current of a unit taken from the standard',
  'finding.bus-current-assumed.body':
    '{names}: no current is given, so each unit counts with the {limitAmps:A} that the standard allows. Give the sheet’s figure; there are units that take more.',
  'finding.bus-unit-over-standard.title': 'Unit takes more than the standard’s',
  'finding.bus-unit-over-standard.body':
    '{name} takes {amps:A} of the control pair; the standard counts {limitAmps:A} a unit. The count here is by the sheet: fewer fit than the usual tables say.',
  'finding.bus-unit-too-much.title': 'One unit is too much',
  'finding.bus-unit-too-much.body':
    'One unit with {amps:A} is more than the {limitAmps:A} that a bus holds here. Use a larger section, a shorter run, or a control with a higher rating.',
  'finding.bus-over-current.title': 'Too many on one bus',
  'finding.bus-over-current.body':
    'All devices together take {amps:A}; the control or supply holds {ratedAmps:A}. It takes {segments} of them, each with its own pair.',
  'finding.control-under-min-current.title': 'Too little current for the control',
  'finding.control-under-min-current.body':
    'The drivers give {amps:A}; the control needs {minAmps:A} and will not dim to its lowest level. Use a control that needs less.',
  'finding.control-current-direction.title': 'Both ends do the same',
  'finding.control-current-direction.body':
    'The control and {names} both {direction} the control current. One has to source it, the other to sink it: the pair would stay at full, or at nothing. Choose a control to match.',
  'finding.bus-drop-over-limit.title': 'Too much drop on the control pair',
  'finding.bus-drop-over-limit.body':
    'The pair loses {dropVolts:V}; {limitVolts:V} are allowed, which {metresByDrop:m} would keep. Use a larger section, a shorter run, or more controls.',
  'finding.dali-over-addresses.title': 'More gear than addresses',
  'finding.dali-over-addresses.body':
    'The gear needs {addresses} addresses; a DALI bus has {most}. Split it over more buses.',
  'finding.dali-over-input-addresses.title': 'More input devices than addresses',
  'finding.dali-over-input-addresses.body':
    'The input devices need {addresses} addresses; a DALI bus has {most} for them. Split them over more buses.',
  'finding.dali-too-long.title': 'DALI bus too long',
  'finding.dali-too-long.body':
    '{metres:m} lie between the two devices farthest apart; {limitMetres:m} are allowed, whatever the section. Split the bus, or move the supply’s star point.',
  'finding.dali-supply-over-limit.title': 'Too strong a bus supply',
  'finding.dali-supply-over-limit.body':
    'The supplies can give {amps:A}; {limitAmps:A} is the most on one bus, or the devices that pull it low are harmed. Take a supply out.',
  'finding.dali-low-volts.title': 'Too few volts at the far end',
  'finding.dali-low-volts.body':
    '{farVolts:V} are left at the far end; a device needs {leastVolts:V}. Use a larger section or a shorter run.',
  'finding.dali-over-groups.title': 'More groups or scenes than a bus has',
  'finding.dali-over-groups.body':
    '{groups} groups and {scenes} scenes are wanted; a DALI bus has {mostGroups} and {mostScenes}. Split the bus, or do with fewer.',
  'finding.control-run-long.title': 'Long control pair',
  'finding.control-run-long.body':
    'No standard limits the length, but over about {limitMetres:m} makers warn of interference; this one has {metres:m}. Keep it apart from mains wiring, twist or shield it, and ask the maker.',
  'finding.no-off-at-minimum.title': 'Does not switch off',
  'finding.no-off-at-minimum.body':
    'Drivers for 1–10 V stay lit at the lowest level. Turn them off by a switch or relay in the mains.',
  'finding.dimmer-under-least-load.title': 'Too little load for the dimmer',
  'finding.dimmer-under-least-load.body':
    '{watts:W} hang on a dimmer that needs {minWatts:W}: it flickers, or glows when it is off. Choose a dimmer made for LED.',
  'finding.dimmer-least-not-given.title': 'Least load of the dimmer not given',
  'finding.dimmer-least-not-given.body':
    'Whether {watts:W} are load enough for this dimmer is not checked: an old dimmer on LED is the leading call-back. Read its least load on its sheet, and try one room first.',
  'finding.dimmer-over-most-load.title': 'Too much load for the dimmer',
  'finding.dimmer-over-most-load.body':
    '{watts:W} are connected; the dimmer carries {mostWatts:W} of LEDs. Use {segments} of them, or a larger one.',
  'finding.dimmer-led-rating-not-given.title': 'LED rating of the dimmer not given',
  'finding.dimmer-led-rating-not-given.body':
    'Most dimmers carry far fewer watts of LEDs than of lamps of the old kind. Look up the LED rating on its sheet.',
  'finding.control-separation.title': 'Keep the control pair apart',
  'finding.control-separation.body':
    'A Class 2 control pair runs apart from power conductors: not in their raceway, cable or box. Or it is reclassified, and wired as Class 1 all the way.',
  'finding.control-with-power.title': 'Control pair beside power',
  'finding.control-with-power.body':
    'A Class 2 control pair must not share a raceway, cable or box with power conductors. Run it apart, or reclassify it and wire it as Class 1 all the way.',
  'finding.control-as-class-1.title': 'Control pair as Class 1',
  'finding.control-as-class-1.body':
    'Reclassified as Class 1: wiring methods, insulation and boxes of Class 1 all the way, and the Class 2 marking taken off the equipment.',
  'finding.bus-not-selv.title': 'The control pair is not SELV',
  'finding.bus-not-selv.body':
    'Unless the sheet of every device says otherwise, the pair has basic insulation from the mains only. Insulate and enclose it as mains wiring, and isolate the mains before touching it.',
} as const;

export const benchAndBusWorking = {
  'working.fit-thermal-volts': 'Thermal voltage while measuring',
  'working.fit-emission': 'Emission coefficient',
  'working.fit-saturation-amps': 'Saturation current',
  'working.fit-series-ohms': 'Series resistance',
  'working.fit-residual': 'How far the readings miss the curve',
  'working.fit-working-volts': 'Forward volts at the working current',
  'working.fit-spread': 'Standard deviation of the samples',
  'working.bus-amps': 'Current of all devices on the pair',
  'working.bus-drop': 'Volts lost over both conductors',
  'working.bus-error': 'Error of the level at the far end',
  'working.bus-metres-by-drop': 'Longest pair that keeps the drop',
  'working.bus-units-alone': 'Most of the first device alone on one bus',
  'working.bus-segments': 'Buses or dimmers that it takes',
  'working.dimmer-watts': 'Watts behind the dimmer',
  'working.dimmer-most-watts': 'Watts of LEDs that the dimmer carries',
} as const;
