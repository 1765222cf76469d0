/** Findings and working steps of the lumen method, energy, money over time and lumen maintenance. */
export const lightingFindings = {
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
} as const;

export const lightingWorking = {
  'working.energy-before': 'Energy before',
  'working.energy-after': 'Energy after',
  'working.energy-net': 'Energy saved with heating and cooling',
  'working.energy-demand-cost': 'Demand charge saved',
  'working.energy-fuel-cost': 'Heating fuel that takes the place of the lights’ heat',
  'working.energy-cost': 'Money saved in a year',
  'working.energy-carbon': 'Carbon dioxide saved in a year',
} as const;
