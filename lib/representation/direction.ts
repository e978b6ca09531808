import { adjugate, apply, determinant, gcd, type IntMat3, type IntVec3 } from "../algebra/index.ts";

/**
 * Directions of the conventional axes a, b, c in the basis of the matrices, up to one common factor. Columns of the
 * change of basis: with the columns of `frame` as new basis vectors, rotation matrices become those of the
 * conventional cell.
 */
export interface AxisFrame {
  readonly x: IntVec3;
  readonly y: IntVec3;
  readonly z: IntVec3;
}

export const BASIS_FRAME: AxisFrame = { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] };

/** Matrix whose columns are the frame vectors. */
export function frameMatrix(frame: AxisFrame): IntMat3 {
  const { x, y, z } = frame;
  return [x[0], y[0], z[0], x[1], y[1], z[1], x[2], y[2], z[2]];
}

/** The vector divided by the gcd of its components, first non-zero component positive. */
export function primitiveDirection(v: IntVec3): IntVec3 {
  const g = gcd(gcd(v[0], v[1]), v[2]);
  const first = v[0] !== 0 ? v[0] : v[1] !== 0 ? v[1] : v[2];
  const s = first < 0 ? -g : g;
  return [v[0] / s + 0, v[1] / s + 0, v[2] / s + 0];
}

/** The axis direction of a vector in frame coordinates [uvw], primitive, first non-zero index positive. */
export function toFrame(v: IntVec3, adjugateOfFrame: IntMat3): IntVec3 {
  return primitiveDirection(apply(adjugateOfFrame, v));
}

export function opposite(v: IntVec3): IntVec3 {
  return [-v[0] + 0, -v[1] + 0, -v[2] + 0];
}

export function sameVector(a: IntVec3, b: IntVec3): boolean {
  return a[0] === b[0] && a[1] === b[1] && a[2] === b[2];
}

/** Sum of squared indices first, then larger indices first: [100], [010], [001], [110], [101], [011], [1-10] ... */
export function compareDirections(a: IntVec3, b: IntVec3): number {
  const length = a[0] ** 2 + a[1] ** 2 + a[2] ** 2 - (b[0] ** 2 + b[1] ** 2 + b[2] ** 2);
  return length || b[0] - a[0] || b[1] - a[1] || b[2] - a[2];
}

/** `[1-10]`; with blanks if an index has two digits or more. */
export function formatDirection(v: IntVec3): string {
  return `[${v.join(v.some((e) => Math.abs(e) > 9) ? " " : "")}]`;
}

/** A vector along the axis of a proper rotation other than the identity. */
export function rotationAxis(R: IntMat3): IntVec3 {
  // R - 1 has rank 2, so every column of its adjugate lies in its kernel.
  const a = adjugate([R[0] - 1, R[1], R[2], R[3], R[4] - 1, R[5], R[6], R[7], R[8] - 1]);
  for (let j = 0; j < 3; j++) {
    if (a[j] || a[j + 3] || a[j + 6]) return primitiveDirection([a[j]!, a[j + 3]!, a[j + 6]!]);
  }
  throw new RangeError(`not a rotation of finite order: ${R.join(" ")}`);
}

/** Determinant of the matrix with columns a, b, c. */
export function triple(a: IntVec3, b: IntVec3, c: IntVec3): number {
  return determinant([a[0], b[0], c[0], a[1], b[1], c[1], a[2], b[2], c[2]]);
}
