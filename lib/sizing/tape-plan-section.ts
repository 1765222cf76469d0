/**
 * Does a section of tape hold its limits with these feeders? Where every load drew the same current, the drop is a
 * closed formula; with the current at full volts it is the most that can be, with the current at the lowest volts
 * allowed the least. Only what lies between the two goes through `tape-analysis`, and so does every chosen section.
 */
import { atLeast, atMost, EngineError, floorWithin } from '@/lib/engine/contract';
import { stringAmps, thermalVolts } from './diode';
import { type TapeAnalysis, tapeAnalysis } from './tape-analysis';
import type { Feed, TapePlanInput } from './tape-plan-input';

/** Room for rounding between the closed formula and the exact solution. */
const ROUNDING = 1e-7;

/** Feeders of a section, ohm of one conductor each: one, or for both ends the start's and the end's. */
export type FeederOhms = readonly [number] | readonly [number, number];

interface Even {
  dropVolts: number;
  /** Most that enters the tape at one of its feeds. */
  feedAmps: number;
}

/** Boundary at which a section of `cuts` is fed from the middle. */
export const middleOf = (cuts: number): number => Math.floor(cuts / 2);

/** Current of one cut at `volts`, A. */
function lawOf({ load, celsius }: TapePlanInput['tape']): (volts: number) => number {
  if (load.model === 'constant-current') return () => load.amps;
  if (load.model === 'resistive') return (volts) => volts / load.ohms;
  const string = {
    ohms: load.ballastOhms + load.leds * load.seriesOhms,
    junctions: [
      {
        slopeVolts: load.leds * load.emissionCoefficient * thermalVolts(celsius ?? 25),
        saturationAmps: load.saturationAmps,
      },
    ],
  };
  return (volts) => stringAmps(string, volts);
}

export class SectionCheck {
  /** Of one cut at the full volts: what the drivers are counted for. */
  readonly cutAmps: number;
  readonly cutWatts: number;
  private readonly lowAmps: number;
  private readonly ampsAt: (volts: number) => number;
  private readonly dropLimit: number;
  private readonly reachCuts: number;
  private readonly longestCuts: number;
  private readonly known = new Map<string, TapeAnalysis | null>();

  constructor(private readonly input: TapePlanInput) {
    const { tape, limits } = input;
    this.ampsAt = lawOf(tape);
    const drawn = this.ampsAt(tape.volts);
    const sheetAmps = ((tape.wattsPerMetre ?? 0) * tape.cutMetres) / tape.volts;
    this.cutAmps = Math.max(drawn, sheetAmps);
    this.cutWatts = this.cutAmps * tape.volts;
    const dropout = tape.load.model === 'constant-current' ? (tape.load.dropoutVolts ?? 0) : 0;
    this.dropLimit = Math.min((limits.maxDropPct / 100) * tape.volts, tape.volts - dropout);
    this.lowAmps = this.ampsAt(Math.max(0, tape.volts - this.dropLimit));
    this.reachCuts = floorWithin((tape.maxRunMetres ?? Infinity) / tape.cutMetres);
    this.longestCuts = floorWithin((limits.longestRunMetres ?? Infinity) / tape.cutMetres);
  }

  /** Data sheet and the planner's own limit on the length. */
  lengthFits(cuts: number, feed: Feed): boolean {
    const reach = feed === 'both' ? Math.ceil(cuts / 2) : feed === 'middle' ? cuts - middleOf(cuts) : cuts;
    return cuts <= this.longestCuts && reach <= this.reachCuts;
  }

  /** Highest drop and feed current if every load drew `amps`. */
  private evenly(cuts: number, feed: Feed, ohms: FeederOhms, amps: number): Even {
    const { railOhmsPerMetre, cutMetres } = this.input.tape;
    const total = cuts * amps;
    if (feed !== 'both') {
      const leg = feed === 'middle' ? cuts - middleOf(cuts) : cuts;
      const pair = (railOhmsPerMetre.positive + railOhmsPerMetre.negative) * cutMetres;
      return { dropVolts: (amps * pair * leg * leg) / 2 + total * 2 * ohms[0], feedAmps: amps * leg };
    }
    const [start, end = start] = ohms;
    let [constant, linear, square, feedAmps] = [0, 0, 0, 0];
    for (const perMetre of [railOhmsPerMetre.positive, railOhmsPerMetre.negative]) {
      // One rail: what comes from the start, then drop at load k = from*(start + rail*(k - 1/2)) - amps*rail*k(k-1)/2.
      const rail = perMetre * cutMetres;
      const loop = start + end + rail * cuts;
      const from = loop > 0 ? (total * (end + (rail * cuts) / 2)) / loop : total / 2;
      constant += from * (start - rail / 2);
      linear += from * rail + (amps * rail) / 2;
      square += (amps * rail) / 2;
      feedAmps = Math.max(feedAmps, from, total - from);
    }
    const peak = square > 0 ? linear / (2 * square) : cuts;
    const at = (k: number) => {
      const within = Math.min(cuts, Math.max(1, k));
      return constant + linear * within - square * within * within;
    };
    return { dropVolts: Math.max(at(Math.floor(peak)), at(Math.ceil(peak))), feedAmps };
  }

  /** The section's figures by `tape-analysis`; null where it has no operating point. */
  figures(cuts: number, feed: Feed, ohms: FeederOhms): TapeAnalysis | null {
    // Start and end are the same tape seen from either side.
    const kind = feed === 'end' ? 'start' : feed;
    const key = `${cuts} ${kind} ${ohms.join(' ')}`;
    const known = this.known.get(key);
    if (known !== undefined) return known;
    const { tape } = this.input;
    const places = kind === 'both' ? [0, cuts] : [kind === 'middle' ? middleOf(cuts) : 0];
    const found = this.solved({
      cuts,
      cutMetres: tape.cutMetres,
      railOhmsPerMetre: tape.railOhmsPerMetre,
      load: tape.load,
      ...(tape.celsius === undefined ? {} : { celsius: tape.celsius }),
      feeds: places.map((at, i) => ({
        at,
        volts: tape.volts,
        positiveOhms: ohms[i] ?? ohms[0],
        negativeOhms: ohms[i] ?? ohms[0],
      })),
    });
    this.known.set(key, found);
    return found;
  }

  private solved(input: Parameters<typeof tapeAnalysis>[0]): TapeAnalysis | null {
    try {
      return tapeAnalysis(input);
    } catch (error) {
      if (error instanceof EngineError && error.code === 'no-solution') return null;
      throw error;
    }
  }

  /** By `tape-analysis`: drop, dimmest, dropout and what enters at a feed. */
  holds(cuts: number, feed: Feed, ohms: FeederOhms): boolean {
    const { tape, limits } = this.input;
    const found = this.figures(cuts, feed, ohms);
    if (!found || !this.lengthFits(cuts, feed)) return false;
    const dropout = tape.load.model === 'constant-current' ? (tape.load.dropoutVolts ?? 0) : 0;
    const brightest = found.loadAmps.reduce((most, amps) => Math.max(most, amps), 0);
    const feedAmps = found.feeds.reduce((most, { amps }) => Math.max(most, amps), 0);
    return (
      atMost(found.worstDropPct, limits.maxDropPct) &&
      atLeast(found.minVolts, dropout) &&
      (found.dimmestPct === null || atLeast(found.dimmestPct, limits.minDimmestPct)) &&
      (feed !== 'both' || cuts <= this.reachCuts || atMost(feedAmps, this.reachCuts * brightest))
    );
  }

  /** The same answer as `holds`, mostly without solving the ladder. */
  passes(cuts: number, feed: Feed, ohms: FeederOhms): boolean {
    if (!this.lengthFits(cuts, feed)) return false;
    const { tape, limits } = this.input;
    if (this.evenly(cuts, feed, ohms, this.lowAmps).dropVolts > this.dropLimit * (1 + ROUNDING)) return false;
    const full = this.ampsAt(tape.volts);
    const most = this.evenly(cuts, feed, ohms, full);
    const dimmest = full > 0 ? (this.ampsAt(Math.max(0, tape.volts - most.dropVolts)) / full) * 100 : 100;
    const surely =
      most.dropVolts < this.dropLimit * (1 - ROUNDING) &&
      (dimmest > limits.minDimmestPct * (1 + ROUNDING) || tape.load.model === 'constant-current') &&
      (feed !== 'both' || cuts <= this.reachCuts);
    return surely || this.holds(cuts, feed, ohms);
  }
}
