import type { CharacterTable } from "./character-table.ts";
import { decompose } from "./decomposition.ts";
import { matrixIndex } from "./matrix-index.ts";
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
