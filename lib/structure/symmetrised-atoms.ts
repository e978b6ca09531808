import { type FoldedAtoms, pointOf } from "./atom-set.ts";
import { apply3, type Vec3 } from "./cell.ts";
import type { SymmetrySearch } from "./symmetry-search.ts";

/** Atoms put where the group found wants them. */
export interface SymmetrisedAtoms {
  /** For each atom given, Cartesian, angstrom: where it lies, seen from where it is put. */
  readonly moves: readonly Vec3[];
  /** For each atom given, the orbit it belongs to: the index of the first atom given of that orbit. */
  readonly orbits: Int32Array;
}

/** Every atom at the mean of its images under the group found, and the orbits of that group. */
export function symmetrisedAtoms(search: SymmetrySearch): SymmetrisedAtoms {
  const { folded, given } = search;
  const means = meanPositions(search);
  const orbitOf = orbitNumbers(search);
  const first = new Map<number, number>();
  const orbits = new Int32Array(given.length);
  const moves = given.map((_, i): Vec3 => {
    const k = folded.owner[i]!;
    const orbit = orbitOf[k]!;
    if (!first.has(orbit)) first.set(orbit, i);
    orbits[i] = first.get(orbit)!;
    return moveOf(folded, i, k, means);
  });
  return { moves, orbits };
}

function moveOf({ atoms, offset }: FoldedAtoms, i: number, k: number, means: Float64Array): Vec3 {
  const x = pointOf(atoms, k);
  const d = apply3(atoms.axes, [x[0] - means[3 * k]!, x[1] - means[3 * k + 1]!, x[2] - means[3 * k + 2]!]);
  return [d[0] + offset[3 * i]!, d[1] + offset[3 * i + 1]!, d[2] + offset[3 * i + 2]!];
}

/** Fractional in the axes of the folded atoms, next to each of them. */
function meanPositions({ folded: { atoms }, group, exact }: SymmetrySearch): Float64Array {
  const { origin } = exact;
  const means = new Float64Array(atoms.x.length);
  const share = 1 / group.members.length;
  group.members.forEach(({ W, permutation }, m) => {
    const { n, d } = exact.operations[m]!.w;
    for (let k = 0; k < permutation.length; k++) {
      const x = pointOf(atoms, k);
      const image = apply3(W, [x[0] - origin[0], x[1] - origin[1], x[2] - origin[2]]);
      const j = permutation[k]!;
      for (let i = 0; i < 3; i++) {
        const at = image[i]! + n[i]! / d + origin[i]!;
        means[3 * j + i]! += share * (at - Math.round(at - atoms.x[3 * j + i]!));
      }
    }
  });
  return means;
}

function orbitNumbers({ folded: { atoms }, group }: SymmetrySearch): Int32Array {
  const orbit = new Int32Array(atoms.species.length).fill(-1);
  for (let k = 0; k < orbit.length; k++) {
    if (orbit[k] !== -1) continue;
    for (const { permutation } of group.members) orbit[permutation[k]!] = k;
  }
  return orbit;
}
