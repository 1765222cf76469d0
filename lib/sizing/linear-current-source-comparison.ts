/** The same string behind a linear source, a resistor and a switching driver: what each wastes, and how steady it is. */
import type { Case } from './linear-current-source';
import { arrayString } from './resistor-array-string';

/** Small switching LED drivers give 80 to 90 % at full load; between them where no sheet is at hand. */
export const SWITCHING_EFFICIENCY_PCT = 85;

/** One way to feed the string, at nominal supply and forward volts. */
export interface Way {
  /** LED watts over supply watts. */
  efficiency: number | null;
  /** Watts that heat something else than the LEDs. */
  heatWatts: number | null;
  /** Over supply window, forward volts and tolerance; null where a sheet would have to say. */
  ampsMin: number | null;
  ampsMax: number | null;
}

export interface Comparison {
  ledWatts: number | null;
  linear: Way;
  resistor: Way & { ohms: number | null };
  switching: Way;
}

interface Linear {
  headroomVolts: number;
  setOhms: number;
  amps: number | null;
  ampsMax: number | null;
}

/**
 * Linear source and resistor lose the same at the same current: V - n * Vf has to fall somewhere. They differ in how
 * far the current strays; the resistor is sized as in `resistor-array`, with the set resistor's tolerance. The
 * switching driver gives the LEDs the same watts at its efficiency.
 */
export function comparisonOf(c: Case, { headroomVolts, setOhms, amps, ampsMax }: Linear): Comparison {
  const { input, supply } = c;
  const stringVolts = input.perString * input.led.forwardVolts;
  const ledWatts = amps === null ? null : stringVolts * amps;
  const resistor = arrayString(
    {
      supply,
      led: { ...input.led, amps: input.amps, maxAmps: input.led.maxAmps ?? input.amps },
      series: input.series,
      tolerance: c.tolerance,
      ratedWatts: [],
      loadFraction: 1,
      derate: 1,
      ampsWanted: input.amps,
    },
    input.perString,
  );
  const switching = (input.switchingEfficiencyPct ?? SWITCHING_EFFICIENCY_PCT) / 100;
  return {
    ledWatts,
    linear: {
      efficiency: amps === null ? null : stringVolts / supply.volts,
      heatWatts: amps === null ? null : (supply.volts - stringVolts) * amps,
      ampsMin: headroomVolts >= 0 ? c.referenceVolts / (setOhms * (1 + c.tolerance)) : null,
      ampsMax,
    },
    resistor: {
      ohms: resistor.ballastOhms,
      efficiency: resistor.amps === null ? null : stringVolts / supply.volts,
      heatWatts: resistor.ballastWatts,
      ampsMin: resistor.ampsMin,
      ampsMax: resistor.ampsMax,
    },
    switching: {
      efficiency: switching,
      heatWatts: ledWatts === null ? null : ledWatts / switching - ledWatts,
      ampsMin: null,
      ampsMax: null,
    },
  };
}
