import { adjugate, apply, determinant, multiply, transpose } from "../algebra/index.ts";
import { dot, type Matrix3, snap, type Vector3 } from "./cartesian.ts";
import type { MolecularGroup } from "./molecular-group.ts";
import type { PointGroup } from "./point-group.ts";

/**
 * Orthogonal matrices of a group in its own right-handed axes x, y, z (`group.axes`); null where a crystallographic
 * group does not fix these axes (1, -1, 2, m, 2/m), whose species all have dimension one.
 */
export function matricesInOwnAxes(group: PointGroup | MolecularGroup): Matrix3[] | null {
  if (!("frame" in group)) {
    const { x, y, z } = group.axes;
    const T: Matrix3 = [...x, ...y, ...z];
    return group.elements.map((M) => snapped(multiply(multiply(T, M), transpose(T))));
  }
  const { x, y, z } = group.axes;
  if (!x || !y || !z) return null;
  const { frame } = group;
  const inBasis = (v: Vector3): Vector3 => apply(columns(frame.x, frame.y, frame.z), v);
  const A = columns(inBasis(x), inBasis(y), inBasis(z));
  const lengths = axisLengths(group.elements, A);
  const det = determinant(A);
  return group.elements.map((W) => {
    const M = multiply(multiply(adjugate(A), W), A);
    return snapped(M.map((e, k) => (e / det) * (lengths[Math.floor(k / 3)]! / lengths[k % 3]!)));
  });
}

function columns(a: Vector3, b: Vector3, c: Vector3): Matrix3 {
  return [a[0], b[0], c[0], a[1], b[1], c[1], a[2], b[2], c[2]];
}

/** Lengths of the columns of A in the metric summed over the group, which leaves it invariant. */
function axisLengths(elements: readonly Matrix3[], A: Matrix3): number[] {
  const axes = [0, 1, 2].map((j): Vector3 => [A[j]!, A[j + 3]!, A[j + 6]!]);
  return axes.map((v) => {
    const images = elements.map((W) => apply(W, v));
    return Math.sqrt(images.reduce((sum, image) => sum + dot(image, image), 0));
  });
}

function snapped(m: readonly number[]): Matrix3 {
  return m.map(snap) as unknown as Matrix3;
}
