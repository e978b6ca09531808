import {
  IDENTITY,
  type IntVec3,
  inverseRatMat,
  multiplyRatMat,
  type RatVec3,
  ratMat3,
  ratVec3,
  transformVector,
} from "../algebra/index.ts";
import { primitiveBasis } from "../symmetry/index.ts";
import { type AtomMapping, AtomMatcher } from "./atom-mapping.ts";
import { type AtomSet, type FoldedAtoms, floatMatrix, placeWrapped, pointOf, rarestCount } from "./atom-set.ts";
import { apply3, multiply3, type Vec3 } from "./cell.ts";
import { niggliReduction } from "./niggli-reduction.ts";

/** A translation that carries the atoms onto themselves. */
export interface FoundTranslation {
  /** In terms of the cell given. */
  readonly vector: RatVec3;
  /** Distances between image and atom, angstrom. */
  readonly largest: number;
  readonly mean: number;
}

/** Near translations are looked for first with this share of the tolerance, so that exact ones go before others. */
const FIRST_SHARE = 0.1;

/**
 * Folds a structure into its smallest cell: one translation after another, atoms that it carries onto each other put at
 * their mean, until none is left. No atom is moved by more than the tolerance at a time.
 * @param tolerance largest displacement, angstrom
 */
export function foldTranslations(
  start: FoldedAtoms,
  tolerance: number,
): { readonly folded: FoldedAtoms; readonly translations: readonly FoundTranslation[] } {
  let folded = start;
  const translations: FoundTranslation[] = [];
  for (const limit of [FIRST_SHARE * tolerance, tolerance]) {
    // every translation divides the number of atoms by two or more, so the loop ends
    for (;;) {
      const found = firstTranslation(folded.atoms, limit);
      if (!found) break;
      const { largest, mean } = found.mapping;
      translations.push({ vector: transformVector(folded.basis, found.vector), largest, mean });
      folded = fold(folded, found);
    }
  }
  return { folded, translations };
}

/** A translation of finite order: q times it is a vector of the lattice. */
interface CyclicTranslation {
  readonly mapping: AtomMapping;
  readonly vector: RatVec3;
  readonly order: number;
  /** The atoms in cycles of that length. */
  readonly cycles: readonly Cycle[];
}

/** Atoms that a translation carries into each other. */
interface Cycle {
  readonly members: readonly number[];
  /** Mean of the atoms, each taken back by its share of the translation; fractional. */
  readonly centre: Vec3;
  /** Cartesian, angstrom: each atom seen from the mean. */
  readonly offsets: readonly Vec3[];
}

function firstTranslation(atoms: AtomSet, limit: number): CyclicTranslation | null {
  const matcher = new AtomMatcher(atoms, limit);
  const [x0, y0, z0] = pointOf(atoms, 0);
  const count = rarestCount(atoms);
  for (let j = 1; j < count; j++) {
    const [x, y, z] = pointOf(atoms, j);
    const mapping = matcher.match(IDENTITY, [x - x0, y - y0, z - z0]);
    const cyclic = mapping && cyclicTranslation(atoms, mapping, limit);
    if (cyclic) return cyclic;
  }
  return null;
}

/** A translation moves no atom onto itself, so all its cycles have one length, and all sum up to one lattice vector. */
function cyclicTranslation(atoms: AtomSet, mapping: AtomMapping, limit: number): CyclicTranslation | null {
  const { permutation, shifts } = mapping;
  const n = permutation.length;
  const done = new Uint8Array(n);
  const rings: { members: number[]; cells: IntVec3[]; sum: IntVec3 }[] = [];
  for (let k = 0; k < n; k++) {
    if (done[k]) continue;
    const members: number[] = [];
    const cells: IntVec3[] = [];
    let sum: IntVec3 = [0, 0, 0];
    for (let j = k; !done[j]; j = permutation[j]!) {
      done[j] = 1;
      members.push(j);
      cells.push(sum);
      sum = [sum[0] + shifts[3 * j]!, sum[1] + shifts[3 * j + 1]!, sum[2] + shifts[3 * j + 2]!];
    }
    rings.push({ members, cells, sum });
    const first = rings[0]!;
    if (members.length !== first.members.length || sum.some((e, i) => e !== first.sum[i])) return null;
  }
  const order = rings[0]!.members.length;
  const vector = ratVec3(rings[0]!.sum, order);
  if (order < 2 || vector.d !== order) return null; // two atoms on one place can be exchanged by a lattice vector
  const cycles = rings.map(({ members, cells }) => averaged(atoms, members, cells, vector));
  const within = cycles.every((c) => c.offsets.every((o) => Math.hypot(...o) <= limit));
  return within ? { mapping, vector, order, cycles } : null;
}

function averaged(atoms: AtomSet, members: readonly number[], cells: readonly IntVec3[], t: RatVec3): Cycle {
  const back = members.map((k, step) => {
    const x = pointOf(atoms, k);
    return [0, 1, 2].map((i) => x[i]! + cells[step]![i]! - (step * t.n[i]!) / t.d) as unknown as Vec3;
  });
  const centre = [0, 1, 2].map((i) => back.reduce((s, x) => s + x[i]!, 0) / back.length) as unknown as Vec3;
  const offsets = back.map((x) => apply3(atoms.axes, [x[0] - centre[0], x[1] - centre[1], x[2] - centre[2]]));
  return { members, centre, offsets };
}

/** The atoms on the Niggli axes of the lattice with the translation added. */
function fold(from: FoldedAtoms, { vector, order, cycles }: CyclicTranslation): FoldedAtoms {
  const multiples = Array.from({ length: order }, (_, m) => {
    const part = (n: number) => (((n * m) % vector.d) + vector.d) % vector.d;
    return ratVec3([part(vector.n[0]), part(vector.n[1]), part(vector.n[2])], vector.d);
  });
  const finer = primitiveBasis(multiples);
  const axes = multiply3(from.atoms.axes, floatMatrix(finer));
  const change = multiplyRatMat(finer, ratMat3(niggliReduction(axes)));
  const back = floatMatrix(inverseRatMat(change));
  const x = new Float64Array(3 * cycles.length);
  const species = new Int32Array(cycles.length);
  const target = new Int32Array(from.atoms.species.length);
  const moved = new Float64Array(3 * from.atoms.species.length);
  cycles.forEach(({ members, centre, offsets }, c) => {
    placeWrapped(x, c, apply3(back, centre));
    species[c] = from.atoms.species[members[0]!]!;
    members.forEach((k, step) => {
      target[k] = c;
      moved.set(offsets[step]!, 3 * k);
    });
  });
  return {
    atoms: { axes: multiply3(from.atoms.axes, floatMatrix(change)), x, species },
    basis: multiplyRatMat(from.basis, change),
    owner: from.owner.map((k) => target[k]!),
    offset: from.offset.map((e, i) => e + moved[3 * from.owner[Math.floor(i / 3)]! + (i % 3)]!),
  };
}
