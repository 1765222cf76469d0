/** Findings by their code: what happened, and what to do next. Every code has `.title` and `.body`. */
export const findings = {
  'finding.flexible-as-stranded.title': 'Flexible taken as stranded',
  'finding.flexible-as-stranded.body':
    'The US tables list no flexible conductor of {size}; the stranded row is used. Check the maker’s figure.',
  'finding.drop-exceeds-supply.title': 'More drop than supply',
  'finding.drop-exceeds-supply.body':
    'This current would lose {dropVolts:V} of {volts:V}: it can not flow. Use a larger cable or a shorter run.',
} as const;
