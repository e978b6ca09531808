import { type BigFraction, big, bigAdd, bigGcd, bigMultiply } from "./big-fraction.ts";

/** Integer matrices of any shape and size, by the textbook definitions. */
export type BigMatrix = readonly (readonly bigint[])[];

export function bigMatrix(rows: readonly (readonly number[])[]): BigMatrix {
  return rows.map((row) => row.map(BigInt));
}

/** The rows of a row-major 3 x 3 matrix. */
export function rowsOf<T>(m: readonly T[]): T[][] {
  return [m.slice(0, 3), m.slice(3, 6), m.slice(6, 9)];
}

export function bigProduct(a: BigMatrix, b: BigMatrix): bigint[][] {
  return a.map((row) => (b[0] ?? []).map((_, j) => row.reduce((sum, e, k) => sum + e * b[k]![j]!, 0n)));
}

/** Determinant by expansion along the first row. */
export function bigDeterminant(m: BigMatrix): bigint {
  if (m.length === 0) return 1n;
  return m[0]!.reduce((sum, e, j) => {
    const minor = m.slice(1).map((row) => row.filter((_, k) => k !== j));
    return sum + (j % 2 ? -e : e) * (e === 0n ? 0n : bigDeterminant(minor));
  }, 0n);
}

function choices(n: number, k: number, from = 0): number[][] {
  if (k === 0) return [[]];
  const found: number[][] = [];
  for (let i = from; i <= n - k; i++) for (const rest of choices(n, k - 1, i + 1)) found.push([i, ...rest]);
  return found;
}

/** Greatest common divisor of all k x k minors (determinantal divisor); 1 for k = 0. */
export function minorsGcd(m: BigMatrix, k: number): bigint {
  let g = k === 0 ? 1n : 0n;
  for (const rows of choices(m.length, k)) {
    for (const columns of choices(m[0]?.length ?? 0, k)) {
      g = bigGcd(g, bigDeterminant(rows.map((i) => columns.map((j) => m[i]![j]!))));
    }
  }
  return g;
}

/** Invariant factors as quotients of determinantal divisors; 0 beyond the rank. */
export function invariantFactors(m: BigMatrix): bigint[] {
  const size = Math.min(m.length, m[0]?.length ?? 0);
  const divisors = Array.from({ length: size + 1 }, (_, k) => minorsGcd(m, k));
  return divisors.slice(1).map((d, i) => (d === 0n ? 0n : d / divisors[i]!));
}

export function bigRank(m: BigMatrix): number {
  return invariantFactors(m).filter((d) => d !== 0n).length;
}

/** Product of two matrices of fractions given as row-major numerators over a denominator. */
export function bigRatProduct(
  a: { readonly n: readonly number[]; readonly d: number },
  b: { readonly n: readonly number[]; readonly d: number },
): BigFraction[] {
  const entry = (m: typeof a, i: number) => big(BigInt(m.n[i]!), BigInt(m.d));
  const width = b.n.length / 3; // 3 for a matrix, 1 for a column
  return a.n
    .map((_, at) => at)
    .flatMap((at) => {
      const [i, j] = [Math.floor(at / 3), at % 3];
      if (j >= width) return [];
      const terms = [0, 1, 2].map((k) => bigMultiply(entry(a, 3 * i + k), entry(b, width * k + j)));
      return [terms.reduce(bigAdd)];
    });
}
