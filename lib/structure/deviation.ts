import { apply3, type Mat3, type Vec3 } from "./cell.ts";
import { length3, minus3, transpose3 } from "./rotation-fit.ts";

/** How far a molecule is from its idealised form. */
export interface Deviation {
  /** angstrom */
  readonly largest: number;
  readonly mean: number;
  /**
   * 100 times the sum of squared distances over the sum of squared distances from the centroid, dimensionless.
   * Source: H. Zabrodsky, S. Peleg and D. Avnir, J. Am. Chem. Soc. 114 (1992) 7843 (continuous symmetry measure).
   */
  readonly measure: number;
}

/** @param places of the points in the idealised molecule */
export function deviationOf(points: readonly Vec3[], places: readonly Vec3[]): Deviation {
  const distances = points.map((p, k) => length3(minus3(p, places[k]!)));
  const squares = distances.reduce((s, d) => s + d * d, 0);
  const size = points.reduce((s, p) => s + length3(p) ** 2, 0);
  return {
    largest: distances.reduce((m, d) => Math.max(m, d), 0),
    mean: distances.reduce((s, d) => s + d, 0) / distances.length,
    measure: (100 * squares) / size,
  };
}

/** Mean over the group of where each atom should be, seen from its images. */
export function symmetrised(
  points: readonly Vec3[],
  matrices: readonly Mat3[],
  permutations: readonly (readonly number[])[],
): Vec3[] {
  return points.map((_, k) => {
    const sum: [number, number, number] = [0, 0, 0];
    matrices.forEach((m, g) => {
      const back = apply3(transpose3(m), points[permutations[g]![k]!]!);
      for (let i = 0; i < 3; i++) sum[i]! += back[i]! / matrices.length;
    });
    return sum;
  });
}
