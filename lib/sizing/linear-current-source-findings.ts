/** What is wrong with a linear current source, or worth knowing before it is built. */
import { atLeast, atMost, type Finding } from '@/lib/engine/contract';
import { hardStop, note, softStop } from '@/lib/engine/finding';
import { fieldBuilt } from './bench-work';
import { COMMON_PRACTICE, DATASHEET, junctionFindings, ledFindings, noHeadroom } from './constant-current';
import { nextPreferred } from './e-series';
import type { Case, LinearCurrentSource } from './linear-current-source';
import { SWITCHING_EFFICIENCY_PCT } from './linear-current-source-comparison';

/** A resistor whose current strays no further than this over the whole supply window does as well. */
const STEADY_SHARE = 0.1;

function regulatorFindings(c: Case, { amps }: LinearCurrentSource): Finding[] {
  const { minLoadAmps, maxDifferenceVolts } = c.input;
  const findings: Finding[] = [];
  if (maxDifferenceVolts !== undefined && !atMost(c.differenceMaxVolts, maxDifferenceVolts))
    findings.push(
      hardStop(
        'regulator-over-volts',
        `The regulator can see ${c.differenceMaxVolts} V from input to output, above its ${maxDifferenceVolts} V.`,
        { differenceVolts: c.differenceMaxVolts, maxDifferenceVolts },
        DATASHEET,
      ),
    );
  if (minLoadAmps !== undefined && amps !== null && !atLeast(amps, minLoadAmps))
    findings.push(
      softStop(
        'under-min-load',
        `${amps} A is less than the ${minLoadAmps} A that the regulator needs to regulate.`,
        { amps, minLoadAmps },
        DATASHEET,
      ),
    );
  if (c.input.referenceMaxVolts === undefined)
    findings.push(
      note(
        'reference-spread-not-given',
        `The reference is taken as ${c.referenceVolts} V exactly: its spread is not given.`,
        { referenceVolts: c.referenceVolts },
        DATASHEET,
      ),
    );
  return findings;
}

/** Whether the estimator should rather take a resistor or a switching driver. */
function worthFindings(c: Case, { comparison }: LinearCurrentSource): Finding[] {
  const { linear, resistor, switching } = comparison;
  const findings: Finding[] = [];
  if (linear.efficiency !== null && switching.efficiency !== null) {
    if (!atLeast(linear.efficiency, switching.efficiency))
      findings.push(
        note(
          'switching-wastes-less',
          `${linear.efficiency * 100} % of the supply reaches the LEDs and ${linear.heatWatts} W turn into heat; a switching driver at ${switching.efficiency * 100} % would lose ${switching.heatWatts} W.`,
          {
            efficiencyPct: linear.efficiency * 100,
            heatWatts: linear.heatWatts,
            switchingEfficiencyPct: switching.efficiency * 100,
            switchingHeatWatts: switching.heatWatts,
          },
          c.input.switchingEfficiencyPct === undefined ? COMMON_PRACTICE : DATASHEET,
        ),
      );
    if (c.input.switchingEfficiencyPct === undefined)
      findings.push(
        note(
          'switching-efficiency-assumed',
          `The switching driver is taken at ${SWITCHING_EFFICIENCY_PCT} %: its sheet is not given.`,
          { switchingEfficiencyPct: SWITCHING_EFFICIENCY_PCT },
          COMMON_PRACTICE,
        ),
      );
  }
  const { ampsMin, ampsMax, ohms } = resistor;
  const { amps, led } = c.input;
  const steady =
    ampsMin !== null &&
    ampsMax !== null &&
    atLeast(ampsMin, amps * (1 - STEADY_SHARE)) &&
    atMost(ampsMax, Math.min(amps * (1 + STEADY_SHARE), led.maxAmps ?? Infinity));
  if (steady)
    findings.push(
      note(
        'resistor-would-do',
        `A resistor of ${ohms} ohm loses the same and keeps the current between ${ampsMin} A and ${ampsMax} A.`,
        { ohms, ampsMin, ampsMax },
        COMMON_PRACTICE,
      ),
    );
  return findings;
}

export function findingsOf(c: Case, result: LinearCurrentSource): Finding[] {
  const { input, supply } = c;
  const safer = (maxAmps: number) =>
    nextPreferred(c.referenceMaxVolts / (maxAmps * (1 - c.tolerance)), input.series);
  return [
    fieldBuilt(),
    ...(result.headroomVolts >= 0
      ? []
      : [noHeadroom(input.perString, result.headroomVolts, supply.minVolts)]),
    ...(result.regulatorWattsMax === null ? [] : junctionFindings(input, result.regulatorWattsMax)),
    ...ledFindings(input.led, input.amps, result.ampsMax, safer),
    ...regulatorFindings(c, result),
    ...worthFindings(c, result),
  ];
}
