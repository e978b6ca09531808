import {
  determinant,
  type IntMat3,
  inverseRatMat,
  multiplyRatMat,
  type RatMat3,
  type RatVec3,
  ratMat3,
} from "../algebra/index.ts";
import {
  axesOf,
  changeAxes,
  type LatticeAxes,
  latticeSymmetries,
  type Metric,
  niggliReduction,
} from "../structure/index.ts";
import { primitiveBasis } from "../symmetry/index.ts";

/** The reduced basis of a lattice, in which all its rotations are integer matrices. */
export interface ReducedLattice {
  /** (a, b, c) reduced = (a, b, c) of the cell times this; indices of reflections, as rows, change with it likewise. */
  readonly basis: RatMat3;
  readonly axes: LatticeAxes;
  /** Rotation parts of determinant 1 of the highest symmetry within the tolerance. */
  readonly rotations: readonly IntMat3[];
  /** Largest angle by which the lattice misses this symmetry, degrees. */
  readonly deviation: number;
}

/**
 * @param angleTolerance degrees
 * @throws InputProblem `cell-too-skew`
 */
export function reducedLattice(metric: Metric, centrings: readonly RatVec3[], angleTolerance: number): ReducedLattice {
  const primitive = primitiveBasis(centrings);
  const start = axesOf(metric, primitive);
  const niggli = niggliReduction(start);
  const axes = changeAxes(start, niggli);
  const { rotations, deviation } = latticeSymmetries(axes, angleTolerance).at(-1)!; // the identity alone is always one
  return { basis: multiplyRatMat(primitive, ratMat3(niggli)), axes, rotations, deviation };
}

/** Rotation parts in the basis (a, b, c) P, or null where the lattice of the new axes does not have them. */
export function rotationsIn(P: RatMat3, rotations: readonly IntMat3[]): IntMat3[] | null {
  const back = inverseRatMat(P);
  const found: IntMat3[] = [];
  for (const W of rotations) {
    const { n, d } = multiplyRatMat(multiplyRatMat(back, ratMat3(W)), P);
    if (d !== 1 || Math.abs(determinant(n)) !== 1) return null;
    found.push(n);
  }
  return found;
}
