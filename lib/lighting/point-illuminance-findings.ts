/** What a reader of illuminance at points must know. */
import { atLeast, atMost, type Finding } from '@/lib/engine/contract';
import { caution, note, softStop } from '@/lib/engine/finding';
import type { Points } from './point-illuminance';

const PRACTICE = 'common practice';
const EN_12464 = 'EN 12464-1:2011, read in copies';

/** Under five times its size a luminaire is no point any more: the error is about 1 % at five times. */
const FIVE_TIMES = 5;
const UPLIGHT_PCT = 5;
/** More than this over the target is energy that nobody asked for. */
const TOO_MUCH = 1.5;

const lowest = ({ result }: Points) =>
  result.luminaires.reduce((least, { mountingMetres }) => Math.min(least, mountingMetres), Infinity);

function ofTheMethod(points: Points): Finding[] {
  const { source, grid, result } = points;
  const found = [
    note(
      'point-direct-only',
      'Only light that comes straight from the luminaires is counted: walls, ceiling and floor add to it.',
      { average: result.average },
      PRACTICE,
    ),
  ];
  const uplightPct = (source.uplightFraction ?? 0) * 100;
  if (!atMost(uplightPct, UPLIGHT_PCT))
    found.push(
      note(
        'point-uplight-not-counted',
        'The light that goes up is left out altogether.',
        { uplightPct },
        PRACTICE,
      ),
    );
  const mountingMetres = lowest(points);
  if (source.openingMetres !== null && !atLeast(mountingMetres, FIVE_TIMES * source.openingMetres))
    found.push(
      caution(
        'point-near-field',
        'The luminaire is too large for its height to count as a point: near it the figures are too high.',
        {
          mountingMetres,
          openingMetres: source.openingMetres,
          neededMetres: FIVE_TIMES * source.openingMetres,
        },
        'five-times rule of photometry (from memory)',
      ),
    );
  const spot = spotMetres(source.beamDegrees, mountingMetres);
  const step = Math.max(result.stepMetres.x, result.stepMetres.y);
  if (!atMost(step, spot))
    found.push(
      caution(
        'point-grid-coarse',
        'The points lie too far apart for this height and beam: they can miss the bright and dark spots.',
        { stepMetres: step, spotMetres: spot },
        PRACTICE,
      ),
    );
  if (grid.x.bandDropped || grid.y.bandDropped)
    found.push(
      note(
        'point-wall-band-dropped',
        'The room is too narrow to leave out a band along its walls: it is calculated from wall to wall.',
        {
          metres: Math.min(
            ...[grid.x, grid.y].filter((side) => side.bandDropped).map(({ metres }) => metres),
          ),
        },
        EN_12464,
      ),
    );
  return found;
}

/** What one step of the grid should not skip: the height, or the width of the beam on the plane. */
function spotMetres(beamDegrees: number | null, mountingMetres: number): number {
  if (beamDegrees === null || beamDegrees >= 180) return mountingMetres;
  return Math.min(mountingMetres, 2 * mountingMetres * Math.tan((beamDegrees * Math.PI) / 360));
}

function ofTheTargets({ input, result }: Points): Finding[] {
  const found: Finding[] = [];
  const { average, minimum, uniformity } = result;
  if (input.targetLux !== undefined && !atLeast(average, input.targetLux))
    found.push(
      caution(
        'point-under-target',
        'The average from the luminaires alone is under the target.',
        { average, targetLux: input.targetLux },
        PRACTICE,
      ),
    );
  if (input.targetLux !== undefined && !atMost(average, TOO_MUCH * input.targetLux))
    found.push(
      caution(
        'point-over-target',
        'The average is far over the target even without what the walls send back.',
        { average, targetLux: input.targetLux },
        PRACTICE,
      ),
    );
  if (input.minimumLux !== undefined && !atLeast(minimum, input.minimumLux))
    found.push(
      caution(
        'point-under-minimum',
        'The darkest point is under the least that is wanted.',
        { minimum, minimumLux: input.minimumLux },
        PRACTICE,
      ),
    );
  if (input.minimumUniformity !== undefined && !atLeast(uniformity ?? 0, input.minimumUniformity))
    found.push(
      caution(
        'point-uneven',
        'Darkest point over average is under the uniformity that is wanted.',
        { uniformity: uniformity ?? 0, minimumUniformity: input.minimumUniformity },
        EN_12464,
      ),
    );
  return found;
}

export function findingsOf(points: Points): Finding[] {
  const dark =
    points.result.maximum === 0
      ? [
          softStop(
            'point-no-light',
            'No light reaches any point.',
            { points: points.result.points },
            PRACTICE,
          ),
        ]
      : [];
  return [...dark, ...ofTheMethod(points), ...ofTheTargets(points), ...points.source.findings];
}
