import type { Mat3 } from "../structure/index.ts";
import type { SparseRow } from "./independent-species.ts";

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
