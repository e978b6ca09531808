import {
  apply,
  applyRow,
  gcd,
  hermiteRows,
  type IntMat3,
  type IntVec3,
  integerNullspace,
  lcm,
  mod,
  type RatVec3,
} from "../algebra/index.ts";
import type { PrimitiveOperation } from "./primitive-group.ts";

/**
 * A point, line, plane or the whole of space, modulo the lattice Z^3: the x with F x = c modulo 1. The rows of F are a
 * basis, in Hermite form, of all integer rows that vanish on the directions of the subspace, so F maps Z^3 onto Z^k and
 * two subspaces coincide modulo the lattice exactly when F and c modulo 1 agree.
 */
export interface AffineSubspace {
  readonly F: readonly IntVec3[];
  /** Numerators over d, in [0, d), lowest terms together. */
  readonly c: readonly number[];
  readonly d: number;
  /** Equal for equal subspaces modulo the lattice, different for others. */
  readonly key: string;
}

/** Dimension: 0 for a point, 3 for all of space. */
export function dimension(s: AffineSubspace): number {
  return 3 - s.F.length;
}

/** Subspace of rows (F_i | c_i) with F saturated, c_i a numerator over d. */
export function subspace(rows: readonly (readonly number[])[], d: number): AffineSubspace {
  const reduced = rows.length === 0 ? [] : hermiteRows(rows);
  const F = reduced.map((r) => [r[0]!, r[1]!, r[2]!] as const);
  const c = reduced.map((r) => mod(r[3]!, d));
  return normalised(F, c, d);
}

function normalised(F: readonly IntVec3[], c: readonly number[], d: number): AffineSubspace {
  const g = c.reduce((a, b) => gcd(a, b), d);
  const lowest = c.map((e) => e / g);
  return { F, c: lowest, d: d / g, key: `${F.join(";")}|${lowest.join()}/${d / g}` };
}

/** The subspace through a point with given directions (integer vectors, dependent ones allowed). */
export function subspaceThrough(point: RatVec3, directions: readonly IntVec3[]): AffineSubspace {
  const nonzero = directions.filter((v) => v.some((e) => e !== 0));
  const F = nonzero.length === 0 ? UNIT_ROWS : integerNullspace(nonzero, 3);
  return subspace(
    F.map((f) => [...f, f[0]! * point.n[0] + f[1]! * point.n[1] + f[2]! * point.n[2]]),
    point.d,
  );
}

const UNIT_ROWS: readonly IntVec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** Image under an operation whose translation is over dw: F W^-1 y = c + F W^-1 w. */
export function imageOf(s: AffineSubspace, a: PrimitiveOperation, dw: number): AffineSubspace {
  const d = lcm(s.d, dw);
  if (s.F.length === 3) return point(apply(a.W, s.c as IntVec3), a.w, d / s.d, d / dw, d);
  const rows = s.F.map((f, i) => {
    const row = applyRow(f, a.inverse);
    const shift = row[0] * a.w[0] + row[1] * a.w[1] + row[2] * a.w[2];
    return [...row, s.c[i]! * (d / s.d) + shift * (d / dw)];
  });
  return subspace(rows, d);
}

/** The point x kx + w kw, numerators over d: its F is the unit matrix, so nothing has to be reduced. */
function point(x: IntVec3, w: IntVec3, kx: number, kw: number, d: number): AffineSubspace {
  return normalised(
    UNIT_ROWS,
    x.map((e, i) => mod(e * kx + w[i]! * kw, d)),
    d,
  );
}

/** Basis of the lattice vectors along the subspace. */
export function directionsOf(s: AffineSubspace): IntVec3[] {
  if (s.F.length === 0) return [...UNIT_ROWS];
  return integerNullspace(s.F, 3) as unknown as IntVec3[];
}

/** A point of the subspace, chosen the same every time: free coordinates 0. Numerators over the result's d. */
export function pointOf(s: AffineSubspace): RatVec3 {
  // F is in Hermite form: back substitution with the non-pivot coordinates set to 0
  const x: [number, number, number] = [0, 0, 0];
  let d = s.d;
  for (let i = s.F.length - 1; i >= 0; i--) {
    const row = s.F[i]!;
    const pivot = row.findIndex((e) => e !== 0);
    let n = s.c[i]! * (d / s.d);
    for (let j = pivot + 1; j < 3; j++) n -= row[j]! * x[j]!;
    const g = gcd(n, row[pivot]!);
    const k = row[pivot]! / (g || 1);
    for (let j = 0; j < 3; j++) x[j]! *= k;
    d *= k;
    x[pivot] = n === 0 ? 0 : n / g;
  }
  return { n: x, d };
}

/** Matrix with the directions as columns, zero columns beyond. */
export function directionMatrix(directions: readonly IntVec3[]): IntMat3 {
  const at = (i: number, j: number) => directions[j]?.[i] ?? 0;
  return [at(0, 0), at(0, 1), at(0, 2), at(1, 0), at(1, 1), at(1, 2), at(2, 0), at(2, 1), at(2, 2)];
}
