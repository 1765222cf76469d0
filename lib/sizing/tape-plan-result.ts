/** A plan as the shop reads it: sections and feeders of each run, outputs of each driver, and the bill. */
import type { TapeAnalysis } from './tape-analysis';
import type { Choices, Option, Section, Variant } from './tape-plan-choices';
import { feederOhms } from './tape-plan-choices';
import type { Feed, TapePlanInput } from './tape-plan-input';
import type { Offer } from './tape-plan-offer';
import type { Found } from './tape-plan-search';
import type { SectionCheck } from './tape-plan-section';

export interface PlannedSection {
  fromMetres: number;
  toMetres: number;
  cuts: number;
  place: string;
  feed: Feed;
  /** One way, of each feeder: one, or the start's and the end's. */
  feederMetres: number[];
  size: string;
  stranding: string;
  /** Index of the driver in `drivers`, and of its output. */
  driver: number;
  output: number;
  /** By `tape-analysis`. */
  amps: number;
  watts: number;
  worstDropPct: number;
  dimmestPct: number | null;
}

export interface PlannedOutput {
  /** Sections that it feeds: index of the run, and of the section in it. */
  sections: { run: number; section: number }[];
  /** At the full volts: what its rating is held against. */
  amps: number;
  watts: number;
  loadPct: number;
}

export interface PlannedDriver {
  sku: string;
  place: string;
  wiring: string;
  outputs: PlannedOutput[];
}

export interface PlanBill {
  drivers: { sku: string; quantity: number; cost: number }[];
  conductors: { size: string; stranding: string; metres: number; cost: number }[];
  feeds: number;
  labourHours: number;
  driverCost: number;
  conductorCost: number;
  labourCost: number;
}

export interface TapePlan {
  totalCost: number | null;
  /** How far above the best plan of these choices it can be, in % of the total. */
  boundPct: number | null;
  runs: { id: string; sections: PlannedSection[] }[] | null;
  drivers: PlannedDriver[] | null;
  bill: PlanBill | null;
}

export const NO_PLAN: TapePlan = { totalCost: null, boundPct: null, runs: null, drivers: null, bill: null };

export interface Case {
  input: TapePlanInput;
  offer: Offer;
  check: SectionCheck;
  choices: Choices;
}

export interface ChosenSection {
  run: number;
  section: number;
  piece: Section;
  site: number;
  variant: Variant;
}

/** The chosen sections in the order of runs, each fed from where its output is. */
export function chosenSections({ choices }: Case, found: Found): ChosenSection[] {
  const siteOf = new Map<string, number>();
  for (const { bin, sections } of found.channels)
    for (const { run, section } of sections) siteOf.set(`${run} ${section}`, choices.bins[bin]?.site ?? 0);
  return found.options.flatMap((option, run) => {
    const own: Option | undefined = choices.runs[run]?.options[option];
    return (own?.sections ?? []).flatMap((piece, section) => {
      const spot = piece.spots.find(({ site }) => site === siteOf.get(`${run} ${section}`));
      return spot ? [{ run, section, piece, site: spot.site, variant: spot.variant }] : [];
    });
  });
}

type Output = PlannedOutput & { from: ChosenSection[] };

function outputOf({ check, input }: Case, rating: number, from: ChosenSection[]): Output {
  const watts = from.reduce((sum, { piece }) => sum + piece.cuts, 0) * check.cutWatts;
  return {
    from,
    sections: from.map(({ run, section }) => ({ run, section })),
    amps: watts / input.tape.volts,
    watts,
    loadPct: (watts / rating) * 100,
  };
}

/** Channels of one bin, put into drivers one after another. */
function driversOf(c: Case, found: Found, chosen: readonly ChosenSection[]) {
  const { choices, offer } = c;
  const byId = new Map(chosen.map((own) => [`${own.run} ${own.section}`, own]));
  return choices.bins.flatMap((bin, b) => {
    const type = offer.types[bin.type];
    const own = found.channels.filter((channel) => channel.bin === b);
    if (!type) return [];
    return Array.from({ length: Math.ceil(own.length / bin.channels) }, (_, d) => ({
      type,
      place: choices.places[bin.place] ?? '',
      outputs: own.slice(d * bin.channels, (d + 1) * bin.channels).map(({ sections }) => {
        const from = sections.flatMap(({ run, section }) => byId.get(`${run} ${section}`) ?? []);
        return outputOf(
          c,
          type.given.channelWatts,
          from.sort((x, y) => x.run - y.run || x.section - y.section),
        );
      }),
    }));
  });
}

function billOf({ input, offer }: Case, chosen: readonly ChosenSection[], skus: readonly string[]): PlanBill {
  const { labour } = input;
  const drivers = input.drivers.flatMap(({ sku, cost }) => {
    const quantity = skus.filter((own) => own === sku).length;
    return quantity > 0 ? [{ sku, quantity, cost: quantity * cost }] : [];
  });
  const conductors = offer.cables.flatMap(({ given, index }) => {
    const own = chosen.filter(({ variant }) => variant.cable.index === index);
    const metres = own.reduce((sum, { variant }) => variant.metres.reduce((all, one) => all + one, sum), 0);
    const { size, stranding, costPerMetre } = given;
    return own.length > 0 ? [{ size, stranding, metres, cost: metres * costPerMetre }] : [];
  });
  const feeds = chosen.reduce((sum, { variant }) => sum + variant.metres.length, 0);
  const metres = conductors.reduce((sum, own) => sum + own.metres, 0);
  const labourHours =
    feeds * labour.hoursPerFeed + skus.length * labour.hoursPerDriver + metres * labour.hoursPerMetre;
  return {
    drivers,
    conductors,
    feeds,
    labourHours,
    driverCost: drivers.reduce((sum, { cost }) => sum + cost, 0),
    conductorCost: conductors.reduce((sum, { cost }) => sum + cost, 0),
    labourCost: labourHours * labour.ratePerHour,
  };
}

function sectionOf(
  c: Case,
  { run, piece, variant }: ChosenSection,
  figures: TapeAnalysis,
): Omit<PlannedSection, 'driver' | 'output' | 'place'> {
  const { cutMetres, volts } = c.input.tape;
  const watts = figures.totalWatts;
  return {
    fromMetres: piece.first * cutMetres,
    toMetres: Math.min((piece.first + piece.cuts) * cutMetres, c.input.runs[run]?.metres ?? Infinity),
    cuts: piece.cuts,
    feed: variant.feed,
    feederMetres: variant.metres,
    size: variant.cable.given.size,
    stranding: variant.cable.given.stranding,
    amps: watts / volts,
    watts,
    worstDropPct: figures.worstDropPct,
    dimmestPct: figures.dimmestPct,
  };
}

/** The plan with its figures; every section is solved by `tape-analysis`, and one that did not hold would be a bug. */
export function resultOf(c: Case, found: Found, bound: number): TapePlan {
  const chosen = chosenSections(c, found);
  const drivers = driversOf(c, found, chosen);
  const home = new Map<ChosenSection, { driver: number; output: number; place: string }>();
  drivers.forEach(({ outputs, place }, driver) =>
    outputs.forEach(({ from }, output) => from.forEach((own) => home.set(own, { driver, output, place }))),
  );
  const planned = chosen.map((own): { run: number; section: PlannedSection } => {
    const { piece, variant } = own;
    const at = home.get(own);
    const figures = c.check.figures(piece.cuts, variant.feed, feederOhms(variant));
    if (!at || !figures || !c.check.holds(piece.cuts, variant.feed, feederOhms(variant)))
      throw new Error('A planned section does not hold its limits.');
    return { run: own.run, section: { ...sectionOf(c, own, figures), ...at } };
  });
  const bill = billOf(
    c,
    chosen,
    drivers.map(({ type }) => type.given.sku),
  );
  const totalCost = bill.driverCost + bill.conductorCost + bill.labourCost;
  const gap = totalCost - bound;
  return {
    totalCost,
    // What is left of the gap at 1e-9 is rounding.
    boundPct: totalCost === 0 || gap <= 1e-8 * totalCost ? 0 : Math.min(100, (gap / totalCost) * 100),
    runs: c.input.runs.map(({ id }, r) => ({
      id,
      sections: planned.filter(({ run }) => run === r).map(({ section }) => section),
    })),
    drivers: drivers.map(({ type, place, outputs }) => ({
      sku: type.given.sku,
      place,
      wiring: type.wiring,
      outputs: outputs.map(({ sections, amps, watts, loadPct }) => ({ sections, amps, watts, loadPct })),
    })),
    bill,
  };
}
