import {
  add,
  apply,
  IDENTITY,
  type IntMat3,
  multiply,
  type RatVec3,
  ratVec3,
  subtractVectors,
} from "../algebra/index.ts";
import type { Operation } from "./operation.ts";

/** 1 + W + ... + W^(k-1), with k the order of W: k times the projection onto what W leaves fixed. */
export function orbitSum(W: IntMat3): { readonly sum: IntMat3; readonly k: number } {
  let sum = IDENTITY;
  let power = W;
  let k = 1;
  while (!isIdentity(power)) {
    sum = add(sum, power);
    power = multiply(power, W);
    if (++k > 6) throw new RangeError(`not a crystallographic rotation: ${W.join(" ")}`);
  }
  return { sum, k };
}

function isIdentity(m: IntMat3): boolean {
  return m.every((e, i) => e === IDENTITY[i]);
}

/**
 * Translation part split into the intrinsic part (screw or glide vector, fixed by W) and the location part.
 * Source: International Tables for Crystallography A (2016), section 1.2.2.4.
 */
export function splitTranslation(a: Operation): { readonly intrinsic: RatVec3; readonly location: RatVec3 } {
  const { sum, k } = orbitSum(a.W);
  const intrinsic = ratVec3(apply(sum, a.w.n), a.w.d * k);
  return { intrinsic, location: subtractVectors(a.w, intrinsic) };
}
