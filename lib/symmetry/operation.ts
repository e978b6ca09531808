import {
  addVectors,
  apply,
  equal,
  equalVectors,
  IDENTITY,
  type IntMat3,
  inverseUnimodular,
  modOne,
  multiply,
  negateVector,
  type RatVec3,
  ratVec3,
  ZERO_VECTOR,
} from "../algebra/index.ts";

/**
 * A symmetry operation x' = W x + w on column coordinates of the cell in use.
 * W is an integer matrix of determinant 1 or -1; w is exact.
 */
export interface Operation {
  readonly W: IntMat3;
  readonly w: RatVec3;
}

export const IDENTITY_OPERATION: Operation = { W: IDENTITY, w: ZERO_VECTOR };

/** a after b: x' = a(b(x)). The translation is not reduced. */
export function compose(a: Operation, b: Operation): Operation {
  return { W: multiply(a.W, b.W), w: addVectors({ n: apply(a.W, b.w.n), d: b.w.d }, a.w) };
}

/** The inverse operation; its translation is not reduced. */
export function invert(a: Operation): Operation {
  const W = inverseUnimodular(a.W);
  return { W, w: negateVector(ratVec3(apply(W, a.w.n), a.w.d)) };
}

/** The same operation with its translation reduced to [0, 1). */
export function reduce(a: Operation): Operation {
  return { W: a.W, w: modOne(a.w) };
}

export function sameOperation(a: Operation, b: Operation): boolean {
  return equal(a.W, b.W) && equalVectors(a.w, b.w);
}

/** A string that two operations share exactly when they are equal; reduce first to compare modulo the lattice. */
export function operationKey(a: Operation): string {
  return `${a.W.join(",")}|${a.w.n.join(",")}/${a.w.d}`;
}

/** Image W x + w of a point given by floating-point coordinates. */
export function transformPoint(a: Operation, x: readonly [number, number, number]): [number, number, number] {
  const { W, w } = a;
  return [
    W[0] * x[0] + W[1] * x[1] + W[2] * x[2] + w.n[0] / w.d,
    W[3] * x[0] + W[4] * x[1] + W[5] * x[2] + w.n[1] / w.d,
    W[6] * x[0] + W[7] * x[1] + W[8] * x[2] + w.n[2] / w.d,
  ];
}
