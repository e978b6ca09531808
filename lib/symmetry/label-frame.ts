import { apply, type IntMat3, type IntVec3, trace } from "../algebra/index.ts";
import type { AxisFrame, CrystalSystem } from "../representation/index.ts";
import type { SpaceGroup } from "./space-group.ts";
import type { Transformation } from "./transformation.ts";

/** The axes that species labels refer to. */
export interface LabelFrames {
  /** Axes of the cell of the file; null where they are not symmetry directions (a primitive cell, say). */
  readonly own: AxisFrame | null;
  /** Axes of the reference setting, in the basis of the file. */
  readonly reference: AxisFrame;
}

/** The axes of the reference setting; a common factor does not matter to a frame. */
export function referenceFrame({ P }: Transformation): AxisFrame {
  return { x: column(P.n, 0), y: column(P.n, 1), z: column(P.n, 2) };
}

const AXES: readonly IntVec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/**
 * The axes of the cell in use, where they are symmetry directions. With one principal axis, z runs along it wherever
 * it lies, and x and y follow cyclically.
 */
export function ownFrame(group: SpaceGroup, system: CrystalSystem, toReference: Transformation): AxisFrame | null {
  const P = toReference.P.n;
  switch (system) {
    case "triclinic":
    case "monoclinic":
      return cyclic(2);
    case "orthorhombic":
    case "cubic":
      return [0, 1, 2].every((j) => soleEntry(column(P, j)) >= 0) ? cyclic(2) : null;
    case "tetragonal":
    case "trigonal":
    case "hexagonal": {
      const principal = soleEntry(column(P, 2));
      if (principal < 0 || !inPlane(P, principal)) return null;
      const frame = cyclic(principal);
      return isRotated(group, frame) ? frame : null;
    }
    default:
      return system satisfies never;
  }
}

function cyclic(principal: number): AxisFrame {
  return { x: AXES[(principal + 1) % 3]!, y: AXES[(principal + 2) % 3]!, z: AXES[principal]! };
}

function column(m: IntMat3, j: number): IntVec3 {
  return [m[j]!, m[3 + j]!, m[6 + j]!];
}

/** Index of the only non-zero component, -1 if there are several. */
function soleEntry(v: IntVec3): number {
  const nonZero = [0, 1, 2].filter((i) => v[i] !== 0);
  return nonZero.length === 1 ? nonZero[0]! : -1;
}

function inPlane(P: IntMat3, principal: number): boolean {
  return P[3 * principal]! === 0 && P[3 * principal + 1]! === 0;
}

/** True where a rotation of order 3, 4 or 6 about z carries the x axis onto y or onto -x-y. */
function isRotated(group: SpaceGroup, { x, y }: AxisFrame): boolean {
  return group.representatives.some(({ W }) => {
    const image = apply(W, x);
    const third: IntVec3 = [-x[0] - y[0], -x[1] - y[1], -x[2] - y[2]];
    return trace(W) !== 3 && [y, third].some((v) => same(image, v) || same(image, [-v[0], -v[1], -v[2]]));
  });
}

function same(a: IntVec3, b: IntVec3): boolean {
  return a[0] === b[0] && a[1] === b[1] && a[2] === b[2];
}
