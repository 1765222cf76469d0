/**
 * The choices of a plan. A run is cut into 1 to maxSections sections as equal as whole cuts allow, the longer ones
 * first; a section is fed from one of its places at start, end, middle or both ends by one size; its output is of any
 * driver that takes that size. What a section draws is counted at the full volts and so is the same however it is
 * fed: of all ways to feed it from one place by one group of drivers only the cheapest that holds the limits matters.
 */
import { atMost, refuse } from '@/lib/engine/contract';
import { type Feed, FEEDS, MAX_SECTIONS, type PlanRun, type TapePlanInput } from './tape-plan-input';
import type { Cable, Offer } from './tape-plan-offer';
import { type FeederOhms, middleOf, type SectionCheck } from './tape-plan-section';

export interface Variant {
  feed: Feed;
  cable: Cable;
  /** One way, of each feeder. */
  metres: number[];
  /** Cable, laying and connecting. */
  cost: number;
}

/** A section fed from a site: a place and a group of drivers. */
export interface Spot {
  site: number;
  variant: Variant;
}

export interface Section {
  /** First cut, from 0. */
  first: number;
  cuts: number;
  spots: Spot[];
}

export interface Option {
  sections: Section[];
  /** At least this for its feeders. */
  leastCost: number;
}

/** Channels of one driver type at one place. */
export interface Bin {
  place: number;
  type: number;
  site: number;
  cuts: number;
  channels: number;
  /** Of a whole driver. */
  cost: number;
}

export interface Choices {
  places: string[];
  bins: Bin[];
  sites: number;
  runs: { index: number; cuts: number; options: Option[] }[];
}

export const feederOhms = ({ metres, cable }: Variant): FeederOhms =>
  metres.map((own) => own * cable.ohmsPerMetre) as unknown as FeederOhms;

/** Sections of a run: lengths that differ by one cut at most, the longer ones first. */
export function piecesOf(cuts: number, sections: number): { first: number; cuts: number }[] {
  const least = Math.floor(cuts / sections);
  const longer = cuts - least * sections;
  return Array.from({ length: sections }, (_, j) => ({
    first: j * least + Math.min(j, longer),
    cuts: least + (j < longer ? 1 : 0),
  }));
}

interface Maker {
  input: TapePlanInput;
  offer: Offer;
  check: SectionCheck;
  places: string[];
  bins: Bin[];
}

/** Every way to feed the piece from the place, cheapest first. */
export function variantsOf(
  { input, offer }: Pick<Maker, 'input' | 'offer'>,
  run: PlanRun,
  at: PlanRun['places'][number],
  first: number,
  cuts: number,
) {
  const { tape, labour } = input;
  const length = run.metres;
  const metresTo = (boundary: number) =>
    Math.min(
      at.startMetres + boundary * tape.cutMetres,
      (at.endMetres ?? at.startMetres + length) + Math.max(0, length - boundary * tape.cutMetres),
    );
  const boundaries: Record<Feed, number[]> = {
    start: [first],
    end: [first + cuts],
    middle: [first + middleOf(cuts)],
    both: [first, first + cuts],
  };
  const found: Variant[] = [];
  for (const feed of FEEDS) {
    if (run.pinned?.feed ? feed !== run.pinned.feed : feed === 'middle' && cuts < 2) continue;
    const metres = boundaries[feed].map(metresTo);
    const total = metres.reduce((sum, own) => sum + own, 0);
    for (const cable of offer.cables) {
      if (run.pinned?.size !== undefined && cable.given.size !== run.pinned.size) continue;
      const connecting = metres.length * labour.hoursPerFeed * labour.ratePerHour;
      found.push({ feed, cable, metres, cost: total * cable.costPerMetre + connecting });
    }
  }
  return found.sort((a, b) => a.cost - b.cost);
}

/** Where the piece can be fed from and by which drivers, each at its least cost. */
function spotsOf(maker: Maker, run: PlanRun, first: number, cuts: number): Spot[] {
  const { offer, check, places, bins } = maker;
  const spots: Spot[] = [];
  for (const at of run.places) {
    if (run.pinned?.place !== undefined && at.place !== run.pinned.place) continue;
    const place = places.indexOf(at.place);
    const variants = variantsOf(maker, run, at, first, cuts);
    const held = new Map<Variant, boolean>();
    offer.feeders.forEach((mask, group) => {
      const site = place * offer.feeders.length + group;
      if (!bins.some((bin) => bin.site === site && bin.cuts >= cuts)) return;
      const variant = variants.find((own) => {
        if (!mask[own.cable.index] || !atMost(cuts * check.cutAmps, own.cable.amps)) return false;
        const known = held.get(own) ?? check.passes(cuts, own.feed, feederOhms(own));
        held.set(own, known);
        return known;
      });
      if (variant) spots.push({ site, variant });
    });
  }
  return spots;
}

const cheapestDriver = (bins: readonly Bin[], site: number, cuts: number): number =>
  bins.reduce(
    (least, bin) => (bin.site === site && bin.cuts >= cuts ? Math.min(least, bin.cost) : least),
    Infinity,
  );

/** Most sections that a run is cut into. */
export function mostSections({ limits, tape }: TapePlanInput, run: PlanRun, cuts: number): number {
  const longest = Math.min(limits.longestRunMetres ?? Infinity, 2 * (tape.maxRunMetres ?? Infinity));
  return Math.min(cuts, limits.maxSections ?? Math.max(MAX_SECTIONS, Math.ceil((2 * run.metres) / longest)));
}

/** What costs at least as much as another option with drivers of its own is never needed. */
function worthwhile(options: readonly { option: Option; alone: number }[]): Option[] {
  const best = options.reduce(
    (a, b) => (b.alone < a.alone ? b : a),
    options[0] ?? { alone: 0, option: null },
  );
  return options
    .filter((own) => own.option === best.option || own.option.leastCost < best.alone)
    .map(({ option }) => option);
}

function optionsOf(maker: Maker, run: PlanRun, cuts: number): Option[] {
  const { input, bins } = maker;
  const pinned = run.pinned?.sections;
  const feedCost = input.labour.hoursPerFeed * input.labour.ratePerHour;
  const found: { option: Option; alone: number }[] = [];
  let best = Infinity;
  const last = pinned ?? mostSections(input, run, cuts);
  for (let count = pinned ?? 1; count <= last && count * feedCost < best; count++) {
    const sections: Section[] = [];
    let [leastCost, alone] = [0, 0];
    for (const piece of piecesOf(cuts, count)) {
      const spots = spotsOf(maker, run, piece.first, piece.cuts);
      if (spots.length === 0) break;
      sections.push({ ...piece, spots });
      leastCost += Math.min(...spots.map(({ variant }) => variant.cost));
      alone += Math.min(
        ...spots.map(({ site, variant }) => variant.cost + cheapestDriver(bins, site, piece.cuts)),
      );
    }
    if (sections.length < count) continue;
    found.push({ option: { sections, leastCost }, alone });
    best = Math.min(best, alone);
  }
  return worthwhile(found);
}

/** Names that must be told apart, and pinned choices that must be there. */
export function checkNames(input: TapePlanInput): void {
  const unique = (names: readonly string[], path: (i: number) => string) =>
    names.forEach((own, i) => {
      if (names.indexOf(own) < i) refuse(path(i), 'is there twice');
    });
  unique(
    input.runs.map(({ id }) => id),
    (i) => `runs.${i}.id`,
  );
  unique(
    input.drivers.map(({ sku }) => sku),
    (i) => `drivers.${i}.sku`,
  );
  input.runs.forEach(({ places, pinned }, r) => {
    unique(
      places.map(({ place }) => place),
      (i) => `runs.${r}.places.${i}.place`,
    );
    if (pinned?.place !== undefined && !places.some(({ place }) => place === pinned.place))
      refuse(`runs.${r}.pinned.place`, 'is none of the run’s places');
    if (pinned?.size !== undefined && !input.conductors.some(({ size }) => size === pinned.size))
      refuse(`runs.${r}.pinned.size`, 'is none of the conductors offered');
  });
}

/** All choices of all runs; a run without options can't be planned. */
export function choicesOf(
  input: TapePlanInput,
  offer: Offer,
  check: SectionCheck,
  cutsOf: readonly number[],
): Choices {
  const places = [...new Set(input.runs.flatMap(({ places: own }) => own.map(({ place }) => place)))];
  const groups = offer.feeders.length;
  const total = cutsOf.reduce((sum, cuts) => sum + cuts, 0);
  const bins = places.flatMap((_, place) =>
    offer.types.map((own, type): Bin => ({
      place,
      type,
      site: place * groups + own.group,
      cuts: Math.min(own.cuts, total),
      channels: own.channels,
      cost: own.cost,
    })),
  );
  const maker = { input, offer, check, places, bins };
  const runs = input.runs.map((run, index) => {
    const cuts = cutsOf[index] ?? 0;
    return { index, cuts, options: optionsOf(maker, run, cuts) };
  });
  return { places, bins, sites: places.length * groups, runs };
}
