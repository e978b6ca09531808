import type { AxialElement } from "./axial-element.ts";
import type { GroupTable } from "./group-table.ts";

/** What names and characters need to know of an element, whatever its matrix is made of. */
export interface GroupElement {
  readonly proper: boolean;
  /** Order of the rotation part: of W where it is proper, else of -W. */
  readonly order: number;
  /** Trace of the rotation part. */
  readonly trace: number;
  /** Index of its axis (of a plane, its normal); -1 for the identity and the inversion. */
  readonly axis: number;
}

/**
 * How a group lies: `isotropic` has no axis (C1, Ci), `single` one axis, `orthorhombic` is D2, D2h or C2v, `axial` has
 * a principal axis and lateral elements, `cubic` and `icosahedral` have several axes of order 3.
 */
export type GroupKind = "isotropic" | "single" | "orthorhombic" | "axial" | "cubic" | "icosahedral";

/** Everything about a group of matrices that its names, labels and characters are read from. */
export interface GroupAnalysis {
  readonly elements: readonly GroupElement[];
  readonly table: GroupTable;
  readonly schoenflies: string;
  readonly classes: readonly (readonly number[])[];
  readonly kind: GroupKind;
  /** Axis indices of x, y, z; -1 where an axis is not one of the elements' (or not defined). */
  readonly main: readonly [number, number, number];
  /** Elements relative to the principal axis; empty in cubic and icosahedral groups. */
  readonly axial: readonly AxialElement[];
  /** Units per full turn of `turn`. */
  readonly turns: number;
  /** Per element: 0 about a secondary direction, 1 about a tertiary one, -1 otherwise. */
  readonly lateral: readonly number[];
  /** Sense, 1 or -1, of the class of rotations of order 3 (or of -W) in T and Th. */
  readonly threefoldSense: (members: readonly number[]) => number;
  /** The axes of a class, in words. */
  readonly directions: (members: readonly number[]) => string[];
}

/** Index of the inversion, or -1. */
export function inversionOf(a: Pick<GroupAnalysis, "elements">): number {
  return a.elements.findIndex((e) => !e.proper && e.order === 1);
}

/** Index of the plane perpendicular to the principal axis, or -1. */
export function horizontalOf(a: Pick<GroupAnalysis, "axial">): number {
  return a.axial.findIndex((e) => e.flips && !e.reflects && e.turn === 0);
}
