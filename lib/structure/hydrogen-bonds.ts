import { isHydrogen } from "./bond-class.ts";
import { bondValence, cationStates } from "./bond-valence-parameters.ts";
import type { LatticeAtom } from "./cell-atoms.ts";
import { latticeKey, type NeighbourAtoms } from "./neighbour-atoms.ts";
import type { ChosenNeighbour, NeighbourLists } from "./neighbour-choice.ts";
import type { MeasuredQuantity, NeighbourMeasures } from "./neighbour-measures.ts";
import type { NearAtom } from "./neighbour-search.ts";
import { vanDerWaalsSum } from "./van-der-waals-radius.ts";

/** Donor-hydrogen-acceptor angles below this are no hydrogen bonds: T. Steiner, Angew. Chem. Int. Ed. 41 (2002) 48-76. */
export const LEAST_HYDROGEN_ANGLE = 110;
/** No hydrogen lies between oxygen or nitrogen atoms nearer than this; angstrom. */
const CLOSEST_PAIR = 2.35;
/** An oxide ion has a valence sum near 2, hydroxide without its hydrogen 1, water 0 to 0.5 (as in the audit). */
const PROTONATED = 1.4;
/** Hydrogen without a bond of its own is looked for between atoms this near; angstrom. */
const CENTRED_REACH = 1.5;

const ACCEPTORS = new Set(["N", "O", "F", "S", "Cl", "Se", "Br", "I"]);
/** Atoms that donate hydrogen even where it is not listed. */
const BARE_DONORS = new Set(["N", "O"]);

/** A hydrogen bond, placed so that the donor stands as listed. */
export interface FoundHydrogenBond {
  readonly donor: LatticeAtom;
  /** Null where the file does not place the hydrogen atom. */
  readonly hydrogen: LatticeAtom | null;
  readonly acceptor: LatticeAtom;
  readonly donorHydrogen: MeasuredQuantity | null;
  readonly hydrogenAcceptor: MeasuredQuantity | null;
  readonly donorAcceptor: MeasuredQuantity;
  /** Degrees. */
  readonly angle: MeasuredQuantity | null;
  /** Equivalent bonds of the donor under its site symmetry. */
  readonly count: number;
}

/** What hydrogen bonds are looked for in. */
export interface HydrogenBondOptions {
  /** Carbon as a donor too. */
  readonly weak: boolean;
  /** Whether the file lacks hydrogen of its formula. */
  readonly incomplete: boolean;
}

/**
 * Hydrogen bonds: acceptors nearer to hydrogen than the sum of the van der Waals radii, at an angle of at least
 * LEAST_HYDROGEN_ANGLE. Where hydrogen is missing, pairs of a donor that lacks valence and an acceptor within the sum of
 * their radii, edges of coordination polyhedra left out.
 */
export class HydrogenBonds {
  private readonly source: NeighbourAtoms;
  private readonly lists: NeighbourLists;
  private readonly bonds: ReadonlyMap<number, readonly ChosenNeighbour[]>;
  private readonly measures: NeighbourMeasures;

  constructor(source: NeighbourAtoms, lists: NeighbourLists, measures: NeighbourMeasures) {
    this.source = source;
    this.lists = lists;
    this.measures = measures;
    this.bonds = lists.choose({ kind: "bonds" }, () => true);
  }

  /** @param shells neighbours of the first shell, which tell donors that lack hydrogen */
  find(options: HydrogenBondOptions, shells: ReadonlyMap<number, readonly ChosenNeighbour[]>): FoundHydrogenBond[] {
    const placed = this.withHydrogen(options.weak);
    return options.incomplete ? [...placed, ...this.withoutHydrogen(shells)] : placed;
  }

  private element(atom: number): string {
    return this.source.elementOf(atom) ?? "?";
  }

  private withHydrogen(weak: boolean): FoundHydrogenBond[] {
    const { source } = this;
    const hydrogens = this.lists.centres.filter((s) => isHydrogen(source.crystal.sites[s]!.element));
    if (hydrogens.length === 0) return [];
    const limit = (_: number, a: number) => {
      return ACCEPTORS.has(this.element(a)) ? (vanDerWaalsSum("H", this.element(a)) ?? 0) : 0;
    };
    const near = this.lists.around(LONGEST_CONTACT, limit, hydrogens);
    const seen = new Set<string>();
    return hydrogens.flatMap((site) => {
      const listed = source.listed(site);
      return this.donorsOf(site, near(site), weak).flatMap((donor) =>
        near(site)
          .filter((a) => latticeKey(a) !== latticeKey(donor) && this.accepts(a.atom))
          .flatMap((acceptor) => this.hydrogenBond(donor, listed, acceptor, seen) ?? []),
      );
    });
  }

  /** Atoms that a hydrogen atom is bonded to; the nearest two where it is centred and has no bond. */
  private donorsOf(site: number, near: readonly NearAtom[], weak: boolean): LatticeAtom[] {
    const bonded = this.bonds.get(site)!;
    const donors = bonded.length > 0 ? bonded : near.filter((n) => n.distance < CENTRED_REACH).slice(0, 1);
    return donors.filter((d) => ACCEPTORS.has(this.element(d.atom)) || (weak && this.element(d.atom) === "C"));
  }

  /** Other atoms bonded to oxygen or fluorine are the positive end of an anion, and nitrogen with four bonds has no pair. */
  private accepts(atom: number): boolean {
    const element = this.element(atom);
    if (element === "O" || element === "F") return true;
    const around = this.bonds.get(this.source.atoms[atom]!.site) ?? [];
    if (around.some((n) => ["O", "F"].includes(this.element(n.atom)))) return false;
    return element !== "N" || around.length < 4;
  }

  /** The bond moved so that the donor stands as listed; null where the angle is too small or the bond was seen before. */
  private hydrogenBond(d: LatticeAtom, h: LatticeAtom, a: LatticeAtom, seen: Set<string>): FoundHydrogenBond | null {
    const { source, measures } = this;
    const angle = measures.angle(d, h, a);
    if (angle.value < LEAST_HYDROGEN_ANGLE) return null;
    const hydrogen = source.reverse(h, d);
    const donor = source.listed(source.atoms[d.atom]!.site);
    const acceptor = source.reverse(a, d);
    const orbit = this.orbit(donor, [hydrogen, acceptor]);
    if (seen.has(orbit[0]!)) return null;
    for (const key of orbit) seen.add(key);
    return {
      donor,
      hydrogen,
      acceptor,
      donorHydrogen: measures.distance(donor, hydrogen),
      hydrogenAcceptor: measures.distance(hydrogen, acceptor),
      donorAcceptor: measures.distance(donor, acceptor),
      angle,
      count: orbit.length,
    };
  }

  /** Keys of the images of other atoms under the site symmetry of the donor. */
  private orbit(donor: LatticeAtom, others: readonly LatticeAtom[]): string[] {
    const { site } = this.source.atoms[donor.atom]!;
    const { operations } = this.source.crystal.sites[site]!.symmetry;
    const keys = operations.map((g) => others.map((o) => latticeKey(this.source.action.image(g, o))).join());
    return [...new Set(keys.map((key) => `${site}: ${key}`))];
  }

  private withoutHydrogen(shells: ReadonlyMap<number, readonly ChosenNeighbour[]>): FoundHydrogenBond[] {
    const { source } = this;
    const donors = this.lists.centres.filter((site) => this.lacksHydrogen(site, shells));
    if (donors.length === 0) return [];
    const limit = (d: number, a: number) => {
      return ACCEPTORS.has(this.element(a)) ? (vanDerWaalsSum(this.element(d), this.element(a)) ?? 0) : 0;
    };
    const near = this.lists.around(LONGEST_CONTACT + 1, limit, donors);
    const isDonor = new Set(donors);
    return donors.flatMap((site) => {
      const listed = source.listed(site);
      const seen = new Set<string>();
      return near(site).flatMap((a) => {
        const other = source.atoms[a.atom]!.site;
        if (a.distance < CLOSEST_PAIR || seen.has(latticeKey(a)) || !this.accepts(a.atom)) return [];
        if (isDonor.has(other) && other < site) return []; // told from the other end
        if (this.sharesNeighbour(site, a, shells)) return [];
        const orbit = source.crystal.sites[site]!.symmetry.operations.map((g) => latticeKey(source.action.image(g, a)));
        for (const key of orbit) seen.add(key);
        const none = { hydrogen: null, donorHydrogen: null, hydrogenAcceptor: null, angle: null };
        const donorAcceptor = this.measures.distance(listed, a);
        return [{ donor: listed, acceptor: a, donorAcceptor, ...none, count: new Set(orbit).size }];
      });
    });
  }

  /** Oxygen whose bonds give it too little valence, and nitrogen without any; none that has hydrogen. */
  private lacksHydrogen(site: number, shells: ReadonlyMap<number, readonly ChosenNeighbour[]>): boolean {
    const { element } = this.source.crystal.sites[site]!;
    const around = shells.get(site) ?? [];
    if (!BARE_DONORS.has(element ?? "") || around.some((n) => isHydrogen(this.source.elementOf(n.atom)))) return false;
    if (element === "N") return around.length === 0;
    if (around.some((n) => this.element(n.atom) === "O")) return false;
    return around.reduce((s, n) => s + mostValence(this.element(n.atom), n.distance), 0) < PROTONATED;
  }

  /** Whether two atoms are corners of one polyhedron, or bonded to each other. */
  private sharesNeighbour(
    site: number,
    other: LatticeAtom,
    shells: ReadonlyMap<number, readonly ChosenNeighbour[]>,
  ): boolean {
    const { source } = this;
    const own = new Set((shells.get(site) ?? []).map(latticeKey));
    if (own.has(latticeKey(other))) return true;
    const there = source.operationTo(other);
    const around = shells.get(source.atoms[other.atom]!.site) ?? [];
    return around.some((n) => own.has(latticeKey(source.action.image(there, n))));
  }
}

/** The largest sum of radii of hydrogen and an acceptor is shorter; angstrom. */
const LONGEST_CONTACT = 3.3;

/** Valence of a bond to oxygen by the state that gives most. */
function mostValence(symbol: string, distance: number): number {
  return cationStates(symbol).reduce((m, s) => {
    const r0 = s.r0.get("O");
    return r0 === undefined ? m : Math.max(m, bondValence(r0, distance));
  }, 0);
}
