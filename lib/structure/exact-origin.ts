import {
  addVectors,
  equal,
  IDENTITY,
  type IntMat3,
  type IntVec3,
  inverseRatMat,
  inverseUnimodular,
  lcm,
  multiply,
  multiplyRatMat,
  type Rational,
  type RatMat3,
  type RatVec3,
  rational,
  ratMat3,
  ratVec3,
  smithForm,
  subtractVectors,
  transformVector,
  vectorOf,
} from "../algebra/index.ts";
import type { Operation, SpaceGroup } from "../symmetry/index.ts";
import { floatMatrix } from "./atom-set.ts";
import { apply3, lengthOf, type Metric, type Vec3 } from "./cell.ts";

/** An origin in the cell given, made exact. */
export interface ExactOrigin {
  readonly origin: RatVec3;
  /** What separates it from the measured origin: the origin of the cell given has to be moved by this first; fractional. */
  readonly shift: Vec3;
}

/** The group found: operations about its own origin, on axes given in terms of the cell. */
export interface GroupFrame {
  readonly basis: RatMat3;
  readonly operations: readonly Operation[];
}

/** An origin nearer to a fraction than this is on it; angstrom. */
const NEAR_FRACTION = 0.02;
/** Denominators of origins in the directions that the declared group leaves open. */
const DENOMINATORS = [1, 2, 3, 4, 6, 8, 12, 16, 24, 48] as const;

/**
 * The exact origin next to a measured one at which the group found holds the declared operations exactly as declared.
 * Directions that the declared group leaves open (all of them in P 1) get the nearest small fraction, or where none is
 * near a whole number, and the rest is a shift of the origin, which the declared group permits.
 * @param measured fractional in the cell given
 */
export function exactOrigin(metric: Metric, declared: SpaceGroup, found: GroupFrame, measured: Vec3): ExactOrigin {
  const bound = boundOperations(declared, found);
  return solve(metric, found.basis, bound, measured) ?? solve(metric, found.basis, [], measured)!;
}

/** A declared operation and its translation about the origin wanted. */
interface Bound {
  readonly declared: Operation;
  /** In the cell given. */
  readonly wanted: RatVec3;
}

/** Generators of that part of the declared group which the group found contains. */
function boundOperations(declared: SpaceGroup, { basis, operations }: GroupFrame): Bound[] {
  const back = inverseRatMat(basis);
  const found = new Map(operations.map((a) => [a.W.join(), a]));
  const spanned: IntMat3[] = [IDENTITY];
  const bound: Bound[] = [];
  for (const a of declared.representatives) {
    if (spanned.some((W) => equal(W, a.W))) continue;
    const inside = multiplyRatMat(multiplyRatMat(back, ratMat3(a.W)), basis);
    const same = inside.d === 1 ? found.get(inside.n.join()) : undefined;
    if (!same) continue;
    bound.push({ declared: a, wanted: transformVector(basis, same.w) });
    span(
      spanned,
      bound.map((b) => b.declared.W),
    );
  }
  return bound;
}

function span(list: IntMat3[], generators: readonly IntMat3[]): void {
  for (let i = 0; i < list.length; i++) {
    for (const g of generators) {
      const product = multiply(list[i]!, g);
      if (!list.some((W) => equal(W, product))) list.push(product);
    }
  }
}

/** Solves (W - 1) p = wanted - declared + lattice vector for all generators; null where no p does. */
function solve(metric: Metric, basis: RatMat3, bound: readonly Bound[], measured: Vec3): ExactOrigin | null {
  const sides = bound.map((b) => rightSide(basis, b, measured));
  const d = sides.reduce((m, r) => lcm(m, r.d), 1);
  const right = sides.flatMap((r) => r.n.map((e) => e * (d / r.d)));
  const rows = bound.flatMap(({ declared: { W } }) =>
    [0, 1, 2].map((i) => [0, 1, 2].map((j) => W[3 * i + j]! - (i === j ? 1 : 0))),
  );
  const smith = rows.length > 0 ? smithForm(rows) : { u: [], d: [0, 0, 0], v: [1, 0, 0, 0, 1, 0, 0, 0, 1] };
  const v = smith.v.flat() as unknown as IntMat3;
  const near = apply3(inverseUnimodular(v), measured);
  const image = smith.u.map((row) => row.reduce((s, e, k) => s + e * right[k]!, 0));
  const fixed = [0, 1, 2].map((i) => (smith.d[i] ? rational(image[i]!, d * smith.d[i]!) : null));
  if (image.some((e, i) => e !== 0 && !smith.d[i])) return null;
  return nearestOrigin(metric, v, fixed, near);
}

function rightSide(basis: RatMat3, { declared, wanted }: Bound, measured: Vec3): RatVec3 {
  const { W, w } = declared;
  const exact = subtractVectors(wanted, w);
  const image = apply3(W, measured);
  const back = floatMatrix(inverseRatMat(basis));
  const cells = apply3(back, [0, 1, 2].map((i) => image[i]! - measured[i]! - exact.n[i]! / exact.d) as unknown as Vec3);
  const lattice = transformVector(basis, ratVec3(cells.map((e) => Math.round(e) + 0) as unknown as IntVec3));
  return addVectors(exact, lattice);
}

/** The origin v q: q as solved where it is fixed, next to the measured one elsewhere. */
function nearestOrigin(metric: Metric, v: IntMat3, fixed: readonly (Rational | null)[], near: Vec3): ExactOrigin {
  for (const denominator of [...DENOMINATORS, null]) {
    const q = near.map((e, i) => fixed[i] ?? rational(Math.round(e * (denominator ?? 1)) + 0, denominator ?? 1));
    const rest = near.map((e, i) => (fixed[i] ? 0 : e - q[i]!.n / q[i]!.d)) as unknown as Vec3;
    const shift = apply3(v, rest);
    if (denominator !== null && lengthOf(metric, shift) > NEAR_FRACTION) continue;
    return { origin: transformVector(ratMat3(v), vectorOf(q[0]!, q[1]!, q[2]!)), shift };
  }
  throw new RangeError("the list of denominators ends without a choice");
}
