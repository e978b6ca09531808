import { adjugate, determinant, type IntMat3, multiply, ratMat3, transpose } from "../algebra/index.ts";
import { type AxisFrame, cartesianMatrices, type Matrix3 } from "../representation/index.ts";
import { rotationParts } from "../symmetry/index.ts";
import { apply3, cellOfMetric, inverse3, type Mat3, metricOf, multiply3, type Vec3 } from "./cell.ts";
import type { Crystal } from "./crystal.ts";
import { invariantMetric } from "./invariant-metric.ts";

/**
 * The Cartesian frame that tensors and geometries refer to: x along a, y in the plane of a and b, z along c* of the
 * cell in the file, or of the reference setting where the cell of the file is skew (primitive or rhombohedral axes).
 */
export interface CrystalFrame {
  readonly cell: "file" | "reference";
  /** Axes of the labels, in the basis of the file. */
  readonly labels: AxisFrame;
  /** Rotation parts of the group's representatives in the frame; orthogonal. */
  readonly matrices: readonly Matrix3[];
  /** From fractional vectors of the file to the frame, angstrom. */
  readonly toCartesian: Mat3;
  readonly text: string;
}

export function crystalFrame(crystal: Crystal): CrystalFrame {
  const { identified, group } = crystal;
  const metric = invariantMetric(crystal.metric, group);
  const { own, reference } = identified.frames;
  const rotations = rotationParts(group);
  if (own) {
    const matrices = cartesianMatrices(rotations, metric.g);
    return { cell: "file", labels: own, matrices, toCartesian: metric.toCartesian, text: frameText("the file") };
  }
  const { n, d } = identified.toReference.P;
  const P = n.map((e) => e / d) as unknown as Mat3;
  const back = inverse3(P);
  const inReference = metricOf(cellOfMetric(multiply3(transpose(P), multiply3(metric.g, P))));
  const carried = rotations.map((W) => carriedRotation(W, n));
  return {
    cell: "reference",
    labels: reference,
    matrices: cartesianMatrices(carried, inReference.g),
    toCartesian: multiply3(inReference.toCartesian, back),
    text: frameText("the reference setting"),
  };
}

function frameText(cell: string): string {
  return `x along a, y in the plane of a and b, z along c* of ${cell}`;
}

/** P^-1 W P, integer since the reference lattice is kept. */
function carriedRotation(W: IntMat3, P: IntMat3): IntMat3 {
  return ratMat3(multiply(multiply(adjugate(P), W), P), determinant(P)).n;
}

/** Unit vector along a lattice direction [uvw] of the file, in the frame. @throws RangeError for [000] */
export function directionVector(frame: CrystalFrame, uvw: Vec3): Vec3 {
  return unitVector(apply3(frame.toCartesian, uvw));
}

/** Unit normal of the planes (hkl) of the file, in the frame. @throws RangeError for (000) */
export function planeNormal(frame: CrystalFrame, hkl: Vec3): Vec3 {
  return unitVector(apply3(transpose(inverse3(frame.toCartesian)), hkl));
}

function unitVector(v: Vec3): Vec3 {
  const length = Math.hypot(...v);
  if (!(length > 0)) throw new RangeError("a direction needs an index other than 0");
  return [v[0] / length + 0, v[1] / length + 0, v[2] / length + 0];
}
