import { determinant, type IntMat3, type IntVec3, multiply } from "../algebra/index.ts";
import { apply3 } from "./cell.ts";
import { changeAxes, gramOf, type LatticeAxes, volumeOfAxes } from "./lattice-axes.ts";
import { niggliReduction, normalSigns, REDUCTION_EPSILON } from "./niggli-reduction.ts";

/** Each step shortens the four vectors; after the first reduction a few are left. */
const MOST_STEPS = 500;

/**
 * The unimodular matrix (determinant 1) that leads from the axes of a primitive cell to its Delaunay cell: the shortest
 * three vectors, in ascending order, of the seven that Selling's reduction ends with, their angles all acute or none.
 * Of triples of the same lengths the one with the smallest scalar products b.c, a.c, a.b in this order is taken, so that
 * the cell depends on nothing but the lattice.
 * @param epsilon terms of the metric tensor closer than this times V^(2/3) count as equal
 * Sources: B. Delaunay, Z. Kristallogr. 84 (1933) 109; E. Selling, J. reine angew. Math. 77 (1874) 143 (reduction).
 */
export function delaunayReduction(axes: LatticeAxes, epsilon: number = REDUCTION_EPSILON): IntMat3 {
  const first = niggliReduction(axes); // the same start whatever the axes, so the same end
  const eps = epsilon * volumeOfAxes(changeAxes(axes, first)) ** (2 / 3);
  const P = selling(axes, first, eps);
  const base = changeAxes(axes, P);
  return multiply(P, shortestTriple(base, eps));
}

/** Selling's reduction of a, b, c and d = -(a + b + c): no two of the four include an acute angle at the end. */
function selling(axes: LatticeAxes, first: IntMat3, eps: number): IntMat3 {
  let P = first;
  for (let i = 0; i < MOST_STEPS; i++) {
    const step = sellingStep(changeAxes(axes, P), eps);
    if (!step) break;
    P = multiply(P, step);
  }
  return P;
}

const FOUR: readonly IntVec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
  [-1, -1, -1],
];

/** The four become -i, j, i + k, i + l for the pair i, j of the largest product; the first three are the new basis. */
function sellingStep(axes: LatticeAxes, eps: number): IntMat3 | null {
  let best = eps;
  let pair: [number, number] | null = null;
  for (let i = 0; i < 4; i++) {
    for (let j = i + 1; j < 4; j++) {
      const p = product(axes, FOUR[i]!, FOUR[j]!);
      if (p > best) {
        best = p;
        pair = [i, j];
      }
    }
  }
  if (!pair) return null;
  const [i, j] = pair;
  const [k, l] = [0, 1, 2, 3].filter((m) => m !== i && m !== j) as [number, number];
  const next = [minus(FOUR[i]!), FOUR[j]!, plus(FOUR[i]!, FOUR[k]!), plus(FOUR[i]!, FOUR[l]!)] as const;
  const step = columns(next[0], next[1], next[2]);
  return determinant(step) > 0 ? step : columns(next[1], next[0], next[2]);
}

/** A candidate for the cell: its matrix with A, B, C, b.c, a.c, a.b. */
interface Triple {
  readonly P: IntMat3;
  readonly form: readonly number[];
}

function shortestTriple(axes: LatticeAxes, eps: number): IntMat3 {
  const seven = [...FOUR, plus(FOUR[0]!, FOUR[1]!), plus(FOUR[1]!, FOUR[2]!), plus(FOUR[2]!, FOUR[0]!)];
  let best: Triple | null = null;
  for (const a of seven) {
    for (const b of seven) {
      for (const c of seven) {
        const triple = Math.abs(determinant(columns(a, b, c))) === 1 ? normalised(axes, a, b, c, eps) : null;
        if (triple && (!best || precedes(triple.form, best.form, eps))) best = triple;
      }
    }
  }
  return best!.P; // the vectors reduced are among the triples
}

function normalised(axes: LatticeAxes, a: IntVec3, b: IntVec3, c: IntVec3, eps: number): Triple {
  const handed = determinant(columns(a, b, c));
  const products = [product(axes, b, c), product(axes, a, c), product(axes, a, b)] as const;
  const [i, j, k] = normalSigns(products, eps).map((s) => s * handed) as [number, number, number];
  const P = columns(times(a, i), times(b, j), times(c, k));
  const g = gramOf(changeAxes(axes, P));
  return { P, form: [g[0], g[4], g[8], g[5], g[2], g[1]] };
}

/** Order of forms, terms within eps being equal. */
function precedes(x: readonly number[], y: readonly number[], eps: number): boolean {
  for (let i = 0; i < x.length; i++) {
    if (x[i]! < y[i]! - eps) return true;
    if (x[i]! > y[i]! + eps) return false;
  }
  return false;
}

function product(axes: LatticeAxes, u: IntVec3, v: IntVec3): number {
  const [x, y, z] = apply3(axes, u);
  const [p, q, r] = apply3(axes, v);
  return x * p + y * q + z * r;
}

function columns(a: IntVec3, b: IntVec3, c: IntVec3): IntMat3 {
  return [a[0], b[0], c[0], a[1], b[1], c[1], a[2], b[2], c[2]];
}

function plus(u: IntVec3, v: IntVec3): IntVec3 {
  return [u[0] + v[0] + 0, u[1] + v[1] + 0, u[2] + v[2] + 0];
}

function minus(u: IntVec3): IntVec3 {
  return times(u, -1);
}

function times(u: IntVec3, k: number): IntVec3 {
  return [u[0] * k + 0, u[1] * k + 0, u[2] * k + 0];
}
