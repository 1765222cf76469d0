/** Findings and working steps of the lumen method, energy, money over time and lumen maintenance. */
export const lightingFindings = {
  'finding.lumen-no-light.title': 'No light reaches the plane',
  'finding.lumen-no-light.body':
    'With a utilisation factor of {utilisationFactor} no number of these luminaires lights the room. The file may hold no light, or shine upwards at a dark ceiling.',
  'finding.lumen-under-target.title': 'Less light than wanted',
  'finding.lumen-under-target.body':
    '{quantity, plural, one {One luminaire gives} other {# luminaires give}} {lux:lx}; {wantedLux:lx} are wanted. It takes {neededQuantity}.',
  'finding.lumen-over-target.title': 'Far more light than wanted',
  'finding.lumen-over-target.body':
    '{quantity, plural, one {One luminaire} other {# luminaires}} of {lumens} lm give {lux:lx}; {wantedLux:lx} are wanted. Use fewer or weaker ones, or dim them.',
  'finding.lumen-layout-other-quantity.title': 'Layout of another number',
  'finding.lumen-layout-other-quantity.body':
    'Rows times columns make {inLayout} luminaires; the figures are for {quantity}.',
  'finding.lumen-spacing-too-wide.title': 'Luminaires too far apart',
  'finding.lumen-spacing-too-wide.body':
    'They hang {spacingMetres:m} apart; at this height {mostMetres:m} is the most. Use more rows or columns, or a wider beam.',
  'finding.lumen-too-few-to-space.title': 'Too few to spread evenly',
  'finding.lumen-too-few-to-space.body':
    'At most {mostMetres:m} apart the room takes {neededQuantity} luminaires; {quantity} would leave dark places. Use more, weaker ones, or a wider beam.',
  'finding.lumen-loss-factor-unusual.title': 'Unusual light loss factor',
  'finding.lumen-loss-factor-unusual.body':
    'Light loss is taken as {lightLossFactor}; from {least} in very dirty rooms to {most} in clean ones is usual. Say what it stands on.',
  'finding.lumen-utilisation-over-one.title': 'More light than the luminaires give',
  'finding.lumen-utilisation-over-one.body':
    'A utilisation factor of {utilisationFactor} holds only for large rooms with very bright surfaces. Look at the table again.',
  'finding.lumen-cavity-beyond-tables.title': 'Room beyond the tables',
  'finding.lumen-cavity-beyond-tables.body':
    'The room cavity ratio is {roomCavityRatio}; the method’s tables end at {most}. Figure it point by point.',
  'finding.lumen-file-other-lumens.title': 'Photometry of other lumens',
  'finding.lumen-file-other-lumens.body':
    'The photometry gives {fileLumens} lm, the luminaire {lumensPerLuminaire} lm. Only the shape of its light is used; see that it is the same optics.',
  'finding.lumen-power-over-allowance.title': 'More power than allowed',
  'finding.lumen-power-over-allowance.body':
    '{wattsPerSquareMetre:W/m2} are installed; {allowed:W/m2} are allowed for this space. Use fewer or more efficient luminaires.',
  'finding.energy-peak-not-counted.title': 'Peak not counted',
  'finding.energy-peak-not-counted.body':
    'The connected load falls by {demandKilowattsSaved} kW, and no demand charge is counted as saved. Say how much of it burns during the billed peak; lights outdoors at night do not.',
  'finding.energy-rate-blended.title': 'Rate holds demand charges',
  'finding.energy-rate-blended.body':
    '{energyRate} per kWh is the bill over its energy, demand charges and all, and the peak is not cut: the saving is overstated. Use the energy rate of the tariff alone.',
  'finding.energy-demand-counted-twice.title': 'Demand counted twice',
  'finding.energy-demand-counted-twice.body':
    '{energyRate} per kWh holds demand charges already, and {billedKilowatts} kW are counted on top. Use the energy rate of the tariff, or leave the demand charge out.',
  'finding.energy-interaction-not-counted.title': 'Heating and cooling not counted',
  'finding.energy-interaction-not-counted.body':
    'Lights warm the room: less light means less cooling and more heating. Neither is counted here.',
  'finding.energy-fuel-not-counted.title': 'Heating fuel not counted',
  'finding.energy-fuel-not-counted.body':
    'Each kWh saved counts {interactionFactor} times for the cooling it spares. Where fuel heats the building, give what the added heating costs.',
  'finding.energy-grows.title': 'Uses more energy than before',
  'finding.energy-grows.body':
    'The lighting goes from {kilowattHoursBefore} kWh to {kilowattHoursAfter} kWh a year. Look at counts, watts and hours again, or say why.',
  'finding.energy-control-saving-unlikely.title': 'Controls save too much',
  'finding.energy-control-saving-unlikely.body':
    'New controls are taken to save {savedPct:%}; the most that has been measured is about {mostPct:%}. Use a figure that has a source.',
  'finding.energy-hours-differ.title': 'Other hours than before',
  'finding.energy-hours-differ.body':
    'The old lights burn {hoursBefore} hours a year, the new ones {hoursAfter}. What controls save belongs into the control factor, so that it shows as such.',
  'finding.payback-incentive-covers-cost.title': 'Incentive covers the whole cost',
  'finding.payback-incentive-covers-cost.body':
    'An incentive of {incentive} stands against a cost of {cost}. Programmes seldom pay all: see what share they allow.',
  'finding.payback-no-saving.title': 'Never pays back',
  'finding.payback-no-saving.body':
    'The first year saves {firstYear}. There is no payback and no rate of return to show.',
  'finding.payback-beyond-years.title': 'Pays back too late',
  'finding.payback-beyond-years.body':
    'The job pays back after {simplePaybackYears} years; {years} are looked at.',
  'finding.payback-below-discount.title': 'Earns less than the discount rate',
  'finding.payback-below-discount.body':
    'The job pays back after {simplePaybackYears} years, and at {discountPct:%} a year its savings are still worth less than it costs.',
  'finding.payback-first-year-plain.title': 'First year not escalated',
  'finding.payback-first-year-plain.body':
    'Energy savings grow by {escalationPct:%} a year from the second year on; savings of maintenance stay the same.',
  'finding.payback-escalation-over-discount.title': 'Savings grow faster than discounted',
  'finding.payback-escalation-over-discount.body':
    'Savings grow by {escalationPct:%} a year and are discounted by {discountPct:%}, so far years count more than near ones. Use an escalation that has a source.',
  'finding.payback-no-single-rate.title': 'No single rate of return',
  'finding.payback-no-single-rate.body':
    'The yearly figures change sign {changes} times. Look at the net present value instead.',
  'finding.payback-incentive-capped.title': 'Incentive cut to its cap',
  'finding.payback-incentive-capped.body':
    '{incentive} is asked for; at {capPct:%} of the cost the programme pays {allowed}.',
  'finding.maintenance-cooler-than-tested.title': 'Cooler than tested',
  'finding.maintenance-cooler-than-tested.body':
    'At {inSituCelsius:C} the LEDs run cooler than the coolest case tested; the figures of {caseCelsius:C} stand.',
  'finding.maintenance-not-interpolated.title': 'Nothing to take between the cases',
  'finding.maintenance-not-interpolated.body':
    'One of the cases about {inSituCelsius:C} shows no decay. The figures of the hotter one, {caseCelsius:C}, stand.',
  'finding.maintenance-hotter-lasts-longer.title': 'Hotter LEDs last no shorter',
  'finding.maintenance-hotter-lasts-longer.body':
    'At {upperCelsius:C} the light falls no faster than at {lowerCelsius:C}. Ask for a longer test before you rely on what lies between.',
  'finding.maintenance-no-decay.title': 'No decay to project',
  'finding.maintenance-no-decay.body':
    'Over the hours that count of a test of {durationHours} h the light does not fall. Only the cap can be told.',
  'finding.maintenance-readings-sparse.title': 'Readings too far apart',
  'finding.maintenance-readings-sparse.body':
    'Two readings lie {gapHours} h apart; the test’s method asks for one each {mostHours} h.',
  'finding.maintenance-poor-fit.title': 'Readings do not follow the curve',
  'finding.maintenance-poor-fit.body':
    'A reading lies {residualPct:%} off the curve, and the projection hangs on it. Look at the test report.',
  'finding.maintenance-passed-in-test.title': 'Threshold passed within the test',
  'finding.maintenance-passed-in-test.body':
    'The light fell to the threshold at {passedAtHours} h, within the {durationHours} h of the test. That stands, whatever the curve says.',
  'finding.maintenance-capped.title': 'Capped by the test',
  'finding.maintenance-capped.body':
    'The curve gives {calculatedHours} h; with {units} units no more than {capTimes} times the {durationHours} h of the test may be told: {capHours} h.',
  'finding.maintenance-claim-not-supported.title': 'Claim not supported',
  'finding.maintenance-claim-not-supported.body':
    '{claimedHours} h are claimed; the test supports {reportedHours} h.',
  'finding.maintenance-of-the-leds-alone.title': 'Life of the LEDs alone',
  'finding.maintenance-of-the-leds-alone.body':
    'The LEDs keep their light for {reportedHours} h. Driver, optics and seals have a life of their own, often a shorter one.',
} as const;

export const lightingWorking = {
  'working.lumen-room-index': 'Room index',
  'working.lumen-room-cavity-ratio': 'Room cavity ratio',
  'working.lumen-utilisation-table': 'Utilisation factor from the table',
  'working.lumen-direct-ratio': 'Share of the downward light that arrives directly',
  'working.lumen-utilisation': 'Utilisation factor',
  'working.lumen-quantity-exact': 'Luminaires, exact',
  'working.lumen-lux': 'Maintained illuminance',
  'working.lumen-power-density': 'Watts a square metre',
  'working.lumen-max-spacing': 'Largest spacing',
  'working.energy-before': 'Energy before',
  'working.energy-after': 'Energy after',
  'working.energy-net': 'Energy saved with heating and cooling',
  'working.energy-demand-cost': 'Demand charge saved',
  'working.energy-fuel-cost': 'Heating fuel that takes the place of the lights’ heat',
  'working.energy-cost': 'Money saved in a year',
  'working.energy-carbon': 'Carbon dioxide saved in a year',
  'working.payback-net-cost': 'Net cost',
  'working.payback-simple': 'Simple payback',
  'working.payback-present-savings': 'Savings of all years, worth today',
  'working.payback-net-present-value': 'Net present value',
  'working.payback-internal-rate': 'Internal rate of return',
  'working.payback-savings-to-investment': 'Savings to investment',
  'working.maintenance-alpha': 'Decay per hour',
  'working.maintenance-b': 'Light at the start of the curve',
  'working.maintenance-activation': 'Activation energy over Boltzmann’s constant',
  'working.maintenance-alpha-in-use': 'Decay per hour at the temperature in use',
  'working.maintenance-b-in-use': 'Light at the start of the curve between both cases',
  'working.maintenance-calculated': 'Hours by the curve',
  'working.maintenance-cap': 'Most hours that may be told',
  'working.maintenance-reported': 'Hours that are told',
} as const;
