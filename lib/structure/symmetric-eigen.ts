/** Eigenvalues, largest first, and unit eigenvectors in the same order. */
export interface EigenSystem {
  readonly values: readonly number[];
  readonly vectors: readonly (readonly number[])[];
}

/** Sweeps of Jacobi's method; convergence is quadratic and takes six or seven for matrices of this size. */
const MOST_SWEEPS = 60;

/**
 * Eigensystem of a small real symmetric matrix by Jacobi rotations.
 * @param matrix rows; only the symmetric part is meant
 * Source: C. G. J. Jacobi, J. reine angew. Math. 30 (1846) 51 (method).
 */
export function symmetricEigen(matrix: readonly (readonly number[])[]): EigenSystem {
  const n = matrix.length;
  const a = matrix.map((row) => [...row]);
  const v = Array.from({ length: n }, (_, i) => Array.from({ length: n }, (_, j) => (i === j ? 1 : 0)));
  for (let sweep = 0; sweep < MOST_SWEEPS; sweep++) {
    let rotated = false;
    for (let p = 0; p < n; p++) {
      for (let q = p + 1; q < n; q++) rotated = annihilate(a, v, p, q) || rotated;
    }
    if (!rotated) break;
  }
  const order = a.map((_, i) => i).sort((i, j) => a[j]![j]! - a[i]![i]!);
  return { values: order.map((i) => a[i]![i]!), vectors: order.map((i) => v.map((row) => row[i]!)) };
}

/** Rotates the plane of p and q so that entry (p, q) vanishes; false where it is nothing beside the diagonal. */
function annihilate(a: number[][], v: number[][], p: number, q: number): boolean {
  const off = a[p]![q]!;
  if (Math.abs(off) <= 1e-17 * (Math.abs(a[p]![p]!) + Math.abs(a[q]![q]!)) || off === 0) return false;
  const theta = (a[q]![q]! - a[p]![p]!) / (2 * off);
  const t = (theta < 0 ? -1 : 1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
  const c = 1 / Math.sqrt(t * t + 1);
  const s = t * c;
  for (const row of a) mix(row, p, q, c, s);
  const [rp, rq] = [a[p]!, a[q]!];
  for (let k = 0; k < a.length; k++) [rp[k], rq[k]] = [c * rp[k]! - s * rq[k]!, s * rp[k]! + c * rq[k]!];
  for (const row of v) mix(row, p, q, c, s);
  return true;
}

function mix(row: number[], p: number, q: number, c: number, s: number): void {
  [row[p], row[q]] = [c * row[p]! - s * row[q]!, s * row[p]! + c * row[q]!];
}
