import type { MolecularUnit, Vec3 } from "../structure/index.ts";
import type { DisplacementAction } from "./independent-species.ts";

/**
 * Atoms with bonds and a group that keeps them: what internal coordinates are built on. `A` names an atom: an index in a
 * molecule, an atom with its whole cells in a crystal.
 */
export interface Scaffold<A> {
  readonly action: DisplacementAction;
  /** Image of an atom under element g. */
  readonly image: (g: number, atom: A) => A;
  /** The same text for lists that differ by a translation of the lattice only. */
  readonly key: (atoms: readonly A[]) => string;
  /** Cartesian, angstrom. */
  readonly place: (atom: A) => Vec3;
  /** Row of the atom in the displacements. */
  readonly index: (atom: A) => number;
  readonly element: (atom: A) => string;
  readonly label: (atom: A) => string;
}

/** What is needed of a molecule or ion of finite symmetry. */
export interface ShapedAtoms {
  readonly unit: Pick<MolecularUnit, "atoms" | "bonds">;
  /** Idealised places, angstrom; the group keeps them exactly. */
  readonly idealised: readonly Vec3[];
  readonly matrices: DisplacementAction["matrices"];
  readonly permutations: DisplacementAction["permutations"];
}

/** The scaffold of a molecule or ion under its own point group. */
export function unitScaffold({ unit, idealised, matrices, permutations }: ShapedAtoms): Scaffold<number> {
  return {
    action: { atoms: unit.atoms.length, matrices, permutations },
    image: (g, k) => permutations[g]![k]!,
    key: (atoms) => atoms.join(),
    place: (k) => idealised[k]!,
    index: (k) => k,
    element: (k) => (unit.atoms[k]!.element === "D" ? "H" : unit.atoms[k]!.element),
    label: (k) => unit.atoms[k]!.label,
  };
}

/** An atom with its bonded neighbours. */
export interface Star<A> {
  readonly centre: A;
  readonly ligands: readonly A[];
}

/**
 * The stars of all atoms of a molecule. Where its group carries a bond onto a pair that is just not bonded, that pair
 * counts as bonded too.
 */
export function unitStars({ unit, permutations }: Pick<ShapedAtoms, "unit" | "permutations">): Star<number>[] {
  const around = unit.atoms.map(() => new Set<number>());
  for (const [a, b] of unit.bonds) {
    for (const p of permutations) {
      around[p[a]!]!.add(p[b]!);
      around[p[b]!]!.add(p[a]!);
    }
  }
  return around.map((ligands, centre) => ({ centre, ligands: [...ligands].sort((a, b) => a - b) }));
}
