/** What the readings do not settle, or settle at something no LED does. */
import { atLeast, atMost, type Finding } from '@/lib/engine/contract';
import { caution, note, softStop } from '@/lib/engine/finding';
import { fieldBuilt } from './bench-work';
import { LED_LAW_BASIS } from './diode';
import type { Fit } from './led-fit';

/** From memory: Belsley, Kuh, Welsch, Regression Diagnostics (1980): scaled condition indexes over 30 are strong. */
const WORST_CONDITION = 30;
const CONDITION_BASIS = 'scaled condition index over 30 (common practice in regression)';
/** One junction: white and blue fit well above the 1 to 2 of a plain diode (common practice). */
const USUAL_EMISSION = { least: 1, most: 5 } as const;
/** What a meter of the bench reads wrong (common practice). */
const METER_SHARE = 0.01;
const PRACTICE = 'common practice';

function illConditioned({ curve, input }: Fit): Finding[] {
  if (curve === null) return [];
  const findings: Finding[] = [];
  if (!atMost(curve.conditionNumber, WORST_CONDITION))
    findings.push(
      caution(
        'fit-ill-conditioned',
        `The readings hardly tell n and the series resistance apart (condition number ${curve.conditionNumber}): add readings between, and over more of the range.`,
        { conditionNumber: curve.conditionNumber, points: input.points.length },
        CONDITION_BASIS,
      ),
    );
  if (curve.seriesOhms === 0)
    findings.push(
      caution(
        'fit-no-series-ohms',
        'The best series resistance is none at all: the LED warmed at the higher currents, or they are too low to show it.',
        { residualVolts: curve.residualVolts },
        LED_LAW_BASIS,
      ),
    );
  return findings;
}

function unusual({ input, curve, result }: Fit): Finding[] {
  const n = result.emissionCoefficient;
  if (curve === null || n === null) return [];
  const junctions = input.junctions ?? 1;
  const least = USUAL_EMISSION.least * junctions;
  const most = USUAL_EMISSION.most * junctions;
  const findings: Finding[] = [];
  if (!atLeast(n, least) || !atMost(n, most))
    findings.push(
      caution(
        'fit-unusual-emission',
        `n = ${n} is outside the ${least} to ${most} of LEDs with ${junctions} junctions in series: the LED warmed, or the package holds another number.`,
        { emissionCoefficient: n, least, most, junctions },
        PRACTICE,
      ),
    );
  const volts = input.points.reduce((sum, point) => sum + point.volts, 0) / input.points.length;
  if (!atMost(curve.residualVolts, METER_SHARE * volts))
    findings.push(
      caution(
        'fit-residual-large',
        `The readings miss the curve by ${curve.residualVolts} V, more than a meter's ${METER_SHARE * 100} %.`,
        {
          residualVolts: curve.residualVolts,
          residualMaxVolts: curve.residualMaxVolts,
          meterPct: METER_SHARE * 100,
        },
        PRACTICE,
      ),
    );
  return findings;
}

function notAnLed({ curve, result }: Fit): Finding[] {
  const failed = result.samples.filter(({ saturationAmps }) => saturationAmps === null);
  if (curve !== null && failed.length === 0) return [];
  const which = failed.flatMap(({ sample }) => sample ?? []).join(', ');
  return [
    softStop(
      'not-an-led-curve',
      `No LED's curve fits these readings${which === '' ? '' : ` (${which})`}: the volts must rise with the logarithm of the current.`,
      { samples: which === '' ? null : which },
      LED_LAW_BASIS,
    ),
  ];
}

function workingPoint({ input, result, curve }: Fit): Finding[] {
  const { workingAmps } = input;
  const findings: Finding[] = [];
  if (workingAmps === undefined) {
    if (result.samples.length > 1)
      findings.push(
        note(
          'fit-working-amps-not-given',
          'The spread of the samples is told at the working current, and none is given.',
          { samples: result.samples.length },
          PRACTICE,
        ),
      );
    return findings;
  }
  const amps = input.points.map((point) => point.amps);
  const minAmps = amps.reduce((a, b) => Math.min(a, b));
  const maxAmps = amps.reduce((a, b) => Math.max(a, b));
  if (curve !== null && (!atLeast(workingAmps, minAmps) || !atMost(workingAmps, maxAmps)))
    findings.push(
      caution(
        'fit-beyond-readings',
        `The working current of ${workingAmps} A lies outside the readings, ${minAmps} A to ${maxAmps} A.`,
        { workingAmps, minAmps, maxAmps },
        PRACTICE,
      ),
    );
  return findings;
}

export function findingsOf(fit: Fit): Finding[] {
  return [fieldBuilt(), ...notAnLed(fit), ...illConditioned(fit), ...unusual(fit), ...workingPoint(fit)];
}
