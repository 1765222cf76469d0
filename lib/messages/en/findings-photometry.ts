/** Findings and working steps of photometric files and of illuminance at points: what happened, and what to do next. */
export const photometryFindings = {
  'finding.photometry-no-light.title': 'File without light',
  'finding.photometry-no-light.body': 'All intensities of the file are zero. Ask for the file again.',
  'finding.photometry-uplight.title': 'Part of the light goes up',
  'finding.photometry-uplight.body':
    '{uplightPct:%} of the light goes up and reaches the work by the ceiling alone. Under an open or dark ceiling it is lost.',
  'finding.photometry-coarse-angles.title': 'Angles too far apart',
  'finding.photometry-coarse-angles.body':
    'Depending on how the gaps between the angles are filled, the file gives {totalLumens} lm or {linearLumens} lm: {differencePct:%} apart. Ask for a file with smaller steps.',
  'finding.photometry-poles-disagree.title': 'Planes disagree straight down or up',
  'finding.photometry-poles-disagree.body':
    'Straight down and straight up are one direction in all planes, and the file gives figures for it that differ by {spreadPct:%} of the peak. The file is damaged, or was not measured.',
  'finding.photometry-edition-unknown.title': 'Edition of the file not known',
  'finding.photometry-edition-unknown.body':
    'The first line says {edition}. The file was read as LM-63-2002; compare the lumens with the sheet.',
  'finding.photometry-keywords-missing.title': 'Required keywords missing',
  'finding.photometry-keywords-missing.body':
    '{names}: the file does not say, though its edition requires it. Who measured the luminaire, and when, is open.',
  'finding.photometry-reserved-factor.title': 'Factor in a reserved field',
  'finding.photometry-reserved-factor.body':
    'The field kept for future use holds {factor}. It was applied to all intensities, as the edition of 1995 does; compare the lumens with the sheet.',
  'finding.photometry-tilt-block.title': 'Light depends on tilt',
  'finding.photometry-tilt-block.body':
    'The file lists factors for {angles, plural, one {one angle} other {# angles}} of tilt. The figures hold for the luminaire as it was measured; tilted, it gives more or less.',
  'finding.photometry-lamp-sets.title': 'Several sets of lamps in the file',
  'finding.photometry-lamp-sets.body':
    'The file holds {lampSets} sets of lamps; lumens, watts and intensities are for set {lampSet}. Choose the one that is installed.',
  'finding.photometry-more-than-lamps.title': 'More light than the lamps give',
  'finding.photometry-more-than-lamps.body':
    'The intensities add up to {totalLumens} lm, and the lamps give {lampLumens} lm: {ratioPct:%}. Multiplier or lamp lumens of the file are wrong.',
  'finding.photometry-stated-differs.title': 'Stated share differs',
  'finding.photometry-stated-differs.body':
    '{field} is stated as {statedPct:%}; the intensities of the file give {pct:%}. Compare with the sheet before you rely on it.',
  'finding.photometry-no-watts.title': 'No watts in the file',
  'finding.photometry-no-watts.body':
    'The file gives no input watts, so no efficacy can be told. Take the watts from the sheet.',
  'finding.photometry-efficacy-unlikely.title': 'Efficacy too good to be true',
  'finding.photometry-efficacy-unlikely.body':
    '{efficacy} lm/W is more than white light reaches (about {most}). Watts or multiplier of the file are wrong.',
} as const;

export const photometryWorking = {
  'working.photometry-scale': 'Factor on the listed intensities',
  'working.photometry-lumens': 'Lumens by zones',
  'working.photometry-uplight': 'Share of the light above the horizontal',
  'working.photometry-beam': 'Beam angle',
  'working.photometry-efficacy': 'Efficacy',
} as const;
