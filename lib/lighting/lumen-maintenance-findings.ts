/** What a reader of a lumen maintenance projection must know. */
import { atMost, type Finding } from '@/lib/engine/contract';
import { caution, note } from '@/lib/engine/finding';
import type { Projection } from './lumen-maintenance';
import { TOLERANCE_HOURS } from './lumen-maintenance-fit';

const TM_21 = 'IES TM-21-11 with Addendum B, read in copies';
const LM_80 = 'IES LM-80 (a reading each 1,000 h), from memory';
const POSITION = 'IES PS-10-18';
const PRACTICE = 'common practice';

const LM_80_HOURS = 1000;
/** Readings of averages lie closer to their curve than 1 %. */
const FAR_OFF = 0.01;

function ofTheCurve({ curve, input }: Projection): Finding[] {
  const found: Finding[] = [];
  const inSituCelsius = input.inSituCelsius ?? null;
  if (curve.standIn === 'cooler-than-tested')
    found.push(
      note(
        'maintenance-cooler-than-tested',
        'The LEDs run cooler than the coolest case tested; its figures stand.',
        { inSituCelsius, caseCelsius: curve.caseCelsius },
        TM_21,
      ),
    );
  if (curve.standIn === 'no-decay')
    found.push(
      caution(
        'maintenance-not-interpolated',
        'One of the two cases shows no decay, so nothing lies between them; the hotter one’s figures stand.',
        { inSituCelsius, caseCelsius: curve.caseCelsius },
        TM_21,
      ),
    );
  if (curve.between && curve.between.activationKelvin <= 0)
    found.push(
      caution(
        'maintenance-hotter-lasts-longer',
        'The hotter case decays no faster than the cooler one: the test says little about temperature.',
        { lowerCelsius: curve.between.lowerCelsius, upperCelsius: curve.between.upperCelsius },
        PRACTICE,
      ),
    );
  if (!(curve.alpha > 0))
    found.push(
      caution(
        'maintenance-no-decay',
        'The light does not fall over the hours that count: no life can be figured, only the cap told.',
        { durationHours: curve.durationHours },
        TM_21,
      ),
    );
  return found;
}

function ofTheReadings({ curve }: Projection): Finding[] {
  const found: Finding[] = [];
  const gap = curve.fits
    .flatMap(({ used }) => used.slice(1).map(({ hours }, k) => hours - (used[k]?.hours ?? 0)))
    .reduce((most, one) => Math.max(most, one), 0);
  if (!atMost(gap, LM_80_HOURS + 2 * TOLERANCE_HOURS))
    found.push(
      caution(
        'maintenance-readings-sparse',
        'The readings lie further apart than the test’s method asks.',
        { gapHours: gap, mostHours: LM_80_HOURS },
        LM_80,
      ),
    );
  const residual = curve.fits.reduce((most, fit) => Math.max(most, fit.residual), 0);
  if (!atMost(residual, FAR_OFF))
    found.push(
      caution(
        'maintenance-poor-fit',
        'A reading lies far from the curve: the projection hangs on it.',
        { residualPct: residual * 100 },
        PRACTICE,
      ),
    );
  return found;
}

function ofTheFigure({ input, capTimes, result }: Projection): Finding[] {
  const found: Finding[] = [];
  const { reportedHours, calculatedHours, durationHours } = result;
  if (result.passedAtHours !== null)
    found.push(
      caution(
        'maintenance-passed-in-test',
        'The light fell to the threshold within the test: that reading stands, not the projection.',
        { passedAtHours: result.passedAtHours, durationHours },
        TM_21,
      ),
    );
  if (result.capped)
    found.push(
      note(
        'maintenance-capped',
        'More hours than a multiple of the test may not be told.',
        { calculatedHours, capHours: result.capHours, capTimes, durationHours, units: input.sampleSize },
        TM_21,
      ),
    );
  if (input.claimedHours !== undefined && !atMost(input.claimedHours, reportedHours))
    found.push(
      caution(
        'maintenance-claim-not-supported',
        'The hours that are claimed are more than the test supports.',
        { claimedHours: input.claimedHours, reportedHours },
        POSITION,
      ),
    );
  found.push(
    note(
      'maintenance-of-the-leds-alone',
      'These are the LEDs’ hours. Driver, optics and seals have a life of their own, often a shorter one.',
      { reportedHours },
      POSITION,
    ),
  );
  return found;
}

export const findingsOf = (projection: Projection): Finding[] => [
  ...ofTheCurve(projection),
  ...ofTheReadings(projection),
  ...ofTheFigure(projection),
];
