import { isHydrogen } from "./bond-class.ts";
import { type CellAtom, cellAtoms } from "./cell-atoms.ts";
import { radiusSum } from "./contact-table.ts";
import type { Crystal, CrystalSite } from "./crystal.ts";
import { type Contact, contactsWithin } from "./neighbour-search.ts";

/** Two partly occupied atoms nearer than this share of the sum of their radii are never there together. */
const CLASH_SHARE = 0.75;

/** Two partly occupied hydrogen atoms nearer than this are alternatives; those of one H2O are 1.5 apart; angstrom. */
const HYDROGEN_CLASH = 1.35;

/** Occupancies count as full from here, and alternatives may add up to as much above 1; both are rounded in files. */
const OCCUPANCY_SLACK = 0.02;

/** Which sites stand for a disordered structure. */
export interface ComponentChoice {
  /** Per site. */
  readonly chosen: readonly boolean[];
  /** What was chosen and what was left out, plain sentences. */
  readonly notes: readonly string[];
  /** Sites chosen of which some images exclude others, which symmetry forbids to choose from. */
  readonly contested: readonly number[];
}

/**
 * One component of each disorder: per assembly the group of largest occupancy, then of lowest number; at a position
 * shared by several sites the one of largest occupancy; among partly occupied sites too near each other to be there
 * together the one of largest occupancy; always the first listed where that leaves a tie. Images of one site that
 * exclude each other cannot be chosen from without lowering the symmetry; they are all kept and named in a note.
 */
export function chooseComponents(crystal: Crystal): ComponentChoice {
  const chosen = crystal.sites.map((s) => s.occupancy > 0);
  const notes: string[] = [];
  const left = (sites: readonly number[], why: string) => {
    if (sites.length === 0) return;
    for (const i of sites) chosen[i] = false;
    notes.push(`${why}: ${sites.map((i) => crystal.sites[i]!.label).join(", ")} left out`);
  };
  for (const [assembly, groups] of assemblies(crystal)) {
    if (groups.length < 2) continue;
    const [first, ...others] = groups;
    const name = assembly === "" ? "disorder" : `disorder assembly ${assembly}`;
    left(
      others.flatMap((g) => g.sites).filter((i) => chosen[i]),
      `${name}: group ${first!.name} (occupancy ${first!.occupancy}) taken`,
    );
  }
  left(shared(crystal, chosen), "positions shared by several sites: the one of largest occupancy taken");
  const atoms = cellAtoms(crystal, (i) => chosen[i]!);
  const clashes = exclusiveContacts(crystal, atoms).map(({ first, second }): [number, number] => {
    return [atoms[first]!.site, atoms[second]!.site];
  });
  left(clashing(crystal, clashes), "partly occupied sites too near each other: the one of larger occupancy taken");
  const contested = [...new Set(clashes.flatMap(([a, b]) => (isOneBlock(crystal, a, b) && chosen[a] ? [a, b] : [])))];
  return { chosen, notes, contested };
}

interface DisorderGroup {
  readonly name: string;
  readonly sites: readonly number[];
  readonly occupancy: number;
}

/** Groups of each assembly, best first. */
function assemblies(crystal: Crystal): Map<string, DisorderGroup[]> {
  const map = new Map<string, Map<string, number[]>>();
  crystal.sites.forEach((site, i) => {
    if (site.disorderGroup === null || site.disorderGroup === "0") return;
    const groups = map.get(site.assembly ?? "") ?? new Map<string, number[]>();
    map.set(site.assembly ?? "", groups);
    const sites = groups.get(site.disorderGroup) ?? [];
    groups.set(site.disorderGroup, sites);
    sites.push(i);
  });
  const rank = (name: string) => (Number.isFinite(Number(name)) ? Math.abs(Number(name)) : Number.MAX_VALUE);
  return new Map(
    [...map].map(([assembly, groups]) => {
      const list = [...groups].map(([name, sites]) => ({ name, sites, occupancy: meanOccupancy(crystal, sites) }));
      return [assembly, list.sort((a, b) => b.occupancy - a.occupancy || rank(a.name) - rank(b.name))];
    }),
  );
}

function meanOccupancy(crystal: Crystal, sites: readonly number[]): number {
  const sum = sites.reduce((s, i) => s + crystal.sites[i]!.occupancy, 0);
  return Math.round((1000 * sum) / sites.length) / 1000;
}

function shared(crystal: Crystal, chosen: readonly boolean[]): number[] {
  const places = new Map<number, number[]>();
  crystal.sites.forEach((site, i) => {
    if (!chosen[i]) return;
    const root = site.sharesPositionOf ?? i;
    places.set(root, [...(places.get(root) ?? []), i]);
  });
  return [...places.values()].flatMap((sites) => {
    const best = sites.reduce((a, b) => (crystal.sites[b]!.occupancy > crystal.sites[a]!.occupancy ? b : a));
    return sites.filter((i) => i !== best);
  });
}

/** Contacts between atoms that are never there at the same time. */
export function exclusiveContacts(crystal: Crystal, atoms: readonly CellAtom[]): Contact[] {
  const partial = atoms.flatMap((a, i) => (crystal.sites[a.site]!.occupancy < 1 - OCCUPANCY_SLACK ? [i] : []));
  if (partial.length === 0) return [];
  const siteOf = (k: number) => crystal.sites[atoms[partial[k]!]!.site]!;
  const sums = partial.map((_, k) => radiusSum(siteOf(k).element, siteOf(k).element) ?? 0);
  const reach = sums.reduce((m, s) => Math.max(m, CLASH_SHARE * s), HYDROGEN_CLASH);
  const positions = partial.map((i) => atoms[i]!.position);
  return contactsWithin(crystal.metric, positions, reach).contacts.flatMap((c) =>
    excludeEachOther(siteOf(c.first), siteOf(c.second), c.distance)
      ? [{ ...c, first: partial[c.first]!, second: partial[c.second]! }]
      : [],
  );
}

/** Whether two atoms are too near, and too seldom there, to be there at the same time. */
export function excludeEachOther(a: CrystalSite, b: CrystalSite, distance: number): boolean {
  if (a.occupancy + b.occupancy > 1 + OCCUPANCY_SLACK) return false;
  if (isHydrogen(a.element) && isHydrogen(b.element)) return distance < HYDROGEN_CLASH;
  const sum = radiusSum(a.element, b.element);
  return sum !== null && distance < CLASH_SHARE * sum;
}

/** Whether two sites are there together or not at all: the same site, or two of one disorder group. */
function isOneBlock(crystal: Crystal, a: number, b: number): boolean {
  const [p, q] = [crystal.sites[a]!, crystal.sites[b]!];
  return a === b || (p.disorderGroup !== null && p.disorderGroup === q.disorderGroup && p.assembly === q.assembly);
}

/** Sites to leave out so that no two different ones exclude each other: greedily, the best occupied kept first. */
function clashing(crystal: Crystal, clashes: readonly (readonly [number, number])[]): number[] {
  const rivals = new Map<number, Set<number>>();
  for (const [a, b] of clashes) {
    if (isOneBlock(crystal, a, b)) continue;
    rivals.set(a, (rivals.get(a) ?? new Set<number>()).add(b));
    rivals.set(b, (rivals.get(b) ?? new Set<number>()).add(a));
  }
  const order = [...rivals.keys()].sort((a, b) => crystal.sites[b]!.occupancy - crystal.sites[a]!.occupancy || a - b);
  const kept = new Set<number>();
  const out: number[] = [];
  for (const i of order) {
    if ([...rivals.get(i)!].some((j) => kept.has(j))) out.push(i);
    else kept.add(i);
  }
  return out.sort((a, b) => a - b);
}
