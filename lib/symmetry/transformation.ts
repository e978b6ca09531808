import {
  addVectors,
  inverseRatMat,
  multiplyRatMat,
  negateVector,
  RAT_IDENTITY,
  type RatMat3,
  type RatVec3,
  ratMat3,
  subtractVectors,
  transformVector,
  ZERO_VECTOR,
} from "../algebra/index.ts";
import type { Operation } from "./operation.ts";

/**
 * Change of setting (P, p): (a', b', c') = (a, b, c) P, origin moved by p in the old basis, so x = P x' + p.
 * Source: International Tables for Crystallography A (2016), section 1.5.1.
 */
export interface Transformation {
  readonly P: RatMat3;
  readonly p: RatVec3;
}

export const IDENTITY_TRANSFORMATION: Transformation = { P: RAT_IDENTITY, p: ZERO_VECTOR };

/** First a, then b (b is given in the basis that a leads to): (Pa Pb, Pa pb + pa). */
export function chain(a: Transformation, b: Transformation): Transformation {
  return { P: multiplyRatMat(a.P, b.P), p: addVectors(transformVector(a.P, b.p), a.p) };
}

/** The way back: (P^-1, -P^-1 p). */
export function reverse(t: Transformation): Transformation {
  const P = inverseRatMat(t.P);
  return { P, p: negateVector(transformVector(P, t.p)) };
}

/**
 * The operation in the new setting, W' = P^-1 W P, w' = P^-1 (W p + w - p); its translation is not reduced.
 * Returns null where W' is not an integer matrix, that is, where the new lattice is not invariant under W.
 */
export function transformOperation(
  a: Operation,
  t: Transformation,
  back: Transformation = reverse(t),
): Operation | null {
  const W = ratMat3(a.W);
  const P = multiplyRatMat(multiplyRatMat(back.P, W), t.P);
  if (P.d !== 1) return null;
  const moved = subtractVectors(addVectors(transformVector(W, t.p), a.w), t.p);
  return { W: P.n, w: transformVector(back.P, moved) };
}
