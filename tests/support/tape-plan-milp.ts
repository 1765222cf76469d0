/**
 * The judge of tape-plan: the same published choices as a mixed-integer program for HiGHS, made from the input alone.
 * A run takes one number of sections, each section one driver type at one place, fed the cheapest way that
 * tape-analysis finds within the limits; channels are paths through their room, cut by cut (arc-flow formulation of
 * bin packing, J. M. Valério de Carvalho 1999), so that channels that are alike need not be told apart.
 */
import highsLoader from 'highs';
import { conductorResistance } from '@/lib/sizing/conductor-resistance';
import { tapeAnalysis } from '@/lib/sizing/tape-analysis';
import type { TapePlanInput } from '@/lib/sizing/tape-plan-input';

type Run = TapePlanInput['runs'][number];
type Driver = TapePlanInput['drivers'][number];
const MARGIN = 1 + 1e-9;

/** Everyday figures of the test jobs: what their conductors may carry, A. */
const AMPS: Readonly<Record<string, number>> = { 'AWG 18': 7, 'AWG 16': 10, 'AWG 14': 15, 'AWG 12': 20 };

/** Drop, dimmest and reach of a section by tape-analysis. */
function sectionHolds(
  input: TapePlanInput,
  cuts: number,
  ats: readonly number[],
  ohms: readonly number[],
): boolean {
  const { tape, limits } = input;
  const { volts, cutMetres, railOhmsPerMetre, load } = tape;
  const reach = Math.floor((tape.maxRunMetres ?? Infinity) / cutMetres + 1e-9);
  const farthest = Math.max(
    ...Array.from({ length: ats.length === 1 ? 2 : 1 }, (_, side) =>
      ats.length === 2 ? Math.ceil(cuts / 2) : side === 0 ? (ats[0] ?? 0) : cuts - (ats[0] ?? 0),
    ),
  );
  if (farthest > reach) return false;
  const feeds = ats.map((at, i) => ({ at, volts, positiveOhms: ohms[i] ?? 0, negativeOhms: ohms[i] ?? 0 }));
  const found = tapeAnalysis({ cuts, cutMetres, railOhmsPerMetre, load, feeds });
  const most = Math.max(...found.loadAmps);
  return (
    found.worstDropPct <= limits.maxDropPct * MARGIN &&
    (found.dimmestPct ?? 100) * MARGIN >= limits.minDimmestPct &&
    (cuts <= reach || ats.length === 1 || found.feeds.every(({ amps }) => amps <= reach * most * MARGIN))
  );
}

/** Least cost of feeding cuts first..first+cuts of the run from the place by the driver; null where nothing holds. */
function feederCost(
  input: TapePlanInput,
  run: Run,
  p: number,
  driver: Driver,
  first: number,
  cuts: number,
): number | null {
  const { tape, labour } = input;
  const at = run.places[p] as Run['places'][number];
  const end = at.endMetres ?? at.startMetres + run.metres;
  const metresTo = (cut: number) =>
    Math.min(at.startMetres + cut * tape.cutMetres, end + Math.max(0, run.metres - cut * tape.cutMetres));
  const load = cuts * cutAmps(input);
  const ways = [[0], [cuts], [0, cuts], ...(cuts > 1 ? [[Math.floor(cuts / 2)]] : [])].flatMap((ats) =>
    input.conductors.map(({ size, stranding, costPerMetre }) => {
      const each = ats.map((cut) => metresTo(first + cut));
      const metres = each.reduce((sum, own) => sum + own, 0);
      const hours = ats.length * labour.hoursPerFeed + metres * labour.hoursPerMetre;
      const ohmsPerMetre = conductorResistance(size, stranding, input.celsius).ohmsPerMetre;
      const carries = Math.max(load, driver.classLimited ? 0 : driver.channelWatts / driver.volts);
      return {
        ats,
        ohms: each.map((own) => own * ohmsPerMetre),
        fits: carries <= (AMPS[size] ?? 0) * MARGIN,
        cost: metres * costPerMetre + hours * labour.ratePerHour,
      };
    }),
  );
  const cheapestFirst = ways.filter(({ fits }) => fits).sort((a, b) => a.cost - b.cost);
  return cheapestFirst.find(({ ats, ohms }) => sectionHolds(input, cuts, ats, ohms))?.cost ?? null;
}

function cutAmps({ tape }: TapePlanInput): number {
  if (tape.load.model === 'constant-current') return tape.load.amps;
  if (tape.load.model === 'resistive') return tape.volts / tape.load.ohms;
  throw new Error('The judge takes constant currents and resistances.');
}

interface Program {
  objective: string[];
  rows: string[];
  whole: string[];
  yesOrNo: string[];
}

/** Paths of one driver type at one place through the room of a channel. */
function addPaths(
  program: Program,
  name: string,
  room: number,
  users: ReadonlyMap<number, string[]>,
  driver: { channels: number; cost: number },
): void {
  const sizes = [...users.keys()].sort((a, b) => b - a);
  const inOf = new Map<number, string[]>();
  const outOf = new Map<number, string[]>();
  const arcsOf = new Map<number, string[]>();
  const put = (map: Map<number, string[]>, key: number, own: string) =>
    map.set(key, [...(map.get(key) ?? []), own]);
  // Longer sections first along a path, so only rooms that such sums reach are nodes.
  let reached = new Set([0]);
  for (const size of sizes) {
    const next = new Set(reached);
    for (const start of [...reached].sort((a, b) => a - b)) {
      for (let from = start; from + size <= room; from += size) {
        const arc = `f_${name}_${from}_${size}`;
        if (!(arcsOf.get(size) ?? []).includes(arc)) {
          put(arcsOf, size, arc);
          put(outOf, from, arc);
          put(inOf, from + size, arc);
          program.whole.push(arc);
        }
        next.add(from + size);
      }
    }
    reached = next;
  }
  // A path may end anywhere: what leaves a node is no more than what enters it.
  for (const [node, out] of outOf)
    if (node > 0) program.rows.push(`${out.join(' + ')} - ${(inOf.get(node) ?? []).join(' - ')} <= 0`);
  const driverName = `z_${name}`;
  program.whole.push(driverName);
  program.objective.push(`${driver.cost} ${driverName}`);
  program.rows.push(`${(outOf.get(0) ?? ['zero']).join(' + ')} - ${driver.channels} ${driverName} <= 0`);
  for (const [size, sections] of users)
    program.rows.push(`${sections.join(' + ')} - ${(arcsOf.get(size) ?? ['zero']).join(' - ')} <= 0`);
}

/** The program's text in LP format. */
export function planProgram(input: TapePlanInput): string {
  const program: Program = { objective: [], rows: [], whole: [], yesOrNo: [] };
  const users = new Map<string, Map<number, string[]>>();
  const { tape, limits, labour } = input;
  const roomOf = ({ channelWatts, totalWatts, channels }: Driver) =>
    Math.floor(
      (limits.loadFraction * Math.min(channelWatts, (totalWatts ?? Infinity) / channels)) /
        (cutAmps(input) * tape.volts) +
        1e-9,
    );
  input.runs.forEach((run, r) => {
    const all = Math.floor(run.metres / tape.cutMetres + 1e-9);
    const options: string[] = [];
    for (let m = 1; m <= Math.min(all, limits.maxSections ?? 12); m++) {
      const option = `x_${r}_${m}`;
      const rows: string[] = [];
      let first = 0;
      for (let j = 0; j < m; j++) {
        const cuts = Math.floor(all / m) + (j < all % m ? 1 : 0);
        const ways: string[] = [];
        run.places.forEach(({ place }, p) =>
          input.drivers.forEach((driver, d) => {
            const cost = roomOf(driver) >= cuts ? feederCost(input, run, p, driver, first, cuts) : null;
            if (cost === null) return;
            const way = `a_${r}_${m}_${j}_${p}_${d}`;
            const bin = `${place}_${d}`;
            const own = users.get(bin) ?? new Map<number, string[]>();
            own.set(cuts, [...(own.get(cuts) ?? []), way]);
            users.set(bin, own);
            program.objective.push(`${cost} ${way}`);
            program.yesOrNo.push(way);
            ways.push(way);
          }),
        );
        if (ways.length > 0) rows.push(`${ways.join(' + ')} - ${option} = 0`);
        first += cuts;
      }
      if (rows.length < m) {
        // Some section can't be fed: its ways must not be used either.
        rows.forEach((row) => program.rows.push(row));
        program.rows.push(`${option} = 0`);
      } else program.rows.push(...rows);
      program.yesOrNo.push(option);
      options.push(option);
    }
    program.rows.push(`${options.join(' + ')} = 1`);
  });
  for (const [bin, own] of users) {
    const d = Number(bin.slice(bin.lastIndexOf('_') + 1));
    const driver = input.drivers[d] as Driver;
    const cost = driver.cost + labour.hoursPerDriver * labour.ratePerHour;
    addPaths(program, bin, roomOf(driver), own, { channels: driver.channels, cost });
  }
  program.rows.push('zero = 0');
  const lines = (parts: readonly string[]) =>
    parts.map((own) => own.replaceAll(/([+-]) /g, '$1 ')).join('\n');
  return [
    'Minimize',
    ` obj: ${program.objective.join('\n + ')}`,
    'Subject To',
    lines(program.rows.map((row, i) => ` r${i}: ${row.replaceAll(' + ', '\n + ')}`)),
    'General',
    lines(program.whole.map((own) => ` ${own}`)),
    'Binary',
    lines(program.yesOrNo.map((own) => ` ${own}`)),
    'End',
  ].join('\n');
}

export interface Judged {
  /** Of the best plan that HiGHS found; Infinity where there is none. */
  cost: number;
  /** It proved that none is cheaper. */
  proven: boolean;
}

/** Loads HiGHS once; judges any number of jobs. */
export async function judge(): Promise<(input: TapePlanInput) => Judged> {
  const highs = await highsLoader();
  return (input) => {
    const solved = highs.solve(planProgram(input), { mip_rel_gap: 0, mip_abs_gap: 1e-7, time_limit: 10 });
    if (solved.Status === 'Infeasible') return { cost: Infinity, proven: true };
    return { cost: solved.ObjectiveValue, proven: solved.Status === 'Optimal' };
  };
}
