import type { IntVec3, RatVec3 } from "../algebra/index.ts";
import { directionsOfForm } from "./affine-form.ts";
import { subspaceThrough } from "./affine-subspace.ts";
import { positionAt } from "./position-lookup.ts";

/** A set of fixed points in its place among the positions of a type. */
export interface PlacedPoints {
  readonly letter: string;
  /** Whether they are, up to whole cells, the points of the first triplet that International Tables list. */
  readonly first: boolean;
}

/**
 * The position that the fixed points of a site-symmetry group belong to, in the reference setting.
 * @param order of the site-symmetry group
 * @throws RangeError if they are the fixed points of no site-symmetry group of that order
 */
export function placedPoints(
  number: number,
  point: RatVec3,
  directions: readonly IntVec3[],
  order: number,
): PlacedPoints {
  const position = positionAt(number, point, directions, order);
  if (!position) throw new RangeError(`no position of type ${number} has these points`);
  const { letter, form } = position;
  const own = subspaceThrough(point, directions).key;
  return { letter, first: own === subspaceThrough(form.t, directionsOfForm(form)).key };
}
