import {
  gcd,
  hermiteRows,
  type IntVec3,
  lcm,
  mod,
  multiplyRatMat,
  primitiveRow,
  type RatMat3,
  type RatVec3,
  ratMat3,
  ratVec3,
} from "../algebra/index.ts";
import { type ClassLattice, rowTimesStack } from "./class-lattice.ts";

/**
 * Origin shift p, in the basis of the operations, that carries their translations onto those of the type, once the
 * axes have been changed by P. Among the shifts that serve (a finite set modulo the lattice, times a continuous one in
 * polar groups) the smallest, components in (-1/2, 1/2], positive before negative, 0 along free directions.
 * @param target translations of the type's generators in primitive coordinates, over 12
 * @param translations those of the operations after the change of axes, the same coordinates, over d
 * @param P change of axes
 * @param centrings lattice translations in the basis of the operations
 */
export function originShift(
  lattice: ClassLattice,
  target: readonly IntVec3[],
  translations: readonly IntVec3[],
  d: number,
  P: RatMat3,
  centrings: readonly RatVec3[],
): RatVec3 {
  const { smith, primitive } = lattice;
  const toInput = multiplyRatMat(P, ratMat3(primitive.n, primitive.d));
  const pivots = freeDirections(lattice, toInput);
  const base = solution(smith, target, translations, d);
  const columns = [0, 1, 2].map((i) => ratVec3(column(smith.v, i)));
  // x = v y with y_i = (u b)_i / d_i + k_i / d_i
  let best: RatVec3 | null = null;
  let length = Number.POSITIVE_INFINITY;
  for (const k of steps(smith.d)) {
    const y = base.map((b, i) => (smith.d[i] ? { n: b.n + k[i]! * b.one, d: b.one * smith.d[i]! } : { n: 0, d: 1 }));
    const x = combine(columns, y);
    const inInput = transform(toInput, x);
    for (const t of centrings) {
      const p = settle(inInput, t, pivots);
      const size = (Math.abs(p.n[0]) + Math.abs(p.n[1]) + Math.abs(p.n[2])) / p.d;
      if (best && (size > length || (size === length && !precedes(p, best)))) continue;
      best = p;
      length = size;
    }
  }
  return best!;
}

interface Part {
  readonly n: number;
  readonly d: number;
}

/** (u b)_i as numerator over `one`, b the difference of target and translations. */
function solution(
  smith: ClassLattice["smith"],
  target: readonly IntVec3[],
  translations: readonly IntVec3[],
  d: number,
): { n: number; one: number }[] {
  return [0, 1, 2].map((i) => {
    if (!smith.d[i]) return { n: 0, one: 1 };
    const row = smith.u[i]!;
    const one = lcm(12, d);
    const n = rowTimesStack(row, target) * (one / 12) - rowTimesStack(row, translations) * (one / d);
    const g = gcd(mod(n, one), one);
    return { n: mod(n, one) / g, one: one / g };
  });
}

function column(v: readonly (readonly number[])[], i: number): [number, number, number] {
  return v.length === 0 ? [0, 0, 0] : [v[0]![i]!, v[1]![i]!, v[2]![i]!];
}

/** All k with 0 <= k_i < d_i, 0 where d_i = 0. */
function steps(d: readonly number[]): [number, number, number][] {
  const [p, q, r] = [0, 1, 2].map((i) => Math.max(1, d[i] ?? 1)) as [number, number, number];
  const all: [number, number, number][] = [];
  for (let i = 0; i < p; i++) for (let j = 0; j < q; j++) for (let k = 0; k < r; k++) all.push([i, j, k]);
  return all;
}

function combine(columns: readonly RatVec3[], y: readonly Part[]): RatVec3 {
  const d = y.reduce((m, e) => lcm(m, e.d), 1);
  const sum: [number, number, number] = [0, 0, 0];
  y.forEach((e, i) => {
    for (let j = 0; j < 3; j++) sum[j]! += columns[i]!.n[j]! * e.n * (d / e.d);
  });
  return ratVec3([mod(sum[0], d), mod(sum[1], d), mod(sum[2], d)], d);
}

function transform(m: RatMat3, v: RatVec3): RatVec3 {
  const at = (i: number) => m.n[3 * i]! * v.n[0] + m.n[3 * i + 1]! * v.n[1] + m.n[3 * i + 2]! * v.n[2];
  return ratVec3([at(0), at(1), at(2)], m.d * v.d);
}

interface Free {
  readonly direction: IntVec3;
  readonly pivot: number;
}

/** Directions, in the basis of the operations, along which the origin is free, in echelon form. */
function freeDirections(lattice: ClassLattice, toInput: RatMat3): Free[] {
  const { smith } = lattice;
  const free = [0, 1, 2].filter((i) => smith.v.length > 0 && !smith.d[i]).map((i) => ratVec3(column(smith.v, i)));
  const rows = free.map((v) => primitiveRow(transform(toInput, v).n));
  return hermiteRows(rows).map((row) => ({
    direction: row as unknown as IntVec3,
    pivot: row.findIndex((e) => e !== 0),
  }));
}

/** x + t, freed of what lies along free directions, each component moved by a lattice translation to (-1/2, 1/2]. */
function settle(x: RatVec3, t: RatVec3, free: readonly Free[]): RatVec3 {
  let d = lcm(x.d, t.d);
  let n = [0, 1, 2].map((i) => x.n[i]! * (d / x.d) + t.n[i]! * (d / t.d));
  for (const { direction, pivot } of free) {
    const k = direction[pivot]!;
    const at = n[pivot]!;
    n = n.map((e, i) => e * k - at * direction[i]!);
    d *= k;
  }
  const half = n.map((e) => {
    const r = mod(e, d);
    return 2 * r > d ? r - d : r;
  });
  return ratVec3([half[0]!, half[1]!, half[2]!], d);
}

/** Positive and large components first, so that of 1/4,0,0 and -1/4,0,0 the former is chosen. */
function precedes(a: RatVec3, b: RatVec3): boolean {
  for (let i = 0; i < 3; i++) {
    const difference = a.n[i]! * b.d - b.n[i]! * a.d;
    if (difference !== 0) return difference > 0;
  }
  return false;
}
