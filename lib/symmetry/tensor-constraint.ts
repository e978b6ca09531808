import { gcd, hermiteRows, type IntMat3, lcm } from "../algebra/index.ts";

/** Row and column of each component, in the order of TENSOR_COMPONENTS. */
export const TENSOR_PAIRS = [
  [0, 0],
  [1, 1],
  [2, 2],
  [0, 1],
  [0, 2],
  [1, 2],
] as const;

/** Names of the components of a symmetric tensor in the order used throughout. */
export const TENSOR_COMPONENTS = ["11", "22", "33", "12", "13", "23"] as const;

/** What a site group allows of a symmetric contravariant tensor, such as a displacement tensor. */
export interface TensorConstraint {
  /** Six comma-separated expressions, `u11,u22,u33,0,u13,0`, in the order 11 22 33 12 13 23. */
  readonly text: string;
  /** Indices, in that order, of the components that are free; every other one follows from them. */
  readonly free: readonly number[];
  /** 6 x 6 over d, row-major: u = matrix u, exact for every allowed tensor; zero columns where not free. */
  readonly matrix: { readonly n: readonly number[]; readonly d: number };
  /** 6 x 6 over d, row-major: mean over the site group; carries any tensor onto an allowed one. */
  readonly projection: { readonly n: readonly number[]; readonly d: number };
}

/**
 * Constraint that the rotation parts of a site group put on a tensor t with t' = W t W^T: the components of a mean
 * square displacement on the axes of the cell, so `beta`, and U as well where `scalesAlike` holds.
 * Source of the method: W. J. A. M. Peterse and J. H. Palm, Acta Cryst. 20 (1966) 147.
 */
export function tensorConstraint(rotations: readonly IntMat3[]): TensorConstraint {
  const sum = new Array<number>(36).fill(0);
  for (const W of rotations) addSquare(sum, W);
  // the allowed tensors are the columns of the mean; in echelon form the leading components are free
  const columns = [0, 1, 2, 3, 4, 5].map((j) => [0, 1, 2, 3, 4, 5].map((i) => sum[6 * i + j]!));
  const rows = backSubstituted(hermiteRows(columns.filter((c) => c.some((e) => e !== 0))));
  const free = rows.map((row) => row.findIndex((e) => e !== 0));
  const d = rows.reduce((m, row, k) => lcm(m, row[free[k]!]!), 1);
  const n = new Array<number>(36).fill(0);
  rows.forEach((row, k) => {
    const column = free[k]!;
    for (let i = 0; i < 6; i++) n[6 * i + column] = row[i]! * (d / row[column]!) + 0;
  });
  return {
    text: TENSOR_COMPONENTS.map((_, i) => expression(n.slice(6 * i, 6 * i + 6), d)).join(),
    free,
    matrix: { n, d },
    projection: { n: sum, d: rotations.length },
  };
}

/** Adds the action of W on the six components: (W t W^T)_ij = sum over k, l of W_ik t_kl W_jl. */
function addSquare(sum: number[], W: IntMat3): void {
  TENSOR_PAIRS.forEach(([i, j], row) => {
    TENSOR_PAIRS.forEach(([k, l], column) => {
      const direct = W[3 * i + k]! * W[3 * j + l]!;
      const crossed = k === l ? 0 : W[3 * i + l]! * W[3 * j + k]!;
      sum[6 * row + column]! += direct + crossed;
    });
  });
}

/** Integer rows in echelon form with zeros above every leading entry, each row in lowest terms. */
function backSubstituted(rows: number[][]): number[][] {
  const work = rows.map((r) => [...r]);
  for (let i = work.length - 1; i >= 0; i--) {
    const lead = work[i]!.findIndex((e) => e !== 0);
    for (let k = 0; k < i; k++) {
      const at = work[k]![lead]!;
      if (at !== 0) work[k] = work[k]!.map((e, j) => e * work[i]![lead]! - at * work[i]![j]! + 0);
    }
  }
  return work.map((row) => {
    const g = row.reduce((a, b) => gcd(a, b), 0) * Math.sign(row.find((e) => e !== 0)!);
    return row.map((e) => e / g + 0);
  });
}

/** `u22/2`, `2u13`, `u11-u12`, `0`. */
function expression(row: readonly number[], d: number): string {
  let text = "";
  row.forEach((n, j) => {
    if (n === 0) return;
    const g = gcd(n, d);
    const size = Math.abs(n) / g;
    const sign = n < 0 ? "-" : text ? "+" : "";
    text += `${sign}${size === 1 ? "" : size}u${TENSOR_COMPONENTS[j]}${d === g ? "" : `/${d / g}`}`;
  });
  return text || "0";
}

/**
 * Whether the constraint on beta holds for U as it stands. U_ij = beta_ij / (2 pi^2 a*_i a*_j), so a rotation part that
 * mixes components must mix reciprocal axes of equal length, which the point group ensures if it carries one onto the
 * other. Always so in conventional axes; not in every skew cell.
 * @param rotations of the site group
 * @param pointGroup all rotation parts of the space group
 */
export function scalesAlike(rotations: readonly IntMat3[], pointGroup: readonly IntMat3[]): boolean {
  const alike = [0, 1, 2].map((i) => [0, 1, 2].map((j) => i === j || pointGroup.some((W) => carries(W, i, j))));
  for (const W of rotations) {
    for (let i = 0; i < 3; i++)
      for (let j = 0; j < 3; j++) if (W[3 * i + j] !== 0 && !linked(alike, i, j)) return false;
  }
  return true;
}

/** Row i of W is plus or minus the unit row j: reciprocal axis i goes to axis j. */
function carries(W: IntMat3, i: number, j: number): boolean {
  return [0, 1, 2].every((k) => Math.abs(W[3 * i + k]!) === (k === j ? 1 : 0));
}

function linked(alike: readonly (readonly boolean[])[], i: number, j: number): boolean {
  const direct = alike[i]![j]! || alike[j]![i]!;
  return direct || [0, 1, 2].some((k) => (alike[i]![k]! || alike[k]![i]!) && (alike[k]![j]! || alike[j]![k]!));
}
