import {
  apply,
  IDENTITY,
  type IntMat3,
  inverseUnimodular,
  negate,
  negateVector,
  ratMat3,
  ratVec3,
} from "../algebra/index.ts";
import { directionsOfForm, imageOfForm } from "./affine-form.ts";
import { arithmeticClassOf } from "./arithmetic-class.ts";
import { axisChanges } from "./axis-changes.ts";
import { crystalFamily } from "./geometric-class.ts";
import { normaliserShifts, normalisingShift } from "./normaliser.ts";
import type { Operation } from "./operation.ts";
import { positionAt } from "./position-lookup.ts";
import type { Transformation } from "./transformation.ts";
import { wyckoffPositions } from "./wyckoff-positions.ts";

/** A change of setting after which the group has the same operations, and what it does to the letters. */
export interface NormaliserElement {
  readonly transformation: Transformation;
  /** New letter by old one, for every position: a point of position `a` before is one of `letters.a` after. */
  readonly letters: Readonly<Record<string, string>>;
  /** False where the change exchanges axes that only a cell of special shape has alike. */
  readonly anyCell: boolean;
}

const cache = new Map<number, readonly NormaliserElement[]>();

/**
 * Changes of setting that leave all operations of the reference setting as they are, but for which some position
 * changes its letter: all origin shifts first, then changes of axes, each with one shift that goes with it; one of each
 * permutation of the letters (products of a shift and a change of axes are not repeated). The letters of a structure
 * mean something only up to these. Continuous shifts of polar groups exchange no letters and are not
 * listed; of the endless changes of monoclinic cells those with entries -1, 0, 1 are tried, and none in triclinic ones.
 * Source of the notion: International Tables for Crystallography A (2016), chapter 3.5; computed here.
 */
export function letterExchanges(number: number): readonly NormaliserElement[] {
  const known = cache.get(number);
  if (known) return known;
  const found: NormaliserElement[] = [];
  const seen = new Set<string>();
  for (const { transformation, anyCell } of [...shifts(number), ...axisElements(number)]) {
    const letters = exchange(number, transformation);
    const key = Object.entries(letters).join();
    if (seen.has(key) || Object.entries(letters).every(([from, to]) => from === to)) continue;
    seen.add(key);
    found.push({ transformation, letters, anyCell });
  }
  cache.set(number, found);
  return found;
}

type Element = Pick<NormaliserElement, "transformation" | "anyCell">;

function shifts(number: number): Element[] {
  return normaliserShifts(number).map((p) => ({ transformation: { P: ratMat3(IDENTITY), p }, anyCell: true }));
}

/** Changes of axes, with or without inversion, after which some shift of the origin restores the operations. */
function axisElements(number: number): Element[] {
  const family = crystalFamily(arithmeticClassOf(number).geometric);
  return axisChanges(family).flatMap((N) =>
    [N, negate(N)].flatMap((P): Element[] => {
      const p = normalisingShift(number, P);
      return p ? [{ transformation: { P: ratMat3(P), p }, anyCell: anyCell(family, N) }] : [];
    }),
  );
}

/** Rotations of the holohedry suit every cell; exchanges of unequal axes do not. */
function anyCell(family: ReturnType<typeof crystalFamily>, N: IntMat3): boolean {
  if (family !== "orthorhombic" && family !== "monoclinic") return true;
  return [1, 2, 3, 5, 6, 7].every((i) => N[i] === 0);
}

/** Letter of every position after the change. */
function exchange(number: number, { P, p }: Transformation): Record<string, string> {
  const W = inverseUnimodular(P.n);
  const back: Operation = { W, w: negateVector(ratVec3(apply(W, p.n), p.d)) };
  const letters: Record<string, string> = {};
  for (const { letter, form } of wyckoffPositions(number)) {
    const image = imageOfForm(back, form);
    letters[letter] = positionAt(number, image.t, directionsOfForm(image))!.letter;
  }
  return letters;
}
