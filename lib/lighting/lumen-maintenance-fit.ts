/** Least squares through one series of readings, as TM-21 takes them. */
import { atLeast, atMost, refuse } from '@/lib/engine/contract';

export interface Reading {
  hours: number;
  /** Share of the light at the start. */
  maintenance: number;
}

export interface Fit {
  /** Per hour. */
  alpha: number;
  b: number;
  durationHours: number;
  used: readonly Reading[];
  /** Largest distance of a used reading from the curve, as a share. */
  residual: number;
  readings: readonly Reading[];
}

export const LEAST_HOURS = 6000;
/** Light still settles before. */
const SETTLED_HOURS = 1000;
/** Up to this duration the last 5,000 h count, beyond it the last half. */
const SHORT_TEST_HOURS = 10_000;
const LAST_HOURS = 5000;
/** How far a reading may stand from its nominal hour. */
export const TOLERANCE_HOURS = 48;
/** A slope that changes the light by less over the whole test is rounding. */
const NO_SLOPE = 1e-12;

function checked(readings: readonly Reading[], path: string): number {
  const back = readings.findIndex(({ hours }, k) => k > 0 && hours <= (readings[k - 1]?.hours ?? 0));
  if (back > 0) refuse(`${path}.${back}.hours`, 'must be later than the reading before');
  const durationHours = readings.at(-1)?.hours ?? 0;
  if (!atLeast(durationHours, LEAST_HOURS))
    refuse(path, 'must reach 6,000 h at least: TM-21 projects nothing from a shorter test');
  return durationHours;
}

/** Straight line through ln(maintenance) over hours, figured from the middle so that no digits are lost. */
function line(used: readonly Reading[]): { alpha: number; b: number } {
  const mean = (of: (one: Reading) => number) => used.reduce((sum, one) => sum + of(one), 0) / used.length;
  const middleHours = mean(({ hours }) => hours);
  const middleLn = mean(({ maintenance }) => Math.log(maintenance));
  const over = used.reduce(
    (sum, { hours, maintenance }) => sum + (hours - middleHours) * (Math.log(maintenance) - middleLn),
    0,
  );
  const under = used.reduce((sum, { hours }) => sum + (hours - middleHours) ** 2, 0);
  const slope = over / under;
  const alpha = Math.abs(slope) * (used.at(-1)?.hours ?? 0) <= NO_SLOPE ? 0 : -slope;
  return { alpha, b: Math.exp(middleLn + alpha * middleHours) };
}

/**
 * alpha and b of maintenance = b * exp(-alpha * hours) through the readings that count.
 * @throws {EngineError} `invalid-input` on `path`: not ascending, under 6,000 h, under two readings that count
 */
export function fitOf(readings: readonly Reading[], path: string): Fit {
  const durationHours = checked(readings, path);
  const last = atMost(durationHours, SHORT_TEST_HOURS) ? LAST_HOURS : durationHours / 2;
  const from = Math.max(SETTLED_HOURS, durationHours - last) - TOLERANCE_HOURS;
  const used = readings.filter(({ hours }) => atLeast(hours, from));
  if (used.length < 2) refuse(path, 'needs at least two readings in the hours that count');
  const { alpha, b } = line(used);
  const residual = used.reduce(
    (most, { hours, maintenance }) =>
      Math.max(most, Math.abs(maintenance / (b * Math.exp(-alpha * hours)) - 1)),
    0,
  );
  return { alpha, b, durationHours, used, residual, readings };
}

/** Hours at which the readings pass the threshold, on a line between two of them; null if they do not. */
export function passedAt(readings: readonly Reading[], threshold: number): number | null {
  const k = readings.findIndex(({ maintenance }) => atMost(maintenance, threshold));
  const at = readings[k];
  if (at === undefined) return null;
  const before = readings[k - 1];
  if (before === undefined) return at.hours;
  const share = (before.maintenance - threshold) / (before.maintenance - at.maintenance);
  return before.hours + Math.min(1, share) * (at.hours - before.hours);
}
