/** 21. How long an LED keeps its light, by TM-21 from the readings of an LM-80 test. */
import * as z from 'zod/mini';
import { atMost, defineCalculation, type Outcome, refuse } from '@/lib/engine/contract';
import { type Curve, curveAt, ownCurve } from './lumen-maintenance-cases';
import { findingsOf } from './lumen-maintenance-findings';
import { fitOf, passedAt, TOLERANCE_HOURS } from './lumen-maintenance-fit';
import { workingOf } from './lumen-maintenance-working';

/** Times the test's hours that may be told, by units tested. */
const CAP = { many: 6, few: 5.5, manyFrom: 20 } as const;

const points = z
  .array(
    z.strictObject({
      hours: z
        .number()
        .check(z.nonnegative('must not be negative'), z.maximum(1_000_000, 'must be at most 1,000,000')),
      maintenance: z
        .number()
        .check(
          z.positive('must be greater than zero'),
          z.maximum(1.5, 'must be at most 1.5: a share of the first light, 0.97 rather than 97'),
        ),
    }),
  )
  .check(z.minLength(2, 'needs at least two readings'), z.maxLength(1000, 'takes at most 1,000 readings'));
const celsius = z
  .number()
  .check(z.minimum(-60, 'must be at least -60'), z.maximum(250, 'must be at most 250'));

const schema = z.strictObject({
  /** One series of readings: the average of all units at each hour. */
  points: z.optional(points),
  /** Or one series for each case temperature of the test, and the temperature in use. */
  cases: z.optional(
    z
      .array(z.strictObject({ caseCelsius: celsius, points }))
      .check(z.minLength(1, 'needs at least one case'), z.maxLength(20, 'takes at most 20 cases')),
  ),
  inSituCelsius: z.optional(celsius),
  /** Units tested; of the smaller series where they differ. */
  sampleSize: z
    .number()
    .check(
      z.int('must be a whole number'),
      z.minimum(10, 'must be at least 10: TM-21 projects nothing from fewer units'),
      z.maximum(100_000, 'must be at most 100,000'),
    ),
  /** Share of the first light: 0.7 for L70. */
  threshold: z.number().check(z.positive('must be greater than zero'), z.lt(1, 'must be under 1')),
  /** What a sheet claims, to be compared. */
  claimedHours: z.optional(z.number().check(z.nonnegative('must not be negative'))),
});

export type LumenMaintenanceInput = z.infer<typeof schema>;

export interface LumenMaintenance {
  /** Decay per hour. */
  alpha: number;
  b: number;
  /** ln(b / threshold) / alpha, not under 0; null without decay. */
  calculatedHours: number | null;
  /** What may be told: capped by the test's hours, or read within the test. */
  reportedHours: number;
  capped: boolean;
  durationHours: number;
  capHours: number;
  /** Hours at which the readings themselves pass the threshold; null if they do not. */
  passedAtHours: number | null;
  /** As sheets write it: "L70(6k) > 36000". */
  notation: string;
  /** Between two cases; null where one series stands for itself. */
  activationKelvin: number | null;
}

/** A projection with what its findings and working read. */
export interface Projection {
  input: LumenMaintenanceInput;
  curve: Curve;
  capTimes: number;
  result: LumenMaintenance;
}

function curveOf({ points: one, cases, inSituCelsius }: LumenMaintenanceInput): Curve {
  if (one !== undefined && cases !== undefined) refuse('cases', 'must not stand beside points: give one');
  if (one !== undefined) {
    if (inSituCelsius !== undefined) refuse('inSituCelsius', 'needs cases with their temperatures');
    return ownCurve(fitOf(one, 'points'), null);
  }
  if (cases === undefined) return refuse('points', 'is missing; or give cases');
  if (inSituCelsius === undefined) return refuse('inSituCelsius', 'is missing');
  return curveAt(cases, inSituCelsius);
}

/** Three significant digits, thousands of test hours that were completed. */
function notationOf(threshold: number, durationHours: number, hours: number, capped: boolean): string {
  const percent = Number((threshold * 100).toFixed(1));
  const thousands = Math.floor((durationHours + TOLERANCE_HOURS) / 1000);
  return `L${percent}(${thousands}k) ${capped ? '>' : '='} ${Number(hours.toPrecision(3))}`;
}

/**
 * maintenance = b * exp(-alpha * hours) by least squares on its logarithm, over the last 5,000 h of a test up to
 * 10,000 h, over its last half beyond; readings before 1,000 h are left out (an hour's tolerance is 48 h). Between two
 * case temperatures alpha follows Arrhenius and b is the root of the product.
 * @param input readings as shares of the first light, ascending in hours; degrees Celsius
 * @returns alpha per hour, hours; calculatedHours null where the light does not fall
 * @throws {EngineError} `invalid-input` on `points…`, `cases…`, `inSituCelsius`, `sampleSize` (under 10)
 * Source: IES TM-21-11 with Addendum B (2015) and the US DOE webinar on LM-80 and TM-21 (2011), read in copies; last
 * half and ten units from memory.
 */
export function lumenMaintenance(input: LumenMaintenanceInput): Projection {
  const { sampleSize, threshold } = input;
  const curve = curveOf(input);
  const { alpha, b, durationHours } = curve;
  const capTimes = sampleSize >= CAP.manyFrom ? CAP.many : CAP.few;
  const capHours = capTimes * durationHours;
  const calculatedHours = alpha > 0 ? Math.max(0, Math.log(b / threshold) / alpha) : null;
  const own = curve.between === null ? curve.fits[0] : undefined;
  const passedAtHours = own ? passedAt(own.readings, threshold) : null;
  // Light that is still above the threshold when the test ends has lasted that long, whatever the curve says.
  const projected = calculatedHours === null ? null : Math.max(calculatedHours, own ? durationHours : 0);
  const capped = passedAtHours === null && (projected === null || !atMost(projected, capHours));
  const reportedHours = passedAtHours ?? (capped || projected === null ? capHours : projected);
  const result: LumenMaintenance = {
    alpha,
    b,
    calculatedHours,
    reportedHours,
    capped,
    durationHours,
    capHours,
    passedAtHours,
    notation: notationOf(threshold, durationHours, reportedHours, capped),
    activationKelvin: curve.between?.activationKelvin ?? null,
  };
  return { input, curve, capTimes, result };
}

export const lumenMaintenanceCalculation = defineCalculation({
  name: 'lumen-maintenance',
  summary: 'Hours until LEDs have fallen to a share of their light: TM-21 from LM-80 readings',
  bench: false,
  schema,
  calculate: (input): Outcome<LumenMaintenance> => {
    const projection = lumenMaintenance(input);
    return {
      result: projection.result,
      findings: findingsOf(projection),
      working: workingOf(projection),
    };
  },
});
