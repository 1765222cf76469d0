/** Modules in series on a constant-current driver, with a fault put in. */
import {
  type Family,
  FEEDER_FACTOR,
  feederSurprise,
  jointSurprise,
  jointOhms,
  type Model,
  type Parameter,
  type Quantity,
  settingOf,
  type Solved,
  type Tolerances,
  wholeFrom1,
} from './fault-finder-model';

export interface StringInput {
  /** What the driver is set to, A. */
  amps: number;
  /** Modules in series. */
  count: number;
  /** Of one module at that current, V. */
  module: { forwardVolts: number; forwardVoltsMin: number; forwardVoltsMax: number };
  /** Conductors from the driver to the string, ohm each. */
  positiveOhms: number;
  negativeOhms: number;
  /** What the driver gives an open string, V. */
  openCircuitVolts?: number | undefined;
}

/** A string as it is: V(module) each, extra ohms within it. */
interface Wired {
  amps: number;
  positiveOhms: number;
  negativeOhms: number;
  moduleVolts: (index: number) => number;
  /** Of all modules and what is between them. */
  stringVolts: number;
}

function solvedString(wired: Wired): Solved {
  const { amps, positiveOhms, negativeOhms, stringVolts, moduleVolts } = wired;
  return {
    read: ({ at, index, quantity }) => {
      if (quantity === 'amps') return amps;
      if (at === 'cut') return moduleVolts(index);
      if (at === 'string') return stringVolts;
      if (at === 'positive-conductor') return amps * positiveOhms;
      if (at === 'negative-conductor') return amps * negativeOhms;
      return stringVolts + amps * (positiveOhms + negativeOhms);
    },
    jointAmps: amps,
  };
}

const asDrawn = (input: StringInput): Wired => ({
  amps: input.amps,
  positiveOhms: input.positiveOhms,
  negativeOhms: input.negativeOhms,
  moduleVolts: () => input.module.forwardVolts,
  stringVolts: input.count * input.module.forwardVolts,
});

/** Nothing flows: the driver gives what it has without load. */
const dark = (openVolts: number, stringVolts: number, moduleVolts: (index: number) => number): Solved => ({
  read: ({ at, index, quantity }) => {
    if (quantity === 'amps') return 0;
    if (at === 'feed') return openVolts;
    if (at === 'string') return stringVolts;
    return at === 'cut' ? moduleVolts(index) : 0;
  },
});

/**
 * Axes: current, conductors (cold to as given), the modules that were read, one by one, and all others together.
 * V = count * Vf, each module between its lowest and its highest.
 */
function atEnds(input: StringInput, t: Tolerances, read: readonly number[], ends: readonly number[]): Solved {
  const [current = 0, conductors = 0, others = 0, ...own] = ends;
  const { forwardVolts, forwardVoltsMin, forwardVoltsMax } = input.module;
  const voltsAt = (end: number) => (end < 0 ? forwardVoltsMin : end > 0 ? forwardVoltsMax : forwardVolts);
  const copper = conductors < 0 ? t.coldShare : 1;
  const readVolts = read.map((_, i) => voltsAt(own[i] ?? 0));
  const moduleVolts = (index: number) => readVolts[read.indexOf(index)] ?? voltsAt(others);
  return solvedString({
    amps: input.amps * (1 + (current * t.currentPct) / 100),
    positiveOhms: input.positiveOhms * copper,
    negativeOhms: input.negativeOhms * copper,
    moduleVolts,
    stringVolts:
      readVolts.reduce((sum, volts) => sum + volts, 0) + (input.count - read.length) * voltsAt(others),
  });
}

function feederFamilies(input: StringInput, joint: Parameter): Family[] {
  const wired = asDrawn(input);
  const base = { at: 'feed', rail: null, grid: [1] } as const;
  const inFeed = (rail: 'positive' | 'negative'): Family => ({
    ...base,
    cause: 'joint-in-feed',
    rail,
    parameter: joint,
    surprise: jointSurprise,
    solve: (_, ohms) => {
      const key = rail === 'positive' ? 'positiveOhms' : 'negativeOhms';
      return solvedString({ ...wired, [key]: input[key] + ohms });
    },
  });
  const feeder: Family = {
    ...base,
    cause: 'feeder-resistance',
    parameter: FEEDER_FACTOR,
    surprise: feederSurprise,
    solve: (_, factor) =>
      solvedString({
        ...wired,
        positiveOhms: input.positiveOhms * factor,
        negativeOhms: input.negativeOhms * factor,
      }),
  };
  const setting: Family = {
    ...base,
    cause: 'supply-setting',
    parameter: settingOf(input.amps, 'A'),
    solve: (_, amps) => solvedString({ ...wired, amps }),
  };
  return [
    inFeed('positive'),
    inFeed('negative'),
    ...(input.positiveOhms + input.negativeOhms > 0 ? [feeder] : []),
    setting,
  ];
}

/** Dark strings: what the driver gives without load is known, or is read off. */
function darkFamilies(input: StringInput, read: readonly number[]): Family[] {
  const loaded = input.count * input.module.forwardVoltsMin;
  const open = input.openCircuitVolts;
  const parameter: Parameter | null =
    open === undefined ? { low: loaded, high: 10 * loaded, scale: 'linear', unit: 'V' } : null;
  const volts = (own: number) => open ?? own;
  const unread = Array.from({ length: input.count }, (_, i) => i + 1).find((index) => !read.includes(index));
  const places = [...read, ...(unread === undefined ? [] : [unread])];
  return [
    {
      cause: 'feed-reversed',
      at: 'feed',
      rail: null,
      grid: [1],
      parameter,
      solve: (_, own) => dark(volts(own), -volts(own), () => -volts(own) / input.count),
    },
    {
      cause: 'feed-missing',
      at: 'feed',
      rail: null,
      grid: [1],
      parameter,
      solve: (_, own) => dark(volts(own), 0, () => 0),
    },
    ...places.map((place): Family => ({
      cause: 'open-module',
      at: 'cut',
      rail: null,
      // One that was not read stands for all that were not.
      grid: place === unread && input.count > read.length + 1 ? null : [place],
      parameter,
      solve: (_, own) => dark(volts(own), volts(own), (index) => (index === place ? volts(own) : 0)),
    })),
  ];
}

function moduleFamilies(input: StringInput, read: readonly number[], joint: Parameter): Family[] {
  const wired = asDrawn(input);
  const { forwardVolts } = input.module;
  const inString: Family = {
    cause: 'joint-in-string',
    at: 'string',
    rail: null,
    grid: [1],
    parameter: joint,
    solve: (_, ohms) => solvedString({ ...wired, stringVolts: wired.stringVolts + input.amps * ohms }),
  };
  const shorted = (place: number): Family => ({
    cause: 'shorted-modules',
    at: 'cut',
    rail: null,
    grid: [place],
    parameter: null,
    solve: () =>
      solvedString({
        ...wired,
        moduleVolts: (index) => (index === place ? 0 : forwardVolts),
        stringVolts: wired.stringVolts - forwardVolts,
      }),
  });
  const unread = input.count - read.length;
  const several: Family = {
    cause: 'shorted-modules',
    at: 'cut',
    rail: null,
    grid: null,
    parameter: wholeFrom1(unread),
    solve: (_, count) => solvedString({ ...wired, stringVolts: wired.stringVolts - count * forwardVolts }),
  };
  return [inString, ...read.map(shorted), ...(unread > 0 ? [several] : [])];
}

/** @param read modules that were read, from 1, each once */
export function stringModel(input: StringInput, t: Tolerances, read: readonly number[]): Model {
  const joint = jointOhms(input.count * input.module.forwardVolts, input.amps);
  const once = (at: Quantity['at'], quantity: Quantity['quantity'], index = 1): Quantity => ({
    at,
    index,
    quantity,
  });
  return {
    axes: [
      'current',
      'conductors',
      'forward volts',
      ...read.map((index) => `forward volts of module ${index}`),
    ],
    solve: (ends) => atEnds(input, t, read, ends),
    quantities: [
      once('feed', 'volts'),
      once('feed', 'amps'),
      once('string', 'volts'),
      once('positive-conductor', 'volts'),
      once('negative-conductor', 'volts'),
      ...Array.from({ length: input.count }, (_, i) => once('cut', 'volts', i + 1)),
    ],
    families: [
      ...darkFamilies(input, read),
      ...feederFamilies(input, joint),
      ...moduleFamilies(input, read, joint),
    ],
  };
}
