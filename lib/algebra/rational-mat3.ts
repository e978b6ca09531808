import { adjugate, applyRow, determinant, type IntMat3, type IntVec3, multiply, scale } from "./int-mat3.ts";
import { exact, gcd, lcm, mod, type Rational, rational } from "./rational.ts";

/** The rational vector n/d over its least common denominator d > 0, in lowest terms. */
export interface RatVec3 {
  readonly n: IntVec3;
  readonly d: number;
}

/** The rational matrix n/d over its least common denominator d > 0, in lowest terms; n row-major. */
export interface RatMat3 {
  readonly n: IntMat3;
  readonly d: number;
}

export const ZERO_VECTOR: RatVec3 = { n: [0, 0, 0], d: 1 };
export const RAT_IDENTITY: RatMat3 = { n: [1, 0, 0, 0, 1, 0, 0, 0, 1], d: 1 };

function lowestTerms(n: readonly number[], d: number): { readonly n: number[]; readonly d: number } {
  let g = Math.abs(d);
  for (const e of n) {
    if (!Number.isSafeInteger(e)) throw new RangeError(`not an exact integer: ${e}`);
    if (g !== 1) g = gcd(g, e);
  }
  if (!Number.isSafeInteger(d) || d === 0) throw new RangeError(`not a denominator: ${d}`);
  const s = d < 0 ? -g : g;
  return { n: n.map((e) => e / s + 0), d: d / s };
}

/** Refuses a computation whose terms may add up to more than the safe integers hold; bounds them by largest entries. */
function requireExact(terms: number, ...factors: readonly (readonly number[])[]): void {
  let bound = terms;
  for (const entries of factors) {
    let largest = 0;
    for (const e of entries) largest = Math.max(largest, Math.abs(e));
    bound *= largest;
  }
  if (bound > Number.MAX_SAFE_INTEGER)
    throw new RangeError(`entries too large to stay exact: ${factors.join(" and ")}`);
}

/** The vector n/d in lowest terms. @throws RangeError if d is 0 or exactness is lost */
export function ratVec3(n: readonly [number, number, number], d = 1): RatVec3 {
  return lowestTerms(n, d) as unknown as RatVec3;
}

/** The matrix n/d in lowest terms. @throws RangeError if d is 0 or exactness is lost */
export function ratMat3(n: IntMat3, d = 1): RatMat3 {
  return lowestTerms(n, d) as unknown as RatMat3;
}

/** Vector of three rationals. */
export function vectorOf(x: Rational, y: Rational, z: Rational): RatVec3 {
  const d = lcm(lcm(x.d, y.d), z.d);
  return ratVec3([x.n * (d / x.d), y.n * (d / y.d), z.n * (d / z.d)], d);
}

/** Component i (0, 1 or 2). */
export function component(v: RatVec3, i: number): Rational {
  return rational(v.n[i]!, v.d);
}

export function addVectors(a: RatVec3, b: RatVec3): RatVec3 {
  const d = lcm(a.d, b.d);
  const ka = d / a.d;
  const kb = d / b.d;
  const sum = (i: 0 | 1 | 2) => exact(a.n[i] * ka) + exact(b.n[i] * kb);
  return ratVec3([sum(0), sum(1), sum(2)], d);
}

export function negateVector(a: RatVec3): RatVec3 {
  return { n: [-a.n[0] + 0, -a.n[1] + 0, -a.n[2] + 0], d: a.d };
}

export function subtractVectors(a: RatVec3, b: RatVec3): RatVec3 {
  return addVectors(a, negateVector(b));
}

/** Every component reduced to [0, 1). */
export function modOne(a: RatVec3): RatVec3 {
  return ratVec3([mod(a.n[0], a.d), mod(a.n[1], a.d), mod(a.n[2], a.d)], a.d);
}

export function equalVectors(a: RatVec3, b: RatVec3): boolean {
  return a.d === b.d && a.n[0] === b.n[0] && a.n[1] === b.n[1] && a.n[2] === b.n[2];
}

/** m v with v a column. @throws RangeError if exactness may be lost */
export function transformVector(m: RatMat3, v: RatVec3): RatVec3 {
  requireExact(3, m.n, v.n);
  const [m0, m1, m2, m3, m4, m5, m6, m7, m8] = m.n;
  const [x, y, z] = v.n;
  return ratVec3([m0 * x + m1 * y + m2 * z, m3 * x + m4 * y + m5 * z, m6 * x + m7 * y + m8 * z], m.d * v.d);
}

/** a b. @throws RangeError if exactness may be lost */
export function multiplyRatMat(a: RatMat3, b: RatMat3): RatMat3 {
  requireExact(3, a.n, b.n);
  return ratMat3(multiply(a.n, b.n), a.d * b.d);
}

/** @throws RangeError if the matrix is singular or exactness may be lost */
export function inverseRatMat(m: RatMat3): RatMat3 {
  requireExact(6, m.n, m.n, m.n);
  const det = determinant(m.n);
  if (det === 0) throw new RangeError(`singular matrix: ${m.n.join(" ")}`);
  return ratMat3(scale(adjugate(m.n), m.d), det);
}

/** @throws RangeError if exactness may be lost */
export function ratDeterminant(m: RatMat3): Rational {
  requireExact(6, m.n, m.n, m.n);
  return rational(determinant(m.n), m.d * m.d * m.d);
}

/** v m with v a row of integers. @throws RangeError if exactness may be lost */
export function rowTimes(v: IntVec3, m: RatMat3): RatVec3 {
  requireExact(3, v, m.n);
  return ratVec3(applyRow(v, m.n), m.d);
}

/** The integer matrix, if it is one. */
export function asInteger(m: RatMat3): IntMat3 | null {
  return m.d === 1 ? m.n : null;
}
