import { axisDirection, closeTo, compareAxes, cross, dot, MATRIX_TOLERANCE, unit, type Vector3 } from "./cartesian.ts";
import type { GroupKind } from "./group-analysis.ts";
import type { MolecularElement, MolecularElements } from "./molecular-element.ts";

/** Right-handed Cartesian axes x, y, z of a molecular group, to which its labels refer. */
export interface MolecularOrientation {
  readonly kind: GroupKind;
  readonly x: Vector3;
  readonly y: Vector3;
  readonly z: Vector3;
  /** Per element: 0 on a secondary line, 1 on a tertiary one, -1 if it is not lateral. */
  readonly lateral: readonly number[];
}

const CARTESIAN: readonly [Vector3, Vector3, Vector3] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/**
 * Choice of axes, by rule:
 * - T, O, I and their kin: three perpendicular axes of order 4 (2 in T, Th, I, Ih), along the Cartesian axes where
 *   there are such;
 * - a principal axis of order 3 or more: z along it. The lateral lines (C2' axes, and the lines in which vertical
 *   planes cut the plane normal to z) that hold the Cartesian x, else y, else z, are secondary (C2', sigma_v: so
 *   sigma_v holds C2'), the others tertiary; x along the first secondary line;
 * - D2, D2h and C2v: Cartesian axes where they fit, z along the twofold axis of C2v and x, y following cyclically;
 *   otherwise z (unless fixed) along the last and x along the first axis by `compareAxes`;
 * - one axis or plane: z along it or normal to it, x along the Cartesian x or, if z is near it, y, made perpendicular.
 */
export function orientMolecule(
  description: MolecularElements,
  classes: readonly (readonly number[])[],
): MolecularOrientation {
  const { elements, axes } = description;
  const none = elements.map(() => -1);
  if (axes.length === 0) return { kind: "isotropic", ...triad(CARTESIAN[2], CARTESIAN[0]), lateral: none };
  const highest = Math.max(...elements.map((e) => e.order));
  const threefold = new Set(elements.filter((e) => e.order === 3).map((e) => e.axis));
  if (threefold.size > 1) return { ...several(description, threefold.size, highest), lateral: none };
  if (axes.length === 1) return { kind: "single", ...triad(axes[0]!, null), lateral: none };
  if (highest === 2) return { ...orthorhombic(description), lateral: none };
  return axialOrientation(description, classes, axes[elements.find((e) => e.order === highest)!.axis]!);
}

/** Right-handed axes with z given and x along the part of a vector (by default a Cartesian axis) perpendicular to z. */
function triad(z: Vector3, along: Vector3 | null): Pick<MolecularOrientation, "x" | "y" | "z"> {
  const v = along ?? (Math.abs(z[0]) < 0.9 ? CARTESIAN[0] : CARTESIAN[1]);
  const k = dot(v, z);
  const x = unit([v[0] - k * z[0], v[1] - k * z[1], v[2] - k * z[2]]);
  return { x, y: unit(cross(z, x)), z };
}

function several(
  { elements, axes }: MolecularElements,
  threefold: number,
  highest: number,
): Omit<MolecularOrientation, "lateral"> {
  const kind = threefold === 4 ? "cubic" : "icosahedral";
  const order = kind === "cubic" && highest === 4 ? 4 : 2;
  const used = new Set(elements.filter((e) => e.order === order).map((e) => e.axis));
  const list = [...used].map((i) => axes[i]!).sort(compareAxes);
  const x = list[0]!;
  const y = list.find((v) => Math.abs(dot(v, x)) < MATRIX_TOLERANCE)!;
  return { kind, ...triad(unit(cross(x, y)), x) };
}

function orthorhombic({ elements, axes }: MolecularElements): Omit<MolecularOrientation, "lateral"> {
  const list = [...axes].sort(compareAxes);
  const twofolds = elements.filter((e) => e.proper && e.order === 2).map((e) => axes[e.axis]!);
  const z = twofolds.length === 1 ? twofolds[0]! : (list.find((v) => closeTo(v, CARTESIAN[2])) ?? list[2]!);
  const k = CARTESIAN.findIndex((c) => closeTo(c, z));
  const next = k < 0 ? undefined : list.find((v) => closeTo(v, CARTESIAN[(k + 1) % 3]!));
  return { kind: "orthorhombic", ...triad(z, next ?? list.find((v) => v !== z)!) };
}

function axialOrientation(
  description: MolecularElements,
  classes: readonly (readonly number[])[],
  z: Vector3,
): MolecularOrientation {
  const { elements } = description;
  const lines = elements.map((e) => lateralLine(e, description.axes, z));
  const sets: Vector3[][] = [];
  const setOf = (v: Vector3) => sets.findIndex((s) => s.some((w) => closeTo(v, w)));
  for (const members of classes) {
    const used = members.map((m) => lines[m]!).filter((v) => v !== null);
    if (used.length === 0) continue;
    const known = setOf(used[0]!);
    if (known < 0) sets.push(used);
    else sets[known]!.push(...used);
  }
  const first = CARTESIAN.map(setOf).find((s) => s >= 0) ?? 0;
  const secondary = sets[first]?.sort(compareAxes)[0] ?? null;
  const lateral = lines.map((v) => (v === null ? -1 : setOf(v) === first ? 0 : 1));
  return { kind: "axial", ...triad(z, secondary), lateral };
}

/** The line perpendicular to z that a lateral rotation or a vertical plane keeps; null for other elements. */
function lateralLine(e: MolecularElement, axes: readonly Vector3[], z: Vector3): Vector3 | null {
  if (e.axis < 0) return null;
  const axis = axes[e.axis]!;
  if (Math.abs(dot(axis, z)) > MATRIX_TOLERANCE) return null;
  return axisDirection(e.proper ? axis : cross(z, axis));
}
