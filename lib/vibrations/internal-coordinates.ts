import type { Mat3 } from "../structure/index.ts";
import { angleBend, isStraight, straightBend, stretch } from "./bond-coordinates.ts";
import type { SparseRow } from "./invariant-span.ts";
import { outOfPlane } from "./out-of-plane.ts";
import type { Scaffold, Star } from "./scaffold.ts";

/** A coordinate, or the few that one arrangement of atoms gives, as the two bends of a straight angle. */
export interface InternalCoordinate<A> {
  readonly kind: "stretch" | "outOfPlane" | "bend";
  /** Elements along it: `C-O`, `O-C-O`; the centre alone for motions out of its plane. */
  readonly name: string;
  readonly atoms: readonly A[];
  /** How many coordinates these are. */
  readonly size: number;
  /** Rows of the B matrix that span them. */
  readonly rows: readonly SparseRow[];
  /** Trace on the coordinates of an operation that carries them into themselves, given the atoms that it fixes. */
  readonly character: (R: Mat3, isFixed: (atom: A) => boolean) => number;
  /** A text that atoms in any equivalent order share. */
  readonly key: (atoms: readonly A[]) => string;
}

/**
 * Bond stretches, bends of the angles at the centres, and motions out of the plane of planar centres, each once.
 * Straight angles have two bends where the centre has no other neighbour; else its other angles describe them.
 * Source: E. B. Wilson, J. C. Decius and P. C. Cross, Molecular Vibrations, McGraw-Hill, New York 1955, chapter 4.
 */
export function internalCoordinates<A>(scaffold: Scaffold<A>, stars: readonly Star<A>[]): InternalCoordinate<A>[] {
  const known = new Set<string>();
  const isNew = (c: InternalCoordinate<A>) => {
    const key = `${c.kind} ${c.key(c.atoms)}`;
    if (known.has(key)) return false;
    known.add(key);
    return true;
  };
  return stars.flatMap((star) => coordinatesOf(scaffold, star)).filter(isNew);
}

function coordinatesOf<A>(scaffold: Scaffold<A>, star: Star<A>): InternalCoordinate<A>[] {
  const { centre, ligands } = star;
  const bends = ligands.flatMap((a, i) =>
    ligands.slice(i + 1).flatMap((b) => {
      if (!isStraight(scaffold, a, centre, b)) return [angleBend(scaffold, a, centre, b)];
      return ligands.length === 2 ? [straightBend(scaffold, a, centre, b)] : [];
    }),
  );
  const plane = outOfPlane(scaffold, star);
  return [...ligands.map((l) => stretch(scaffold, centre, l)), ...(plane ? [plane] : []), ...bends];
}
