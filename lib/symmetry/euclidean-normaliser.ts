import {
  apply,
  equal,
  IDENTITY,
  type IntMat3,
  inverseUnimodular,
  modOne,
  multiply,
  negate,
  negateVector,
  type RatVec3,
  ratMat3,
  ratVec3,
  subtractVectors,
} from "../algebra/index.ts";
import { directionsOfForm, imageOfForm } from "./affine-form.ts";
import { arithmeticClassOf } from "./arithmetic-class.ts";
import { axisChanges } from "./axis-changes.ts";
import { classLattice, typeOfTranslations } from "./class-lattice.ts";
import { crystalFamily } from "./geometric-class.ts";
import type { Operation } from "./operation.ts";
import { originShift } from "./origin-shift.ts";
import { positionAt } from "./position-lookup.ts";
import { referenceGroup } from "./reference-group.ts";
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

/** Shifts t with (W - 1) t in the lattice for every W, modulo the lattice, 0 left out, short ones first. */
function shifts(number: number): Element[] {
  const lattice = classLattice(arithmeticClassOf(number));
  const { smith, primitive } = lattice;
  if (smith.v.length === 0) return [];
  const { centrings } = referenceGroup(number);
  const found = new Map<string, RatVec3>();
  for (const k of steps(smith.d)) {
    const d = k.reduce((m, _, i) => m * Math.max(1, smith.d[i]!), 1);
    const y = k.map((e, i) => (smith.d[i] ? (e * d) / smith.d[i]! : 0));
    const x = smith.v.map((row) => row[0]! * y[0]! + row[1]! * y[1]! + row[2]! * y[2]!);
    const inCell = ratVec3(apply(primitive.n, x as unknown as [number, number, number]), d * primitive.d);
    const equivalents = centrings.map((t) => modOne(subtractVectors(inCell, t))).sort(byLength);
    if (equivalents.some((t) => t.n.every((e) => e === 0))) continue;
    found.set(equivalents[0]!.n.join() + equivalents[0]!.d, equivalents[0]!);
  }
  return [...found.values()]
    .sort(byLength)
    .map((p) => ({ transformation: { P: ratMat3(IDENTITY), p }, anyCell: true }));
}

function steps(d: readonly number[]): number[][] {
  let all: number[][] = [[]];
  for (const e of d) all = all.flatMap((k) => Array.from({ length: Math.max(1, e) }, (_, i) => [...k, i]));
  return all;
}

/** Few non-zero components, then a small sum, then those along c first. */
function byLength(a: RatVec3, b: RatVec3): number {
  const size = (v: RatVec3) => v.n.filter((e) => e !== 0).length * 10 + (v.n[0] + v.n[1] + v.n[2]) / v.d;
  return size(a) - size(b) || a.n[0] / a.d - b.n[0] / b.d || a.n[1] / a.d - b.n[1] / b.d;
}

/** Changes of axes, with or without inversion, after which some shift of the origin restores the operations. */
function axisElements(number: number): Element[] {
  const parent = arithmeticClassOf(number);
  const lattice = classLattice(parent);
  const family = crystalFamily(parent.geometric);
  const group = referenceGroup(number);
  const found: Element[] = [];
  axisChanges(family).forEach((N, i) => {
    const { toPrimitive } = lattice.settings[i]!;
    const back = inverseUnimodular(N);
    const generators = parent.generators.map((G) => {
      const W = multiply(multiply(N, G), back);
      return group.representatives.find((a) => equal(a.W, W));
    });
    if (generators.some((g) => g === undefined) || !keepsCentring(N, group.centrings)) return;
    for (const sign of [1, -1] as const) {
      const translations = generators.map((g) => {
        const k = (sign * 12) / g!.w.d;
        return apply(toPrimitive, [g!.w.n[0] * k, g!.w.n[1] * k, g!.w.n[2] * k]);
      });
      const type = typeOfTranslations(lattice, translations, 12);
      if (!type || parent.types[type.index]!.number !== number) continue;
      const P = ratMat3(sign > 0 ? N : negate(N));
      const p = originShift(lattice, type.primitive, translations, 12, P, group.centrings);
      found.push({ transformation: { P, p }, anyCell: anyCell(family, N) });
    }
  });
  return found;
}

function keepsCentring(N: IntMat3, centrings: readonly RatVec3[]): boolean {
  const keys = new Set(centrings.map((t) => `${t.n.join()}/${t.d}`));
  return centrings.every((t) => {
    const image = modOne(ratVec3(apply(inverseUnimodular(N), t.n), t.d));
    return keys.has(`${image.n.join()}/${image.d}`);
  });
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
