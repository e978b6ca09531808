import { addVectors, apply, modOne, type RatVec3, ratVec3, subtractVectors } from "../algebra/index.ts";
import type { Operation } from "./operation.ts";
import type { SpaceGroup } from "./space-group.ts";

/** The operations that fix a point exactly, their translations such that each does so as it stands. */
export function siteOperations({ operations }: SpaceGroup, point: RatVec3): Operation[] {
  return operations.flatMap((a) => {
    const back = subtractVectors(point, exactImage(a, point)); // a lattice vector if the point is fixed modulo the lattice
    return back.d === 1 ? [{ W: a.W, w: addVectors(a.w, back) }] : [];
  });
}

/** One image of a point. */
export interface ExactImage {
  /** Each coordinate in [0, 1). */
  readonly point: RatVec3;
  /** Index of the first operation that makes it. */
  readonly operation: number;
}

/** All images of a point in the cell, in the order of the first operation that makes each. */
export function exactOrbit({ operations }: SpaceGroup, point: RatVec3): ExactImage[] {
  const found = new Map<string, ExactImage>();
  operations.forEach((a, operation) => {
    const image = modOne(exactImage(a, point));
    const key = `${image.n.join()}/${image.d}`;
    if (!found.has(key)) found.set(key, { point: image, operation });
  });
  return [...found.values()];
}

function exactImage(a: Operation, point: RatVec3): RatVec3 {
  return addVectors(ratVec3(apply(a.W, point.n), point.d), a.w);
}
