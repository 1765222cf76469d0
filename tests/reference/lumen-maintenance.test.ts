/**
 * TM-21 against its published example and others (data/lighting/lumen-maintenance.json: source and provenance beside
 * each).
 */
import { expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { lumenMaintenanceCalculation, type LumenMaintenanceInput } from '@/lib/lighting/lumen-maintenance';
import entries from './data/lighting/lumen-maintenance.json';

const figures = (id: string) => {
  const found = entries.find((one) => one.id === id);
  if (!found) throw new Error(`no entry ${id}`);
  return { ...found.inputs, ...found.expected } as unknown as Record<string, number> & {
    hours: number[];
    avg_lumen_maintenance: number[];
    samples: number;
    L70_reported: string;
    L90_reported: string;
  };
};
const run = (input: Partial<LumenMaintenanceInput>) =>
  runCalculation(lumenMaintenanceCalculation, { sampleSize: 20, threshold: 0.7, ...input });
const relative = (got: number | null, want: number | undefined, tolerance: number) =>
  expect(Math.abs((got ?? NaN) / (want ?? NaN) - 1), `${got} against ${want}`).toBeLessThanOrEqual(tolerance);
const pointsOf = ({
  hours,
  avg_lumen_maintenance: all,
}: {
  hours: number[];
  avg_lumen_maintenance: number[];
}) => hours.map((at, k) => ({ hours: at, maintenance: all[k] ?? NaN }));
/** Readings that lie on a curve: for entries that print the curve alone. */
const onCurve = (alpha: number, b: number, to: number) =>
  Array.from({ length: to / 1000 + 1 }, (_, k) => ({
    hours: k * 1000,
    maintenance: b * Math.exp(-alpha * k * 1000),
  }));

it('TM-01: 20 samples over 6,000 h', () => {
  const of = figures('TM-01');
  const { result, working } = run({ points: pointsOf(of), sampleSize: of.samples });
  relative(result.alpha, of.alpha, 0.001);
  expect(Math.abs(result.b - (of.B ?? NaN))).toBeLessThanOrEqual(0.0001);
  relative(result.calculatedHours, of.L70_calculated_h, 0.003);
  expect(result).toMatchObject({ reportedHours: 36_000, capped: true, notation: of.L70_reported });
  const from = working
    .find(({ key }) => key === 'maintenance-alpha')
    ?.inputs.find(({ name }) => name === 'from');
  expect(from?.value).toBe(of.points_used_from_h);
});

it('TM-02: the published interpolation between 55 and 85 °C', () => {
  const of = figures('TM-02');
  const to = of.duration_h ?? NaN;
  const { result, working } = run({
    cases: [
      { caseCelsius: of.T1_C ?? NaN, points: onCurve(of.alpha1 ?? NaN, of.B1 ?? NaN, to) },
      { caseCelsius: of.T2_C ?? NaN, points: onCurve(of.alpha2 ?? NaN, of.B2 ?? NaN, to) },
    ],
    inSituCelsius: of.T_insitu_C,
  } as Partial<LumenMaintenanceInput>);
  expect(Math.abs((result.activationKelvin ?? NaN) - (of.Ea_over_k ?? NaN))).toBeLessThanOrEqual(1);
  relative(result.alpha, of.alpha_insitu, 0.001);
  expect(Math.abs(result.b - (of.B0 ?? NaN))).toBeLessThanOrEqual(0.0001);
  relative(result.calculatedHours, of.L70_projected_h, 0.001);
  expect(result.notation).toBe(of.L70_reported);
  expect(working.map(({ key }) => key)).toContain('maintenance-activation');
});

it('TM-04: an exact exponential over 9,000 h', () => {
  const of = figures('TM-04');
  const at = (threshold: number) => run({ points: pointsOf(of), sampleSize: of.samples, threshold }).result;
  relative(at(0.7).alpha, of.alpha, 1e-6);
  relative(at(0.7).b, of.B, 1e-6);
  relative(at(0.7).calculatedHours, of.L70_calculated_h, 2e-5);
  relative(at(0.8).calculatedHours, of.L80_h, 2e-5);
  relative(at(0.9).calculatedHours, of.L90_h, 5e-5);
  expect(at(0.7).notation).toBe(of.L70_reported);
  expect(at(0.9).notation).toBe(of.L90_reported);
});

it('TM-05: hours by the curve', () => {
  const of = figures('TM-05');
  const { result } = run({ points: onCurve(of.alpha ?? NaN, of.B ?? NaN, 12_000), threshold: of.Lp ?? NaN });
  expect(Math.abs((result.calculatedHours ?? NaN) - (of.Lp_h ?? NaN))).toBeLessThanOrEqual(1);
});

it('TM-06: 100,000 h are not supported by a test of 10,000 h', () => {
  const of = figures('TM-06');
  const { result, findings } = run({
    points: onCurve(1e-6, 1, of.LM80_duration_h ?? NaN),
    claimedHours: of.claim_h ?? NaN,
  });
  expect(result.reportedHours).toBe(of.max_supported_h);
  expect(findings.map(({ code }) => code)).toContain('maintenance-claim-not-supported');
});
