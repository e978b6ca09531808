import { apply, type IntMat3, type IntVec3, inverseUnimodular, negate, subtract } from "../algebra/index.ts";
import type { AxialElement } from "./axial-element.ts";
import type { ConjugacyClass } from "./character-table.ts";
import type { CrystalElement, CrystalElements } from "./crystal-element.ts";
import { type AxisFrame, formatDirection, opposite, sameVector, toFrame, triple } from "./direction.ts";
import type { Orientation } from "./orientation.ts";

/** The directions to which labels refer, as [uvw] in terms of the frame. */
export interface ReferenceAxes {
  /** Mutually perpendicular and right-handed; null where the group does not fix them (as x and y of 2/m). */
  readonly x: IntVec3 | null;
  readonly y: IntVec3 | null;
  readonly z: IntVec3 | null;
  /** Symmetry directions perpendicular to z: C2' axes along them, sigma_v normal to them. */
  readonly secondary: readonly IntVec3[];
  /** C2'' axes along them, sigma_d normal to them; in D2d, D3h and C_nv of odd n, the directions of the other kind. */
  readonly tertiary: readonly IntVec3[];
  /** The same in words. */
  readonly text: string;
}

/**
 * The reference axes of a group with a chosen orientation. For a principal axis of order 3, 4 or 6, x is a of the
 * frame (b where z is along a) if it is perpendicular to z and lies along or normal to a lateral symmetry direction;
 * else the first secondary direction; without lateral directions, a projected along z.
 * @param back adjugate of the frame matrix
 * @param classes with their names and directions, for the words
 */
export function referenceAxes(
  description: CrystalElements,
  axial: readonly AxialElement[],
  orientation: Orientation,
  frame: AxisFrame,
  back: IntMat3,
  classes: readonly ConjugacyClass[],
): ReferenceAxes {
  const { axes } = description;
  const uvw = (i: number) => axes[i]!.uvw;
  const secondary = orientation.secondary.map(uvw);
  const tertiary = orientation.tertiary.map(uvw);
  const z = orientation.z < 0 ? null : uvw(orientation.z);
  let [x, y]: [IntVec3 | null, IntVec3 | null] = [null, null];
  if (orientation.x >= 0 && z) {
    x = uvw(orientation.x);
    y = uvw(orientation.y);
    if (triple(x, y, z) < 0) y = opposite(y);
  } else if (orientation.z >= 0) {
    [x, y] = planeAxes(description, axial, orientation, frame, back) ?? [null, null];
  }
  return { x, y, z, secondary, tertiary, text: describe(x, y, z, classes) };
}

/** x and y perpendicular to a principal axis of order 3, 4 or 6; null for an axis of lower order. */
function planeAxes(
  description: CrystalElements,
  axial: readonly AxialElement[],
  orientation: Orientation,
  frame: AxisFrame,
  back: IntMat3,
): [IntVec3, IntVec3] | null {
  const { elements, axes } = description;
  const first = axial.findIndex((e, i) => !e.reflects && e.turn > 0 && e.turn < 6 && elements[i]!.order > 2);
  if (first < 0) return null;
  const R = rotationPart(elements[first]!);
  const perpendicular = (v: IntVec3) => toFrame(apply(subtract(R, inverseUnimodular(R)), v), back);
  const lateral = [...orientation.secondary, ...orientation.tertiary].map((i) => axes[i]!.uvw);
  const axisAlongZ = (v: IntVec3) => project(v, R, elements[first]!.order).every((e) => e === 0);
  const start = axisAlongZ(frame.x) ? frame.y : frame.x;
  let x = project(start, R, elements[first]!.order);
  const [u, v] = [toFrame(x, back), perpendicular(x)];
  const inPlane = sameVector(u, toFrame(start, back));
  const fits = lateral.some((d) => sameVector(d, u) || sameVector(d, v));
  if (lateral.length > 0 && !(inPlane && fits))
    x = axes[(orientation.secondary[0] ?? orientation.tertiary[0])!]!.vector;
  const [X, y] = [toFrame(x, back), perpendicular(x)];
  return [X, triple(X, y, axes[orientation.z]!.uvw) < 0 ? opposite(y) : y];
}

function rotationPart(e: CrystalElement): IntMat3 {
  return e.proper ? e.W : negate(e.W);
}

/** n v minus the sum of the images of v under the powers of R, of order n: perpendicular to the axis of R. */
function project(v: IntVec3, R: IntMat3, n: number): IntVec3 {
  let [sx, sy, sz]: IntVec3 = [0, 0, 0];
  let image = v;
  for (let k = 0; k < n; k++) {
    sx += image[0];
    sy += image[1];
    sz += image[2];
    image = apply(R, image);
  }
  return [n * v[0] - sx, n * v[1] - sy, n * v[2] - sz];
}

/** `x along [100], z along [001]; C2' along [100] [010]; sigma_d normal to [110] [1-10]`. */
function describe(x: IntVec3 | null, y: IntVec3 | null, z: IntVec3 | null, classes: readonly ConjugacyClass[]): string {
  const named = { x, y, z };
  const main = Object.entries(named).flatMap(([name, v]) => (v ? [`${name} along ${formatDirection(v)}`] : []));
  const lateral = classes.flatMap(({ name, directions }) => {
    const [plain] = /C2'+|sigma_[vd]/.exec(name) ?? [];
    if (!plain) return [];
    return [`${plain} ${plain.startsWith("C") ? "along" : "normal to"} ${directions.join(" ")}`];
  });
  return [main.join(", "), ...lateral].filter(Boolean).join("; ");
}
