/** The curve at the temperature in use, from tests at two case temperatures. */
import { atMost, refuse } from '@/lib/engine/contract';
import { type Fit, fitOf, type Reading } from './lumen-maintenance-fit';

const KELVIN = 273.15;

export interface Case {
  caseCelsius: number;
  points: readonly Reading[];
}

export interface Between {
  lowerCelsius: number;
  upperCelsius: number;
  /** Activation energy over Boltzmann's constant. */
  activationKelvin: number;
  /** Per hour. */
  preExponential: number;
}

export interface Curve {
  alpha: number;
  b: number;
  durationHours: number;
  /** The series behind the curve; two where it lies between them. */
  fits: readonly Fit[];
  between: Between | null;
  /** Why a case's own curve stands in for the temperature in use; null where none does. */
  standIn: 'cooler-than-tested' | 'no-decay' | null;
  caseCelsius: number | null;
}

export const ownCurve = (fit: Fit, caseCelsius: number | null, standIn: Curve['standIn'] = null): Curve => ({
  alpha: fit.alpha,
  b: fit.b,
  durationHours: fit.durationHours,
  fits: [fit],
  between: null,
  standIn,
  caseCelsius,
});

interface Tested {
  caseCelsius: number;
  fit: Fit;
}

/** alpha = A * exp(-(Ea/k) / T) through both cases; b = sqrt(b1 * b2). */
function arrhenius(lower: Tested, upper: Tested, celsius: number): Curve {
  const [cold, hot] = [lower.caseCelsius + KELVIN, upper.caseCelsius + KELVIN];
  const activationKelvin = Math.log(upper.fit.alpha / lower.fit.alpha) / (1 / cold - 1 / hot);
  const preExponential = lower.fit.alpha * Math.exp(activationKelvin / cold);
  return {
    // From the cooler case: A itself can leave the range of numbers where the cases lie close together.
    alpha: lower.fit.alpha * Math.exp(activationKelvin * (1 / cold - 1 / (celsius + KELVIN))),
    b: Math.sqrt(lower.fit.b * upper.fit.b),
    durationHours: Math.min(lower.fit.durationHours, upper.fit.durationHours),
    fits: [lower.fit, upper.fit],
    between: {
      lowerCelsius: lower.caseCelsius,
      upperCelsius: upper.caseCelsius,
      activationKelvin,
      preExponential,
    },
    standIn: null,
    caseCelsius: null,
  };
}

const same = (a: number, b: number) => Math.abs(a - b) <= 1e-9 * Math.max(1, Math.abs(a));

/**
 * Between the two cases about the temperature in use; a case's own curve at its temperature; the coolest case's below
 * it; the hotter case's where one of the two does not decay.
 * @throws {EngineError} `invalid-input` on `cases…` or `inSituCelsius` (hotter than the hottest case)
 */
export function curveAt(cases: readonly Case[], celsius: number): Curve {
  const tested = cases
    .map(({ caseCelsius, points }, k) => ({ caseCelsius, fit: fitOf(points, `cases.${k}.points`) }))
    .sort((a, b) => a.caseCelsius - b.caseCelsius);
  cases.forEach(({ caseCelsius }, k) => {
    if (cases.slice(0, k).some((other) => same(other.caseCelsius, caseCelsius)))
      refuse(`cases.${k}.caseCelsius`, 'must differ from the other cases');
  });
  const at = tested.find(({ caseCelsius }) => same(caseCelsius, celsius));
  if (at) return ownCurve(at.fit, at.caseCelsius);
  const upper = tested.find(({ caseCelsius }) => caseCelsius > celsius);
  if (!upper) refuse('inSituCelsius', 'must not be hotter than the hottest case: TM-21 does not look beyond');
  const lower = tested.filter(({ caseCelsius }) => caseCelsius < celsius).at(-1);
  if (!lower) return ownCurve(upper.fit, upper.caseCelsius, 'cooler-than-tested');
  if (atMost(lower.fit.alpha, 0) || atMost(upper.fit.alpha, 0))
    return ownCurve(upper.fit, upper.caseCelsius, 'no-decay');
  return arrhenius(lower, upper, celsius);
}
