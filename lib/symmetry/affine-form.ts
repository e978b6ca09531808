import {
  addVectors,
  apply,
  determinant,
  gcd,
  hermiteRows,
  type IntMat3,
  type IntVec3,
  integerNullspace,
  lcm,
  mod,
  multiply,
  type RatMat3,
  type RatVec3,
  rational,
  ratMat3,
  ratVec3,
  transformVector,
  vectorOf,
} from "../algebra/index.ts";
import { type AffineExpression, formatExpression, parseTriplet } from "./affine-text.ts";
import type { Operation } from "./operation.ts";
import { plainTriplet } from "./plain-operation.ts";
import type { Transformation } from "./transformation.ts";

/**
 * The points of a position as they are written, `x,x+1/2,0`: the triplet M (x, y, z) + t, where a letter that is not
 * free has a zero column in M.
 */
export interface AffineForm {
  readonly M: RatMat3;
  readonly t: RatVec3;
}

/** Reads `x,2x,z`, `1/8,y,-y+1/4`. @throws InputProblem `triplet-unreadable` */
export function parseForm(text: string): AffineForm {
  const plain = plainTriplet(text);
  if (plain) return { M: { n: plain.W, d: 1 }, t: plain.w };
  const rows = parseTriplet(text, "xyz");
  const entries = rows.flatMap((r) => r.coefficients);
  const d = entries.reduce((m, e) => lcm(m, e.d), 1);
  return {
    M: ratMat3(entries.map((e) => e.n * (d / e.d)) as unknown as IntMat3, d),
    t: vectorOf(rows[0].constant, rows[1].constant, rows[2].constant),
  };
}

/** Inverse of parseForm. */
export function formatForm({ M, t }: AffineForm): string {
  const row = (i: number): AffineExpression => ({
    coefficients: [rational(M.n[3 * i]!, M.d), rational(M.n[3 * i + 1]!, M.d), rational(M.n[3 * i + 2]!, M.d)],
    constant: rational(t.n[i]!, t.d),
  });
  return [0, 1, 2].map((i) => formatExpression(row(i), "xyz")).join(",");
}

/** Image of the points under an operation, constants reduced to [0, 1). */
export function imageOfForm(a: Operation, { M, t }: AffineForm): AffineForm {
  const d = lcm(t.d, a.w.d);
  const moved = apply(a.W, t.n);
  const at = (i: number) => mod(moved[i]! * (d / t.d) + a.w.n[i]! * (d / a.w.d), d);
  return { M: ratMat3(multiply(a.W, M.n), M.d), t: ratVec3([at(0), at(1), at(2)], d) };
}

/**
 * The points in another setting, written anew with letters of their own.
 * @param t the setting that the form is in, seen from the one wanted: x(wanted) = P x(form) + p
 */
export function formFromSetting(form: AffineForm, { P, p }: Transformation): AffineForm {
  const linear = multiply(P.n, form.M.n);
  const directions = [0, 1, 2].map((j): IntVec3 => [linear[j]!, linear[3 + j]!, linear[6 + j]!]);
  return formThrough(addVectors(transformVector(P, form.t), p), directions);
}

/** Whether an operation, after some lattice translation of the cell, fixes every point. */
export function isFixedBy(a: Operation, form: AffineForm): boolean {
  const { M, t } = form;
  const { W, w } = a;
  const d = lcm(t.d, w.d);
  for (let i = 0; i < 3; i++) {
    const [p, q, r] = [W[3 * i]!, W[3 * i + 1]!, W[3 * i + 2]!];
    for (let j = 0; j < 3; j++) {
      if (p * M.n[j]! + q * M.n[j + 3]! + r * M.n[j + 6]! !== M.n[3 * i + j]) return false;
    }
    const moved = p * t.n[0] + q * t.n[1] + r * t.n[2] - t.n[i]!;
    if ((moved * (d / t.d) + w.n[i]! * (d / w.d)) % d !== 0) return false;
  }
  return true;
}

/** Directions in which the points run: the columns of M, integer, dependent ones included. */
export function directionsOfForm({ M }: AffineForm): IntVec3[] {
  return [0, 1, 2].map((j) => [M.n[j]!, M.n[3 + j]!, M.n[6 + j]!]);
}

/**
 * Writes the points point + (span of directions) as a triplet with as many letters as there are dimensions. A free
 * coordinate is called by its own letter and carries no constant; coordinates are made free in the order x, y, z as
 * long as all others stay integer combinations (so `2y,y,z`, not `x,x/2,z`).
 * @param point one of the points
 * @param directions integer vectors, dependent ones allowed
 */
export function formThrough(point: RatVec3, directions: readonly IntVec3[]): AffineForm {
  const basis = saturated(directions);
  const free = freeCoordinates(basis);
  const columns: Record<number, IntVec3> = {};
  const minor = free.map((i) => basis.map((b) => b[i]!));
  const { inverse, det } = smallInverse(minor);
  // direction of the letter i: the combination of the basis that has 1 at i, 0 at the other free coordinates
  free.forEach((letter, k) => {
    columns[letter] = [0, 1, 2].map((i) =>
      basis.reduce((sum, b, j) => sum + b[i]! * inverse[j]![k]!, 0),
    ) as unknown as IntVec3;
  });
  const at = (i: number, j: number) => columns[j]?.[i] ?? 0;
  const n = [0, 1, 2].flatMap((i) => [0, 1, 2].map((j) => at(i, j))) as unknown as IntMat3;
  const M = ratMat3(n, det);
  const moved = apply(M.n, point.n);
  const d = point.d * M.d;
  const rest = (i: number) => point.n[i]! * M.d - (free.length > 0 ? moved[i]! : 0);
  return { M, t: ratVec3([rest(0), rest(1), rest(2)], d) };
}

/** Basis of all lattice vectors in the span of the directions. */
function saturated(directions: readonly IntVec3[]): IntVec3[] {
  const rows = hermiteRows(directions.filter((v) => v.some((e) => e !== 0)));
  if (rows.length === 0) return [];
  if (rows.length === 3) return hermiteRows(UNIT) as unknown as IntVec3[];
  if (rows.length === 1) {
    const [v] = rows;
    const g = v!.reduce((a, b) => gcd(a, b), 0);
    return [v!.map((e) => e / g) as unknown as IntVec3];
  }
  // two directions: those orthogonal to their cross product
  const [u, v] = rows as unknown as [IntVec3, IntVec3];
  const normal = [u[1] * v[2] - u[2] * v[1], u[2] * v[0] - u[0] * v[2], u[0] * v[1] - u[1] * v[0]];
  return integerNullspace([normal], 3) as unknown as IntVec3[];
}

const UNIT: readonly IntVec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** The first choice of coordinates whose minor is 1 or -1; else the first whose minor is not 0. */
function freeCoordinates(basis: readonly IntVec3[]): number[] {
  const choices = CHOICES[basis.length]!;
  const minors = choices.map((c) => Math.abs(minorOf(basis, c)));
  const unimodular = minors.indexOf(1);
  return [...choices[unimodular >= 0 ? unimodular : minors.findIndex((m) => m !== 0)]!];
}

const CHOICES: readonly (readonly (readonly number[])[])[] = [
  [[]],
  [[0], [1], [2]],
  [
    [0, 1],
    [0, 2],
    [1, 2],
  ],
  [[0, 1, 2]],
];

function minorOf(basis: readonly IntVec3[], c: readonly number[]): number {
  if (c.length === 0) return 1;
  if (c.length === 1) return basis[0]![c[0]!]!;
  if (c.length === 2) return basis[0]![c[0]!]! * basis[1]![c[1]!]! - basis[0]![c[1]!]! * basis[1]![c[0]!]!;
  return determinant(basis.flat() as unknown as IntMat3);
}

/** Inverse of an integer matrix of up to two rows (or the unit matrix of three): numerators, and the denominator. */
function smallInverse(m: readonly (readonly number[])[]): { inverse: number[][]; det: number } {
  if (m.length === 1) return { inverse: [[1]], det: m[0]![0]! };
  if (m.length === 2) {
    const [[a, b], [c, d]] = m as [[number, number], [number, number]];
    return {
      inverse: [
        [d, -b],
        [-c, a],
      ],
      det: a * d - b * c,
    };
  }
  return { inverse: m.map((row) => [...row]), det: 1 };
}
