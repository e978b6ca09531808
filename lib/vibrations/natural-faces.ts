import type { Crystal } from "../structure/index.ts";
import type { CrystalTensors } from "./crystal-tensors.ts";
import { formatDirection, type WrittenDirection } from "./geometry-text.ts";
import { type GeometryResult, geometryResult } from "./standard-geometries.ts";

/** Axes at right angles within this are polarisations of one face; degrees. */
const RIGHT_ANGLE = 0.01;

const AXES = [0, 1, 2] as const;

/**
 * Backscattering from the faces (100), (010) and (001) of a monoclinic crystal, whose axes x, y, z are normal to two of
 * them only: along the light the normal of the face, in the face an axis of the cell and what is perpendicular to it.
 * Other crystals have none: their natural faces are normal to axes of the frame, or not these three.
 */
export function naturalFaces(crystal: Crystal, tensors: CrystalTensors): GeometryResult[] {
  if (crystal.identified.summary.crystalSystem !== "monoclinic") return [];
  return AXES.flatMap((face) => {
    const light = formatDirection(written("normal", face));
    const [first, second] = polarisations(crystal, face).map(formatDirection) as [string, string];
    const pairs = [`${first}${first}`, `${first}${second}`, `${second}${second}`];
    return pairs.map((pair) => geometryResult(tensors, `${light}(${pair})-${light}`));
  });
}

/**
 * Two perpendicular directions in a face: both axes in it; where they are not at right angles, the second of them and the
 * normal of the planes that it spans with the axis out of the face.
 */
function polarisations({ metric }: Crystal, face: 0 | 1 | 2): [WrittenDirection, WrittenDirection] {
  const [j, k] = AXES.filter((i) => i !== face) as [0 | 1 | 2, 0 | 1 | 2];
  const angle = [metric.cell.alpha, metric.cell.beta, metric.cell.gamma][face]!;
  const across = Math.abs(angle - 90) < RIGHT_ANGLE ? written("direction", j) : written("normal", j);
  return [across, written("direction", k)];
}

function written(kind: "direction" | "normal", axis: 0 | 1 | 2): WrittenDirection {
  const indices = [0, 0, 0].map((_, i) => Number(i === axis)) as unknown as readonly [number, number, number];
  return { kind, indices, negative: false };
}
