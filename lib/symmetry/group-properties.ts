import { determinant, type IntMat3, type IntVec3, integerNullspace, negateVector } from "../algebra/index.ts";
import { arithmeticClassOf } from "./arithmetic-class.ts";
import {
  type CrystalFamily,
  crystalFamily,
  type GeometricClass,
  geometricClass,
  signedOrder,
} from "./geometric-class.ts";
import { identify } from "./identification.ts";
import type { Operation } from "./operation.ts";
import { referenceGroup } from "./reference-group.ts";

/** Names of the fourteen types of Bravais lattices; S stands for a lattice centred on one face. */
export type BravaisType =
  | "aP"
  | "mP"
  | "mS"
  | "oP"
  | "oS"
  | "oI"
  | "oF"
  | "tP"
  | "tI"
  | "hP"
  | "hR"
  | "cP"
  | "cI"
  | "cF";

/** What a space-group type is, apart from its setting; only the polar directions refer to the axes in use. */
export interface GroupProperties {
  readonly number: number;
  readonly crystalFamily: CrystalFamily;
  readonly bravaisType: BravaisType;
  /** Crystal class, `mmm`. */
  readonly geometricClass: GeometricClass;
  /** Crystal class with an inversion centre added, `4/mmm`. */
  readonly laueClass: GeometricClass;
  /** Lattice letter and oriented point group: `P mmm`, `I -4m2`, `P 321`. */
  readonly arithmeticClass: string;
  readonly centrosymmetric: boolean;
  /** Only rotations and screw rotations, so that chiral crystals may have it. */
  readonly sohncke: boolean;
  /** Number of the type of the mirror image where that is another type (P 41 and P 43), else null. */
  readonly enantiomorph: number | null;
  /** Some point has the whole point group as its site symmetry. */
  readonly symmorphic: boolean;
  /** Some direction is not equivalent to its opposite and is kept by every operation. */
  readonly polar: boolean;
  /** Basis of the directions kept by every operation, in the axes of the operations; empty where not polar. */
  readonly polarDirections: readonly IntVec3[];
}

/**
 * Properties of a space group of known type.
 * @param operations the group in the axes in use; the reference setting if left out
 * @throws RangeError outside 1 to 230
 */
export function groupProperties(number: number, operations?: readonly Operation[]): GroupProperties {
  const reference = referenceGroup(number);
  const rotations = reference.representatives.map((a) => a.W);
  const parent = arithmeticClassOf(number);
  const family = crystalFamily(parent.geometric);
  const sohncke = rotations.every((W) => determinant(W) === 1);
  const polarDirections = keptDirections((operations ?? reference.operations).map((a) => a.W));
  return {
    number,
    crystalFamily: family,
    bravaisType: bravaisType(family, parent.centring),
    geometricClass: parent.geometric,
    laueClass: laueClass(rotations),
    arithmeticClass: parent.name,
    centrosymmetric: rotations.some((W) => signedOrder(W) === -1),
    sohncke,
    enantiomorph: sohncke ? enantiomorph(number) : null,
    symmorphic: isSymmorphic(reference.operations, rotations.length),
    polar: polarDirections.length > 0,
    polarDirections,
  };
}

const FAMILY_LETTERS = {
  triclinic: "a",
  monoclinic: "m",
  orthorhombic: "o",
  tetragonal: "t",
  hexagonal: "h",
  cubic: "c",
} as const;

function bravaisType(family: CrystalFamily, centring: string): BravaisType {
  const letter = centring === "A" || centring === "C" ? "S" : centring;
  return `${FAMILY_LETTERS[family]}${letter}` as BravaisType;
}

function laueClass(rotations: readonly IntMat3[]): GeometricClass {
  const orders = rotations.map(signedOrder);
  const opposite = orders.map((n) => -n as typeof n);
  return geometricClass(orders.includes(-1) ? orders : [...orders, ...opposite])!;
}

/** The mirror image through the origin: same rotations of a group without inversions, opposite translations. */
function enantiomorph(number: number): number | null {
  const image = identify(referenceGroup(number).operations.map(({ W, w }) => ({ W, w: negateVector(w) })));
  return image.number === number ? null : image.number;
}

/** In the reference settings the origin of a symmorphic type has the whole point group as its site symmetry. */
function isSymmorphic(operations: readonly Operation[], order: number): boolean {
  return operations.filter((a) => a.w.n.every((n) => n === 0)).length === order;
}

/** Common solutions of W v = v: a basis of integer vectors. */
function keptDirections(rotations: readonly IntMat3[]): IntVec3[] {
  const rows = rotations.flatMap((W) => [0, 1, 2].map((i) => [0, 1, 2].map((j) => W[3 * i + j]! - (i === j ? 1 : 0))));
  return integerNullspace(rows, 3) as unknown as IntVec3[];
}
