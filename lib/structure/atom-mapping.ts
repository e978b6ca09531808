import { apply, equal, type IntMat3, multiply } from "../algebra/index.ts";
import type { AtomSet } from "./atom-set.ts";
import { apply3, type Vec3 } from "./cell.ts";
import { NearestAtom } from "./nearest-atom.ts";

/**
 * An operation on a set of atoms, up to displacements: W x_k + w lies next to x_j + L_k, j = permutation[k], L_k the
 * whole cells shifts[3k], shifts[3k + 1], shifts[3k + 2].
 */
export interface AtomMapping {
  readonly W: IntMat3;
  /** The translation that leaves no displacement on average; fractional, not reduced. */
  readonly w: Vec3;
  readonly permutation: Int32Array;
  readonly shifts: Int32Array;
  /** Distances between image and atom, angstrom. */
  readonly largest: number;
  readonly mean: number;
}

/** Looks whether operations carry a set of atoms onto itself. */
export class AtomMatcher {
  private readonly atoms: AtomSet;
  private readonly limit: number;
  private readonly nearest: NearestAtom;
  private readonly taken: Int32Array;
  private round = 0;

  /** @param limit largest displacement of an operation, angstrom */
  constructor(atoms: AtomSet, limit: number) {
    this.atoms = atoms;
    this.limit = limit;
    // the translation tried may itself be off by the displacement of the atom it was read from
    this.nearest = new NearestAtom(atoms, 2 * limit);
    this.taken = new Int32Array(atoms.species.length);
  }

  /** Atoms looked for so far: the work done. */
  get searches(): number {
    return this.nearest.searches;
  }

  /** The mapping made by an operation, or null where an atom lands next to none, or two on one. Ends at the first. */
  match(W: IntMat3, w: Vec3): AtomMapping | null {
    const { x, species } = this.atoms;
    const n = species.length;
    const permutation = new Int32Array(n);
    const shifts = new Int32Array(3 * n);
    this.round++;
    for (let k = 0; k < n; k++) {
      const [a, b, c] = [x[3 * k]!, x[3 * k + 1]!, x[3 * k + 2]!];
      const j = this.nearest.find(
        W[0] * a + W[1] * b + W[2] * c + w[0],
        W[3] * a + W[4] * b + W[5] * c + w[1],
        W[6] * a + W[7] * b + W[8] * c + w[2],
        species[k]!,
      );
      if (j < 0 || this.taken[j] === this.round) return null;
      this.taken[j] = this.round;
      permutation[k] = j;
      shifts.set(this.nearest.shift, 3 * k);
    }
    const mapping = measured(this.atoms, W, permutation, shifts);
    return mapping.largest <= this.limit ? mapping : null;
  }
}

/** The mapping with its best translation and its displacements. */
function measured(atoms: AtomSet, W: IntMat3, permutation: Int32Array, shifts: Int32Array): AtomMapping {
  const n = permutation.length;
  const residual = (k: number): [number, number, number] => {
    const image = apply3(W, [atoms.x[3 * k]!, atoms.x[3 * k + 1]!, atoms.x[3 * k + 2]!]);
    const j = 3 * permutation[k]!;
    for (let i = 0; i < 3; i++) image[i] = atoms.x[j + i]! + shifts[3 * k + i]! - image[i]!;
    return image;
  };
  const w: [number, number, number] = [0, 0, 0];
  for (let k = 0; k < n; k++) {
    const r = residual(k);
    for (let i = 0; i < 3; i++) w[i]! += r[i]! / n;
  }
  let largest = 0;
  let sum = 0;
  for (let k = 0; k < n; k++) {
    const r = residual(k);
    const d = Math.hypot(...apply3(atoms.axes, [r[0] - w[0], r[1] - w[1], r[2] - w[2]]));
    largest = Math.max(largest, d);
    sum += d;
  }
  return { W, w, permutation, shifts, largest, mean: sum / n };
}

/** The identity on a set of atoms. */
export function identityMapping(atoms: AtomSet): AtomMapping {
  const n = atoms.species.length;
  const permutation = Int32Array.from({ length: n }, (_, k) => k);
  return {
    W: [1, 0, 0, 0, 1, 0, 0, 0, 1],
    w: [0, 0, 0],
    permutation,
    shifts: new Int32Array(3 * n),
    largest: 0,
    mean: 0,
  };
}

/** a after b, with the displacements of the product. */
export function composeMappings(atoms: AtomSet, a: AtomMapping, b: AtomMapping): AtomMapping {
  const n = a.permutation.length;
  const permutation = new Int32Array(n);
  const shifts = new Int32Array(3 * n);
  for (let k = 0; k < n; k++) {
    const j = b.permutation[k]!;
    permutation[k] = a.permutation[j]!;
    const moved = apply(a.W, [b.shifts[3 * k]!, b.shifts[3 * k + 1]!, b.shifts[3 * k + 2]!]);
    for (let i = 0; i < 3; i++) shifts[3 * k + i] = moved[i]! + a.shifts[3 * j + i]!;
  }
  return measured(atoms, multiply(a.W, b.W), permutation, shifts);
}

/**
 * The whole cells by which a differs from b, where the two are one operation modulo the lattice; null where they are
 * not, or do not agree about some atom.
 */
export function differenceOf(a: AtomMapping, b: AtomMapping): readonly [number, number, number] | null {
  if (!equal(a.W, b.W) || a.permutation[0] !== b.permutation[0]) return null;
  const d = [0, 1, 2].map((i) => a.shifts[i]! - b.shifts[i]! + 0) as [number, number, number];
  for (let k = 0; k < a.permutation.length; k++) {
    if (a.permutation[k] !== b.permutation[k]) return null;
    for (let i = 0; i < 3; i++) if (a.shifts[3 * k + i]! - b.shifts[3 * k + i]! !== d[i]) return null;
  }
  return d;
}
