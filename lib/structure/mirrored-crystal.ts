import { MINUS_IDENTITY, negateVector, ratMat3, ZERO_VECTOR } from "../algebra/index.ts";
import { reduce, spaceGroup, type Transformation } from "../symmetry/index.ts";
import type { Vec3 } from "./cell.ts";
import { type Crystal, crystalOf } from "./crystal.ts";

/** The inversion through the origin, as a change to left-handed axes. */
export const INVERSION: Transformation = { P: ratMat3(MINUS_IDENTITY), p: ZERO_VECTOR };

/** The mirror image of a crystal: every atom at -x. Displacement parameters are the same. */
export function mirroredCrystal(crystal: Crystal): Crystal {
  const { name, metric, tolerance } = crystal;
  const group = spaceGroup(crystal.group.operations.map(({ W, w }) => reduce({ W, w: negateVector(w) })));
  const sites = crystal.sites.map(({ symmetry, images: _, alsoListedAs: __, sharesPositionOf: ___, ...site }) => ({
    ...site,
    position: symmetry.point.map((e) => -e + 0) as unknown as Vec3,
  }));
  return crystalOf({ name, metric, group, sites, tolerance });
}
