import { InputProblem } from "../problem.ts";
import {
  type Correlation,
  correlations,
  crystalClasses,
  type LinearGroupName,
  linearTable,
  type MolecularGroup,
  molecularGroup,
  type PointGroup,
  pointGroupTable,
  subduceLinear,
  type Vector3,
} from "../representation/index.ts";
import { readPointName } from "./point-name.ts";
import { countsOf, type SpeciesCounts } from "./species-counts.ts";

/** How species split in one subgroup. */
export interface SubgroupAnswer {
  readonly schoenflies: string;
  readonly hermannMauguin: string | null;
  readonly order: number;
  /** Elements kept, by their names in the group. */
  readonly kept: string;
  /** Axes and plane normals kept, by name in the group: `C2 [001]`. */
  readonly directions: readonly string[];
  /** Number of conjugate subgroups, which give the same table; null for subgroups of infinite groups. */
  readonly conjugates: number | null;
  /** Directions to which the labels of the subgroup refer, in the axes of the group; empty where they are the same. */
  readonly axes: string;
  readonly table: readonly { readonly species: string; readonly to: SpeciesCounts }[];
}

/**
 * Correlations with every inequivalent embedding of the subgroups of a name, or of all with the name `all`.
 * @throws InputProblem `no-such-subgroup` naming those that there are
 */
export function subgroupAnswers(group: PointGroup | MolecularGroup, name: string): SubgroupAnswer[] {
  const list: readonly Correlation<PointGroup | MolecularGroup>[] = correlations(group);
  const wanted = name === "all" ? null : schoenfliesOf(name);
  const found = list.filter((c) => wanted === null || shortName(c.subgroup.schoenflies) === wanted);
  if (found.length === 0) throw noSubgroup(group.schoenflies, name, [...list.map((c) => c.subgroup.schoenflies)]);
  return found.map((c) => ({
    schoenflies: c.subgroup.schoenflies,
    hermannMauguin: internationalSymbol(c.subgroup),
    order: c.subgroup.order,
    kept: c.kept,
    directions: c.directions,
    conjugates: c.conjugates,
    axes: c.subgroup.axes.text,
    table: c.table.map((row, i) => ({ species: group.irreps[i]!.label, to: countsOf(c.subgroup.irreps, row) })),
  }));
}

/** International symbol of a group; null for molecular groups that no crystal has. */
export function internationalSymbol(group: PointGroup | MolecularGroup): string | null {
  if ("hermannMauguin" in group) return group.hermannMauguin;
  const name = group.schoenflies === "S6" ? "C3i" : group.schoenflies;
  return crystalClasses().get(name)?.hermannMauguin ?? null;
}

const shortName = (schoenflies: string): string => (schoenflies === "C3i" ? "S6" : schoenflies);

function schoenfliesOf(name: string): string {
  const read = readPointName(name);
  return read.kind === "linear" ? read.name : shortName(pointGroupTable(read.name).group.schoenflies);
}

function noSubgroup(group: string, name: string, known: readonly string[]): InputProblem {
  const list = [...new Set(known)].join(", ");
  return new InputProblem("no-such-subgroup", `${group} has no subgroup "${name}"`, null, `It has ${list}.`);
}

/** Ways in which a linear molecule can lie in a finite group in standard orientation. */
const LYING: readonly (readonly [Vector3, string])[] = [
  [[0, 0, 1], "molecule along z of the subgroup"],
  [[1, 0, 0], "molecule along x of the subgroup"],
];

/**
 * Correlations of a linear group with finite groups: species up to an angular momentum about the axis.
 * @throws InputProblem `no-such-subgroup`, also for `all`: there is no end of them
 */
export function linearSubgroupAnswers(linear: LinearGroupName, name: string, upTo: number): SubgroupAnswer[] {
  const read = readPointName(name);
  const some = ["Cn", "Cnv", ...(linear === "Dinfh" ? ["Cnh", "Dn", "Dnh", "Dnd", "S2n", "Ci"] : []), "Cs"];
  if (read.kind === "linear" || name === "all") throw noSubgroup(linear, name, some);
  const group = molecularGroup(schoenfliesOf(read.name));
  const answers = LYING.flatMap(([axis, how]) => {
    if (group.schoenflies === "D2" || group.schoenflies === "D2h") if (axis[2] === 0) return []; // x, y, z are alike
    const table = linearCorrelation(linear, group, axis, upTo);
    if (!table) return [];
    return [
      {
        schoenflies: group.schoenflies,
        hermannMauguin: internationalSymbol(group),
        order: group.order,
        kept: group.classes.map((c) => c.name).join(", "),
        directions: [],
        conjugates: null,
        axes: group.order === 1 || group.schoenflies === "Ci" ? "" : how,
        table,
      },
    ];
  });
  if (answers.length === 0) throw noSubgroup(linear, name, some);
  return group.order === 1 || group.schoenflies === "Ci" ? answers.slice(0, 1) : answers;
}

/** Null where an element moves the axis of the molecule, or exchanges ends that are not alike. */
function linearCorrelation(
  linear: LinearGroupName,
  group: MolecularGroup,
  axis: Vector3,
  upTo: number,
): SubgroupAnswer["table"] | null {
  const k = axis.indexOf(1);
  const keeps = group.elements.every((M) => {
    const along = M[4 * k]!;
    return Math.abs(linear === "Dinfh" ? Math.abs(along) - 1 : along - 1) < 1e-9;
  });
  if (!keeps) return null;
  return linearTable(linear, upTo).map((species) => ({
    species: species.label,
    to: countsOf(group.irreps, subduceLinear(species, group, axis)),
  }));
}
