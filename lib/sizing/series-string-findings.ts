/** What is wrong with series strings, or worth knowing before they are wired. */
import { atMost, type Finding } from '@/lib/engine/contract';
import { caution, hardStop, note, softStop } from '@/lib/engine/finding';
import { COMMON_PRACTICE, DATASHEET, maxAmpsNotGiven } from './constant-current';
import type { Case, PlannedDriver, SeriesString } from './series-string';
import { nearestCounts } from './series-string-plan';
import { type DriverWindow, optionsOfAll, REASONS, stringWatts } from './series-string-window';
import { CLASS_TWO_BASIS } from './tables/nec-ampacity';

/** Over this no DC source is Class 2, and bare parts are not touched. */
const CLASS_TWO_VOLTS = 60;
/** Upper end of extra-low voltage, ripple-free DC. */
const SELV_VOLTS = 120;
const SELV_BASIS = 'IEC 61140:2016, extra-low voltage to 120 V DC (read in a scope note)';
/** Strings whose currents differ by no more look alike. */
const ALIKE_SHARE = 0.02;

/** The driver that fails latest in the order of checks came nearest; of several the first. */
function nearest(windows: readonly DriverWindow[]): DriverWindow | undefined {
  const rank = ({ reason }: DriverWindow) => (reason === null ? REASONS.length : REASONS.indexOf(reason));
  return [...windows].sort((a, b) => rank(b) - rank(a) || a.index - b.index)[0];
}

function doesNotSplit({ input, windows }: Case): Finding {
  const usable = windows.filter(({ reason }) => reason === null);
  const least = Math.min(...usable.map(({ fewest }) => fewest));
  const options = optionsOfAll(input, windows, input.count + least);
  const { below, above } = nearestCounts(options, input.count, least);
  return softStop(
    'count-does-not-split',
    `${input.count} modules can not be split over the drivers' windows; ${below ?? 'none'} below and ${above} above can.`,
    { count: input.count, countBelow: below, countAbove: above },
    DATASHEET,
  );
}

/** No plan: the reason of the driver that came nearest. */
function noPlan(c: Case): Finding[] {
  const { input, ofModule, windows } = c;
  const window = nearest(windows);
  if (!window) return [];
  const { sku, amps, fewest, most, minVolts, maxVolts } = window;
  switch (window.reason) {
    case 'insulation': {
      const insulationVolts = input.module.insulationVolts ?? null;
      return [
        hardStop(
          'string-over-insulation',
          `An open string of ${sku} carries ${window.openVolts} V, above the ${insulationVolts} V of the insulation.`,
          { sku, openVolts: window.openVolts, insulationVolts },
          DATASHEET,
        ),
      ];
    }
    case 'amps': {
      const maxAmps = input.module.maxAmps ?? null;
      return [
        softStop(
          'driver-over-module-amps',
          `${sku} gives ${amps} A, above the module's ${maxAmps} A.`,
          { sku, amps, maxAmps },
          DATASHEET,
        ),
      ];
    }
    case 'window':
      return [
        softStop(
          'string-window-too-narrow',
          `${sku} needs ${fewest} modules to stay over ${minVolts} V hot, and takes ${most} to stay under ${maxVolts} V cold.`,
          {
            sku,
            fewest,
            most,
            minVolts,
            maxVolts,
            hotVolts: ofModule.hotVolts,
            coldVolts: ofModule.coldVolts,
          },
          DATASHEET,
        ),
      ];
    case 'watts': {
      const watts = stringWatts(input, window, fewest);
      return [
        softStop(
          'string-over-watts',
          `The shortest string of ${sku}, ${fewest} modules, takes ${watts} W of the ${window.limitWatts} W that it may be loaded with.`,
          { sku, fewest, watts, limitWatts: window.limitWatts, loadPct: input.loadFraction * 100 },
          COMMON_PRACTICE,
        ),
      ];
    }
    case 'count':
      return [
        softStop(
          'too-few-modules',
          `${input.count} modules stay under the ${minVolts} V that ${sku} needs when they are hot: ${fewest} at least.`,
          { sku, count: input.count, fewest, minVolts, hotVolts: input.count * ofModule.hotVolts },
          DATASHEET,
        ),
      ];
    case null:
      return [doesNotSplit(c)];
  }
}

/** What was taken for granted. */
function notGiven({ input }: Case, result: SeriesString): Finding[] {
  const findings: Finding[] = [];
  const { voltsPerKelvin, maxAmps } = input.module;
  if (voltsPerKelvin === undefined)
    findings.push(
      caution(
        'temperature-not-counted',
        `The forward volts are taken as given from ${input.ambientMinCelsius} C to ${input.ambientMaxCelsius} C: how they change with temperature is not given.`,
        { ambientMinCelsius: input.ambientMinCelsius, ambientMaxCelsius: input.ambientMaxCelsius },
        DATASHEET,
      ),
    );
  else if (input.riseCelsius === undefined)
    findings.push(
      note(
        'rise-not-counted',
        'The LEDs are taken no hotter than the air around them: hot strings need fewer volts than figured.',
        { ambientMaxCelsius: input.ambientMaxCelsius },
        COMMON_PRACTICE,
      ),
    );
  if (maxAmps === undefined && result.strings.length > 0)
    findings.push(maxAmpsNotGiven(result.strings.reduce((most, { amps }) => Math.max(most, amps), 0)));
  return findings;
}

/** Volts that an open string carries, against what may be touched and what Class 2 ends at. */
function voltFindings(used: readonly DriverWindow[]): Finding[] {
  const openVolts = used.reduce((most, window) => Math.max(most, window.openVolts), 0);
  const live = caution(
    'live-string',
    `An open string carries ${openVolts} V and arcs: switch off and wait before a connector is opened or closed.`,
    { openVolts },
    COMMON_PRACTICE,
  );
  if (atMost(openVolts, CLASS_TWO_VOLTS)) return [live];
  if (atMost(openVolts, SELV_VOLTS))
    return [
      live,
      caution(
        'string-over-class-two-volts',
        `${openVolts} V is above the ${CLASS_TWO_VOLTS} V of a Class 2 source: no bare parts, and wiring methods for more.`,
        { openVolts, limitVolts: CLASS_TWO_VOLTS },
        CLASS_TWO_BASIS,
      ),
    ];
  return [
    live,
    caution(
      'string-over-selv-volts',
      `${openVolts} V is above the ${SELV_VOLTS} V of extra-low voltage: insulate and enclose it as mains wiring.`,
      { openVolts, limitVolts: SELV_VOLTS },
      SELV_BASIS,
    ),
  ];
}

/** At a cold start the strings take more than at typical forward volts. */
function coldStart(
  { strings }: SeriesString,
  drivers: readonly (PlannedDriver & { maxWatts: number })[],
): Finding[] {
  const watts = new Map<number, number>();
  for (const { driver, amps, coldVolts } of strings)
    watts.set(driver, (watts.get(driver) ?? 0) + amps * coldVolts);
  const over = drivers.find(({ driver, maxWatts }) => !atMost(watts.get(driver) ?? 0, maxWatts));
  if (!over) return [];
  const coldWatts = watts.get(over.driver) ?? 0;
  return [
    caution(
      'cold-start-over-watts',
      `At a cold start the strings of ${over.sku} can take ${coldWatts} W, above its ${over.maxWatts} W.`,
      { sku: over.sku, watts: coldWatts, maxWatts: over.maxWatts },
      DATASHEET,
    ),
  ];
}

function planned(c: Case, result: SeriesString): Finding[] {
  const plan = c.plan ?? [];
  const used = plan.map(({ window }) => window);
  const findings = [
    ...voltFindings(used),
    ...coldStart(
      result,
      result.drivers.map((driver, index) => ({ ...driver, maxWatts: used[index]?.maxWatts ?? 0 })),
    ),
  ];
  const lowestAmps = used.reduce((least, { amps }) => Math.min(least, amps), Infinity);
  const highestAmps = used.reduce((most, { amps }) => Math.max(most, amps), 0);
  if (!atMost(highestAmps, lowestAmps * (1 + ALIKE_SHARE)))
    findings.push(
      caution(
        'strings-of-different-amps',
        `Strings run at ${lowestAmps} A and at ${highestAmps} A: modules side by side will not be equally bright.`,
        { lowestAmps, highestAmps },
        COMMON_PRACTICE,
      ),
    );
  const spare = plan.reduce((sum, { window, strings }) => sum + window.channels - strings, 0);
  if (spare > 0)
    findings.push(
      note('spare-channels', `${spare} driver channels stay unused.`, { spare }, COMMON_PRACTICE),
    );
  return findings;
}

/** @returns stops first, then cautions of the plan, then what was not given */
export const findingsOf = (c: Case, result: SeriesString): Finding[] => [
  ...(c.plan === null ? noPlan(c) : planned(c, result)),
  ...notGiven(c, result),
];
