/** Row-major 3x3 matrix of floating-point numbers: entry (i, j) is m[3 * i + j]. */
export type Matrix3 = readonly [number, number, number, number, number, number, number, number, number];
/** Cartesian vector. */
export type Vector3 = readonly [number, number, number];

/**
 * Largest difference between entries of orthogonal matrices, or components of unit vectors, taken as equal;
 * dimensionless. Rounding in products is a millionth of it, and elements of a group of order 240 differ by 0.05.
 */
export const MATRIX_TOLERANCE = 1e-6;

export function dot(a: Vector3, b: Vector3): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

export function cross(a: Vector3, b: Vector3): Vector3 {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

/** The vector divided by its length, entries next to an integer made exact. */
export function unit(v: Vector3): Vector3 {
  const length = Math.hypot(...v);
  return [snap(v[0] / length), snap(v[1] / length), snap(v[2] / length)];
}

/** An integer if the number is within rounding of it; never -0. */
export function snap(x: number): number {
  const nearest = Math.round(x);
  return Math.abs(x - nearest) < 1e-12 ? nearest + 0 : x;
}

export function closeTo(a: readonly number[], b: readonly number[], tolerance = MATRIX_TOLERANCE): boolean {
  for (let i = 0; i < a.length; i++) if (!(Math.abs(a[i]! - b[i]!) <= tolerance)) return false;
  return true;
}

/** The unit vector along v or -v whose first component that is not 0 is positive. */
export function axisDirection(v: Vector3): Vector3 {
  const u = unit(v);
  const first = u.find((e) => Math.abs(e) > MATRIX_TOLERANCE) ?? 0;
  return first < 0 ? [-u[0] + 0, -u[1] + 0, -u[2] + 0] : u;
}

/** Along x, then y, then z; otherwise the larger first component that differs comes first. */
export function compareAxes(a: Vector3, b: Vector3): number {
  const rank = (v: Vector3) => {
    const k = v.findIndex((e) => Math.abs(e) > 1 - MATRIX_TOLERANCE);
    return k < 0 ? 3 : k;
  };
  const aligned = rank(a) - rank(b);
  if (aligned !== 0) return aligned;
  for (let i = 0; i < 3; i++) if (Math.abs(a[i]! - b[i]!) > MATRIX_TOLERANCE) return b[i]! - a[i]!;
  return 0;
}

/** `x`, `y`, `z` or the components to three decimals. */
export function formatAxis(v: Vector3): string {
  const k = v.findIndex((e) => Math.abs(e) > 1 - MATRIX_TOLERANCE);
  if (k >= 0) return "xyz"[k]!;
  return `(${v.map((e) => String(Number(e.toFixed(3)) + 0)).join(", ")})`;
}
