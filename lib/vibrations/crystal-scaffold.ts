import { IDENTITY, type IntVec3 } from "../algebra/index.ts";
import {
  apply3,
  type Crystal,
  type LatticeAtom,
  type Mat3,
  multiply3,
  type PolyhedronAnalysis,
  type Vec3,
} from "../structure/index.ts";
import type { SparseRow } from "./independent-species.ts";
import type { Scaffold, Star } from "./scaffold.ts";

/** An atom of the primitive cell that stands for others: which, and by how many cells it is away from its translate. */
interface Representative {
  readonly index: number;
  /** Centring that carries the atom onto a translate of its representative. */
  readonly centring: number;
  /** Whole cells to take off after that. */
  readonly shift: IntVec3;
}

/**
 * The atoms of a crystal under its factor group, for displacements that are alike in all primitive cells (k = 0): one row
 * for each atom of the primitive cell, elements in the order of the representatives of the space group.
 */
export function crystalScaffold(crystal: Crystal, analysis: PolyhedronAnalysis): Scaffold<LatticeAtom> {
  const { atoms, action, metric } = analysis;
  const { representatives } = crystal.group;
  const translations = crystal.group.centrings.map((w) => ({ W: IDENTITY, w }));
  const found = representativesOf(
    atoms.length,
    (centring, atom) => action.image(translations[centring]!, atom),
    translations.length,
  );
  const indices = [...new Set(found.map((r) => r.index))];
  const rowOf = new Map(indices.map((atom, row) => [atom, row]));
  const image = (g: number, atom: LatticeAtom) => action.image(representatives[g]!, atom);
  const site = (a: LatticeAtom) => crystal.sites[atoms[a.atom]!.site]!;
  return {
    action: {
      atoms: indices.length,
      matrices: representatives.map(({ W }): Mat3 => multiply3(metric.toCartesian, multiply3(W, metric.toFractional))),
      permutations: representatives.map((_, g) =>
        indices.map((atom) => rowOf.get(found[image(g, { atom, shift: [0, 0, 0] }).atom]!.index)!),
      ),
    },
    image,
    key: (list) => {
      const { centring, shift } = found[list[0]!.atom]!;
      const moved = list.map((a) => action.image(translations[centring]!, a));
      const first = list[0]!.shift;
      return moved.map((m) => `${m.atom} ${m.shift.map((e, i) => e - shift[i]! - first[i]! + 0).join()}`).join(" ");
    },
    place: ({ atom, shift }) =>
      apply3(metric.toCartesian, atoms[atom]!.position.map((e, i) => e + shift[i]!) as unknown as Vec3),
    index: (a) => rowOf.get(found[a.atom]!.index)!,
    element: (a) => site(a).element ?? "?",
    label: (a) => site(a).label,
  };
}

/** For every atom of the cell the first of its translates by centrings. */
function representativesOf(
  count: number,
  moved: (centring: number, atom: LatticeAtom) => LatticeAtom,
  centrings: number,
): Representative[] {
  return Array.from({ length: count }, (_, atom) => {
    let best: Representative | null = null;
    for (let centring = 0; centring < centrings; centring++) {
      const image = moved(centring, { atom, shift: [0, 0, 0] });
      if (best === null || image.atom < best.index) best = { index: image.atom, centring, shift: image.shift };
    }
    return best!;
  });
}

/** All polyhedra of the primitive cell, from one of each kind. */
export function crystalStars(scaffold: Scaffold<LatticeAtom>, { polyhedra }: PolyhedronAnalysis): Star<LatticeAtom>[] {
  return polyhedra.flatMap(({ members }) => {
    const known = new Set<string>();
    return scaffold.action.matrices.flatMap((_, g): Star<LatticeAtom>[] => {
      const [centre, ...ligands] = members.map((m) => scaffold.image(g, m)) as [LatticeAtom, ...LatticeAtom[]];
      const key = scaffold.key([centre]);
      if (known.has(key)) return [];
      known.add(key);
      return [{ centre, ligands }];
    });
  });
}

/** The acoustic motions at k = 0: all atoms move together. */
export function uniformTranslations(atoms: number): SparseRow[] {
  const axes: readonly Vec3[] = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ];
  return axes.map((e) => Array.from({ length: atoms }, (_, k) => [k, e] as const));
}
