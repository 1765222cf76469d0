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
} as const;

export const benchAndBusWorking = {
  'working.fit-thermal-volts': 'Thermal voltage while measuring',
  'working.fit-emission': 'Emission coefficient',
  'working.fit-saturation-amps': 'Saturation current',
  'working.fit-series-ohms': 'Series resistance',
  'working.fit-residual': 'How far the readings miss the curve',
  'working.fit-working-volts': 'Forward volts at the working current',
  'working.fit-spread': 'Standard deviation of the samples',
} as const;
