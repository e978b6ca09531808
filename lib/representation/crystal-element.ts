import { adjugate, apply, determinant, type IntMat3, type IntVec3, negate, trace } from "../algebra/index.ts";
import type { AxialElement } from "./axial-element.ts";
import { type AxisFrame, frameMatrix, opposite, rotationAxis, sameVector, toFrame, triple } from "./direction.ts";
import type { GroupElement } from "./group-analysis.ts";

/** Order of a proper rotation by its trace: trace = 1 + 2 cos(2 pi / n). */
const ORDER_BY_TRACE = new Map([
  [3, 1],
  [-1, 2],
  [0, 3],
  [1, 4],
  [2, 6],
]);

export interface CrystalElement extends GroupElement {
  readonly W: IntMat3;
}

/** An axis of rotation or rotoinversion, or the normal of a plane. */
export interface Axis {
  /** In the basis of the matrices, pointing along uvw. */
  readonly vector: IntVec3;
  /** In terms of the frame, first non-zero index positive. */
  readonly uvw: IntVec3;
}

export interface CrystalElements {
  readonly elements: readonly CrystalElement[];
  readonly axes: readonly Axis[];
}

/** @throws RangeError if a matrix is not a crystallographic rotation or rotoinversion */
export function describeElements(rotations: readonly IntMat3[], frame: AxisFrame): CrystalElements {
  const F = frameMatrix(frame);
  const back = adjugate(F);
  const lines: IntVec3[] = []; // as `rotationAxis` gives them, one sign for each axis
  const axes: Axis[] = [];
  const elements = rotations.map((W) => {
    const proper = determinant(W) === 1;
    const R = proper ? W : negate(W);
    const t = trace(R);
    const order = ORDER_BY_TRACE.get(t);
    if (order === undefined) {
      throw new RangeError(`not a rotation of a lattice (determinant ${determinant(W)}, trace ${trace(W)})`);
    }
    if (order === 1) return { W, proper, order, trace: t, axis: -1 };
    const line = rotationAxis(R);
    let axis = 0;
    while (axis < lines.length && !sameVector(lines[axis]!, line)) axis++;
    if (axis === lines.length) {
      lines.push(line);
      axes.push(axisAlong(line, F, back));
    }
    return { W, proper, order, trace: t, axis };
  });
  return { elements, axes };
}

function axisAlong(line: IntVec3, F: IntMat3, back: IntMat3): Axis {
  const uvw = toFrame(line, back);
  const image = apply(F, uvw);
  const parallel = image[0] * line[0] + image[1] * line[1] + image[2] * line[2] > 0;
  return { vector: parallel ? line : opposite(line), uvw };
}

/** Turns of crystallographic elements are counted in twelfths. */
export const CRYSTAL_TURNS = 12;

/** Turn in twelfths by the trace of the action in the plane, 2 cos(turn). */
const TURN_BY_PLANE_TRACE = new Map([
  [2, 0],
  [1, 2],
  [0, 3],
  [-1, 4],
  [-2, 6],
]);

/**
 * The element relative to an axis it keeps.
 * @param z vector along the axis, positive end as counted, in the basis of the matrix
 * @param handedness 1 or -1 as the frame is right- or left-handed in the basis of the matrix
 */
export function axialElement(W: IntMat3, z: IntVec3, handedness: number): AxialElement {
  const image = apply(W, z);
  const along = sameVector(image, z) ? 1 : -1;
  const flips = along === -1;
  if (determinant(W) * along === -1) return { turn: 0, flips, reflects: true };
  const size = TURN_BY_PLANE_TRACE.get(trace(W) - along)!;
  const probe: IntVec3 = z[1] === 0 && z[2] === 0 ? [0, 1, 0] : [1, 0, 0];
  const sense = triple(probe, apply(W, probe), z) * handedness;
  return { turn: sense < 0 ? CRYSTAL_TURNS - size : size, flips, reflects: false };
}
