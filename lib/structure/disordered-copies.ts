import type { Operation } from "../symmetry/index.ts";
import { isHydrogen } from "./bond-class.ts";
import { componentsOf } from "./bond-graph.ts";
import { bondsOf } from "./bonds.ts";
import { AtomAction, type CellAtom } from "./cell-atoms.ts";
import type { Crystal } from "./crystal.ts";
import { exclusiveContacts } from "./disorder.ts";

/** Sites that are there or not there together: one site, or those of one disorder group. */
interface Block {
  readonly sites: readonly number[];
  /** Images of the block in the cell, each as the atoms that make it up. */
  readonly copies: readonly (readonly number[])[];
  /** How many copies are there at a time. */
  readonly present: number;
}

/** Copies that a group carries into each other. */
interface CopyOrbit {
  readonly block: number;
  readonly copies: readonly number[]; // numbered through all blocks
}

/** Steps of the search for a choice; real structures take some dozen. */
const MOST_STEPS = 20_000;

/** The parts of a crystal whose images exclude each other, and how to choose among them. */
export class DisorderedCopies {
  readonly blocks: readonly Block[];
  readonly action: AtomAction;
  private readonly crystal: Crystal;
  private readonly atoms: readonly CellAtom[];
  private readonly copies: readonly (readonly number[])[] = [];
  private readonly rivals: readonly ReadonlySet<number>[] = [];
  /** Per copy: the piece of the structure that a hydrogen atom hangs on, null for other copies. */
  private readonly parents: readonly (number | null)[] = [];

  /** @param atoms one component of every other disorder, as `bondsOf` takes them */
  constructor(crystal: Crystal, atoms: readonly CellAtom[]) {
    this.crystal = crystal;
    this.atoms = atoms;
    this.action = new AtomAction(crystal, atoms);
    const clashes = exclusiveContacts(crystal, atoms);
    this.blocks = contestedSites(crystal, atoms, clashes).map((sites) => this.block(sites));
    if (this.blocks.length === 0) return;
    this.copies = this.blocks.flatMap((b) => b.copies);
    const holders = atoms.map(() => [] as number[]);
    this.copies.forEach((copy, c) => {
      for (const a of copy) holders[a]!.push(c);
    });
    const rivals = this.copies.map(() => new Set<number>());
    for (const { first, second } of clashes) {
      for (const c of holders[first]!) {
        for (const d of holders[second]!) {
          if (c === d) continue;
          rivals[c]!.add(d);
          rivals[d]!.add(c);
        }
      }
    }
    this.rivals = rivals;
    this.parents = this.findParents();
  }

  private block(sites: readonly number[]): Block {
    const { group } = this.crystal;
    const listed = sites.map((s) => this.atoms.findIndex((a) => a.site === s && a.image === 0));
    const copies = new Map<string, number[]>();
    for (const g of group.operations) {
      const copy = this.imageOf(g, listed);
      copies.set(copy.join(), copy);
    }
    const occupancy = sites.reduce((s, i) => s + this.crystal.sites[i]!.occupancy, 0) / sites.length;
    return { sites, copies: [...copies.values()], present: Math.round(copies.size * occupancy) };
  }

  private imageOf(g: Operation, copy: readonly number[]): number[] {
    return copy.map((atom) => this.action.image(g, { atom, shift: [0, 0, 0] }).atom).sort((a, b) => a - b);
  }

  private findParents(): (number | null)[] {
    const contested = new Set(this.copies.flat());
    const { bonds } = bondsOf(this.crystal);
    const fixed = bonds.filter((b) => !contested.has(b.first) && !contested.has(b.second));
    const piece = new Map<number, number>();
    componentsOf(this.atoms.length, fixed).forEach((component, k) => {
      for (const m of component.members) piece.set(m.atom, k);
    });
    return this.copies.map((copy) => {
      const [atom] = copy;
      if (copy.length !== 1 || !isHydrogen(this.crystal.sites[this.atoms[atom!]!.site]!.element)) return null;
      const bond = bonds.find((b) => b.first === atom || b.second === atom);
      return bond ? piece.get(bond.first === atom ? bond.second : bond.first)! : null;
    });
  }

  /**
   * Atoms of a union of orbits under a group of operations that holds the right number of copies of every block, none
   * excluding another, with hydrogen shared evenly; null where there is none.
   */
  choose(operations: readonly Operation[]): ReadonlySet<number> | null {
    const orbits = this.orbits(operations).filter(
      (o) => !o.copies.some((c) => o.copies.some((d) => this.rivals[c]!.has(d))),
    );
    const taken = new Set<number>();
    const missing = this.blocks.map((b) => b.present);
    let steps = 0;
    const next = (from: number): boolean => {
      if (missing.every((m) => m === 0)) return this.isEven(taken);
      if (++steps > MOST_STEPS) return false;
      for (let k = from; k < orbits.length; k++) {
        const { block, copies } = orbits[k]!;
        if (copies.length > missing[block]! || copies.some((c) => [...this.rivals[c]!].some((d) => taken.has(d))))
          continue;
        for (const c of copies) taken.add(c);
        missing[block]! -= copies.length;
        if (next(k + 1)) return true;
        for (const c of copies) taken.delete(c);
        missing[block]! += copies.length;
      }
      return false;
    };
    return next(0) ? new Set([...taken].flatMap((c) => this.copies[c]!)) : null;
  }

  private orbits(operations: readonly Operation[]): CopyOrbit[] {
    const index = new Map(this.copies.map((copy, c) => [copy.join(), c]));
    const owner = this.blocks.flatMap((b, k) => b.copies.map(() => k));
    const seen = new Set<number>();
    const orbits: CopyOrbit[] = [];
    this.copies.forEach((copy, c) => {
      if (seen.has(c)) return;
      const images = new Set(operations.map((g) => index.get(this.imageOf(g, copy).join())!));
      for (const d of images) seen.add(d);
      orbits.push({ block: owner[c]!, copies: [...images] });
    });
    return orbits;
  }

  /** Every piece bears its share of hydrogen, up to what rounding to whole atoms takes. */
  private isEven(taken: ReadonlySet<number>): boolean {
    const surplus = new Map<number, number>();
    this.parents.forEach((parent, c) => {
      if (parent === null) return;
      const { occupancy } = this.crystal.sites[this.atoms[this.copies[c]![0]!]!.site]!;
      surplus.set(parent, (surplus.get(parent) ?? 0) + (taken.has(c) ? 1 : 0) - occupancy);
    });
    return [...surplus.values()].every((s) => Math.abs(s) < 1 - 1e-6);
  }
}

/** Sites of which two images exclude each other, each with the other sites of its disorder group. */
function contestedSites(
  crystal: Crystal,
  atoms: readonly CellAtom[],
  clashes: readonly { readonly first: number; readonly second: number }[],
): number[][] {
  const blockName = (i: number) => {
    const { assembly, disorderGroup } = crystal.sites[i]!;
    return disorderGroup === null ? `site ${i}` : `group ${assembly ?? ""} ${disorderGroup}`;
  };
  const contested = new Set<string>();
  for (const { first, second } of clashes) {
    const [a, b] = [blockName(atoms[first]!.site), blockName(atoms[second]!.site)];
    if (a === b) contested.add(a);
  }
  const blocks = new Map<string, number[]>();
  for (const site of new Set(atoms.map((a) => a.site))) {
    const name = blockName(site);
    if (contested.has(name)) blocks.set(name, [...(blocks.get(name) ?? []), site]);
  }
  return [...blocks.values()];
}
