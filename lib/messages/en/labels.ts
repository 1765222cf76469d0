/** What must stay written in a luminaire that has been changed. */
export const labels = {
  'label.no-fluorescent': 'Modified for LED. Do not fit fluorescent lamps.',
  'label.line-volts': 'The lampholders carry {supplyVolts:V}.',
  'label.fed-single': 'Line and neutral at one end only: the end that is marked.',
  'label.fed-double': 'Line at one end, neutral at the other.',
  'label.replace-with':
    'Replace only with Type {tubeType} tubes rated for {ratedVoltsMin:V} to {ratedVoltsMax:V}.',
  'label.driver-fed': 'The lampholders are fed by an LED driver: fit Type C tubes of this driver only.',
  'label.ballast-fed': 'LED tubes of Type {tubeType} on the ballast.',
  'label.kit': 'LED retrofit kit fitted: parts only as its own label says.',
  'label.second-supply':
    'More than one supply: an unswitched emergency feed stays live when the switch is off.',
  'label.modified-by': 'Modified by (name) on (date).',
} as const;
