/** What is wrong with, or worth knowing about, a resistor array. */
import { atLeast, type Finding } from '@/lib/engine/contract';
import { fieldBuilt } from './bench-work';
import {
  type ArrayString,
  type Case,
  distinct,
  type ResistorArray,
  saferOhms,
} from './resistor-array-string';
import { E_SERIES_BASIS } from './tables/e-series';

const DATASHEET = 'datasheet';

const soft = (code: string, message: string, values: Finding['values'], basis: string): Finding => ({
  code,
  severity: 'stop',
  hard: false,
  message,
  values,
  basis,
});

function doesNotFit(c: Case, { leds }: ArrayString): Finding {
  const needed = leds * c.led.forwardVolts;
  return soft(
    'does-not-fit',
    `${leds} in series need ${needed} V of a ${c.supply.volts} V supply: nothing is left for the resistor.`,
    { leds, forwardVolts: needed, volts: c.supply.volts },
    DATASHEET,
  );
}

function overMaxAmps(c: Case, string: ArrayString, safer: number): Finding {
  return soft(
    'over-max-amps',
    `A string of ${string.leds} can reach ${string.ampsMax} A, above the LED's ${c.led.maxAmps} A; ${safer} ohm keep it within.`,
    { leds: string.leds, ampsMax: string.ampsMax, maxAmps: c.led.maxAmps, saferOhms: safer },
    `${DATASHEET}; ${E_SERIES_BASIS}`,
  );
}

function noRating(c: Case, string: ArrayString): Finding {
  return soft(
    'no-rating',
    `No offered rating carries ${string.ballastWattsMax} W at this ambient and load fraction.`,
    {
      leds: string.leds,
      ballastWattsMax: string.ballastWattsMax,
      derate: c.derate,
      loadFraction: c.loadFraction,
      largestRatedWatts: c.ratedWatts.at(-1) ?? null,
    },
    DATASHEET,
  );
}

function lowCurrent(c: Case, string: ArrayString): Finding {
  return {
    code: 'low-current',
    severity: 'caution',
    hard: false,
    message: `At the lowest supply and the highest forward volts a string of ${string.leds} gets only ${string.ampsMin} A.`,
    values: { leds: string.leds, ampsMin: string.ampsMin, ampsWanted: c.ampsWanted },
    basis: 'common practice',
  };
}

function ofString(c: Case, string: ArrayString): Finding[] {
  if (string.ampsMin === null) return [doesNotFit(c, string)];
  const safer = saferOhms(c, string);
  return [
    ...(safer === null ? [] : [overMaxAmps(c, string, safer)]),
    ...(string.ballastRatedWatts === null ? [noRating(c, string)] : []),
    ...(atLeast(string.ampsMin, c.ampsWanted) ? [] : [lowCurrent(c, string)]),
  ];
}

export function findingsOf(c: Case, result: ResistorArray): Finding[] {
  if (result.perString === null) {
    const none = soft(
      'no-count-fits',
      'No number of LEDs in series keeps the current within its limits over the supply window.',
      {
        volts: c.supply.volts,
        forwardVolts: c.led.forwardVolts,
        maxAmps: c.led.maxAmps,
        ampsWanted: c.ampsWanted,
      },
      DATASHEET,
    );
    return [fieldBuilt(), none];
  }
  return [fieldBuilt(), ...distinct(result.strings).flatMap((string) => ofString(c, string))];
}
