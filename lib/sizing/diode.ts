/** The LED's law, and strings of LEDs in series with resistance. */

/** Boltzmann constant, J/K, and elementary charge, C: exact by definition (SI 2019, CODATA 2018). */
const BOLTZMANN = 1.380649e-23;
const CHARGE = 1.602176634e-19;
const ZERO_CELSIUS = 273.15;
/** Newton's steps shrink quadratically once near; this many are never needed from the starts used here. */
const MAX_STEPS = 200;
const LAST_STEP = 1e-8;

/** Below this an LED gives no light that anyone sees (common practice). */
export const DARK_AMPS = 1e-6;

export const LED_LAW_BASIS = 'Shockley equation with series resistance; k and q exact (SI 2019)';

/** kT/q in V. */
export function thermalVolts(celsius: number): number {
  return (BOLTZMANN * (celsius + ZERO_CELSIUS)) / CHARGE;
}

/**
 * Saturation current at another temperature:
 * Is(T) = Is * (T/T0)^(xti/n) * exp((q * gapVolts / (n * k)) * (1/T0 - 1/T)), T in kelvin.
 * @returns A
 * Source: the temperature law of the SPICE junction diode.
 */
export function saturationAt(
  led: { saturationAmps: number; emissionCoefficient: number; gapVolts: number; xti: number },
  fromCelsius: number,
  toCelsius: number,
): number {
  const from = fromCelsius + ZERO_CELSIUS;
  const to = toCelsius + ZERO_CELSIUS;
  const n = led.emissionCoefficient;
  const exponent = ((CHARGE * led.gapVolts) / (n * BOLTZMANN)) * (1 / from - 1 / to);
  return led.saturationAmps * (to / from) ** (led.xti / n) * Math.exp(exponent);
}

/** Junctions in series; several alike may be one with their slopes added. */
export interface Junction {
  /** n * kT/q, V; for k junctions alike k times that. */
  slopeVolts: number;
  saturationAmps: number;
}

/** All that lies in series between a string's two ends: V(I) = ohms * I + sum of slope * ln(1 + I/Is). */
export interface SeriesString {
  ohms: number;
  junctions: readonly Junction[];
}

/** Volts across the string at `amps` (above minus the smallest saturation current). */
export function stringVolts(string: SeriesString, amps: number): number {
  let volts = string.ohms * amps;
  for (const { slopeVolts, saturationAmps } of string.junctions) {
    volts += slopeVolts * Math.log1p(amps / saturationAmps);
  }
  return volts;
}

/** Slope dV/dI of the string in ohm at `amps`. */
export function stringSlopeOhms(string: SeriesString, amps: number): number {
  let ohms = string.ohms;
  for (const { slopeVolts, saturationAmps } of string.junctions) ohms += slopeVolts / (amps + saturationAmps);
  return ohms;
}

/** A start at or above the root for volts above zero: neither resistance nor junctions alone may take more. */
function startAbove(string: SeriesString, smallest: number, volts: number): number {
  let slopes = 0;
  let offset = 0;
  for (const { slopeVolts, saturationAmps } of string.junctions) {
    slopes += slopeVolts;
    offset += slopeVolts * Math.log(saturationAmps / smallest);
  }
  const byJunctions = (volts + offset) / slopes;
  return string.ohms > 0 ? Math.min(byJunctions, Math.log1p(volts / (string.ohms * smallest))) : byJunctions;
}

/**
 * Current through the string at `volts` across it, by Newton in z with I = Is * (exp(z) - 1), Is the smallest of
 * the string. V(z) is convex and rising, so from a start above the root every step falls monotonically to it:
 * no damping is needed. Newton in I or in V fails where the other of the two is nearly straight.
 * @param near a current close by that saves steps; any will do
 * @returns A; Infinity where nothing in the string limits the current to what a double holds.
 */
export function stringAmps(string: SeriesString, volts: number, near?: number): number {
  if (volts === 0) return 0;
  let smallest = Infinity;
  for (const { saturationAmps } of string.junctions) smallest = Math.min(smallest, saturationAmps);
  let z: number;
  if (near !== undefined) z = Math.log1p(near / smallest);
  else if (volts > 0) z = startAbove(string, smallest, volts);
  else z = volts / (string.junctions[0]?.slopeVolts ?? 1);
  for (let i = 0; i < MAX_STEPS; i++) {
    const rise = Math.expm1(z);
    const amps = smallest * rise;
    if (amps === Infinity) return Infinity;
    const fall = smallest * (rise + 1);
    let f = string.ohms * amps - volts;
    let slope = string.ohms * fall;
    for (const { slopeVolts, saturationAmps } of string.junctions) {
      const alone = saturationAmps === smallest;
      f += slopeVolts * (alone ? z : Math.log1p(amps / saturationAmps));
      slope += alone ? slopeVolts : (slopeVolts * fall) / (amps + saturationAmps);
    }
    const step = f / slope;
    z -= step;
    // A near current under the root throws the first step far above it: not beyond what is known to be above.
    if (step < 0 && volts > 0) z = Math.min(z, startAbove(string, smallest, volts));
    // The error left is about half the square of the step.
    if (Math.abs(step) <= LAST_STEP * Math.min(1, Math.abs(z))) break;
  }
  return smallest * Math.expm1(z);
}
