/**
 * Exact zero test for sums of N-th roots of unity: exp(2 pi i k / N) as an integer vector in the basis 1, z, z^2, ...
 * of the cyclotomic field, so that a sum of roots vanishes exactly when the sum of vectors does.
 */
export interface RootTable {
  readonly N: number;
  /** Degree of the cyclotomic polynomial. */
  readonly degree: number;
  /** Row k, of length `degree`: the root exp(2 pi i k / N). */
  readonly rows: readonly (readonly number[])[];
}

const cache = new Map<number, RootTable>();

/** The table for N-th roots, built on first use. */
export function rootTable(N: number): RootTable {
  const known = cache.get(N);
  if (known) return known;
  const modulus = cyclotomic(N);
  const degree = modulus.length - 1;
  const rows: number[][] = [];
  let row = [1, ...new Array<number>(degree - 1).fill(0)];
  for (let k = 0; k < N; k++) {
    rows.push(row);
    // times z; z^degree = -(lower terms), the polynomial being monic
    const top = row[degree - 1]!;
    row = row.map((_, i) => (i === 0 ? 0 : row[i - 1]!) - top * modulus[i]! + 0);
  }
  const fresh = { N, degree, rows };
  cache.set(N, fresh);
  return fresh;
}

/** Coefficients, lowest first, of the N-th cyclotomic polynomial: x^N - 1 divided by those of the proper divisors. */
function cyclotomic(N: number): number[] {
  let p = [-1, ...new Array<number>(N - 1).fill(0), 1];
  for (let d = 1; d < N; d++) if (N % d === 0) p = quotient(p, cyclotomic(d));
  return p;
}

/** Exact quotient by a monic polynomial. */
function quotient(p: readonly number[], by: readonly number[]): number[] {
  const rest = [...p];
  const size = p.length - by.length + 1;
  const q = new Array<number>(size).fill(0);
  for (let i = size - 1; i >= 0; i--) {
    const c = rest[i + by.length - 1]!;
    q[i] = c + 0;
    for (let j = 0; j < by.length; j++) rest[i + j]! -= c * by[j]!;
  }
  return q;
}
