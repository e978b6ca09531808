import { add, apply, type IntVec3, multiply, transpose } from "../algebra/index.ts";
import type { Axis, CrystalElement, CrystalElements } from "./crystal-element.ts";
import { compareDirections, sameVector } from "./direction.ts";
import type { GroupKind } from "./group-analysis.ts";

/** How the axes x, y, z and the symmetry directions of a crystallographic point group were chosen. */
export interface Orientation {
  readonly kind: Exclude<GroupKind, "icosahedral">;
  /** Index of the principal axis; -1 for 1 and -1. */
  readonly z: number;
  /** Axis indices of x and y in `orthorhombic` and `cubic`, else -1. */
  readonly x: number;
  readonly y: number;
  /** Axis indices of the secondary and tertiary symmetry directions in `axial`. */
  readonly secondary: readonly number[];
  readonly tertiary: readonly number[];
}

const FRAME_DIRECTIONS: readonly IntVec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/**
 * Choice of axes, by rule:
 * - cubic: x, y, z are the three axes of order 4 (2 in T and Th), along a, b, c of the frame where they are so, else
 *   in the order of `compareDirections`;
 * - an axis of order 3, 4 or 6 (a rotoinversion counts): z along it. The secondary directions are the set of
 *   equivalent perpendicular symmetry directions that holds a (else b, else c) of the frame; where no set does, the
 *   set with the shorter lattice vectors in a metric the group leaves invariant. A single set that holds no frame axis
 *   while z lies along one is tertiary (312, 31m, -31m);
 * - D2 and D2h: x, y, z along a, b, c; otherwise z along c, else b, else a, else the first by `compareDirections`, and
 *   then x before y by `compareDirections`;
 * - C2v: z along the twofold axis; x, y follow cyclically where all three lie along frame axes, else x before y by
 *   `compareDirections`;
 * - one axis of order 2 or one plane: z along it or along its normal.
 */
export function orient(description: CrystalElements, classes: readonly (readonly number[])[]): Orientation {
  const { elements, axes } = description;
  const none = { x: -1, y: -1, secondary: [], tertiary: [] };
  if (axes.length === 0) return { kind: "isotropic", z: -1, ...none };
  if (axes.length === 1) return { kind: "single", z: 0, ...none };
  const highest = Math.max(...elements.map((e) => e.order));
  if (highest === 2) return orthorhombic(elements, axes);
  const threefold = new Set(elements.filter((e) => e.order === 3).map((e) => e.axis));
  if (threefold.size === 4) return cubic(elements, axes);
  const z = elements.find((e) => e.order === highest)!.axis;
  return axial(description, classes, z);
}

function along(axes: readonly Axis[], direction: IntVec3): number {
  return axes.findIndex((a) => sameVector(a.uvw, direction));
}

function ordered(axes: readonly Axis[], indices: readonly number[]): number[] {
  return [...indices].sort((i, j) => compareDirections(axes[i]!.uvw, axes[j]!.uvw));
}

function orthorhombic(elements: readonly CrystalElement[], axes: readonly Axis[]): Orientation {
  const frame = FRAME_DIRECTIONS.map((d) => along(axes, d));
  const aligned = frame.every((i) => i >= 0);
  const twofolds = elements.filter((e) => e.proper && e.order === 2);
  const polar = twofolds.length === 1;
  let z: number;
  if (polar) z = twofolds[0]!.axis;
  else z = [frame[2]!, frame[1]!, frame[0]!, ordered(axes, [0, 1, 2])[0]!].find((i) => i >= 0)!;
  let [x, y] = ordered(
    axes,
    [0, 1, 2].filter((i) => i !== z),
  ) as [number, number];
  if (aligned) {
    const at = frame.indexOf(z);
    x = frame[(at + 1) % 3]!;
    y = frame[(at + 2) % 3]!;
  }
  return { kind: "orthorhombic", x, y, z, secondary: [], tertiary: [] };
}

function cubic(elements: readonly CrystalElement[], axes: readonly Axis[]): Orientation {
  const highest = elements.some((e) => e.order === 4) ? 4 : 2;
  const main = [...new Set(elements.filter((e) => e.order === highest).map((e) => e.axis))];
  const frame = FRAME_DIRECTIONS.map((d) => along(axes, d));
  const [x, y, z] = (frame.every((i) => main.includes(i)) ? frame : ordered(axes, main)) as [number, number, number];
  return { kind: "cubic", x, y, z, secondary: [], tertiary: [] };
}

function axial(description: CrystalElements, classes: readonly (readonly number[])[], z: number): Orientation {
  const { elements, axes } = description;
  const sets: Set<number>[] = [];
  for (const members of classes) {
    const used = members.map((m) => elements[m]!.axis).filter((a) => a >= 0 && a !== z);
    if (used.length > 0 && !sets.some((s) => s.has(used[0]!))) sets.push(new Set(used));
  }
  const frame = FRAME_DIRECTIONS.map((d) => along(axes, d));
  const first = frame.map((i) => (i === z ? -1 : sets.findIndex((s) => s.has(i)))).find((s) => s >= 0);
  let secondary = first ?? 0;
  if (first === undefined) {
    if (sets.length === 2) secondary = shorterSet(elements, axes, sets);
    else if (frame.includes(z)) secondary = 1;
  }
  const list = (k: number) => ordered(axes, [...(sets[k] ?? [])]);
  return { kind: "axial", x: -1, y: -1, z, secondary: list(secondary), tertiary: list(1 - secondary) };
}

function shorterSet(elements: readonly CrystalElement[], axes: readonly Axis[], sets: readonly Set<number>[]): number {
  const metric = elements.map((e) => multiply(transpose(e.W), e.W)).reduce(add);
  const norm = (s: Set<number>) => {
    const v = axes[[...s][0]!]!.vector;
    const m = apply(metric, v);
    return v[0] * m[0] + v[1] * m[1] + v[2] * m[2];
  };
  return norm(sets[0]!) <= norm(sets[1]!) ? 0 : 1;
}
