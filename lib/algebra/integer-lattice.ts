import { exact, gcd } from "./rational.ts";

/**
 * Row echelon form by unimodular row operations (Hermite form): positive pivots, entries above a pivot reduced to
 * [0, pivot), zero rows dropped. The rows returned span the same lattice as the rows given.
 * @param rows integer rows, each of length m
 * @throws RangeError if an intermediate entry leaves the safe integers (so everywhere in this file)
 * Source: H. Cohen, A Course in Computational Algebraic Number Theory (1993), section 2.4 (method).
 */
export function hermiteRows(rows: readonly (readonly number[])[]): number[][] {
  const work = rows.map((r) => [...r]);
  const width = work[0]?.length ?? 0;
  const done: number[][] = [];
  for (let column = 0; column < width; column++) {
    const pivot = clearColumn(work, column);
    if (!pivot) continue;
    for (const row of done) subtractMultiple(row, pivot, Math.floor(row[column]! / pivot[column]!));
    done.push(pivot);
  }
  return done;
}

/** Euclid's algorithm down a column; removes and returns the row that keeps the gcd, or null if the column is zero. */
function clearColumn(work: number[][], column: number): number[] | null {
  for (;;) {
    let best = -1;
    let others = 0;
    for (let i = 0; i < work.length; i++) {
      const e = Math.abs(work[i]![column]!);
      if (e === 0) continue;
      others++;
      if (best < 0 || e < Math.abs(work[best]![column]!)) best = i;
    }
    if (best < 0) return null;
    const pivot = work[best]!;
    if (others === 1) {
      work.splice(best, 1);
      return pivot[column]! < 0 ? pivot.map((e) => -e + 0) : pivot;
    }
    for (let i = 0; i < work.length; i++) {
      if (i !== best) subtractMultiple(work[i]!, pivot, Math.trunc(work[i]![column]! / pivot[column]!));
    }
  }
}

function subtractMultiple(row: number[], by: readonly number[], k: number): void {
  if (k !== 0) for (let j = 0; j < row.length; j++) row[j] = exact(row[j]! - exact(k * by[j]!)) + 0;
}

/** The row divided by the gcd of its entries; the zero row is returned as it is. */
export function primitiveRow(row: readonly number[]): number[] {
  const g = row.reduce((a, b) => gcd(a, b), 0);
  return g > 1 ? row.map((e) => e / g + 0) : [...row];
}

/**
 * Basis of the integer solutions v of A v = 0 (v a column), as rows of the result; saturated, that is, every integer
 * solution is an integer combination of it.
 * @param a integer rows of equal length m > 0
 */
export function integerNullspace(a: readonly (readonly number[])[], m: number): number[][] {
  // Rows (A e_j | e_j): unimodular reduction of the left part to zero leaves kernel vectors at right.
  const left = a.length;
  const rows = Array.from({ length: m }, (_, j) => [
    ...a.map((row) => row[j]!),
    ...Array.from({ length: m }, (_, k) => (k === j ? 1 : 0)),
  ]);
  return hermiteRows(rows)
    .filter((row) => row.slice(0, left).every((e) => e === 0))
    .map((row) => row.slice(left));
}

/** Smith normal form: u a v = diagonal d, with u and v unimodular; d[i] >= 0 and each divides the next. */
export interface SmithForm {
  readonly u: number[][];
  readonly d: number[];
  readonly v: number[][];
}

/**
 * Smith normal form of an integer matrix with its transformations.
 * @param a integer rows, r of them, each of length c
 * Source: H. Cohen, A Course in Computational Algebraic Number Theory (1993), section 2.4.4 (method).
 */
export function smithForm(a: readonly (readonly number[])[]): SmithForm {
  const r = a.length;
  const c = a[0]?.length ?? 0;
  const m = a.map((row) => [...row]);
  const u = unit(r);
  const v = unit(c);
  const size = Math.min(r, c);
  for (let t = 0; t < size; t++) if (!diagonalise(m, u, v, t)) break;
  for (let i = 0; i < size; i++) {
    if (m[i]![i]! < 0) {
      negateRow(m[i]!);
      negateRow(u[i]!);
    }
  }
  return { u, d: Array.from({ length: size }, (_, i) => m[i]![i]!), v };
}

function diagonalise(m: number[][], u: number[][], v: number[][], t: number): boolean {
  for (;;) {
    const pivot = smallestEntry(m, t);
    if (!pivot) return false;
    swapRows(m, u, t, pivot[0]);
    swapColumns(m, v, t, pivot[1]);
    const p = m[t]![t]!;
    let clean = true;
    for (let i = t + 1; i < m.length; i++) {
      const q = Math.trunc(m[i]![t]! / p);
      subtractMultiple(m[i]!, m[t]!, q);
      subtractMultiple(u[i]!, u[t]!, q);
      if (m[i]![t] !== 0) clean = false;
    }
    for (let j = t + 1; j < m[t]!.length; j++) {
      const q = Math.trunc(m[t]![j]! / p);
      subtractColumn(m, j, t, q);
      subtractColumn(v, j, t, q);
      if (m[t]![j] !== 0) clean = false;
    }
    if (!clean) continue;
    const spoiler = m.findIndex((row, i) => i > t && row.some((e, j) => j > t && e % p !== 0));
    if (spoiler < 0) return true;
    subtractMultiple(m[t]!, m[spoiler]!, -1);
    subtractMultiple(u[t]!, u[spoiler]!, -1);
  }
}

function smallestEntry(m: readonly (readonly number[])[], t: number): [number, number] | null {
  let best: [number, number] | null = null;
  let size = Number.POSITIVE_INFINITY;
  for (let i = t; i < m.length; i++) {
    for (let j = t; j < m[i]!.length; j++) {
      const e = Math.abs(m[i]![j]!);
      if (e !== 0 && e < size) {
        size = e;
        best = [i, j];
      }
    }
  }
  return best;
}

function unit(n: number): number[][] {
  return Array.from({ length: n }, (_, i) => Array.from({ length: n }, (_, j) => (i === j ? 1 : 0)));
}

function swapRows(m: number[][], u: number[][], i: number, j: number): void {
  [m[i], m[j]] = [m[j]!, m[i]!];
  [u[i], u[j]] = [u[j]!, u[i]!];
}

function swapColumns(m: number[][], v: number[][], i: number, j: number): void {
  for (const rows of [m, v]) for (const row of rows) [row[i], row[j]] = [row[j]!, row[i]!];
}

function subtractColumn(m: number[][], j: number, by: number, k: number): void {
  if (k !== 0) for (const row of m) row[j] = exact(row[j]! - exact(k * row[by]!)) + 0;
}

function negateRow(row: number[]): void {
  for (let j = 0; j < row.length; j++) row[j] = -row[j]! + 0;
}
