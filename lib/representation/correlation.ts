import { apply } from "../algebra/index.ts";
import { closeTo } from "./cartesian.ts";
import type { CharacterTable } from "./character-table.ts";
import { type MolecularGroup, orthogonalGroup } from "./molecular-group.ts";
import { type PointGroup, pointGroup } from "./point-group.ts";
import { subduceBy } from "./subduction.ts";
import { subgroupClasses } from "./subgroups.ts";

/** How the species of a group split in one of its subgroups. */
export interface Correlation<G extends PointGroup | MolecularGroup> {
  readonly subgroup: G;
  /** Index in the group of every element of the subgroup. */
  readonly embedded: readonly number[];
  /** Number of subgroups conjugate to this one, itself included. */
  readonly conjugates: number;
  /** Elements kept, by the names they have in the group: `E, C2, 2C2', i, sigma_h, 2sigma_v`. */
  readonly kept: string;
  /** Directions of the axes and planes kept, by name in the group: `C2 [001]`, `C2' [100] [010]`. */
  readonly directions: readonly string[];
  /** Rows: species of the group; columns: multiplicities of the species of the subgroup. */
  readonly table: readonly (readonly number[])[];
}

/**
 * Correlations with one subgroup of every class of conjugate subgroups, the group itself first. Of conjugates, the one
 * is chosen most of whose elements keep the z axis of the group or its frame, else the first.
 */
export function correlations<G extends PointGroup | MolecularGroup>(group: G): Correlation<G>[] {
  return subgroupClasses(group).map((conjugates) => {
    const members = chosen(group, conjugates);
    const subgroup = subgroupOf(group, members);
    const table = subduceBy(group, subgroup, members);
    const kept = keptClasses(group, members);
    return {
      subgroup,
      embedded: members,
      conjugates: conjugates.length,
      kept,
      directions: keptDirections(group, subgroup, members),
      table,
    };
  });
}

function chosen(group: PointGroup | MolecularGroup, conjugates: readonly (readonly number[])[]): readonly number[] {
  const z = "frame" in group ? group.frame.z : group.axes.z;
  const keepsZ = group.elements.map((W) => {
    const image = apply(W, z);
    return closeTo(image, z) || closeTo(image, [-z[0], -z[1], -z[2]]);
  });
  const score = (members: readonly number[]) => members.filter((m) => keepsZ[m]).length;
  return conjugates.reduce((best, other) => (score(other) > score(best) ? other : best));
}

/**
 * The subgroup of some elements of a group, labelled by the same rules in the same frame.
 * @param members element indices; the order of the elements of the result
 * @throws RangeError or InputProblem if they do not form a group
 */
export function subgroupOf<G extends PointGroup | MolecularGroup>(group: G, members: readonly number[]): G;
export function subgroupOf(
  group: PointGroup | MolecularGroup,
  members: readonly number[],
): PointGroup | MolecularGroup {
  return "frame" in group
    ? pointGroup(
        members.map((i) => group.elements[i]!),
        group.frame,
      )
    : orthogonalGroup(members.map((i) => group.elements[i]!));
}

const plainName = (name: string): string => name.replace(/^\d+/, "");

function keptClasses(group: CharacterTable, members: readonly number[]): string {
  const counts = group.classes.map((c) => c.members.filter((m) => members.includes(m)).length);
  const names = group.classes.flatMap((c, k) =>
    counts[k]! > 0 ? [`${counts[k]! > 1 ? counts[k] : ""}${plainName(c.name)}`] : [],
  );
  return names.join(", ");
}

/** Directions of the elements kept, gathered under the names of the classes of the group. */
function keptDirections(group: CharacterTable, subgroup: CharacterTable, members: readonly number[]): string[] {
  const byName = new Map<string, Set<string>>();
  for (const c of subgroup.classes) {
    for (const m of c.members) {
      const name = plainName(group.classes[group.classOf[members[m]!]!]!.name);
      const list = byName.get(name) ?? new Set();
      for (const direction of c.directions) list.add(direction);
      byName.set(name, list);
    }
  }
  return [...byName].filter(([, list]) => list.size > 0).map(([name, list]) => `${name} ${[...list].join(" ")}`);
}
