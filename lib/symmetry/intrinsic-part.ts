import { apply, type IntMat3, type RatVec3, ratVec3, subtractVectors } from "../algebra/index.ts";
import { signedOrder } from "./geometric-class.ts";
import type { Operation } from "./operation.ts";
import { powerSum } from "./rotation-axis.ts";

/** Smallest k > 0 with W^k = 1: the order of a rotation, twice an odd order for a rotoinversion. */
export function matrixOrder(W: IntMat3): number {
  const order = signedOrder(W);
  return order > 0 ? order : order % 2 === 0 ? -order : -2 * order;
}

/**
 * Translation part split into the intrinsic part (screw or glide vector, fixed by W) and the location part.
 * Source: International Tables for Crystallography A (2016), section 1.2.2.4.
 */
export function splitTranslation(a: Operation): { readonly intrinsic: RatVec3; readonly location: RatVec3 } {
  const k = matrixOrder(a.W);
  const intrinsic = ratVec3(apply(powerSum(a.W, k), a.w.n), a.w.d * k);
  return { intrinsic, location: subtractVectors(a.w, intrinsic) };
}
