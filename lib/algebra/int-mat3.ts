/**
 * Integer matrices and vectors, unchecked for speed: exact as long as sums of products stay below 2^53, which holds for
 * symmetry operations and for the basis changes between cells. The rational matrices check.
 */

/** Row-major: entry (i, j) is m[3 * i + j]. */
export type IntMat3 = readonly [number, number, number, number, number, number, number, number, number];
/** A column or a row of three integers, as the function says. */
export type IntVec3 = readonly [number, number, number];

export const IDENTITY: IntMat3 = [1, 0, 0, 0, 1, 0, 0, 0, 1];
export const MINUS_IDENTITY: IntMat3 = [-1, 0, 0, 0, -1, 0, 0, 0, -1];

/** Matrix product a b. Here and below + 0 turns -0 into 0, and indices cost half of what destructuring does. */
export function multiply(a: IntMat3, b: IntMat3): IntMat3 {
  return [
    a[0] * b[0] + a[1] * b[3] + a[2] * b[6] + 0,
    a[0] * b[1] + a[1] * b[4] + a[2] * b[7] + 0,
    a[0] * b[2] + a[1] * b[5] + a[2] * b[8] + 0,
    a[3] * b[0] + a[4] * b[3] + a[5] * b[6] + 0,
    a[3] * b[1] + a[4] * b[4] + a[5] * b[7] + 0,
    a[3] * b[2] + a[4] * b[5] + a[5] * b[8] + 0,
    a[6] * b[0] + a[7] * b[3] + a[8] * b[6] + 0,
    a[6] * b[1] + a[7] * b[4] + a[8] * b[7] + 0,
    a[6] * b[2] + a[7] * b[5] + a[8] * b[8] + 0,
  ];
}

/** m v with v a column. */
export function apply(m: IntMat3, v: IntVec3): IntVec3 {
  return [
    m[0] * v[0] + m[1] * v[1] + m[2] * v[2] + 0,
    m[3] * v[0] + m[4] * v[1] + m[5] * v[2] + 0,
    m[6] * v[0] + m[7] * v[1] + m[8] * v[2] + 0,
  ];
}

/** v m with v a row. */
export function applyRow(v: IntVec3, m: IntMat3): IntVec3 {
  return [
    v[0] * m[0] + v[1] * m[3] + v[2] * m[6] + 0,
    v[0] * m[1] + v[1] * m[4] + v[2] * m[7] + 0,
    v[0] * m[2] + v[1] * m[5] + v[2] * m[8] + 0,
  ];
}

export function determinant(m: IntMat3): number {
  return (
    m[0] * (m[4] * m[8] - m[5] * m[7]) - m[1] * (m[3] * m[8] - m[5] * m[6]) + m[2] * (m[3] * m[7] - m[4] * m[6]) + 0
  );
}

export function trace(m: IntMat3): number {
  return m[0] + m[4] + m[8] + 0;
}

export function transpose(m: IntMat3): IntMat3 {
  return [m[0], m[3], m[6], m[1], m[4], m[7], m[2], m[5], m[8]];
}

/** Adjugate: m adj(m) = det(m) 1. */
export function adjugate(m: IntMat3): IntMat3 {
  return [
    m[4] * m[8] - m[5] * m[7] + 0,
    m[2] * m[7] - m[1] * m[8] + 0,
    m[1] * m[5] - m[2] * m[4] + 0,
    m[5] * m[6] - m[3] * m[8] + 0,
    m[0] * m[8] - m[2] * m[6] + 0,
    m[2] * m[3] - m[0] * m[5] + 0,
    m[3] * m[7] - m[4] * m[6] + 0,
    m[1] * m[6] - m[0] * m[7] + 0,
    m[0] * m[4] - m[1] * m[3] + 0,
  ];
}

/** Entry by entry times k. */
export function scale(m: IntMat3, k: number): IntMat3 {
  return m.map((e) => e * k + 0) as unknown as IntMat3;
}

export function negate(m: IntMat3): IntMat3 {
  return scale(m, -1);
}

export function subtract(a: IntMat3, b: IntMat3): IntMat3 {
  return a.map((e, i) => e - b[i]! + 0) as unknown as IntMat3;
}

export function add(a: IntMat3, b: IntMat3): IntMat3 {
  return a.map((e, i) => e + b[i]! + 0) as unknown as IntMat3;
}

export function equal(a: IntMat3, b: IntMat3): boolean {
  for (let i = 0; i < 9; i++) if (a[i] !== b[i]) return false;
  return true;
}

/**
 * Inverse of a matrix with determinant 1 or -1, so that it is integer again.
 * @throws RangeError for any other determinant
 */
export function inverseUnimodular(m: IntMat3): IntMat3 {
  const det = determinant(m);
  if (det !== 1 && det !== -1) throw new RangeError(`not unimodular, determinant ${det}: ${m.join(" ")}`);
  return scale(adjugate(m), det);
}
