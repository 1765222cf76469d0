/** 13. A multi-channel constant-current sink, one string a channel, programmed by one resistor for all of them. */
import * as z from 'zod/mini';
import { atMost, ceilWithin, defineCalculation, floorWithin, type Outcome } from '@/lib/engine/contract';
import { junctionAt, leftOver, wattsAllowed } from './constant-current';
import { findingsOf } from './current-sink-findings';
import { workingOf } from './current-sink-working';
import { nextPreferred } from './e-series';
import { celsius, count, notNegative, positive } from './inputs';
import { checkForwardVolts, sourceLed } from './led-range';
import { type SupplyWindow, supplyWindow, supplyWindowOf } from './supply-window';
import { E_SERIES_NAMES } from './tables/e-series';

const schema = z.strictObject({
  /** Over the set resistor. */
  referenceVolts: positive,
  /** Current of a channel over that of the set resistor. */
  currentRatio: positive,
  /** Wanted; the set resistor's standard value gives this or a little less. */
  ampsPerChannel: positive,
  /** Of one board. */
  channels: count,
  /** In all, one on each channel. */
  strings: count,
  supply: supplyWindow,
  led: sourceLed,
  perString: count,
  /** Volts that a channel needs to hold its current. */
  dropoutVolts: notNegative,
  maxPackageWatts: positive,
  /** Junction to ambient, on its board. */
  thermalCelsiusPerWatt: notNegative,
  ambientCelsius: celsius,
  series: z.enum(E_SERIES_NAMES),
  maxJunctionCelsius: z.optional(celsius),
  /** How far a channel may be from what is set, with the set resistor's tolerance; 0 unless given. */
  channelTolerancePct: z.optional(
    z.number().check(z.nonnegative('must not be negative'), z.lt(100, 'must be below 100')),
  ),
  /** Most that a channel can be set to. */
  maxChannelAmps: z.optional(positive),
  /** Most volts at a channel that is off. */
  maxChannelVolts: z.optional(positive),
});

export type CurrentSinkInput = z.infer<typeof schema>;

export interface CurrentSink {
  setOhmsExact: number;
  setOhms: number;
  ampsPerChannel: number | null;
  ampsPerChannelMax: number | null;
  headroomVolts: number;
  /** Worst of one channel: Vmax, n * VfMin, highest current. */
  channelWatts: number | null;
  /** Of the fullest board. */
  stringsPerBoard: number | null;
  /** Worst of the fullest board. */
  packageWatts: number | null;
  /** The same at nominal supply, forward volts and current. */
  packageWattsNominal: number | null;
  junctionCelsius: number | null;
  boards: number | null;
  governedBy: 'channels' | 'package-watts' | 'junction' | null;
}

/** The input with its defaults filled in; what figures, findings and working read. */
export interface Case {
  input: CurrentSinkInput;
  supply: SupplyWindow;
  tolerance: number;
  /** Volts over a channel: nominal, and the most with its string lit. */
  channelVolts: number;
  channelVoltsMax: number;
  /** Watts of a package by its junction; null where no limit is given or heat goes nowhere. */
  junctionWatts: number | null;
}

function caseOf(input: CurrentSinkInput): Case {
  const { led, perString, maxJunctionCelsius } = input;
  checkForwardVolts(led, 'led');
  const supply = supplyWindowOf(input.supply, 'supply');
  return {
    input,
    supply,
    tolerance: (input.channelTolerancePct ?? 0) / 100,
    channelVolts: leftOver(supply.volts, perString * led.forwardVolts),
    channelVoltsMax: leftOver(supply.maxVolts, perString * led.forwardVoltsMin),
    junctionWatts: maxJunctionCelsius === undefined ? null : wattsAllowed({ ...input, maxJunctionCelsius }),
  };
}

/** Strings that one board takes by its channels and by its heat, and which of them it is. */
function mostPerBoard(
  { input, junctionWatts }: Case,
  channelWatts: number,
): { most: number; governedBy: NonNullable<CurrentSink['governedBy']> } {
  const heatWatts = Math.min(input.maxPackageWatts, junctionWatts ?? Infinity);
  const byHeat = channelWatts === 0 ? Infinity : floorWithin(heatWatts / channelWatts);
  if (byHeat >= input.channels) return { most: input.channels, governedBy: 'channels' };
  const byPackage = atMost(input.maxPackageWatts, heatWatts);
  return { most: byHeat, governedBy: byPackage ? 'package-watts' : 'junction' };
}

/**
 * Set resistor, headroom, heat and number of boards: I = reference * ratio / R, so R = reference * ratio / I and the
 * next preferred value, with which no channel gives more than is wanted; headroom = Vmin - n * VfMax - dropout; each
 * string leaves (Vmax - n * VfMin) * I in its package; boards enough that none has more strings than channels, nor
 * more heat than its package and its junction take. Strings are spread evenly: the figures are the fullest board's.
 * @returns ohm, A, V, W, celsius; nulls where the supply does not reach the LEDs, or one string is too much heat.
 * @throws {EngineError} `invalid-input` with the field.
 * Source: the sink's sheet; Ohm's law; preferred values IEC 60063:2015.
 */
function currentSink(c: Case): CurrentSink {
  const { input, supply } = c;
  const { led, perString, strings } = input;
  const setOhmsExact = (input.referenceVolts * input.currentRatio) / input.ampsPerChannel;
  const setOhms = nextPreferred(setOhmsExact, input.series);
  const set = (input.referenceVolts * input.currentRatio) / setOhms;
  const amps = c.channelVolts >= 0 ? set : null;
  const ampsMax = c.channelVoltsMax >= 0 ? set * (1 + c.tolerance) : null;
  const channelWatts = ampsMax === null ? null : c.channelVoltsMax * ampsMax;
  const limit = channelWatts === null ? null : mostPerBoard(c, channelWatts);
  const boards = limit === null || limit.most < 1 ? null : ceilWithin(strings / limit.most);
  const stringsPerBoard = boards === null ? null : Math.ceil(strings / boards);
  const packageWatts =
    stringsPerBoard === null || channelWatts === null ? null : stringsPerBoard * channelWatts;
  return {
    setOhmsExact,
    setOhms,
    ampsPerChannel: amps,
    ampsPerChannelMax: ampsMax,
    headroomVolts: leftOver(supply.minVolts, perString * led.forwardVoltsMax + input.dropoutVolts),
    channelWatts,
    stringsPerBoard,
    packageWatts,
    packageWattsNominal:
      stringsPerBoard === null || amps === null ? null : stringsPerBoard * c.channelVolts * amps,
    junctionCelsius: packageWatts === null ? null : junctionAt(input, packageWatts),
    boards,
    governedBy: limit?.governedBy ?? null,
  };
}

export const currentSinkCalculation = defineCalculation({
  name: 'current-sink',
  summary: 'Multi-channel current sink set by one resistor: value, headroom, heat, boards (bench work)',
  bench: true,
  schema,
  calculate: (input): Outcome<CurrentSink> => {
    const c = caseOf(input);
    const result = currentSink(c);
    return { result, findings: findingsOf(c, result), working: workingOf(c, result) };
  },
});
