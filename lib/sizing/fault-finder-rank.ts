/** Which causes explain the readings, and which reading would tell the best ones apart. */
import { type Fit, Places, TOLD_APART } from './fault-finder-fit';
import { meterError, type MeterPct, type Weighed } from './fault-finder-weighed';
import type { Model, Place, Quantity, Solved } from './fault-finder-model';

const MOST_CAUSES = 12;
/** In errors of the reading: less is no use to a crew. */
const TELLS = 2;
/** From here on an ordinary reading is preferred to one along a conductor, which needs long leads. */
const TELLS_WELL = 4;
/** Scores as near as this are one: rounding must not order causes. */
const SAME_SCORE = 0.01;
const ORDINARY: readonly Place[] = ['feed', 'cut', 'string'];

export interface Candidate {
  fit: Fit;
  /** Places that explain the readings nearly as well. */
  range: { from: number; to: number } | null;
  /** Best fits at both ends of the range. */
  ends: Fit[];
}

export interface NextReading extends Quantity {
  /** Ranks of the two causes that it tells apart; the same twice: two places of one cause. */
  between: [number, number];
  /** What it would be under either. */
  under: [number, number];
  /** How far apart these are beyond what the readings taken tell, in errors of meter and tolerances. */
  apart: number;
}

/** Best fit of every cause that explains more than nothing does, best first. */
export function candidatesOf(model: Model, weighed: Weighed, nothing: number): Candidate[] {
  const fits = model.families.flatMap((family): { fit: Fit; places: Places }[] => {
    const places = new Places(family, weighed);
    const fit = places.best();
    return fit && fit.score < nothing ? [{ fit, places }] : [];
  });
  const step = ({ fit }: { fit: Fit }) => Math.round(fit.score / SAME_SCORE);
  const best = fits.sort((a, b) => step(a) - step(b)).slice(0, MOST_CAUSES);
  return best.map(({ fit, places }) => {
    const range = places.range(fit);
    const ends = range ? [range.from, range.to].flatMap((place) => places.at(place) ?? []) : [];
    return { fit, range, ends };
  });
}

/** Those that the readings do not tell from the best, the best first. */
export const suspects = (candidates: readonly Candidate[]): Candidate[] =>
  candidates.filter(({ fit }) => fit.score - (candidates[0]?.fit.score ?? 0) < TOLD_APART);

export interface Asked {
  model: Model;
  weighed: Weighed;
  meter: MeterPct;
  drawn: Solved;
}

type Telling = Omit<NextReading, 'between'>;

/** All that was not read yet, with what it would be under the two fits. */
function untaken({ model, weighed, meter, drawn }: Asked, first: Fit, second: Fit): Telling[] {
  const name = ({ at, index, quantity }: Quantity) => `${at} ${index} ${quantity}`;
  const taken = new Set(weighed.readings.map(name));
  const further = weighed.further(first.solved, second.solved);
  return model.quantities
    .filter((quantity) => !taken.has(name(quantity)))
    .map((quantity) => {
      const under: [number, number] = [first.solved.read(quantity), second.solved.read(quantity)];
      const most = Math.max(Math.abs(under[0]), Math.abs(under[1]));
      const error = meterError(meter, quantity, most, drawn.read(quantity));
      return { ...quantity, under, apart: further(quantity, error) };
    });
}

const furthest = (open: readonly Telling[]): Telling | null =>
  open.reduce<Telling | null>((best, own) => (own.apart > (best?.apart ?? 0) ? own : best), null);

/** The reading that tells the two fits apart best; null where none would do. */
function telling(asked: Asked, first: Fit, second: Fit): Telling | null {
  const open = untaken(asked, first, second);
  const ordinary = furthest(open.filter(({ at }) => ORDINARY.includes(at)));
  if (ordinary && ordinary.apart >= TELLS_WELL) return ordinary;
  const any = furthest(open);
  return any && any.apart >= TELLS ? any : null;
}

/** Of the segments that tell whether the place lies before or behind them, the one half-way: halves the range. */
function halving(asked: Asked, from: Fit, to: Fit): Telling | null {
  const open = untaken(asked, from, to);
  const best = furthest(open);
  if (!best || best.apart < TELLS) return null;
  const middle = (from.place + to.place + 1) / 2;
  const off = ({ index }: Telling) => Math.abs(index - middle);
  return open
    .filter(({ at, apart }) => at === 'cut' && apart >= Math.max(TELLS, best.apart / 4))
    .reduce((near, own) => (near.at !== 'cut' || off(own) < off(near) ? own : near), best);
}

/** null where the readings tell, or no further reading would. */
export function nextReading(asked: Asked, candidates: readonly Candidate[]): NextReading | null {
  const [best, ...rivals] = suspects(candidates);
  if (!best) return null;
  for (const [n, rival] of rivals.entries()) {
    const found = telling(asked, best.fit, rival.fit);
    if (found) return { ...found, between: [1, n + 2] };
  }
  const [from, to] = best.ends;
  const found = from && to ? halving(asked, from, to) : null;
  return found && { ...found, between: [1, 1] };
}
