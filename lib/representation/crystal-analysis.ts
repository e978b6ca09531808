import { apply, determinant, equal, IDENTITY, type IntMat3, type IntVec3, multiply, negate } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import {
  type Axis,
  axialElement,
  CRYSTAL_TURNS,
  type CrystalElement,
  type CrystalElements,
  describeElements,
} from "./crystal-element.ts";
import { type AxisFrame, compareDirections, formatDirection, frameMatrix, triple } from "./direction.ts";
import type { GroupAnalysis } from "./group-analysis.ts";
import { conjugacyClasses, type GroupTable, groupTable } from "./group-table.ts";
import { matrixIndex } from "./matrix-index.ts";
import { type Orientation, orient } from "./orientation.ts";
import { schoenfliesOf } from "./schoenflies.ts";

/** The analysis of a crystallographic group, with its axes. */
export interface CrystalAnalysis extends GroupAnalysis {
  readonly elements: readonly CrystalElement[];
  readonly axes: readonly Axis[];
  readonly orientation: Orientation;
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
  const { elements, axes } = description;
  const { x, y, z, secondary } = orientation;
  const along = z < 0 ? frame.z : axes[z]!.vector;
  const axial = orientation.kind === "cubic" ? [] : rotations.map((W) => axialElement(W, along, handedness));
  return {
    elements,
    axes,
    table,
    schoenflies: schoenfliesOf(elements),
    classes,
    orientation,
    kind: orientation.kind,
    main: [x, y, z],
    axial,
    turns: CRYSTAL_TURNS,
    lateral: elements.map((e, i) => (axial[i]?.reflects ? (secondary.includes(e.axis) ? 0 : 1) : -1)),
    threefoldSense: (members) => threefoldSense(description, members) * handedness,
    directions: (members) => directions(description, members),
  };
}

/** The axes of some elements as `[uvw]` in the order of `compareDirections`. */
function directions({ elements, axes }: CrystalElements, members: readonly number[]): string[] {
  const used = [...new Set(members.map((m) => elements[m]!.axis))].filter((axis) => axis >= 0);
  return used
    .map((axis) => axes[axis]!.uvw)
    .sort(compareDirections)
    .map(formatDirection);
}

/**
 * Sense of the four conjugate rotations of order 3 of T or Th: that of the one about the first axis in the order of
 * `compareDirections`, seen against its direction [uvw].
 */
function threefoldSense({ elements, axes }: CrystalElements, members: readonly number[]): number {
  const uvw = (m: number) => axes[elements[m]!.axis]!.uvw;
  const first = members.reduce((p, q) => (compareDirections(uvw(q), uvw(p)) < 0 ? q : p));
  const { W, proper, axis } = elements[first]!;
  const R = proper ? W : negate(W);
  const v = axes[axis]!.vector;
  const probe: IntVec3 = v[1] === 0 && v[2] === 0 ? [0, 1, 0] : [1, 0, 0];
  return Math.sign(triple(probe, apply(R, probe), v));
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
