import type { Matrix3 } from "./cartesian.ts";
import type { CharacterTable } from "./character-table.ts";
import { decompose } from "./decomposition.ts";
import { matrixIndex } from "./matrix-index.ts";
import type { MolecularGroup } from "./molecular-group.ts";
import type { PointGroup } from "./point-group.ts";

/**
 * Index in the group of every element of a subgroup, matched by equality of matrices.
 * @throws RangeError if an element of the subgroup is not in the group
 */
export function embedding(group: PointGroup, subgroup: PointGroup): number[] {
  const index = matrixIndex(group.elements)!;
  return subgroup.elements.map((W) => {
    const i = index.find(W);
    if (i < 0) throw new RangeError(`${subgroup.schoenflies} is no subgroup: ${W.join(" ")} is not in the group`);
    return i;
  });
}

/** Largest difference of matrix entries that `nearestEmbedding` bridges by default: a misfit of about ten degrees. */
const NEAREST_TOLERANCE = 0.17;

/**
 * Index in a molecular group of every element of a subgroup given by orthogonal matrices, as of the site of a molecule
 * that is not quite as symmetric or not quite as oriented as the group.
 * @param subgroup whose elements the matrices are, in its order
 * @param tolerance largest difference between entries of matching matrices
 * @throws RangeError if a matrix has no match, or the matches do not multiply like the subgroup
 */
export function nearestEmbedding(
  group: MolecularGroup,
  subgroup: CharacterTable,
  matrices: readonly Matrix3[],
  tolerance = NEAREST_TOLERANCE,
): number[] {
  const distance = (a: Matrix3, b: Matrix3) => Math.max(...a.map((e, k) => Math.abs(e - b[k]!)));
  const found = matrices.map((M) => {
    const far = group.elements.map((E) => distance(E, M));
    const nearest = Math.min(...far);
    if (nearest > tolerance) {
      throw new RangeError(`no element of ${group.schoenflies} lies within ${tolerance} of ${M.join(" ")}`);
    }
    return far.indexOf(nearest);
  });
  for (let i = 0; i < found.length; i++) {
    for (let j = 0; j < found.length; j++) {
      const product = group.products[group.order * found[i]! + found[j]!];
      if (product !== found[subgroup.products[subgroup.order * i + j]!]) {
        throw new RangeError(`the elements of ${group.schoenflies} nearest to the matrices do not form a group`);
      }
    }
  }
  return found;
}

/**
 * How the species of a group split in a subgroup.
 * @param embedded index in the group of every element of the subgroup
 * @returns rows: species of the group; columns: multiplicities of the species of the subgroup
 */
export function subduceBy(group: CharacterTable, subgroup: CharacterTable, embedded: readonly number[]): number[][] {
  return group.irreps.map((irrep) =>
    decompose(
      subgroup,
      embedded.map((i) => irrep.characters[group.classOf[i]!]!),
    ),
  );
}

/**
 * Which species of a group arise from each species of a subgroup, by Frobenius reciprocity between real
 * representations: (times in the induced) x norm in the group = (times in the subduced) x norm in the subgroup.
 * @returns rows: species of the subgroup; columns: multiplicities of the species of the group
 */
export function induceBy(subgroup: CharacterTable, group: CharacterTable, embedded: readonly number[]): number[][] {
  const down = subduceBy(group, subgroup, embedded);
  return subgroup.irreps.map((small, s) => group.irreps.map((large, g) => (down[g]![s]! * small.norm) / large.norm));
}

/** `subduceBy` for crystallographic groups in one basis. @throws RangeError if it is no subgroup */
export function subduce(group: PointGroup, subgroup: PointGroup): number[][] {
  return subduceBy(group, subgroup, embedding(group, subgroup));
}

/** `induceBy` for crystallographic groups in one basis. @throws RangeError if it is no subgroup */
export function induce(subgroup: PointGroup, group: PointGroup): number[][] {
  return induceBy(subgroup, group, embedding(group, subgroup));
}
