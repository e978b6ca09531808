import { adjugate, apply, determinant, lcm, negate, trace } from "../algebra/index.ts";
import type { AxialElement } from "./axial-element.ts";
import { axisDirection, closeTo, dot, MATRIX_TOLERANCE, type Matrix3, snap, type Vector3 } from "./cartesian.ts";
import type { GroupElement } from "./group-analysis.ts";

export interface MolecularElement extends GroupElement {
  readonly matrix: Matrix3;
}

export interface MolecularElements {
  readonly elements: readonly MolecularElement[];
  /** Unit vectors, first component that is not 0 positive. */
  readonly axes: readonly Vector3[];
}

/** Largest order of a rotation that is looked for: that of a group of order 240. */
const LARGEST_ROTATION = 240;

/** @throws RangeError if a matrix is not orthogonal or its rotation has no order up to 240 */
export function describeMolecular(matrices: readonly Matrix3[]): MolecularElements {
  const axes: Vector3[] = [];
  const elements = matrices.map((matrix) => {
    const proper = determinant(matrix) > 0;
    const R = proper ? matrix : negate(matrix);
    const order = fraction(turnOf(trace(R) - 1)).of;
    const common = { matrix, proper, order, trace: snap(trace(R)) };
    if (order === 1) return { ...common, axis: -1 };
    const v = axisOf(R);
    let axis = axes.findIndex((a) => closeTo(a, v));
    if (axis < 0) axis = axes.push(v) - 1;
    return { ...common, axis };
  });
  return { elements, axes };
}

/** Part of a full turn in [0, 1/2] from twice its cosine. */
function turnOf(twiceCosine: number): number {
  return Math.acos(Math.max(-1, Math.min(1, twiceCosine / 2))) / (2 * Math.PI);
}

/** The fraction k/of with the smallest denominator next to a part of a turn. */
export function fraction(part: number): { k: number; of: number } {
  for (let of = 1; of <= LARGEST_ROTATION; of++) {
    const k = Math.round(part * of);
    if (Math.abs(part * of - k) < MATRIX_TOLERANCE * of) return { k, of };
  }
  throw new RangeError(`a rotation by ${360 * part} degrees has no order up to ${LARGEST_ROTATION}`);
}

function axisOf(R: Matrix3): Vector3 {
  const a = adjugate([R[0] - 1, R[1], R[2], R[3], R[4] - 1, R[5], R[6], R[7], R[8] - 1]);
  const columns = [0, 1, 2].map((j): Vector3 => [a[j]!, a[j + 3]!, a[j + 6]!]);
  return axisDirection(columns.reduce((p, q) => (dot(q, q) > dot(p, p) ? q : p)));
}

/** The action of an element in right-handed axes x, y, z, where it keeps z. */
export interface PlaneAction {
  readonly flips: boolean;
  readonly reflects: boolean;
  /**
   * Part of a full turn in [0, 1): of the rotation in the plane, or twice the angle from x to the line that a
   * reflection keeps.
   */
  readonly part: number;
}

export function planeAction(M: Matrix3, x: Vector3, y: Vector3, z: Vector3): PlaneAction {
  const flips = dot(z, apply(M, z)) < 0;
  const reflects = determinant(M) < 0 !== flips;
  const image = apply(M, x);
  const part = Math.atan2(dot(y, image), dot(x, image)) / (2 * Math.PI);
  return { flips, reflects, part: part < -MATRIX_TOLERANCE ? part + 1 : Math.max(0, part) };
}

/** The elements relative to the principal axis, with their turns as integers. */
export function axialElements(
  matrices: readonly Matrix3[],
  x: Vector3,
  y: Vector3,
  z: Vector3,
): { axial: AxialElement[]; turns: number } {
  const actions = matrices.map((M) => planeAction(M, x, y, z));
  const turns = actions.reduce((n, a) => (a.reflects ? n : lcm(n, fraction(a.part).of)), 1);
  const axial = actions.map(({ flips, reflects, part }) => ({
    flips,
    reflects,
    turn: reflects ? 0 : Math.round(part * turns) % turns,
  }));
  return { axial, turns };
}
