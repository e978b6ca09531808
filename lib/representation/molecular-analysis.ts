import { apply, determinant, IDENTITY, multiply, negate, transpose } from "../algebra/index.ts";
import {
  axisDirection,
  closeTo,
  compareAxes,
  cross,
  dot,
  formatAxis,
  MATRIX_TOLERANCE,
  type Matrix3,
  type Vector3,
} from "./cartesian.ts";
import type { GroupAnalysis } from "./group-analysis.ts";
import { conjugacyClasses, type GroupTable, groupTable } from "./group-table.ts";
import { axialElements, describeMolecular, type MolecularElements } from "./molecular-element.ts";
import { type MolecularOrientation, orientMolecule } from "./molecular-orientation.ts";
import { schoenfliesOf } from "./schoenflies.ts";

/** The analysis of a group of orthogonal matrices, with its Cartesian axes. */
export interface MolecularAnalysis extends GroupAnalysis {
  readonly orientation: MolecularOrientation;
}

/** Largest order of a molecular group. */
export const LARGEST_ORDER = 240;

/** @throws RangeError if the matrices are not orthogonal or do not form a group of order up to 240 */
export function analyseMolecular(matrices: readonly Matrix3[]): MolecularAnalysis {
  const table = multiplicationTable(matrices);
  const description = describeMolecular(matrices);
  const { elements, axes } = description;
  const classes = conjugacyClasses(table);
  const orientation = orientMolecule(description, classes);
  const { kind, x, y, z } = orientation;
  const several = kind === "cubic" || kind === "icosahedral";
  const { axial, turns } = several ? { axial: [], turns: 1 } : axialElements(matrices, x, y, z);
  const find = (v: Vector3) => axes.findIndex((a) => closeTo(a, axisDirection(v)));
  return {
    elements,
    table,
    schoenflies: schoenfliesOf(elements),
    classes,
    kind,
    main: [find(x), find(y), find(z)],
    axial,
    turns,
    lateral: orientation.lateral,
    threefoldSense: (members) => threefoldSense(description, members),
    directions: (members) => directions(description, members),
    orientation,
  };
}

function multiplicationTable(matrices: readonly Matrix3[]): GroupTable {
  if (matrices.length > LARGEST_ORDER)
    throw new RangeError(`a group of order ${matrices.length} exceeds ${LARGEST_ORDER}`);
  for (const M of matrices) {
    if (!closeTo(multiply(M, transpose(M)), IDENTITY)) throw new RangeError(`not orthogonal: ${M.join(" ")}`);
  }
  const identity = findMatrix(matrices, IDENTITY);
  const table =
    identity < 0
      ? null
      : groupTable(matrices.length, identity, (i, j) => {
          return findMatrix(matrices, multiply(matrices[i]!, matrices[j]!));
        });
  if (!table) throw new RangeError("the matrices do not form a group");
  return table;
}

/** Index of an orthogonal matrix in a list, within tolerance, or -1. */
export function findMatrix(matrices: readonly Matrix3[], M: Matrix3, tolerance = MATRIX_TOLERANCE): number {
  return matrices.findIndex((candidate) => closeTo(candidate, M, tolerance));
}

function directions({ elements, axes }: MolecularElements, members: readonly number[]): string[] {
  const used = [...new Set(members.map((m) => elements[m]!.axis))].filter((axis) => axis >= 0);
  return used
    .map((axis) => axes[axis]!)
    .sort(compareAxes)
    .map(formatAxis);
}

/** Sense of four conjugate rotations of order 3: that of the one about the first axis in the order of `compareAxes`. */
function threefoldSense({ elements, axes }: MolecularElements, members: readonly number[]): number {
  const axis = (m: number) => axes[elements[m]!.axis]!;
  const first = members.reduce((p, q) => (compareAxes(axis(q), axis(p)) < 0 ? q : p));
  const { matrix } = elements[first]!;
  const R = determinant(matrix) > 0 ? matrix : negate(matrix);
  const v = axis(first);
  const probe: Vector3 = Math.abs(v[0]) > 0.9 ? [0, 1, 0] : [1, 0, 0];
  return Math.sign(dot(cross(probe, apply(R, probe)), v));
}
