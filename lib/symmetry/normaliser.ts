import {
  apply,
  determinant,
  equal,
  IDENTITY,
  type IntMat3,
  inverseRatMat,
  inverseUnimodular,
  modOne,
  multiply,
  negate,
  type RatVec3,
  ratMat3,
  ratVec3,
  subtractVectors,
} from "../algebra/index.ts";
import { arithmeticClassOf } from "./arithmetic-class.ts";
import { classLattice, typeOfTranslations } from "./class-lattice.ts";
import { originShift } from "./origin-shift.ts";
import { referenceGroup } from "./reference-group.ts";

/**
 * Origin shifts under which the group keeps all its operations: t with (W - 1) t in the lattice for every W, modulo the
 * lattice, 0 along directions in which the origin is free; short ones first, 0 left out. With 0 they are the discrete
 * translations of the Euclidean normaliser.
 * @param number type of the space group, in its reference setting
 */
export function normaliserShifts(number: number): RatVec3[] {
  const { smith, primitive } = classLattice(arithmeticClassOf(number));
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
  return [...found.values()].sort(byLength);
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

/**
 * The origin shift p with which a change of axes P leaves all operations of the reference setting as they are, or null
 * where none does. All others that do differ from it by a shift of the group or along its free directions.
 * @param P integer, determinant 1 or -1
 */
export function normalisingShift(number: number, P: IntMat3): RatVec3 | null {
  const parent = arithmeticClassOf(number);
  const group = referenceGroup(number);
  const sign = determinant(P);
  const N = sign > 0 ? P : negate(P);
  const back = inverseUnimodular(N);
  const generators = parent.generators.map((G) => {
    const W = multiply(multiply(N, G), back);
    return group.representatives.find((a) => equal(a.W, W));
  });
  if (generators.some((g) => g === undefined) || !keepsCentring(back, group.centrings)) return null;
  const lattice = classLattice(parent);
  const toPrimitive = multiply(inverseRatMat(ratMat3(lattice.primitive.n, lattice.primitive.d)).n, back);
  const translations = generators.map((g) => {
    const k = (sign * 12) / g!.w.d;
    return apply(toPrimitive, [g!.w.n[0] * k, g!.w.n[1] * k, g!.w.n[2] * k]);
  });
  const type = typeOfTranslations(lattice, translations, 12);
  if (!type || parent.types[type.index]!.number !== number) return null;
  if (equal(P, IDENTITY)) return ratVec3([0, 0, 0]);
  return originShift(lattice, type.primitive, translations, 12, ratMat3(P), group.centrings);
}

function keepsCentring(back: IntMat3, centrings: readonly RatVec3[]): boolean {
  const keys = new Set(centrings.map((t) => `${t.n.join()}/${t.d}`));
  return centrings.every((t) => {
    const image = modOne(ratVec3(apply(back, t.n), t.d));
    return keys.has(`${image.n.join()}/${image.d}`);
  });
}
