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
  'finding.point-no-light.title': 'No light reaches the plane',
  'finding.point-no-light.body':
    'None of the {points} points gets light from the luminaires. They may shine upwards only, or the file holds no light.',
  'finding.point-direct-only.title': 'Direct light only',
  'finding.point-direct-only.body':
    'The average of {average:lx} comes straight from the luminaires. Walls, ceiling and floor add to it; furniture takes from it.',
  'finding.point-uplight-not-counted.title': 'Uplight is left out',
  'finding.point-uplight-not-counted.body':
    '{uplightPct:%} of the light goes up and is not in these figures at all. A light ceiling gives a good part of it back.',
  'finding.point-near-field.title': 'Close to a large luminaire',
  'finding.point-near-field.body':
    'The luminaire is {openingMetres:m} long and hangs {mountingMetres:m} over the plane. Under {neededMetres:m} it is no point any more: right below it the figures are too high.',
  'finding.point-grid-coarse.title': 'Points too far apart',
  'finding.point-grid-coarse.body':
    'The points lie {stepMetres:m} apart; at this height and beam {spotMetres:m} is the most. Bright and dark spots can fall between them: choose a smaller step.',
  'finding.point-wall-band-dropped.title': 'Calculated from wall to wall',
  'finding.point-wall-band-dropped.body':
    'The room is only {metres:m} wide, too narrow to leave out a band along its walls.',
  'finding.point-under-target.title': 'Average under the target',
  'finding.point-under-target.body':
    'The luminaires alone give {average:lx}; {targetLux:lx} are wanted. See whether walls and ceiling make up for it, or add light.',
  'finding.point-over-target.title': 'Far more light than wanted',
  'finding.point-over-target.body':
    '{average:lx} come from the luminaires alone; {targetLux:lx} are wanted. Use fewer or weaker luminaires, or dim them.',
  'finding.point-under-minimum.title': 'Darkest point too dark',
  'finding.point-under-minimum.body':
    'The darkest point has {minimum:lx}; {minimumLux:lx} are the least. Move luminaires closer together or towards the walls.',
  'finding.point-uneven.title': 'Light too uneven',
  'finding.point-uneven.body':
    'Darkest point over average is {uniformity}; {minimumUniformity} is wanted. Use more, weaker luminaires closer together, or a wider beam.',
} as const;

export const photometryWorking = {
  'working.photometry-scale': 'Factor on the listed intensities',
  'working.photometry-lumens': 'Lumens by zones',
  'working.photometry-uplight': 'Share of the light above the horizontal',
  'working.photometry-beam': 'Beam angle',
  'working.photometry-efficacy': 'Efficacy',
  'working.point-grid-step': 'Largest step of the grid',
  'working.point-grid-points': 'Points',
  'working.point-brightest': 'Illuminance at the brightest point',
  'working.point-average': 'Average illuminance',
  'working.point-uniformity': 'Uniformity',
} as const;
