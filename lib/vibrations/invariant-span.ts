import type { Mat3, Vec3 } from "../structure/index.ts";

/** A group acting on the displacements of atoms: element g turns them by matrices[g] and moves atom k to permutations[g][k]. */
export interface DisplacementAction {
  readonly atoms: number;
  /** Orthogonal, on Cartesian columns. */
  readonly matrices: readonly Mat3[];
  readonly permutations: readonly (readonly number[])[];
}

/** A row of Wilson's B matrix: the change of a coordinate per displacement of an atom; an atom may come twice. */
export type SparseRow = readonly (readonly [atom: number, gradient: Vec3])[];

/**
 * A row of which less than this is new, as a share of its length, is redundant. Rounding stays below 1e-10; rows that
 * a nearly planar or nearly straight arrangement makes nearly dependent stay above 1e-3. Dimensionless.
 */
export const RANK_TOLERANCE = 1e-4;

/** Rows shorter than this are null, such as a bond between an atom and its own translate; dimensionless. */
const NULL_ROW = 1e-9;

/** Largest difference of a trace from the integer or algebraic number that a character is. */
const CHARACTER_ROUNDING = 1e-9;

/**
 * A space of displacements that the group keeps, growing by sets of rows that the group permutes. What each set adds is
 * invariant too, so its characters are traces of the projection onto it: they count exactly how many coordinates of each
 * species are independent of all before.
 * Source: E. B. Wilson, J. C. Decius and P. C. Cross, Molecular Vibrations, McGraw-Hill, New York 1955, chapters 4 and 6
 * (B matrix, redundant coordinates).
 */
export class InvariantSpan {
  private readonly action: DisplacementAction;
  private readonly basis: Float64Array[] = []; // orthonormal

  constructor(action: DisplacementAction) {
    this.action = action;
  }

  get rank(): number {
    return this.basis.length;
  }

  /**
   * Adds rows. @returns the character of what they add, one number per element of the group
   */
  extend(rows: readonly SparseRow[]): number[] {
    const first = this.basis.length;
    const whole = 3 * this.action.atoms;
    for (const row of rows) {
      if (this.basis.length === whole) break;
      const residual = this.residual(row);
      if (residual) this.basis.push(residual);
    }
    return this.characters(first);
  }

  /** The part of a row orthogonal to the basis, of length 1; null where it is redundant. */
  private residual(row: SparseRow): Float64Array | null {
    const v = new Float64Array(3 * this.action.atoms);
    for (const [atom, [x, y, z]] of row) {
      v[3 * atom]! += x;
      v[3 * atom + 1]! += y;
      v[3 * atom + 2]! += z;
    }
    if (normalise(v) < NULL_ROW) return null;
    this.project(v);
    if (normalise(v) < RANK_TOLERANCE) return null;
    this.project(v); // once more: the first pass leaves errors of rounding, magnified by its cancellation
    normalise(v);
    return v;
  }

  private project(v: Float64Array): void {
    for (const q of this.basis) {
      let c = 0;
      for (let i = 0; i < v.length; i++) c += v[i]! * q[i]!;
      if (c === 0) continue;
      for (let i = 0; i < v.length; i++) v[i]! -= c * q[i]!;
    }
  }

  /** Traces of every element on the basis vectors from `first` on. */
  private characters(first: number): number[] {
    const { matrices, permutations, atoms } = this.action;
    return matrices.map((R, g) => {
      let sum = 0;
      for (let k = first; k < this.basis.length; k++) {
        const q = this.basis[k]!;
        for (let a = 0; a < atoms; a++) sum += expectation(R, q, 3 * a, 3 * permutations[g]![a]!);
      }
      return tidy(sum);
    });
  }
}

/** q at `to`, times R times q at `from`. */
function expectation(R: Mat3, q: Float64Array, from: number, to: number): number {
  const [x, y, z] = [q[from]!, q[from + 1]!, q[from + 2]!];
  return (
    q[to]! * (R[0] * x + R[1] * y + R[2] * z) +
    q[to + 1]! * (R[3] * x + R[4] * y + R[5] * z) +
    q[to + 2]! * (R[6] * x + R[7] * y + R[8] * z)
  );
}

/** Makes the length 1. @returns the length before */
function normalise(v: Float64Array): number {
  let square = 0;
  for (const e of v) square += e * e;
  const length = Math.sqrt(square);
  if (length > 0) for (let i = 0; i < v.length; i++) v[i]! /= length;
  return length;
}

function tidy(x: number): number {
  const nearest = Math.round(x);
  return Math.abs(x - nearest) < CHARACTER_ROUNDING ? nearest + 0 : x;
}
