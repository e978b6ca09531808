import { type Mat3, multiply3, type Vec3 } from "./cell.ts";
import { symmetricEigen } from "./symmetric-eigen.ts";

/**
 * The rotation R (determinant 1) that makes the trace of R^T M largest, that is, the one nearest to M. Defined for
 * matrices of rank 2 and 3.
 * Source: P. B. Davenport's quaternion solution of G. Wahba's problem, SIAM Review 7 (1965) 409.
 */
export function nearestRotation(m: Mat3): Mat3 {
  const [a, b, c, d, e, f, g, h, i] = m;
  const { vectors } = symmetricEigen([
    [a + e + i, h - f, c - g, d - b],
    [h - f, a - e - i, b + d, c + g],
    [c - g, b + d, e - a - i, f + h],
    [d - b, c + g, f + h, i - a - e],
  ]);
  const [w, x, y, z] = vectors[0] as [number, number, number, number];
  return [
    w * w + x * x - y * y - z * z,
    2 * (x * y - w * z),
    2 * (x * z + w * y),
    2 * (x * y + w * z),
    w * w - x * x + y * y - z * z,
    2 * (y * z - w * x),
    2 * (x * z - w * y),
    2 * (y * z + w * x),
    w * w - x * x - y * y + z * z,
  ];
}

/** The orthogonal matrix of given determinant, 1 or -1, nearest to M. */
export function nearestOrthogonal(m: Mat3, determinant: 1 | -1): Mat3 {
  return scale3(nearestRotation(scale3(m, determinant)), determinant);
}

export function scale3(m: Mat3, k: number): Mat3 {
  return m.map((e) => e * k) as unknown as Mat3;
}

export function transpose3(m: Mat3): Mat3 {
  return [m[0], m[3], m[6], m[1], m[4], m[7], m[2], m[5], m[8]];
}

/** Sum of matrices; `terms` is not empty. */
export function sum3(terms: Iterable<Mat3>): Mat3 {
  const sum = new Array<number>(9).fill(0);
  for (const m of terms) for (let i = 0; i < 9; i++) sum[i]! += m[i]!;
  return sum as unknown as Mat3;
}

/** Sum over points of to from^T: the matrix whose nearest orthogonal one carries the points `from` onto `to` best. */
export function correlationMatrix(from: readonly Vec3[], to: (index: number) => Vec3): Mat3 {
  const sum = new Array<number>(9).fill(0);
  from.forEach((x, k) => {
    const y = to(k);
    for (let i = 0; i < 3; i++) for (let j = 0; j < 3; j++) sum[3 * i + j]! += y[i]! * x[j]!;
  });
  return sum as unknown as Mat3;
}

/** Largest difference between entries. */
export function difference3(a: Mat3, b: Mat3): number {
  let worst = 0;
  for (let i = 0; i < 9; i++) worst = Math.max(worst, Math.abs(a[i]! - b[i]!));
  return worst;
}

/** F M F^T. */
export function conjugate3(F: Mat3, m: Mat3): Mat3 {
  return multiply3(F, multiply3(m, transpose3(F)));
}

export function dot3(a: Vec3, b: Vec3): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

export function cross3(a: Vec3, b: Vec3): Vec3 {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

export function minus3(a: Vec3, b: Vec3): Vec3 {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
}

export function length3(a: Vec3): number {
  return Math.sqrt(dot3(a, a));
}

/** The vector divided by its length. */
export function unit3(a: Vec3): Vec3 {
  const l = length3(a);
  return [a[0] / l, a[1] / l, a[2] / l];
}

/** Sum of to[i] from[i]^T: the matrix that carries orthonormal vectors `from` onto `to`. */
export function multiplyColumns(to: readonly Vec3[], from: readonly Vec3[]): Mat3 {
  return correlationMatrix(from, (i) => to[i]!);
}
