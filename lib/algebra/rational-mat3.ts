import { adjugate, apply, applyRow, determinant, type IntMat3, type IntVec3, multiply, scale } from "./int-mat3.ts";
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

/** The greatest number that divides all of n and d, with the sign of d. */
function commonFactor(n: readonly number[], d: number): number {
  let g = Math.abs(d);
  for (let i = 0; i < n.length; i++) {
    const e = n[i]!;
    if (!Number.isSafeInteger(e)) throw new RangeError(`not an exact integer: ${e}`);
    if (g !== 1 && e !== 0) g = gcd(g, e);
  }
  if (!Number.isSafeInteger(d) || d === 0) throw new RangeError(`not a denominator: ${d}`);
  return d < 0 ? -g : g;
}

/** Sum of the squares of the entries. */
function squares(e: readonly number[]): number {
  let sum = 0;
  for (let i = 0; i < e.length; i++) sum += e[i]! * e[i]!;
  return sum;
}

/**
 * Refuses a computation whose terms may add up to 2^52 or more, where sums of floating-point integers begin to round.
 * By Cauchy and Schwarz the absolute terms of a product of matrices or vectors add up to at most the root of the
 * product of their sums of squares; those of a determinant to at most the root of the cube of its sum of squares.
 */
function requireExact(boundSquared: number): void {
  if (boundSquared < 2 ** 104) return;
  throw new RangeError(`entries too large to stay exact: terms of up to ${Math.sqrt(boundSquared).toPrecision(3)}`);
}

/** The vector n/d in lowest terms. @throws RangeError if d is 0 or exactness is lost */
export function ratVec3(n: readonly [number, number, number], d = 1): RatVec3 {
  const s = commonFactor(n, d);
  return { n: [n[0] / s + 0, n[1] / s + 0, n[2] / s + 0], d: d / s };
}

/** The matrix n/d in lowest terms. @throws RangeError if d is 0 or exactness is lost */
export function ratMat3(n: IntMat3, d = 1): RatMat3 {
  const s = commonFactor(n, d);
  return { n: n.map((e) => e / s + 0) as unknown as IntMat3, d: d / s };
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
  requireExact(squares(m.n) * squares(v.n));
  return ratVec3(apply(m.n, v.n), m.d * v.d);
}

/** a b. @throws RangeError if exactness may be lost */
export function multiplyRatMat(a: RatMat3, b: RatMat3): RatMat3 {
  requireExact(squares(a.n) * squares(b.n));
  return ratMat3(multiply(a.n, b.n), a.d * b.d);
}

/** @throws RangeError if the matrix is singular or exactness may be lost */
export function inverseRatMat(m: RatMat3): RatMat3 {
  requireExact(squares(m.n) ** 3);
  const det = determinant(m.n);
  if (det === 0) throw new RangeError(`singular matrix: ${m.n.join(" ")}`);
  return ratMat3(scale(adjugate(m.n), m.d), det);
}

/** @throws RangeError if exactness may be lost */
export function ratDeterminant(m: RatMat3): Rational {
  requireExact(squares(m.n) ** 3);
  return rational(determinant(m.n), m.d * m.d * m.d);
}

/** v m with v a row of integers. @throws RangeError if exactness may be lost */
export function rowTimes(v: IntVec3, m: RatMat3): RatVec3 {
  requireExact(squares(v) * squares(m.n));
  return ratVec3(applyRow(v, m.n), m.d);
}

/** The integer matrix, if it is one. */
export function asInteger(m: RatMat3): IntMat3 | null {
  return m.d === 1 ? m.n : null;
}
