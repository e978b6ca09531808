import { bondClasses, isHydrogen } from "./bond-class.ts";
import type { LatticeAtom } from "./cell-atoms.ts";
import { type BondRule, radiusSum } from "./contact-table.ts";
import { endOfShell, SHELL_REACH, type ShellCandidate, shellCandidates } from "./coordination-shell.ts";
import { latticeKey, type NeighbourAtoms } from "./neighbour-atoms.ts";
import { bondRules } from "./neighbour-bonds.ts";
import { atomsAround, type NearAtom } from "./neighbour-search.ts";
import { vanDerWaalsSum } from "./van-der-waals-radius.ts";

/** Which atoms count as neighbours. */
export type NeighbourChoice =
  /** Bonds by rule, and the first shell of metals and of lone atoms up to the widest gap; mutual. */
  | { readonly kind: "shell" }
  /** Bonds by rule alone. */
  | { readonly kind: "bonds" }
  /** All atoms nearer than this, angstrom. */
  | { readonly kind: "within"; readonly distance: number }
  /** The nearest atoms, this many, and others as far as the last of them. */
  | { readonly kind: "nearest"; readonly count: number }
  /** All atoms nearer than the sum of the van der Waals radii. */
  | { readonly kind: "contacts" };

/** A neighbour of the listed point of a site. */
export interface ChosenNeighbour extends LatticeAtom {
  /** angstrom */
  readonly distance: number;
  /** The rule by which it is bonded; null where it is not. */
  readonly rule: BondRule | null;
}

/** The first shell of a site as the widest gap ends it; distances in angstrom, in units of the sum of the radii too. */
export interface ShellEnd {
  readonly count: number;
  readonly last: ShellCandidate;
  /** The nearest candidate outside; null if there is none within SHELL_REACH. */
  readonly next: ShellCandidate | null;
  readonly candidates: readonly ShellCandidate[];
}

/** Distances that differ by less are one when the nearest atoms are counted; angstrom. */
const EQUAL_DISTANCE = 1e-3;
/** As in the search, so that equivalent distances agree exactly; angstrom. */
const ROUNDING = 1e-9;
/** Hydrogen of hydroxide, water, ammonium or an organic group does not coordinate; that of hydrides and boranates does. */
const CARRIERS = new Set(["C", "N", "O", "F", "P", "S", "Cl", "Se", "Br", "I"]);
/** Farthest that nearest atoms are looked for; angstrom. */
const FARTHEST = 24;

/** Neighbours of every site, by one choice; lists are closed under the site symmetry, in order of distance. */
export class NeighbourLists {
  private readonly source: NeighbourAtoms;
  private readonly rules: ReadonlyMap<number, ReadonlyMap<string, BondRule>>;
  private ends: ReadonlyMap<number, ShellEnd | null> | null = null; // found when first asked for
  /** Indices of sites that have lists. */
  readonly centres: readonly number[];

  constructor(source: NeighbourAtoms) {
    this.source = source;
    this.centres = source.firstImage.flatMap((atom, site) => (atom === null ? [] : [site]));
    this.rules = bondRules(source);
  }

  /** Per site; empty for sites that are no centres. */
  choose(choice: NeighbourChoice, isWanted: (site: number) => boolean): ReadonlyMap<number, ChosenNeighbour[]> {
    const wanted = (list: readonly NearAtom[]) => list.filter((n) => isWanted(this.source.atoms[n.atom]!.site));
    switch (choice.kind) {
      case "bonds":
        return this.gathered((site) => this.bonded(site), wanted);
      case "shell":
        return this.mutualShells(wanted);
      case "within":
        return this.gathered(this.around(choice.distance), wanted);
      case "contacts": {
        const { limit, reach } = this.pairLimit((a, b) => vanDerWaalsSum(a, b) ?? 0);
        return this.gathered(this.around(reach, limit), wanted);
      }
      case "nearest":
        return this.nearest(choice.count, wanted);
      default:
        return choice satisfies never;
    }
  }

  /** Ends of the first shells by the widest gap; null where nothing lies within SHELL_REACH. */
  shellEnds(): ReadonlyMap<number, ShellEnd | null> {
    this.ends ??= this.findShellEnds();
    return this.ends;
  }

  private findShellEnds(): ReadonlyMap<number, ShellEnd | null> {
    const { source } = this;
    const { limit, reach } = this.pairLimit((a, b) => SHELL_REACH * (radiusSum(a, b) ?? 0));
    const near = this.around(reach, limit);
    return new Map(
      this.centres.map((site) => {
        const listed = source.listed(site);
        const isMetal = !bondClasses().nonMetal.has(source.crystal.sites[site]!.element ?? "?");
        const around = isMetal ? near(site).filter((n) => !this.isCarried(n.atom)) : near(site);
        const candidates = shellCandidates(source.crystal, source.crystal.metric, source.atoms, listed.atom, around);
        const count = endOfShell(candidates);
        if (count === 0) return [site, null];
        return [site, { count, last: candidates[count - 1]!, next: candidates[count] ?? null, candidates }];
      }),
    );
  }

  /** Whether an atom is hydrogen bonded to one of CARRIERS: it is no ligand of its own. */
  private isCarried(atom: number): boolean {
    if (!isHydrogen(this.source.elementOf(atom))) return false;
    const bonds = this.rules.get(this.source.atoms[atom]!.site)!;
    return [...bonds.keys()].some((key) => CARRIERS.has(this.source.elementOf(atomOfKey(key).atom) ?? ""));
  }

  /** All atoms around the centres that may be there together with them, nearest first. */
  around(
    reach: number,
    limit?: (centre: number, other: number) => number,
    sites: readonly number[] = this.centres,
  ): (site: number) => NearAtom[] {
    const { crystal, atoms } = this.source;
    const points = atoms.map((a) => a.position);
    const centres = sites.map((site) => this.source.listed(site));
    const found = atomsAround(
      crystal.metric,
      points,
      centres.map((c) => c.atom),
      reach,
      limit,
    );
    const lists = new Map(
      sites.map((site, k) => {
        const { atom: first, shift: base } = centres[k]!;
        const there = found[k]!.filter(({ atom: second, shift, distance }) => {
          return !this.source.areApart({ first, second, shift, distance });
        });
        const moved = there.map(({ atom, shift: s, distance }): NearAtom => {
          return { atom, shift: [s[0] + base[0], s[1] + base[1], s[2] + base[2]], distance };
        });
        return [site, moved];
      }),
    );
    return (site) => lists.get(site)!;
  }

  private pairLimit(of: (a: string | null, b: string | null) => number) {
    const { source } = this;
    const elements = [...new Set(source.crystal.sites.map((s) => s.element))];
    const table = elements.map((a) => elements.map((b) => of(a, b)));
    const kind = source.atoms.map((_, i) => elements.indexOf(source.elementOf(i)));
    const reach = table.flat().reduce((m, x) => Math.max(m, x), 0);
    return { reach, limit: (i: number, j: number) => table[kind[i]!]![kind[j]!]! };
  }

  private bonded(site: number): NearAtom[] {
    const listed = this.source.listed(site);
    return [...this.rules.get(site)!.keys()].map((key) => this.seenFrom(listed, atomOfKey(key)));
  }

  private gathered(
    listOf: (site: number) => readonly NearAtom[],
    wanted: (list: readonly NearAtom[]) => NearAtom[],
  ): Map<number, ChosenNeighbour[]> {
    return new Map(this.centres.map((site) => [site, this.finished(site, wanted(listOf(site)))]));
  }

  private finished(site: number, list: readonly NearAtom[]): ChosenNeighbour[] {
    const rules = this.rules.get(site)!;
    return list
      .map(({ atom, shift, distance }) => {
        return { atom, shift, distance, rule: rules.get(latticeKey({ atom, shift })) ?? null };
      })
      .sort((a, b) => a.distance - b.distance || a.atom - b.atom || latticeKey(a).localeCompare(latticeKey(b)));
  }

  /** Bonds, and the first shells of metals and of atoms that would have no neighbour otherwise, seen from both ends. */
  private mutualShells(wanted: (list: readonly NearAtom[]) => NearAtom[]): Map<number, ChosenNeighbour[]> {
    const lists = new Map(
      this.centres.map((s) => [s, new Map(this.bonded(s).map((n) => [latticeKey(n), n]))] as const),
    );
    const ends = this.shellEnds();
    const { nonMetal } = bondClasses();
    const elementOf = (site: number) => this.source.crystal.sites[site]!.element ?? "?";
    const take = (sites: readonly number[]) => {
      for (const site of sites) {
        const end = ends.get(site) ?? null;
        for (const n of end?.candidates.slice(0, end.count) ?? []) this.addPair(lists, site, n);
      }
    };
    take(this.centres.filter((site) => !nonMetal.has(elementOf(site))));
    take(this.centres.filter((site) => lists.get(site)!.size === 0));
    return this.gathered((site) => [...lists.get(site)!.values()], wanted);
  }

  /** Adds a neighbour with its images under the site symmetry, and the centre to the list of the neighbour. */
  private addPair(lists: ReadonlyMap<number, Map<string, NearAtom>>, site: number, neighbour: LatticeAtom): void {
    const { source } = this;
    const listed = source.listed(site);
    this.addOrbit(lists, site, neighbour);
    this.addOrbit(lists, source.atoms[neighbour.atom]!.site, source.reverse(listed, neighbour));
  }

  private addOrbit(lists: ReadonlyMap<number, Map<string, NearAtom>>, site: number, neighbour: LatticeAtom): void {
    const list = lists.get(site)!;
    if (list.has(latticeKey(neighbour))) return;
    const listed = this.source.listed(site);
    for (const s of this.source.crystal.sites[site]!.symmetry.operations) {
      const image = this.source.action.image(s, neighbour);
      list.set(latticeKey(image), this.seenFrom(listed, image));
    }
  }

  private seenFrom(listed: LatticeAtom, there: LatticeAtom): NearAtom {
    const [a, b] = [this.source.cartesian(listed), this.source.cartesian(there)];
    const distance = Math.round(Math.hypot(b[0] - a[0], b[1] - a[1], b[2] - a[2]) / ROUNDING) * ROUNDING;
    return { atom: there.atom, shift: there.shift, distance };
  }

  private nearest(
    count: number,
    wanted: (list: readonly NearAtom[]) => NearAtom[],
  ): ReadonlyMap<number, ChosenNeighbour[]> {
    for (let reach = 4; ; reach *= 1.5) {
      const around = this.around(reach);
      const lists = this.gathered(around, wanted);
      if (reach < FARTHEST && [...lists.values()].some((list) => list.length <= count)) continue;
      return new Map([...lists].map(([site, list]) => [site, firstOf(list, count)]));
    }
  }
}

function firstOf(list: readonly ChosenNeighbour[], count: number): ChosenNeighbour[] {
  const last = list[Math.min(count, list.length) - 1];
  return last ? list.filter((n) => n.distance <= last.distance + EQUAL_DISTANCE) : [];
}

function atomOfKey(key: string): LatticeAtom {
  const [atom, a, b, c] = key.split(" ").map(Number);
  return { atom: atom!, shift: [a!, b!, c!] };
}
