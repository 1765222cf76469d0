/** Strings of LEDs in parallel with a fault put in. */
import { EngineError } from '@/lib/engine/contract';
import { arrayAnalysis, type ArrayInput } from './array-analysis';
import { thermalVolts } from './diode';
import {
  type Family,
  jointOhms,
  type Model,
  type Quantity,
  settingOf,
  type Solved,
  type Tolerances,
  wholeFrom1,
} from './fault-finder-model';

const LED_CELSIUS = 25;
type ArrayString = ArrayInput['strings'][number];

const sum = (figures: readonly number[]) => figures.reduce((total, own) => total + own, 0);

function unknown(message: string): never {
  throw new EngineError('no-solution', `The array has no operating point: ${message}.`, [
    { path: 'strings', message },
  ]);
}

/** @param gone string that is open, from 0: what feeds the strings stands across its LEDs */
function solvedArray(input: ArrayInput, gone = -1): Solved {
  const strings = input.strings.filter((_, i) => i !== gone);
  if (strings.length === 0) return dark(input, 1);
  const result = arrayAnalysis({ ...input, strings });
  const nodeVolts = result.supplyVolts - result.supplyAmps * (input.sharedOhms ?? 0);
  return {
    read: ({ at, index, quantity }) => {
      if (at === 'feed') return quantity === 'volts' ? result.supplyVolts : result.supplyAmps;
      const i = index - 1;
      if (i === gone) return quantity === 'volts' ? nodeVolts : 0;
      const string = result.strings[gone >= 0 && i > gone ? i - 1 : i];
      return (quantity === 'amps' ? string?.amps : sum(string?.ledVolts ?? [])) ?? 0;
    },
  };
}

/** Nothing flows; `share` of the supply's volts stands across the strings. */
function dark({ supply }: ArrayInput, share: -1 | 0 | 1): Solved {
  const { volts } = supply;
  if (volts === undefined) return unknown('what a current source without load gives is not known');
  return {
    read: ({ at, quantity }) => {
      if (quantity === 'amps') return 0;
      return at === 'feed' ? volts : share * volts;
    },
  };
}

function spread(string: ArrayString, volts: number): ArrayString {
  return {
    ...string,
    leds: string.leds.map((led) => {
      const slopeVolts = led.emissionCoefficient * thermalVolts(led.celsius ?? LED_CELSIUS);
      return { ...led, saturationAmps: led.saturationAmps * Math.exp(-volts / slopeVolts) };
    }),
  };
}

/** Axes: supply, resistors, then the forward volts of each string. */
function atEnds(input: ArrayInput, t: Tolerances, ends: readonly number[]): ArrayInput {
  const [supply = 0, resistors = 0, ...spreads] = ends;
  const { volts, amps } = input.supply;
  const ohms = 1 + (resistors * t.resistorPct) / 100;
  return {
    supply: {
      ...input.supply,
      ...(volts === undefined ? {} : { volts: volts * (1 + (supply * t.supplyPct) / 100) }),
      ...(amps === undefined ? {} : { amps: amps * (1 + (supply * t.currentPct) / 100) }),
    },
    sharedOhms: (input.sharedOhms ?? 0) * ohms,
    strings: input.strings.map((string, i) =>
      spread({ ...string, ballastOhms: string.ballastOhms * ohms }, (spreads[i] ?? 0) * t.spreadVolts),
    ),
  };
}

const changed = (input: ArrayInput, i: number, change: (string: ArrayString) => ArrayString): ArrayInput => ({
  ...input,
  strings: input.strings.map((string, s) => (s === i ? change(string) : string)),
});

function stringFamilies(input: ArrayInput, i: number, volts: number, amps: number): Family[] {
  const base = { at: 'string', rail: null, grid: [i + 1] } as const;
  const leds = input.strings[i]?.leds.length ?? 1;
  const open: Family = { ...base, cause: 'open-string', parameter: null, solve: () => solvedArray(input, i) };
  const joint: Family = {
    ...base,
    cause: 'joint-in-string',
    parameter: jointOhms(volts, amps),
    solve: (_, ohms) => {
      const bad = changed(input, i, (string) => ({ ...string, ballastOhms: string.ballastOhms + ohms }));
      const { read } = solvedArray(bad);
      return { read, jointAmps: read({ at: 'string', index: i + 1, quantity: 'amps' }) };
    },
  };
  const shorted: Family = {
    ...base,
    cause: 'shorted-leds',
    parameter: wholeFrom1(leds - 1),
    solve: (_, count) =>
      solvedArray(changed(input, i, (string) => ({ ...string, leds: string.leds.slice(count) }))),
  };
  return [open, joint, ...(leds > 1 ? [shorted] : [])];
}

function supplyFamilies(input: ArrayInput, volts: number, amps: number): Family[] {
  const base = { at: 'feed', rail: null, grid: [1] } as const;
  const { supply } = input;
  const unit = supply.amps === undefined ? 'V' : 'A';
  const setting: Family = {
    ...base,
    cause: 'supply-setting',
    parameter: settingOf(unit === 'V' ? volts : amps, unit),
    solve: (_, own) =>
      solvedArray({ ...input, supply: { ...supply, [unit === 'V' ? 'volts' : 'amps']: own } }),
  };
  const joint: Family = {
    ...base,
    cause: 'joint-in-feed',
    parameter: jointOhms(volts, amps),
    solve: (_, ohms) => {
      const { read } = solvedArray({ ...input, sharedOhms: (input.sharedOhms ?? 0) + ohms });
      return { read, jointAmps: read({ at: 'feed', index: 1, quantity: 'amps' }) };
    },
  };
  return [
    { ...base, cause: 'feed-reversed', parameter: null, solve: () => dark(input, -1) },
    { ...base, cause: 'feed-missing', parameter: null, solve: () => dark(input, 0) },
    joint,
    setting,
  ];
}

export function arrayModel(input: ArrayInput, t: Tolerances): Model {
  const nominal = solvedArray(input);
  const amps = nominal.read({ at: 'feed', index: 1, quantity: 'amps' });
  const volts = input.supply.volts ?? nominal.read({ at: 'feed', index: 1, quantity: 'volts' });
  const both = (at: 'feed' | 'string', index: number): Quantity[] => [
    { at, index, quantity: 'volts' },
    { at, index, quantity: 'amps' },
  ];
  return {
    axes: ['supply', 'resistors', ...input.strings.map((_, i) => `forward volts of string ${i + 1}`)],
    solve: (ends) => solvedArray(atEnds(input, t, ends)),
    quantities: [...both('feed', 1), ...input.strings.flatMap((_, i) => both('string', i + 1))],
    families: [
      ...supplyFamilies(input, volts, amps),
      ...input.strings.flatMap((_, i) =>
        stringFamilies(input, i, volts, nominal.read({ at: 'string', index: i + 1, quantity: 'amps' })),
      ),
    ],
  };
}
