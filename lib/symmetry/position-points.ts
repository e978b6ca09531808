import type { IntVec3 } from "../algebra/index.ts";
import { type AffineForm, directionsOfForm, formatForm, formFromSetting, imageOfForm } from "./affine-form.ts";
import { subspaceThrough } from "./affine-subspace.ts";
import { plainestForm } from "./plainest-form.ts";
import { referenceGroup } from "./reference-group.ts";
import type { AssignmentGroup } from "./site-assignment.ts";
import { tabulated, wyckoffPosition } from "./wyckoff-positions.ts";

/** Points that one triplet of a Wyckoff position stands for, modulo the lattice: the x with F x = c modulo 1. */
export interface PositionPoints {
  /** A basis of the integer rows that are constant on the points; it maps Z^3 onto Z^k. */
  readonly F: readonly IntVec3[];
  /** One number for each row. */
  readonly c: readonly number[];
}

/** A Wyckoff position in the cell in use. */
export interface PositionInCell {
  readonly letter: string;
  /** Points in the cell in use. */
  readonly multiplicity: number;
  /** Points in the conventional cell of the reference setting. */
  readonly referenceMultiplicity: number;
  /** Order of the site-symmetry group. */
  readonly order: number;
  /** First triplet in the cell in use, as `groupAnswer` lists it: `x,0,1/4`. */
  readonly triplet: string;
  readonly form: AffineForm;
}

/** A group with what `identifyGroup` says of it. */
export type PositionGroup = AssignmentGroup & { readonly isReference: boolean };

/**
 * The Wyckoff positions of a group in the cell in use, in the order of their letters; triplets are worked out when they
 * are asked for.
 */
export function positionsInCell(context: PositionGroup): PositionInCell[] {
  const { group, number } = context;
  const whole = referenceGroup(number).operations.length;
  return tabulated(number).map(({ letter, multiplicity: referenceMultiplicity }, index) => {
    const order = whole / referenceMultiplicity;
    let known: AffineForm | null = null;
    return {
      letter,
      multiplicity: group.operations.length / order,
      referenceMultiplicity,
      order,
      get triplet() {
        return formatForm(this.form);
      },
      get form() {
        known ??= formInCell(context, index);
        return known;
      },
    };
  });
}

function formInCell({ group, number, toReference, isReference }: PositionGroup, index: number): AffineForm {
  const { form } = wyckoffPosition(number, index);
  return isReference ? form : plainestForm(group, formFromSetting(form, toReference));
}

/** All triplets of a position, each as the points it stands for, those equal modulo the lattice once. */
export function pointsOfPosition({ group }: AssignmentGroup, { form }: PositionInCell): PositionPoints[] {
  const found = new Map<string, PositionPoints>();
  for (const a of group.operations) {
    const image = imageOfForm(a, form);
    const { F, c, d, key } = subspaceThrough(image.t, directionsOfForm(image));
    if (!found.has(key)) found.set(key, { F, c: c.map((e) => e / d) });
  }
  return [...found.values()];
}

/** The first triplet with numbers for its letters. @param free values of x, y, z; what it does not have is not used */
export function pointOfForm({ M, t }: AffineForm, free: readonly [number, number, number]): [number, number, number] {
  const at = (i: number) => {
    const [x, y, z] = free;
    const moved = M.n[3 * i]! * x + M.n[3 * i + 1]! * y + M.n[3 * i + 2]! * z;
    return moved / M.d + t.n[i]! / t.d;
  };
  return [at(0), at(1), at(2)];
}

/** Indices of the letters x, y, z that a triplet leaves free. */
export function freeLetters({ M }: AffineForm): number[] {
  return [0, 1, 2].filter((j) => [0, 1, 2].some((i) => M.n[3 * i + j] !== 0));
}
