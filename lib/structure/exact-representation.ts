import { type Mat3, multiply3 } from "./cell.ts";
import { conjugate3, difference3, nearestOrthogonal, nearestRotation, sum3, transpose3 } from "./rotation-fit.ts";

/** A finite group by its products, i after j at products[order * i + j], and the determinants of its matrices. */
export interface AbstractGroup {
  readonly order: number;
  readonly products: ArrayLike<number>;
  readonly determinants: readonly (1 | -1)[];
}

/** Matrices of some elements that are known exactly. */
export interface KnownMatrices {
  /** Indices of the elements in the group. */
  readonly elements: readonly number[];
  readonly matrices: readonly Mat3[];
}

/** Largest error of a product or of a known matrix in the result; rounding lies three orders below. */
const EXACT = 1e-9;

/** The error left after a round is the square of its change. */
const SETTLED = 1e-9;

/** Rounds of averaging; convergence is quadratic and takes four or five. */
const MOST_ROUNDS = 30;

/**
 * Orthogonal matrices that multiply exactly as the group does, near approximate ones: each matrix is replaced by the
 * orthogonal one nearest to the mean of all products that should equal it, until nothing changes; then all are turned so
 * that the known ones come out as they are. Null where the approximate matrices are too rough for that.
 * Method: K. Grove, H. Karcher and E. A. Ruh, Math. Ann. 211 (1974) 7 (centre of mass of almost homomorphisms; from
 * memory).
 */
export function exactRepresentation(
  group: AbstractGroup,
  approximate: readonly Mat3[],
  known: KnownMatrices,
): Mat3[] | null {
  let matrices = [...approximate];
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const next = matrices.map((_, g) => meanOfProducts(group, matrices, g));
    const change = next.reduce((worst, m, g) => Math.max(worst, difference3(m, matrices[g]!)), 0);
    matrices = next;
    if (change < SETTLED) break;
  }
  const turn = nearestRotation(
    sum3(known.elements.map((g, s) => multiply3(known.matrices[s]!, transpose3(matrices[g]!)))),
  );
  const turned = matrices.map((m) => conjugate3(turn, m));
  return isExact(group, turned, known) ? turned : null;
}

/** Mean over h of (g h) h^-1, made orthogonal. */
function meanOfProducts({ order, products, determinants }: AbstractGroup, matrices: readonly Mat3[], g: number): Mat3 {
  const terms = matrices.map((h, i) => multiply3(matrices[products[order * g + i]!]!, transpose3(h)));
  return nearestOrthogonal(sum3(terms), determinants[g]!);
}

function isExact({ order, products }: AbstractGroup, matrices: readonly Mat3[], known: KnownMatrices): boolean {
  const asKnown = known.elements.every((g, s) => difference3(matrices[g]!, known.matrices[s]!) < EXACT);
  return (
    asKnown &&
    matrices.every((a, i) =>
      matrices.every((b, j) => difference3(multiply3(a, b), matrices[products[order * i + j]!]!) < EXACT),
    )
  );
}
