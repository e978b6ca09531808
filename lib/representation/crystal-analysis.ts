import { determinant, equal, IDENTITY, type IntMat3, multiply } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import {
  type AxialElement,
  axialElement,
  type CrystalElement,
  type CrystalElements,
  describeElements,
} from "./crystal-element.ts";
import type { RotationPart } from "./cubic-characters.ts";
import { type AxisFrame, frameMatrix } from "./direction.ts";
import { conjugacyClasses, type GroupTable, groupTable } from "./group-table.ts";
import { matrixIndex } from "./matrix-index.ts";
import { type Orientation, orient } from "./orientation.ts";
import { schoenfliesSymbol } from "./schoenflies.ts";

/** Everything about a group of rotation matrices that its names, labels and characters are read from. */
export interface CrystalAnalysis extends CrystalElements {
  readonly table: GroupTable;
  readonly schoenflies: string;
  readonly classes: readonly (readonly number[])[];
  readonly orientation: Orientation;
  /** The elements relative to the principal axis; empty in cubic groups. */
  readonly axial: readonly AxialElement[];
  /** 1 or -1 as the frame is right- or left-handed in the basis of the matrices. */
  readonly handedness: number;
}

/** Order of the largest crystallographic point group, m-3m. */
const LARGEST_ORDER = 48;

/**
 * @throws InputProblem `not-a-group` if the list is not a group of crystallographic rotations
 * @throws RangeError if the frame vectors are not independent
 */
export function analyse(rotations: readonly IntMat3[], frame: AxisFrame): CrystalAnalysis {
  const handedness = Math.sign(determinant(frameMatrix(frame)));
  if (handedness === 0) throw new RangeError("the three vectors of the frame lie in one plane");
  const table = multiplicationTable(rotations);
  const description = describeElements(rotations, frame);
  const classes = conjugacyClasses(table);
  const orientation = orient(description, classes);
  const z = orientation.z < 0 ? frame.z : description.axes[orientation.z]!.vector;
  const axial = orientation.kind === "cubic" ? [] : rotations.map((W) => axialElement(W, z, handedness));
  return {
    ...description,
    table,
    schoenflies: recognise(description.elements),
    classes,
    orientation,
    axial,
    handedness,
  };
}

function multiplicationTable(rotations: readonly IntMat3[]): GroupTable {
  const order = rotations.length;
  const identity = rotations.findIndex((W) => equal(W, IDENTITY));
  if (identity < 0) throw notAGroup("the identity is missing");
  if (order > LARGEST_ORDER)
    throw notAGroup(`${order} matrices are more than any crystal class has (${LARGEST_ORDER})`);
  for (const W of rotations) {
    if (Math.abs(determinant(W)) !== 1) throw notAGroup(`the matrix ${W.join(" ")} has determinant ${determinant(W)}`);
  }
  const index = matrixIndex(rotations);
  if (!index) throw notAGroup("a matrix is listed twice");
  let missing = "";
  const table = groupTable(order, identity, (i, j) => {
    const found = index.find(multiply(rotations[i]!, rotations[j]!));
    if (found < 0) missing = `the product of matrices ${i + 1} and ${j + 1} is missing`;
    return found;
  });
  if (!table) throw notAGroup(missing);
  return table;
}

function notAGroup(why: string): InputProblem {
  const hint = "Give every rotation of the group once.";
  return new InputProblem("not-a-group", `The rotation matrices do not form a group: ${why}.`, null, hint);
}

function recognise(elements: readonly CrystalElement[]): string {
  const proper = elements.filter((e) => e.proper);
  return schoenfliesSymbol({
    order: elements.length,
    proper: proper.length,
    threefold: proper.filter((e) => e.order === 3).length,
    fivefold: 0,
    inversion: elements.some((e) => !e.proper && e.order === 1),
    highestProper: Math.max(...proper.map((e) => e.order)),
    highest: Math.max(...elements.map((e) => e.order)),
  });
}

const TRACE_BY_ORDER = [0, 3, -1, 0, 1, 0, 2] as const;

/** The elements as the cubic characters want them. */
export function rotationParts(elements: readonly CrystalElement[]): RotationPart[] {
  return elements.map((e) => ({ proper: e.proper, order: e.order, trace: TRACE_BY_ORDER[e.order]! }));
}
