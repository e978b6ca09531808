import { transpose } from "../algebra/index.ts";
import { type CifBlock, findValue, numbOf } from "../cif/index.ts";
import type { SpaceGroup } from "../symmetry/index.ts";
import { type Mat3, type Metric, multiply3 } from "./cell.ts";
import { scaledDirections } from "./free-parameters.ts";
import { transpose3 } from "./rotation-fit.ts";

/** Standard uncertainties of a, b, c (angstrom), alpha, beta, gamma (degrees); null where none is stated. */
export type CellUncertainties = readonly (number | null)[];

const ITEMS = ["length_a", "length_b", "length_c", "angle_alpha", "angle_beta", "angle_gamma"] as const;
const DEGREE = Math.PI / 180;

/** What a block states, in parentheses or under a name of its own. */
export function cellUncertainties(block: CifBlock): CellUncertainties {
  return ITEMS.map((item) => {
    const su = numbOf(findValue(block, `_cell.${item}`)?.value ?? null)?.su ?? null;
    return su ?? numbOf(findValue(block, `_cell.${item}_su`)?.value ?? null)?.value ?? null;
  });
}

/**
 * Strains of the crystal, in the Cartesian frame of the metric, one for each free parameter of the cell, scaled by its
 * uncertainty: a point r moves to r + strain r, up to a rotation. Only changes of the cell that all operations of the
 * group allow occur: a = b = c of a cubic cell is one parameter, and 90 degrees that symmetry fixes are exact. A free
 * angle without uncertainty counts as exact.
 */
export function cellStrains(metric: Metric, group: SpaceGroup, su: CellUncertainties): Mat3[] {
  const allowed = UNIT_CHANGES.map((change) => parametersOf(metric, invariantPart(change, group)));
  return scaledDirections(allowed, su).directions.map((p) => strainOf(metric, metricChange(metric, p)));
}

/** The six independent changes of a metric tensor. */
const UNIT_CHANGES: readonly Mat3[] = [
  [1, 0, 0, 0, 0, 0, 0, 0, 0],
  [0, 0, 0, 0, 1, 0, 0, 0, 0],
  [0, 0, 0, 0, 0, 0, 0, 0, 1],
  [0, 0, 0, 0, 0, 1, 0, 1, 0],
  [0, 0, 1, 0, 0, 0, 1, 0, 0],
  [0, 1, 0, 1, 0, 0, 0, 0, 0],
];

/** Mean over the rotations of the group. */
function invariantPart(change: Mat3, { representatives }: SpaceGroup): Mat3 {
  const sum = new Array<number>(9).fill(0);
  for (const { W } of representatives) {
    const image = multiply3(transpose(W), multiply3(change, W));
    for (let i = 0; i < 9; i++) sum[i]! += image[i]! / representatives.length;
  }
  return sum as unknown as Mat3;
}

const PAIRS = [
  [1, 2],
  [0, 2],
  [0, 1],
] as const;

/** Change of a, b, c and of the angles, degrees, that makes a small change of the metric tensor. */
function parametersOf({ cell, g }: Metric, change: Mat3): number[] {
  const lengths = [cell.a, cell.b, cell.c];
  const byLength = lengths.map((l, i) => change[4 * i]! / (2 * l));
  const byAngle = PAIRS.map(([i, j]) => {
    const cosine = g[3 * i + j]! / (lengths[i]! * lengths[j]!);
    const own = change[3 * i + j]! / (lengths[i]! * lengths[j]!);
    const lengthening = byLength[i]! / lengths[i]! + byLength[j]! / lengths[j]!;
    return (cosine * lengthening - own) / Math.sqrt(1 - cosine * cosine) / DEGREE;
  });
  return [...byLength, ...byAngle];
}

/** Inverse of parametersOf. */
function metricChange({ cell, g }: Metric, p: readonly number[]): Mat3 {
  const lengths = [cell.a, cell.b, cell.c];
  const change = new Array<number>(9).fill(0);
  lengths.forEach((l, i) => {
    change[4 * i] = 2 * l * p[i]!;
  });
  PAIRS.forEach(([i, j], k) => {
    const cosine = g[3 * i + j]! / (lengths[i]! * lengths[j]!);
    const lengthening = p[i]! / lengths[i]! + p[j]! / lengths[j]!;
    const turning = -Math.sqrt(1 - cosine * cosine) * p[3 + k]! * DEGREE;
    const value = lengths[i]! * lengths[j]! * (cosine * lengthening + turning);
    change[3 * i + j] = value;
    change[3 * j + i] = value;
  });
  return change as unknown as Mat3;
}

function strainOf({ toFractional }: Metric, change: Mat3): Mat3 {
  return multiply3(transpose3(toFractional), multiply3(change, toFractional)).map((e) => e / 2) as unknown as Mat3;
}
