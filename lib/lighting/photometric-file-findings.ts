/** What a reader of a photometric file must know. */
import { atMost, type Finding } from '@/lib/engine/contract';
import { caution, note, softStop } from '@/lib/engine/finding';
import type { Photometry } from './photometric-file';

const LM63 = 'ANSI/IESNA LM-63-02, read in a copy';
const EULUMDAT = 'EULUMDAT (1990), read in copies';
const PRACTICE = 'common practice';
const GEOMETRY = 'a direction has one intensity (geometry)';

/** Two ways of drawing the line between listed angles differ by more: the angles are too far apart for the beam. */
const COARSE_PCT = 1;
const UPLIGHT_PCT = 5;
/** Rounding of the file's figures. */
const SAME_DIRECTION_PCT = 1;
const STATED_POINTS = 2;
/** White light of good colour hardly reaches it (common practice). */
const MOST_EFFICACY = 250;

type Figures = Omit<Photometry, 'findings'>;

/** Largest difference between figures for one and the same direction, in percent of the peak. */
function sameDirectionPct({ distribution: { vertical, candela }, peak }: Figures): number {
  if (peak.candela === 0) return 0;
  const last = vertical.length - 1;
  const poles = [
    ...(vertical[0] === 0 ? [candela.map((plane) => plane[0] ?? 0)] : []),
    ...(vertical[last] === 180 ? [candela.map((plane) => plane[last] ?? 0)] : []),
  ];
  const spread = (all: number[]) => {
    const [low, high] = all.reduce<[number, number]>(
      ([least, most], one) => [Math.min(least, one), Math.max(most, one)],
      [Infinity, 0],
    );
    return high - low;
  };
  return (poles.reduce((most, all) => Math.max(most, spread(all)), 0) / peak.candela) * 100;
}

function ofTheFile({ read: { header, remarks } }: Figures): Finding[] {
  const found: Finding[] = [];
  if (remarks.unknownEdition)
    found.push(
      caution(
        'photometry-edition-unknown',
        'The first line names an edition of LM-63 that is not known here; it was read as 2002.',
        { edition: header.edition },
        LM63,
      ),
    );
  if (remarks.missingKeywords)
    found.push(
      note(
        'photometry-keywords-missing',
        'Keywords that the edition requires are missing.',
        { names: remarks.missingKeywords.join(', ') },
        LM63,
      ),
    );
  if (header.edition === '2002' && header.format === 'lm-63' && header.ballastLampFactor !== 1)
    found.push(
      caution(
        'photometry-reserved-factor',
        'The field that LM-63-2002 keeps for future use is not 1; it was applied as the ballast-lamp factor of 1995.',
        { factor: header.ballastLampFactor },
        'LM-63-2002 (from memory)',
      ),
    );
  if (header.tilt)
    found.push(
      note(
        'photometry-tilt-block',
        'The lamp’s output changes with tilt; the figures hold for the luminaire as it was measured.',
        { angles: header.tilt.angles.length },
        LM63,
      ),
    );
  if (remarks.lampSets !== undefined)
    found.push(
      caution(
        'photometry-lamp-sets',
        'The file holds several sets of lamps; the figures are for one of them.',
        { lampSets: remarks.lampSets, lampSet: remarks.lampSet ?? 1 },
        EULUMDAT,
      ),
    );
  return found;
}

function ofTheStated({ read: { header }, result, flux }: Figures): Finding[] {
  const found: Finding[] = [];
  const ratio = result.header.lightOutputRatio;
  if (ratio !== null && !atMost(ratio, 1.01))
    found.push(
      caution(
        'photometry-more-than-lamps',
        'More light leaves the luminaire than its lamps give.',
        { ratioPct: ratio * 100, totalLumens: result.totalLumens, lampLumens: header.lampLumens },
        'conservation of energy',
      ),
    );
  const down = result.uplightFraction === null ? null : (1 - result.uplightFraction) * 100;
  const own = header.lampLumens ?? flux.totalLumens;
  const compared: [string, number | null, number | null][] = [
    ['LORL', header.statedOutputRatio, own > 0 && !header.absolute ? (flux.totalLumens / own) * 100 : null],
    ['DFF', header.statedDownwardFraction, down],
  ];
  for (const [field, stated, pct] of compared)
    if (stated !== null && pct !== null && !atMost(Math.abs(stated * 100 - pct), STATED_POINTS))
      found.push(
        caution(
          'photometry-stated-differs',
          'A share that the file states is not the one of its intensities.',
          { field, statedPct: stated * 100, pct },
          EULUMDAT,
        ),
      );
  return found;
}

function ofTheLight(figures: Figures): Finding[] {
  const { result, flux } = figures;
  const found: Finding[] = [];
  if (flux.totalLumens === 0)
    return [softStop('photometry-no-light', 'All intensities of the file are zero.', {}, LM63)];
  const uplightPct = (result.uplightFraction ?? 0) * 100;
  if (!atMost(uplightPct, UPLIGHT_PCT))
    found.push(
      note(
        'photometry-uplight',
        'Part of the light goes up: it reaches the work by the ceiling alone.',
        { uplightPct },
        PRACTICE,
      ),
    );
  const differencePct = (Math.abs(flux.linearLumens - flux.totalLumens) / flux.totalLumens) * 100;
  if (!atMost(differencePct, COARSE_PCT))
    found.push(
      caution(
        'photometry-coarse-angles',
        'The angles are too far apart for this beam: the lumens depend on how the gaps are filled.',
        { differencePct, totalLumens: flux.totalLumens, linearLumens: flux.linearLumens },
        PRACTICE,
      ),
    );
  const spreadPct = sameDirectionPct(figures);
  if (!atMost(spreadPct, SAME_DIRECTION_PCT))
    found.push(
      caution(
        'photometry-poles-disagree',
        'The planes give different figures for straight down or straight up.',
        { spreadPct },
        GEOMETRY,
      ),
    );
  return found;
}

function ofTheWatts({ result }: Figures): Finding[] {
  if (result.wattsInput === 0)
    return [caution('photometry-no-watts', 'The file gives no watts: no efficacy can be told.', {}, LM63)];
  if (result.efficacy === null || atMost(result.efficacy, MOST_EFFICACY)) return [];
  return [
    caution(
      'photometry-efficacy-unlikely',
      'More lumens per watt than white light reaches: watts or multiplier are wrong.',
      { efficacy: result.efficacy, most: MOST_EFFICACY },
      PRACTICE,
    ),
  ];
}

export const findingsOf = (figures: Figures): Finding[] => [
  ...ofTheLight(figures),
  ...ofTheFile(figures),
  ...ofTheStated(figures),
  ...ofTheWatts(figures),
];
