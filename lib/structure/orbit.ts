import { productFinder, type SpaceGroup, transformPoint } from "../symmetry/index.ts";
import type { Vec3 } from "./cell.ts";
import type { SiteSymmetry } from "./site-symmetry.ts";

/** One image of a site in the cell. */
export interface Image {
  /** Fractional, each in [0, 1). */
  readonly position: Vec3;
  /** Index in the operations of the group of the first operation that makes this image. */
  readonly operation: number;
}

/** Distances below this, in fractions of a cell edge, come from rounding in sums of doubles, not from the structure. */
const ROUNDING = 1e-9;

/** Into [0, 1), taking what lies within rounding of 1 as 0. */
export function wrap(x: number): number {
  const r = x - Math.floor(x);
  return r > 1 - ROUNDING || r < ROUNDING ? 0 : r;
}

/**
 * All images of a site in the cell, one per left coset of its site-symmetry group, in the order of the first
 * operation that makes each. Cosets are told apart exactly; no distances are compared.
 */
export function orbitOf(group: SpaceGroup, site: SiteSymmetry): Image[] {
  const images: Image[] = [];
  if (site.operations.length === 1) {
    group.operations.forEach((a, i) => {
      images.push({ position: wrapPoint(transformPoint(a, site.point)), operation: i });
    });
    return images;
  }
  const product = productFinder(group.operations);
  const done = new Uint8Array(group.operations.length);
  group.operations.forEach((a, i) => {
    if (done[i]) return;
    images.push({ position: wrapPoint(transformPoint(a, site.point)), operation: i });
    for (let k = 0; k < site.operations.length; k++) done[product(a, site.operations[k]!)] = 1;
  });
  return images;
}

function wrapPoint(x: readonly [number, number, number]): Vec3 {
  return [wrap(x[0]), wrap(x[1]), wrap(x[2])];
}

/** Number of images in the cell: the index of the site-symmetry group. */
export function multiplicityOf(group: SpaceGroup, site: SiteSymmetry): number {
  return group.operations.length / site.operations.length;
}
