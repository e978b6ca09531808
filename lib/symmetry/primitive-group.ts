import {
  apply,
  type IntMat3,
  type IntVec3,
  inverseRatMat,
  inverseUnimodular,
  lcm,
  mod,
  multiply,
  type RatMat3,
} from "../algebra/index.ts";
import type { SpaceGroup } from "./space-group.ts";

/** A space group on primitive axes, one operation per rotation part, so that its lattice is Z^3. */
export interface PrimitiveGroup {
  readonly operations: readonly PrimitiveOperation[];
  /** Common denominator of all translations. */
  readonly d: number;
  /** Primitive axes in terms of the cell of the group: columns. */
  readonly basis: RatMat3;
  /** Inverse of `basis`, integer: from coordinates of the cell to primitive ones. */
  readonly toPrimitive: IntMat3;
}

export interface PrimitiveOperation {
  readonly W: IntMat3;
  readonly inverse: IntMat3;
  /** Numerators over the common denominator, in [0, d). */
  readonly w: IntVec3;
}

const cache = new WeakMap<SpaceGroup, PrimitiveGroup>();

/** The group on the axes `group.primitive`, operations in the order of its representatives; computed once. */
export function primitiveGroup(group: SpaceGroup): PrimitiveGroup {
  const known = cache.get(group);
  if (known) return known;
  const basis = group.primitive;
  const inverse = inverseRatMat(basis);
  if (inverse.d !== 1) throw new RangeError("the cell is not spanned by lattice vectors");
  const toPrimitive = inverse.n;
  const d = group.representatives.reduce((m, a) => lcm(m, a.w.d), 1);
  const operations = group.representatives.map((a): PrimitiveOperation => {
    const W = multiply(multiply(toPrimitive, a.W), basis.n).map((e) => e / basis.d + 0) as unknown as IntMat3;
    const k = d / a.w.d;
    const [x, y, z] = apply(toPrimitive, a.w.n);
    return { W, inverse: inverseUnimodular(W), w: [mod(x * k, d), mod(y * k, d), mod(z * k, d)] };
  });
  const fresh = { operations, d, basis, toPrimitive };
  cache.set(group, fresh);
  return fresh;
}
