/** Sections of the chosen options in groups that share no driver: each group is packed by itself. */
import type { Choices, Section } from './tape-plan-choices';
import type { PackKind } from './tape-plan-pack';
import type { SectionId } from './tape-plan-search';

export interface Component {
  /** Bins of its sites, by index. */
  own: number[];
  kinds: PackKind[];
  /** Sections of each kind. */
  members: SectionId[][];
}

/** For each site the first of those that some section ties it to. */
function tiedSites(sites: number, sections: readonly Section[]): number[] {
  const first = Array.from({ length: sites }, (_, site) => site);
  const root = (site: number): number => (first[site] === site ? site : root(first[site] ?? site));
  for (const { spots } of sections)
    for (const { site } of spots) {
      const [a, b] = [root(spots[0]?.site ?? site), root(site)];
      first[Math.max(a, b)] = Math.min(a, b);
    }
  return first.map((_, site) => root(site));
}

export function componentsOf(choices: Choices, chosen: readonly { option: number }[]): Component[] {
  const all = chosen.flatMap(({ option }, run) =>
    (choices.runs[run]?.options[option]?.sections ?? []).map((own, section) => ({
      own,
      id: { run, section },
    })),
  );
  const tied = tiedSites(
    choices.sites,
    all.map(({ own }) => own),
  );
  const groups = new Map<number, Map<string, { kind: PackKind; members: SectionId[] }>>();
  for (const { own, id } of all) {
    const least = Math.min(...own.spots.map(({ variant }) => variant.cost));
    const extra = new Array<number | undefined>(choices.sites).fill(undefined);
    for (const { site, variant } of own.spots) extra[site] = variant.cost - least;
    const key = `${own.cuts}:${extra.join()}`;
    const at = tied[own.spots[0]?.site ?? 0] ?? 0;
    const group = groups.get(at) ?? new Map<string, { kind: PackKind; members: SectionId[] }>();
    const alike = group.get(key) ?? { kind: { cuts: own.cuts, count: 0, extra }, members: [] };
    alike.kind.count++;
    alike.members.push(id);
    group.set(key, alike);
    groups.set(at, group);
  }
  return [...groups].map(([at, group]) => {
    const sorted = [...group.values()].sort((a, b) => b.kind.cuts - a.kind.cuts);
    return {
      own: choices.bins.map((_, b) => b).filter((b) => tied[choices.bins[b]?.site ?? 0] === at),
      kinds: sorted.map(({ kind }) => kind),
      members: sorted.map(({ members }) => members),
    };
  });
}
