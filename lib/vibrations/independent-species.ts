import { irrepMatrices, type MolecularGroup, type PointGroup, type Rows } from "../representation/index.ts";
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
 * A row of which less than this share is new is redundant. Where a ring or a centre is nearly planar, its angles hold a
 * little of a torsion, in proportion to heights of up to 0.1 angstrom: less than this. Dimensionless.
 */
export const RANK_TOLERANCE = 0.1;

/** Projections below this share of a row come from rounding; any other is above 1 / (order of the group). */
const NOTHING = 1e-6;

/**
 * Displacements sorted by species, growing by sets of rows that the group permutes. One partner of each species stands for
 * all, so the rank of what has been added there is the number of independent coordinates of the species.
 * Source: E. B. Wilson, J. C. Decius and P. C. Cross, Molecular Vibrations, McGraw-Hill, New York 1955, chapters 4 and 6
 * (B matrix, symmetry coordinates, redundant coordinates).
 */
export class IndependentSpecies {
  private readonly action: DisplacementAction;
  private readonly partners: readonly FirstPartner[];

  constructor(action: DisplacementAction, group: PointGroup | MolecularGroup) {
    this.action = action;
    this.partners = group.irreps.map(({ norm }, i) => ({ matrices: irrepMatrices(group, i), norm, basis: [] }));
  }

  /**
   * Adds the rows and all their images. @returns how many coordinates of each species are new, in the order of the species
   */
  extend(rows: readonly SparseRow[]): number[] {
    return this.partners.map((partner) => {
      const { matrices, norm, basis } = partner;
      const projected = rows.flatMap((row) => matrices[0]!.map((_, j) => this.projected(row, matrices, j)));
      return Math.round(
        extendBasis(
          basis,
          projected.filter((v) => v !== null),
        ) / norm,
      );
    });
  }

  /** The part of a row that transforms like partner j, carried to the first partner; null where there is none. */
  private projected(row: SparseRow, matrices: readonly Rows[], j: number): Float64Array | null {
    const v = new Float64Array(3 * this.action.atoms);
    const share = matrices[0]!.length / matrices.length;
    for (let g = 0; g < matrices.length; g++) {
      const weight = share * matrices[g]![0]![j]!;
      if (weight !== 0) addImage(v, row, this.action.matrices[g]!, this.action.permutations[g]!, weight);
    }
    const length = Math.sqrt(row.reduce((s, [, e]) => s + e[0] * e[0] + e[1] * e[1] + e[2] * e[2], 0));
    return normalise(v) > NOTHING * length ? v : null;
  }
}

/** Adds `weight` times the image of a row under an element. */
function addImage(v: Float64Array, row: SparseRow, R: Mat3, permutation: readonly number[], weight: number): void {
  for (let k = 0; k < row.length; k++) {
    const entry = row[k]!;
    const e = entry[1];
    const at = 3 * permutation[entry[0]]!;
    v[at]! += weight * (R[0] * e[0] + R[1] * e[1] + R[2] * e[2]);
    v[at + 1]! += weight * (R[3] * e[0] + R[4] * e[1] + R[5] * e[2]);
    v[at + 2]! += weight * (R[6] * e[0] + R[7] * e[1] + R[8] * e[2]);
  }
}

/** The displacements that transform like the first partner of a species. */
interface FirstPartner {
  readonly matrices: readonly Rows[];
  /** 2 for a pair of complex conjugate species: the first partner then stands for both. */
  readonly norm: 1 | 2;
  /** Orthonormal; what has been added so far. */
  readonly basis: Float64Array[];
}

/**
 * Extends an orthonormal basis by the rows, the one of which most is new first, until less than RANK_TOLERANCE of any is
 * new. @returns by how many
 */
function extendBasis(basis: Float64Array[], rows: readonly Float64Array[]): number {
  const left = rows.map((v) => {
    for (const q of basis) takeOff(v, q);
    return v;
  });
  const before = basis.length;
  for (;;) {
    const lengths = left.map(lengthOf);
    const longest = lengths.reduce((best, l, i) => (l > lengths[best]! ? i : best), 0);
    if (left.length === 0 || lengths[longest]! < RANK_TOLERANCE) return basis.length - before;
    const [q] = left.splice(longest, 1) as [Float64Array];
    normalise(q);
    basis.push(q);
    for (const v of left) takeOff(v, q);
  }
}

function takeOff(v: Float64Array, q: Float64Array): void {
  let c = 0;
  for (let i = 0; i < v.length; i++) c += v[i]! * q[i]!;
  if (c === 0) return;
  for (let i = 0; i < v.length; i++) v[i]! -= c * q[i]!;
}

function lengthOf(v: Float64Array): number {
  let square = 0;
  for (let i = 0; i < v.length; i++) square += v[i]! * v[i]!;
  return Math.sqrt(square);
}

/** Makes the length 1. @returns the length before */
function normalise(v: Float64Array): number {
  const length = lengthOf(v);
  if (length > 0) for (let i = 0; i < v.length; i++) v[i]! /= length;
  return length;
}
