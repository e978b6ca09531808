import { bondClasses, isHydrogen } from "./bond-class.ts";
import type { CellAtom } from "./cell-atoms.ts";
import { covalentRadius } from "./covalent-radius.ts";
import type { Crystal } from "./crystal.ts";
import { type Contact, contactsWithin } from "./neighbour-search.ts";

/**
 * A bond may be longer than the sum of the covalent radii by this much; angstrom. Single bonds scatter about the sum
 * by 0.1, bonds to hydrogen bridges and in I3-, Te or Sb2S3 reach 0.25 more, and the next contacts begin above 0.5.
 */
export const BOND_TOLERANCE = 0.3;

/** Distances within this of a limit are shown, so that a chance decision is seen; angstrom. */
export const NEAR_LIMIT = 0.1;

/** Why two atoms count as bonded. */
export type BondRule =
  | "non-metals"
  | "hydrogen"
  | "hydride"
  | "tetrahedral oxo-anion"
  | "oxo-anion"
  | "thio-anion"
  | "halo complex"
  | "nitrogen ligand"
  | "carbon ligand"
  | "phosphorus or sulfur ligand"
  | "chelate oxygen"
  | "metal pair"
  | "asked for";

/** Sum of the covalent radii of two elements, angstrom; null where one has none. */
export function radiusSum(a: string | null, b: string | null): number | null {
  const [ra, rb] = [a && covalentRadius(a), b && covalentRadius(b)];
  return ra && rb ? ra + rb : null;
}

/** All contacts that could be bonds, with the verdict on each, while bonds are being chosen. */
export class ContactTable {
  readonly atoms: readonly CellAtom[];
  readonly elements: readonly (string | null)[]; // per atom
  readonly contacts: readonly Contact[];
  /** Per contact: the rule that makes it a bond, or null. */
  readonly rules: (BondRule | null)[];
  /** Per contact: the limit, in angstrom, that it was measured by; null where distance did not decide. */
  readonly limits: (number | null)[];
  /** Per contact: why it is no bond whatever its length, or null. */
  readonly cuts: ("water" | "asked" | null)[];
  readonly compared: number;
  private readonly byAtom: number[][];

  /**
   * @param wider limits beyond the usual ones, where the user asks for them
   * @param excluded contacts of atoms that are never there at the same time
   */
  constructor(
    crystal: Crystal,
    atoms: readonly CellAtom[],
    wider: PairLimits | null,
    excluded: (contact: Contact) => boolean,
  ) {
    this.atoms = atoms;
    this.elements = atoms.map((a) => crystal.sites[a.site]!.element);
    const limit = pairLimits(crystal, wider);
    const positions = atoms.map((a) => a.position);
    const search = contactsWithin(crystal.metric, positions, limit.reach, (i, j) =>
      limit.of(atoms[i]!.site, atoms[j]!.site),
    );
    this.contacts = search.contacts.filter((c) => !excluded(c));
    this.compared = search.compared;
    this.rules = this.contacts.map(() => null);
    this.limits = this.contacts.map(() => null);
    this.cuts = this.contacts.map(() => null);
    this.byAtom = atoms.map(() => []);
    this.contacts.forEach((c, k) => {
      this.byAtom[c.first]!.push(k);
      if (c.second !== c.first) this.byAtom[c.second]!.push(k);
    });
    for (const list of this.byAtom) list.sort((a, b) => this.contacts[a]!.distance - this.contacts[b]!.distance);
  }

  /** Indices of the contacts of an atom, shortest first. */
  around(atom: number): readonly number[] {
    return this.byAtom[atom]!;
  }

  /** The atom at the other end of a contact. */
  other(contact: number, atom: number): number {
    const { first, second } = this.contacts[contact]!;
    return first === atom ? second : first;
  }

  /** Measures a contact by a limit; it becomes a bond where it is not longer. */
  judge(contact: number, rule: BondRule, limit: number): void {
    if (this.rules[contact] !== null) return;
    this.limits[contact] = limit;
    if (this.contacts[contact]!.distance <= limit) this.rules[contact] = rule;
  }

  /** Makes a contact no bond, whatever the rules said of its length. */
  cut(contact: number, why: "water" | "asked"): void {
    this.rules[contact] = null;
    this.limits[contact] = null;
    this.cuts[contact] = why;
  }

  /** Bonded neighbours of an atom, one entry per bond. */
  bonded(atom: number): number[] {
    return this.byAtom[atom]!.filter((k) => this.rules[k] !== null).map((k) => this.other(k, atom));
  }

  /** The two elements of a contact, in the order first, second. */
  pair(contact: number): [string, string] {
    const { first, second } = this.contacts[contact]!;
    return [this.elements[first] ?? "?", this.elements[second] ?? "?"];
  }
}

/** Largest distances of interest; angstrom. */
export interface PairLimits {
  /** The largest of them all. */
  readonly reach: number;
  /** For two sites; 0 for none. */
  readonly of: (siteA: number, siteB: number) => number;
}

function pairLimits(crystal: Crystal, wider: PairLimits | null): PairLimits {
  const elements = [...new Set(crystal.sites.map((s) => s.element))];
  const index = crystal.sites.map((s) => elements.indexOf(s.element));
  const table = elements.map((a) => elements.map((b) => elementLimit(a, b)));
  const reach = Math.max(0, ...table.flat());
  const usual = (i: number, j: number) => table[index[i]!]![index[j]!]!;
  if (!wider) return { reach, of: usual };
  return { reach: Math.max(reach, wider.reach), of: (i, j) => Math.max(usual(i, j), wider.of(i, j)) };
}

/** Largest distance at which two elements are looked at without being asked; 0 where they never bond by default. */
function elementLimit(a: string | null, b: string | null): number {
  const sum = radiusSum(a, b);
  if (sum === null || a === null || b === null) return 0;
  const { nonMetal, metalPair } = bondClasses();
  if (isHydrogen(a) && isHydrogen(b)) return sum + BOND_TOLERANCE;
  if (nonMetal.has(a) || nonMetal.has(b)) return sum + BOND_TOLERANCE + NEAR_LIMIT;
  return metalPair.get(`${a}-${b}`) ?? 0;
}
