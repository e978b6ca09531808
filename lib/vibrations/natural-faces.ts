import { type Crystal, type CrystalFrame, directionVector, dot3 } from "../structure/index.ts";
import type { CrystalTensors } from "./crystal-tensors.ts";
import { formatDirection, type WrittenDirection } from "./geometry-text.ts";
import { type GeometryResult, geometryResult } from "./standard-geometries.ts";

/** Cosine below which axes of the frame, exact but for rounding, are at right angles. */
const RIGHT_ANGLE = 1e-9;

const AXES = [0, 1, 2] as const;

/**
 * Backscattering from the faces (100), (010) and (001) of a monoclinic crystal, whose axes x, y, z are normal to two of
 * them only: along the light the normal of the face, in the face an axis of the cell and what is perpendicular to it.
 * Other crystals have none: their natural faces are normal to axes of the frame, or not these three; nor are there any
 * where the cell is a skew one, whose indices are not those of the faces.
 */
export function naturalFaces(crystal: Crystal, tensors: CrystalTensors): GeometryResult[] {
  const { frame } = tensors;
  if (crystal.identified.summary.crystalSystem !== "monoclinic" || !hasUniqueAxis(frame)) return [];
  return AXES.flatMap((face) => {
    const light = formatDirection(written("normal", face));
    const [first, second] = polarisations(frame, face).map(formatDirection) as [string, string];
    const pairs = [`${first}${first}`, `${first}${second}`, `${second}${second}`];
    return pairs.map((pair) => geometryResult(tensors, `${light}(${pair})-${light}`));
  });
}

/** Whether one axis of the cell in the file is at right angles to both others, and these are not to each other. */
function hasUniqueAxis(frame: CrystalFrame): boolean {
  if (frame.cell !== "file") return false;
  return AXES.filter((face) => isRightAngled(frame, face)).length === 2;
}

/** Whether the two axes of the cell in a face are at right angles. */
function isRightAngled(frame: CrystalFrame, face: 0 | 1 | 2): boolean {
  const [j, k] = AXES.filter((i) => i !== face) as [0 | 1 | 2, 0 | 1 | 2];
  return Math.abs(dot3(directionVector(frame, along(j)), directionVector(frame, along(k)))) < RIGHT_ANGLE;
}

/**
 * Two perpendicular directions in a face: both axes in it; where they are not at right angles, the second of them and the
 * normal of the planes that it spans with the axis out of the face.
 */
function polarisations(frame: CrystalFrame, face: 0 | 1 | 2): [WrittenDirection, WrittenDirection] {
  const [j, k] = AXES.filter((i) => i !== face) as [0 | 1 | 2, 0 | 1 | 2];
  const across = written(isRightAngled(frame, face) ? "direction" : "normal", j);
  return [across, written("direction", k)];
}

function written(kind: "direction" | "normal", axis: 0 | 1 | 2): WrittenDirection {
  return { kind, indices: along(axis), negative: false };
}

function along(axis: 0 | 1 | 2): [number, number, number] {
  return [Number(axis === 0), Number(axis === 1), Number(axis === 2)];
}
