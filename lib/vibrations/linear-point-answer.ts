import {
  type LinearGroupName,
  type LinearRow,
  linearGroupTable,
  pointGroupTable,
  subduceLinear,
  type Vector3,
} from "../representation/index.ts";
import { activities } from "./activity.ts";
import type { PointAnswer, PointOptions, PointSpeciesAnswer } from "./finite-point-answer.ts";
import { tensorsAnswer } from "./point-tensors.ts";
import { linearProductAnswer } from "./species-product.ts";
import { linearSubgroupAnswers } from "./subgroup-answer.ts";

/** Species are listed up to this angular momentum about the axis (Gamma). */
const LARGEST_LAMBDA = 4;

/** A finite group that tells all tensors up to rank 3 apart as the linear group does. */
const STAND_IN: Readonly<Record<LinearGroupName, string>> = { Cinfv: "C8v", Dinfh: "D8h" };

const AXIS: Vector3 = [0, 0, 1];

/** Table of a linear group: characters in terms of the angle phi about the axis, species up to Gamma. */
export function linearPointAnswer(name: LinearGroupName, options: PointOptions): PointAnswer {
  const table = pointGroupTable(STAND_IN[name]);
  const { group } = table;
  const rows = linearGroupTable(name, LARGEST_LAMBDA);
  const finite = rows.map((row) => subduceLinear(row, group, AXIS));
  const activity = activities(group);
  const labelOf = (irrep: number) => rows[finite.findIndex((row) => row[irrep]! > 0)]!.label;
  return {
    schoenflies: name,
    hermannMauguin: name === "Cinfv" ? "infm" : "inf/mm",
    order: null,
    frame: "x, y, z of the standard orientation: z along the molecule",
    axes: "",
    classes: CLASSES[name].map(([text, directions]) => ({ name: text, size: null, directions, containsAxes: [] })),
    planeNaming: null,
    species: rows.map((row, i) => ({
      label: row.label,
      dimension: row.dimension,
      complexPair: false,
      characters: charactersOf(row),
      ...row.functions,
      ...ofFinite(activity, finite[i]!),
    })),
    closedForms: [],
    tensors: options.tensors ? tensorsAnswer(table, labelOf) : null,
    products: (options.products ?? []).map((text) => linearProductAnswer(name, text)),
    subgroups: (options.subgroups ?? []).flatMap((text) => linearSubgroupAnswers(name, text, LARGEST_LAMBDA)),
  };
}

const CLASSES: Readonly<Record<LinearGroupName, readonly (readonly [string, readonly string[]])[]>> = {
  Cinfv: [
    ["E", []],
    ["2C(phi)", ["z"]],
    ["inf sigma_v", ["normal to z"]],
  ],
  Dinfh: [
    ["E", []],
    ["2C(phi)", ["z"]],
    ["inf sigma_v", ["normal to z"]],
    ["i", []],
    ["2S(phi)", ["z"]],
    ["inf C2'", ["normal to z"]],
  ],
};

/** Characters on E, C(phi), sigma_v; then on i, S(phi), C2', where S(phi) is i times the turn by phi + 180 degrees. */
function charactersOf({ lambda, dimension, reflection, parity }: LinearRow): (number | string)[] {
  const turn = (sign: number) => (lambda === 0 ? sign : `${sign < 0 ? "-" : ""}2cos(${lambda > 1 ? lambda : ""}phi)`);
  const proper = [dimension, turn(1), reflection];
  if (parity === 0) return proper;
  return [...proper, parity * dimension, turn(lambda % 2 === 0 ? parity : -parity), parity * reflection + 0];
}

/** Activity of a species by those of the finite group that it becomes; all tensors up to rank 3 have lambda below 4. */
function ofFinite(
  activity: readonly Pick<PointSpeciesAnswer, "infrared" | "raman" | "hyperRaman" | "hyperRamanGeneral">[],
  counts: readonly number[],
) {
  const index = counts.findIndex((n) => n > 0);
  const { infrared, raman, hyperRaman, hyperRamanGeneral } = activity[index]!;
  return { infrared, raman, hyperRaman, hyperRamanGeneral };
}
