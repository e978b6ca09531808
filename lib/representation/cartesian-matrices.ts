import { IDENTITY, type IntMat3, multiply, transpose } from "../algebra/index.ts";
import { type Matrix3, snap } from "./cartesian.ts";

/**
 * Rotation matrices in the Cartesian frame of a crystal: x along a, y in the plane of a and b, z along c*.
 * @param rotations a whole group, in the basis a, b, c
 * @param metric dot products of a, b, c, row-major, in any unit of area; it is averaged over the group first, so the
 * result is orthogonal even where the cell obeys its symmetry only within its uncertainty. By default that of a cell
 * with a = b = c = 1 and angles as near to 90 degrees as the group allows
 * @throws RangeError if the metric is not positive definite
 */
export function cartesianMatrices(rotations: readonly IntMat3[], metric: Matrix3 = IDENTITY): Matrix3[] {
  const mean: number[] = new Array(9).fill(0);
  for (const W of rotations) {
    multiply(multiply(transpose(W), metric), W).forEach((e, k) => {
      mean[k]! += e / rotations.length;
    });
  }
  const A = cellMatrix(mean as unknown as Matrix3);
  const inverse = inverseUpper(A);
  return rotations.map((W) => multiply(multiply(A, W), inverse).map(snap) as unknown as Matrix3);
}

/** Columns a, b, c in the frame: the upper triangular A with A^T A = G. */
function cellMatrix(G: Matrix3): Matrix3 {
  const a = Math.sqrt(G[0]);
  const [bx, cx] = [G[1] / a, G[2] / a];
  const by = Math.sqrt(G[4] - bx * bx);
  const cy = (G[5] - bx * cx) / by;
  const cz = Math.sqrt(G[8] - cx * cx - cy * cy);
  if (!(a > 0 && by > 0 && cz > 0)) throw new RangeError(`not the metric of a cell: ${G.join(" ")}`);
  return [a, bx, cx, 0, by, cy, 0, 0, cz];
}

function inverseUpper([a, b, c, , e, f, , , i]: Matrix3): Matrix3 {
  return [1 / a, -b / (a * e), (b * f - c * e) / (a * e * i), 0, 1 / e, -f / (e * i), 0, 0, 1 / i];
}
